import { forEachCoveredSegment } from './covered-segments';
import { shareAtOrAbove } from './linear-segment';
import type { Series, TimeWindow } from './series';

/** Limits of a wanted range, both inclusive; `null` leaves that side open. */
export interface ValueRange {
  readonly low: number | null;
  readonly high: number | null;
}

/** What a window's samples say, weighted by time. */
export interface TimeWeightedStatistics {
  /** Samples in the window. */
  readonly count: number;
  /** Time that the samples speak for [ms]: all of the window but its gaps. */
  readonly coveredMs: number;
  /** Covered share of the window, 0 to 1. */
  readonly coverage: number;
  /** Lowest sample in the window; `null` without samples. */
  readonly min: number | null;
  /** Highest sample in the window; `null` without samples. */
  readonly max: number | null;
  /** Time-weighted mean; `null` where nothing is covered, even if single samples exist. */
  readonly mean: number | null;
  /** Covered time within the range, limits included [ms]. */
  readonly inRangeMs: number;
  /** Covered time below the range [ms]. */
  readonly belowMs: number;
  /** Covered time above the range [ms]. */
  readonly aboveMs: number;
}

const UNBOUNDED: ValueRange = { low: null, high: null };

/**
 * Statistics of a series over a window, with values in between taken from straight lines between neighbours.
 *
 * @param series - Samples, including the neighbours just outside the window where they are known: the line that crosses
 *   an edge counts as far as it lies inside.
 * @param options - The half-open window [ms since epoch]; `maxGapMs`, the longest interval between samples that is not a
 *   gap [ms]; and the wanted range, open on both sides unless given.
 * @returns The statistics. Extremes are those of samples in the window, not of interpolated edges.
 * @throws {@link DomainError} `INVALID_ARGUMENT` unless `from` precedes `to`; `UNORDERED_SERIES` unless samples are
 *   strictly increasing in time.
 */
export function timeWeightedStatistics(
  series: Series,
  options: TimeWindow & { readonly maxGapMs: number; readonly range?: ValueRange },
): TimeWeightedStatistics {
  const { low, high } = options.range ?? UNBOUNDED;
  let coveredMs = 0;
  let integral = 0;
  let belowMs = 0;
  let aboveMs = 0;
  forEachCoveredSegment(series, options, options.maxGapMs, (fromValue, toValue, durationMs) => {
    coveredMs += durationMs;
    integral += ((fromValue + toValue) / 2) * durationMs;
    if (low !== null) {
      belowMs += (1 - shareAtOrAbove(fromValue, toValue, low)) * durationMs;
    }
    if (high !== null) {
      // Mirrored, so that time exactly on the upper limit is in range.
      aboveMs += (1 - shareAtOrAbove(-fromValue, -toValue, -high)) * durationMs;
    }
  });
  return {
    ...extremesInWindow(series, options),
    coveredMs,
    coverage: coveredMs / (options.to - options.from),
    mean: coveredMs === 0 ? null : integral / coveredMs,
    // Shares of a line are fractions; their rounding must not leave a negative time.
    inRangeMs: Math.max(0, coveredMs - belowMs - aboveMs),
    belowMs,
    aboveMs,
  };
}

function extremesInWindow(
  series: Series,
  window: TimeWindow,
): Pick<TimeWeightedStatistics, 'count' | 'min' | 'max'> {
  let count = 0;
  let min = Infinity;
  let max = -Infinity;
  for (const { at, value } of series) {
    if (at >= window.from && at < window.to) {
      count += 1;
      min = value < min ? value : min;
      max = value > max ? value : max;
    }
  }
  return count === 0 ? { count, min: null, max: null } : { count, min, max };
}
