import type { UnjudgedSensor } from './second-look-store';

/**
 * Parts sensors so that each part can be looked at in a transaction of its own: a long past takes seconds, for which
 * only the sensors that hang together with it, by shelf or device, should be held.
 *
 * @param unjudged - Sensors that wait for their second look.
 * @returns Those without a long past together and first, then each long past with what hangs together with it.
 */
export function looksApart(unjudged: readonly UnjudgedSensor[]): UnjudgedSensor[][] {
  const apart: UnjudgedSensor[][] = [];
  let left = [...unjudged];
  for (let long = left.find(hasLongPast); long !== undefined; long = left.find(hasLongPast)) {
    const together = hangingTogether(long, left);
    apart.push(together);
    left = left.filter((sensor) => !together.includes(sensor));
  }
  return left.length > 0 ? [left, ...apart] : apart;
}

function hasLongPast({ isLong }: UnjudgedSensor): boolean {
  return isLong;
}

function hangingTogether(first: UnjudgedSensor, among: readonly UnjudgedSensor[]): UnjudgedSensor[] {
  let together = [first];
  for (;;) {
    const shelfIds = new Set(together.flatMap(({ shelfId }) => shelfId ?? []));
    const deviceIds = new Set(together.flatMap(({ deviceId }) => deviceId ?? []));
    const wider = among.filter(
      (sensor) =>
        sensor === first || shelfIds.has(sensor.shelfId ?? '') || deviceIds.has(sensor.deviceId ?? ''),
    );
    if (wider.length === together.length) return together;
    together = wider;
  }
}
