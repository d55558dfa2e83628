import { valueBetween } from './linear-segment';
import { requireAfter, requireWindow, type Series, type TimeWindow } from './series';

/**
 * Walks the straight lines between neighbouring samples as far as they lie in a window. This is the one place that says
 * what a gap is: a pair further apart than `maxGapMs` is not connected, and the time between is not covered.
 *
 * @param series - Samples, including those just outside the window, whose lines cross its edges.
 * @param window - Half-open window; lines are cut at its edges by interpolation.
 * @param maxGapMs - Longest interval between two samples that still counts as measured [ms].
 * @param visit - Receives each line's values at start and end and its duration [ms], above 0.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a window that does not run forward, `UNORDERED_SERIES` for samples
 *   that are not strictly increasing.
 */
export function forEachCoveredSegment(
  series: Series,
  window: TimeWindow,
  maxGapMs: number,
  visit: (fromValue: number, toValue: number, durationMs: number) => void,
): void {
  requireWindow(window);
  let previousAt = -Infinity;
  let previousValue = 0;
  for (const { at, value } of series) {
    requireAfter(previousAt, at);
    const startAt = Math.max(previousAt, window.from);
    const endAt = Math.min(at, window.to);
    if (startAt < endAt && at - previousAt <= maxGapMs) {
      const startValue =
        startAt === previousAt ? previousValue : valueBetween(previousAt, previousValue, at, value, startAt);
      const endValue = endAt === at ? value : valueBetween(previousAt, previousValue, at, value, endAt);
      visit(startValue, endValue, endAt - startAt);
    }
    previousAt = at;
    previousValue = value;
  }
}
