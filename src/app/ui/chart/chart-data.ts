import type { WantedRange } from '@shared/format/standing';

/**
 * One drawn point: instant [ms since the epoch], mean, lowest and highest value of the time it stands for. A single
 * reading has all three the same; null is a gap.
 */
export type ChartPoint = readonly [at: number, mean: number | null, low: number | null, high: number | null];

/** One line of a chart, points in order of time. */
export interface ChartLine {
  readonly name: string;
  readonly unit: string;
  readonly decimals: number;
  readonly points: readonly ChartPoint[];
}

/** A span of time [ms since the epoch], half-open. */
export interface ChartSpan {
  readonly from: number;
  readonly to: number;
}

/** The wanted range over a span; spans follow each other as lamps go on and off. */
export type WantedSpan = ChartSpan & WantedRange;

/** Something that happened: a watering, a count, a move, an alert. */
export interface ChartMark {
  readonly at: number;
  /** Name of a Material symbol. */
  readonly icon: string;
  readonly text: string;
}

/** A limit that was passed from one instant to another, in the unit of the first line. */
export interface ChartLimit extends ChartSpan {
  readonly value: number;
  readonly isUpper: boolean;
}

/** From the first to the last point of all lines; null when there is none. */
export function spanOfLines(lines: readonly ChartLine[]): ChartSpan | null {
  const ends = lines.flatMap(({ points }) => {
    const [first, last] = [points[0], points.at(-1)];
    return first === undefined || last === undefined ? [] : [first[0], last[0]];
  });
  return ends.length === 0 ? null : { from: Math.min(...ends), to: Math.max(...ends) };
}
