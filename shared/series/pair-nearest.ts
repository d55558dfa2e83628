import { requireIncreasing, type Series } from './series';

/** A sample with the value that another series had nearest to its time. */
export interface Pair {
  /** Instant of the sample [ms since epoch]. */
  readonly at: number;
  /** The sample's value. */
  readonly value: number;
  /** Value of the other series' nearest sample. */
  readonly other: number;
}

/**
 * Pairs samples pointwise with those of another series: humidity readings with their shelf's temperatures.
 *
 * @param series - The series whose instants the pairs keep.
 * @param others - The series to look in.
 * @param withinMs - Longest distance in time of a pair [ms]; the sensors' expected interval.
 * @returns Pairs in order of time; a sample without a partner near enough is left out. Of two equally near the earlier
 *   counts. One sample of `others` may serve several pairs.
 * @throws {@link DomainError} `UNORDERED_SERIES` unless both series are strictly increasing in time.
 */
export function pairNearest(series: Series, others: Series, withinMs: number): Pair[] {
  requireIncreasing(series);
  requireIncreasing(others);
  const pairs: Pair[] = [];
  let index = 0;
  for (const { at, value } of series) {
    while (distanceMs(others, index + 1, at) < distanceMs(others, index, at)) {
      index += 1;
    }
    const nearest = others[index];
    if (nearest !== undefined && Math.abs(nearest.at - at) <= withinMs) {
      pairs.push({ at, value, other: nearest.value });
    }
  }
  return pairs;
}

function distanceMs(series: Series, index: number, at: number): number {
  const sample = series[index];
  return sample === undefined ? Infinity : Math.abs(sample.at - at);
}
