/**
 * Value of the straight line between two samples at an instant between them.
 *
 * @param fromAt - Instant of the first sample.
 * @param fromValue - Its value.
 * @param toAt - Instant of the second sample, after the first.
 * @param toValue - Its value.
 * @param at - Instant from `fromAt` to `toAt`.
 * @returns The interpolated value.
 */
export function valueBetween(
  fromAt: number,
  fromValue: number,
  toAt: number,
  toValue: number,
  at: number,
): number {
  return fromValue + ((toValue - fromValue) * (at - fromAt)) / (toAt - fromAt);
}

/**
 * Share of a straight line that lies at or above a threshold.
 *
 * @param fromValue - Value at the start of the line.
 * @param toValue - Value at its end.
 * @param threshold - The threshold, in the same unit.
 * @returns Share of the line's duration, 0 to 1. A level line on the threshold counts as above it.
 */
export function shareAtOrAbove(fromValue: number, toValue: number, threshold: number): number {
  const low = Math.min(fromValue, toValue);
  const high = Math.max(fromValue, toValue);
  if (low >= threshold) {
    return 1;
  }
  return high > threshold ? (high - threshold) / (high - low) : 0;
}

/**
 * Mean of `max(0, value − threshold)` along a straight line.
 *
 * @param fromValue - Value at the start of the line.
 * @param toValue - Value at its end.
 * @param threshold - The threshold, in the same unit.
 * @returns Mean excess over the threshold, at least 0.
 */
export function meanExcess(fromValue: number, toValue: number, threshold: number): number {
  const low = Math.min(fromValue, toValue);
  const high = Math.max(fromValue, toValue);
  if (low >= threshold) {
    return (low + high) / 2 - threshold;
  }
  // The part above is a triangle: its height times half its share of the duration.
  return high > threshold ? (high - threshold) ** 2 / (2 * (high - low)) : 0;
}
