/** One way by which a store exchanges with something: how strongly, and towards which value. */
export type Exchange = readonly [conductance: number, towards: number];

/**
 * Lets a store of heat or water settle for a while towards what it exchanges with, plus a constant inflow.
 *
 * The neighbours are held still meanwhile and the store follows its exact exponential, so that a step far longer than the
 * store's own time constant is as stable as a short one.
 *
 * @param value - The store's level now.
 * @param capacity - Inflow times seconds that lifts the level by one.
 * @param seconds - Length of the step.
 * @param exchanges - Conductances, at least one above 0, and the levels they pull towards.
 * @param inflow - Constant inflow, in conductance times level.
 * @returns The level at the end of the step.
 */
export function settle(
  value: number,
  capacity: number,
  seconds: number,
  exchanges: readonly Exchange[],
  inflow = 0,
): number {
  let conductance = 0;
  let pull = inflow;
  // By index: taking the pairs apart by pattern cost an eighth of the whole model's time.
  for (const exchange of exchanges) {
    conductance += exchange[0];
    pull += exchange[0] * exchange[1];
  }
  const target = pull / conductance;
  return target + (value - target) * Math.exp((-seconds * conductance) / capacity);
}
