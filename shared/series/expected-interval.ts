/**
 * Longest step between two readings that still counts as measured: one reading may be lost, two in a row make a gap.
 * Common practice, no source.
 *
 * @param expectedIntervalS - The sensor's expected interval [s], above 0.
 * @returns Longest step [ms].
 */
export function maxGapMs(expectedIntervalS: number): number {
  return expectedIntervalS * 2_500;
}

/**
 * When a sensor counts as silent: after three missed readings, but not before half an hour. Common practice, no source.
 *
 * @param expectedIntervalS - The sensor's expected interval [s], above 0.
 * @returns Time without a reading [ms].
 */
export function silentAfterMs(expectedIntervalS: number): number {
  return Math.max(30 * 60_000, expectedIntervalS * 3_000);
}
