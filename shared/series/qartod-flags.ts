/** Primary flags of QARTOD: 1 pass, 2 not evaluated, 3 suspect, 4 fail. */
export type QartodFlag = 1 | 2 | 3 | 4;

/**
 * The gross range test as published.
 *
 * @param values - Values of one sensor.
 * @param limits - `sensor`: what it can measure; `user`: what is expected. All limits included.
 * @returns A flag for each value: 4 outside the sensor's range, or for NaN; 3 outside the user's; else 1.
 *
 * @remarks
 * Source: US IOOS, QARTOD manual for real-time quality control of wind data, gross range test.
 */
export function grossRangeFlags(
  values: readonly number[],
  limits: { readonly sensor: readonly [number, number]; readonly user: readonly [number, number] },
): QartodFlag[] {
  const isWithin = (value: number, [low, high]: readonly [number, number]): boolean =>
    value >= low && value <= high;
  return values.map((value) => {
    if (!isWithin(value, limits.sensor)) {
      return 4;
    }
    return isWithin(value, limits.user) ? 1 : 3;
  });
}

/**
 * The spike test as published: how far each value is from the mean of its two neighbours. It needs the value after, and
 * flags a spike's neighbours too, so it serves displays that look back and not the check on arrival.
 *
 * @param values - Values of one sensor at even intervals.
 * @param thresholds - Distances above which a value is suspect or failed, in the unit of the values.
 * @returns A flag for each value; 2 for the first and the last, which lack a neighbour.
 *
 * @remarks
 * Source: US IOOS, QARTOD manual for real-time quality control of wind data, spike test.
 */
export function spikeFlags(
  values: readonly number[],
  thresholds: { readonly suspect: number; readonly fail: number },
): QartodFlag[] {
  return values.map((value, index) => {
    const before = values[index - 1];
    const after = values[index + 1];
    if (before === undefined || after === undefined) {
      return 2;
    }
    const distance = Math.abs(value - (before + after) / 2);
    if (distance > thresholds.fail) {
      return 4;
    }
    return distance > thresholds.suspect ? 3 : 1;
  });
}
