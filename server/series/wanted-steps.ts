import type { LampInterval } from '@shared/alerts/lamp-plan';
import type { WantedRange } from '@shared/contracts/rooms';

/** A stretch with one wanted range [ms]. */
export interface WantedStep {
  readonly from: number;
  readonly to: number;
  readonly low: number | null;
  readonly high: number | null;
}

/**
 * The wanted range of a quantity over a span, as it steps with the planned lamps.
 *
 * @param wanted - The shelf's range; undefined gives no steps.
 * @param lamps - Planned light in order.
 * @param from - Start [ms], inclusive.
 * @param to - End [ms], exclusive.
 * @returns Steps that touch and fill the span.
 */
export function wantedSteps(
  wanted: WantedRange | undefined,
  lamps: readonly LampInterval[],
  from: number,
  to: number,
): WantedStep[] {
  if (wanted === undefined) return [];
  const steps: WantedStep[] = [];
  let at = from;
  const add = (until: number, limits: WantedRange['lampsOn']): void => {
    const end = Math.min(until, to);
    if (end <= at) return;
    steps.push({ from: at, to: end, low: limits.low, high: limits.high });
    at = end;
  };
  for (const { onAt, offAt } of lamps) {
    add(onAt, wanted.lampsOff);
    add(offAt, wanted.lampsOn);
  }
  add(to, wanted.lampsOff);
  return steps;
}
