import type { ChartSpan } from './chart-data';

const shortestMs = 10 * 60_000;

/** The span that ECharts shows now, from its option; null when it has none. */
export function spanShownBy(option: unknown): ChartSpan | null {
  const zoom = (option as { dataZoom?: { startValue?: number; endValue?: number }[] } | undefined)
    ?.dataZoom?.[0];
  const { startValue, endValue } = zoom ?? {};
  return startValue === undefined || endValue === undefined ? null : { from: startValue, to: endValue };
}

/** Whether two spans are drawn alike: ECharts keeps its zoom in per cent, which rounds. */
export function isSameSpan(one: ChartSpan, other: ChartSpan): boolean {
  const tolerance = (one.to - one.from) / 10_000;
  return Math.abs(one.from - other.from) <= tolerance && Math.abs(one.to - other.to) <= tolerance;
}

/** A span around the same middle, longer or shorter, kept within the whole and to ten minutes or more. */
export function zoomedSpan(shown: ChartSpan, whole: ChartSpan, factor: number): ChartSpan {
  const length = Math.max(shortestMs, (shown.to - shown.from) * factor);
  const middle = (shown.from + shown.to) / 2;
  return kept(middle - length / 2, length, whole);
}

/** A span of the same length, moved by a share of it and kept within the whole. */
export function movedSpan(shown: ChartSpan, whole: ChartSpan, share: number): ChartSpan {
  const length = shown.to - shown.from;
  return kept(shown.from + length * share, length, whole);
}

function kept(from: number, length: number, whole: ChartSpan): ChartSpan {
  const fitting = Math.min(length, whole.to - whole.from);
  const start = Math.min(Math.max(from, whole.from), whole.to - fitting);
  return { from: start, to: start + fitting };
}
