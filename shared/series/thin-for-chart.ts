import { requireInRange } from '../errors/domain-error';
import { requireIncreasing, type Sample, type Series } from './series';

/** A point of a drawn line; a `null` value breaks the line. */
export interface ChartPoint {
  /** Instant [ms since epoch]. */
  readonly at: number;
  /** Value in the unit of the series, or `null` for a break. */
  readonly value: number | null;
}

/** Samples drawn as one, by their extremes. */
interface Bucket {
  readonly key: number;
  low: Sample;
  high: Sample;
  last: Sample;
}

/** Points that one bucket can come to: its lowest and highest sample, and a break before them. */
const POINTS_PER_BUCKET = 3;

/** The first and the last sample, which are always kept, and a break before the last. */
const POINTS_AT_ENDS = 3;

/**
 * Thins a series to what a chart can show, without flattening it.
 *
 * @param series - Samples of one quantity.
 * @param options - `maxPoints`, the most points to return, breaks included, at least 6; `maxGapMs`, the longest
 *   interval between samples that is still drawn as a line [ms].
 * @returns Points in order of time. A series that is short enough comes back whole, with a break in the middle of each
 *   gap. Otherwise time is cut into equal buckets, of which each gives its lowest and its highest sample; a gap within
 *   one bucket, narrower than its points are apart, is not broken.
 * @throws {@link DomainError} `OUT_OF_RANGE` for fewer than 6 points, `UNORDERED_SERIES` unless samples are strictly
 *   increasing in time.
 */
export function thinForChart(
  series: Series,
  options: { readonly maxPoints: number; readonly maxGapMs: number },
): ChartPoint[] {
  const { maxPoints, maxGapMs } = options;
  requireInRange('maxPoints', maxPoints, POINTS_PER_BUCKET + POINTS_AT_ENDS, Infinity);
  requireIncreasing(series);
  const isGap = (before: Sample, after: Sample): boolean => after.at - before.at > maxGapMs;
  const bucketOf =
    series.length + countGaps(series, isGap) <= maxPoints ? ownBucket : timeBuckets(series, maxPoints);

  const points: ChartPoint[] = [];
  let bucket: Bucket | null = null;
  for (const [index, sample] of series.entries()) {
    const key = bucketOf(sample, index);
    if (bucket === null || bucket.key !== key) {
      pushExtremes(points, bucket);
      if (bucket !== null && isGap(bucket.last, sample)) {
        points.push({ at: (bucket.last.at + sample.at) / 2, value: null });
      }
      bucket = { key, low: sample, high: sample, last: sample };
      continue;
    }
    bucket.low = sample.value < bucket.low.value ? sample : bucket.low;
    bucket.high = sample.value > bucket.high.value ? sample : bucket.high;
    bucket.last = sample;
  }
  pushExtremes(points, bucket);
  return points;
}

function ownBucket(_sample: Sample, index: number): number {
  return index;
}

/** Equal spans of time, with one of their own for the first and the last sample. */
function timeBuckets(series: Series, maxPoints: number): (sample: Sample, index: number) => number {
  const count = Math.floor((maxPoints - POINTS_AT_ENDS) / POINTS_PER_BUCKET);
  const lastIndex = series.length - 1;
  const startAt = series[0]?.at ?? 0;
  const spanMs = (series[lastIndex]?.at ?? 0) - startAt;
  return ({ at }, index) => {
    if (index === 0) {
      return -1;
    }
    return index === lastIndex ? count : Math.min(count - 1, Math.floor((count * (at - startAt)) / spanMs));
  };
}

function countGaps(series: Series, isGap: (before: Sample, after: Sample) => boolean): number {
  return series.reduce((gaps, sample, index) => {
    const before = series[index - 1];
    return before !== undefined && isGap(before, sample) ? gaps + 1 : gaps;
  }, 0);
}

function pushExtremes(points: ChartPoint[], bucket: Bucket | null): void {
  if (bucket === null) {
    return;
  }
  const { low, high } = bucket;
  if (low === high) {
    points.push(low);
  } else {
    points.push(...(low.at < high.at ? [low, high] : [high, low]));
  }
}
