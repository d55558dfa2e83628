import { formatValue } from '@shared/format/numbers';
import { formatDayAndTime } from '@shared/format/room-time';
import { standing } from '@shared/format/standing';
import { spanOfLines, type ChartLine, type WantedSpan } from './chart-data';

/** What a chart shows, in words, for those who cannot see it. @param zone - IANA name of the room's time zone. */
export function chartSummary(
  lines: readonly ChartLine[],
  wanted: readonly WantedSpan[],
  zone: string,
): string {
  const span = spanOfLines(lines);
  if (span === null) return 'Chart without readings.';
  const time = `Chart from ${formatDayAndTime(span.from, zone)} to ${formatDayAndTime(span.to, zone)}.`;
  return [time, ...lines.map((line, index) => lineSummary(line, index === 0 ? wanted : []))].join(' ');
}

function lineSummary({ name, unit, decimals, points }: ChartLine, wanted: readonly WantedSpan[]): string {
  let [lowest, highest] = [Infinity, -Infinity];
  let last: readonly [at: number, value: number] | null = null;
  for (const [at, mean, low, high] of points) {
    if (mean === null) continue;
    lowest = Math.min(lowest, low ?? mean);
    highest = Math.max(highest, high ?? mean);
    last = [at, mean];
  }
  if (last === null) return `${name}: no readings.`;
  const say = (value: number): string => formatValue(value, unit, decimals);
  return `${name}: last ${say(last[1])}${judged(last, wanted)}, lowest ${say(lowest)}, highest ${say(highest)}.`;
}

function judged([at, value]: readonly [number, number], wanted: readonly WantedSpan[]): string {
  const range = wanted.find(({ from, to }) => at >= from && at <= to);
  if (range === undefined) return '';
  const { side } = standing(value, range);
  return side === 'inside' ? ', within the wanted range' : `, ${side} the wanted range`;
}
