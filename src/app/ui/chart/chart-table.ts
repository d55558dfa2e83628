import { csvLine } from '@shared/logger-files/csv-writing';
import { formatNumber, noValue } from '@shared/format/numbers';
import { formatDayAndTime } from '@shared/format/room-time';
import type { ChartLine, ChartPoint } from './chart-data';

/** A chart's numbers, few enough to be read through. */
export interface ChartTable {
  readonly columns: readonly string[];
  readonly rows: readonly { readonly when: string; readonly cells: readonly string[] }[];
}

const mostRows = 48;

/**
 * The numbers of a chart, at most 48 rows: with more points each row is a stretch of time with what was lowest and
 * highest in it.
 *
 * @param zone - IANA name of the room's time zone.
 */
export function chartTable(lines: readonly ChartLine[], zone: string): ChartTable {
  const instants = everyInstant(lines);
  const size = Math.max(1, Math.ceil(instants.length / mostRows));
  const columns = lines.map(({ name, unit }) => `${name}, ${unit}`);
  const starts = instants.filter((_, index) => index % size === 0);
  const cells = lines.map((line) =>
    stretches(line.points, starts).map((points) => extent(points, line.decimals)),
  );
  return {
    columns,
    rows: starts.map((at, row) => ({
      when: formatDayAndTime(at, zone),
      cells: cells.map((column) => column[row] ?? noValue),
    })),
  };
}

function everyInstant(lines: readonly ChartLine[]): readonly number[] {
  return [...new Set(lines.flatMap(({ points }) => points.map(([at]) => at)))].sort((a, b) => a - b);
}

/** The points from each start up to the next. */
function stretches(
  points: readonly ChartPoint[],
  starts: readonly number[],
): readonly (readonly ChartPoint[])[] {
  let next = 0;
  return starts.map((_, row) => {
    const first = next;
    const end = starts[row + 1] ?? Infinity;
    while ((points[next]?.[0] ?? Infinity) < end) next += 1;
    return points.slice(first, next);
  });
}

function extent(points: readonly ChartPoint[], decimals: number): string {
  const values = points
    .flatMap((point) => point.slice(1))
    .filter((value) => value !== null && value !== undefined);
  if (values.length === 0) return noValue;
  const low = formatNumber(Math.min(...values), decimals);
  const high = formatNumber(Math.max(...values), decimals);
  return low === high ? low : `${low} to ${high}`;
}

/** Every point of a chart as a CSV file (RFC 4180), a row an instant. */
export function chartCsv(lines: readonly ChartLine[], zone: string): string {
  const byInstant = lines.map(({ points }) => new Map(points.map((point) => [point[0], point])));
  const rows = everyInstant(lines).map((at) =>
    csvLine([
      new Date(at).toISOString(),
      formatDayAndTime(at, zone),
      ...byInstant.flatMap((points) => {
        const [, mean = null, low = null, high = null] = points.get(at) ?? [];
        return [mean, low, high];
      }),
    ]),
  );
  const names = lines.flatMap(({ name, unit }) =>
    ['mean', 'lowest', 'highest'].map((part) => `${name} ${part} [${unit}]`),
  );
  return csvLine(['Time (UTC)', `Time (${zone})`, ...names]) + rows.join('');
}
