import { formatDayAndYear, formatShortDay, formatTime } from '@shared/format/room-time';
import type { ChartSpan } from './chart-data';

const minuteMs = 60_000;
const hourMs = 60 * minuteMs;
const dayMs = 24 * hourMs;

const steps = [
  ...[5, 10, 30].map((minutes) => minutes * minuteMs),
  ...[1, 2, 3, 6, 12].map((hours) => hours * hourMs),
  ...[1, 2, 7, 14, 28, 56, 112, 364].map((days) => days * dayMs),
];

const clocks = new Map<string, Intl.DateTimeFormat>();

/** What a clock on the wall of the room shows, as if it were UTC [ms]. */
function wallClock(at: number, zone: string): number {
  const clock =
    clocks.get(zone) ??
    new Intl.DateTimeFormat('en-GB', {
      timeZone: zone,
      hourCycle: 'h23',
      year: 'numeric',
      month: 'numeric',
      day: 'numeric',
      hour: 'numeric',
      minute: 'numeric',
      second: 'numeric',
    });
  clocks.set(zone, clock);
  const part = Object.fromEntries(clock.formatToParts(at).map(({ type, value }) => [type, Number(value)]));
  const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = part;
  return Date.UTC(year, month - 1, day, hour, minute, second);
}

/** The instant at which the room's clock shows a time. A time that the clocks skip falls just after the gap. */
function instantOf(wall: number, zone: string): number {
  const guess = wall - (wallClock(wall, zone) - wall);
  return guess - (wallClock(guess, zone) - wall);
}

/**
 * Round times of a room's own clock within a span, for an axis: midnights stay midnights when the clocks change.
 *
 * @param count - At most about this many.
 * @param zone - IANA name.
 */
export function roomTicks(span: ChartSpan, count: number, zone: string): readonly number[] {
  const length = span.to - span.from;
  const step = steps.find((candidate) => length / candidate <= count) ?? 364 * dayMs;
  const first = Math.floor(wallClock(span.from, zone) / step) * step;
  const ticks: number[] = [];
  for (let wall = first; ticks.length <= 2 * count; wall += step) {
    const at = instantOf(wall, zone);
    if (at > span.to) break;
    if (at >= span.from && at !== ticks.at(-1)) ticks.push(at);
  }
  return ticks;
}

/** What stands at a tick: the time, at midnight the day, on long spans the date with its year. */
export function tickLabel(at: number, span: ChartSpan, zone: string): string {
  if (span.to - span.from > 300 * dayMs) return formatDayAndYear(at, zone);
  const time = formatTime(at, zone);
  if (time !== '00:00') return time;
  const day = formatShortDay(at, zone);
  // The month can be read from its neighbours on a short span.
  return span.to - span.from > 10 * dayMs ? day.split(' ').slice(1).join(' ') : day;
}
