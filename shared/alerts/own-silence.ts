/** A stretch without readings [ms since 1970 UTC]: from the reading before it to the one after it. */
export interface Silence {
  readonly from: number;
  readonly to: number;
}

/**
 * The longest time that a sensor was silent while its device spoke. A device that lost its power silences all its
 * sensors; that is one alert about the device, so a sensor counts as silent only for what is left.
 *
 * @param silence - Of the sensor; up to now while it lasts.
 * @param ofDevice - Silences of its device, in order.
 * @returns The longest stretch of the sensor's silence in none of the device's [ms].
 */
export function longestOwnSilenceMs({ from, to }: Silence, ofDevice: readonly Silence[]): number {
  let longestMs = 0;
  let spokenFrom = from;
  for (const device of ofDevice) {
    if (device.to <= from || device.from >= to) continue;
    longestMs = Math.max(longestMs, device.from - spokenFrom);
    spokenFrom = Math.max(spokenFrom, device.to);
  }
  return Math.max(longestMs, to - spokenFrom);
}
