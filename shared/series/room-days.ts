import { DateTime } from 'luxon';

import { DomainError } from '../errors/domain-error';
import type { PeriodBounds } from './period-summary';

/** A room's calendar day: its date and, half-open, the instants [ms since epoch] at which it starts and ends. */
export interface DayBounds extends PeriodBounds {
  /** ISO 8601 date, `YYYY-MM-DD`. */
  readonly date: string;
}

const HOUR_MS = 3_600_000;
const MINUTE_MS = 60_000;

/**
 * The calendar day of a place.
 *
 * @param day - ISO date `YYYY-MM-DD`, or any instant within the day [ms since epoch].
 * @param zone - IANA time zone, such as `Europe/Dublin`.
 * @returns The day, from its first instant up to the first instant of the next. Days last 23 to 25 hours where clocks
 *   change; where midnight is skipped the day starts at the first time that exists, where it comes twice at the earlier.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for an unknown zone, a malformed date, an instant outside what a
 *   calendar can name, or a date that the zone left out (2011-12-30 in Pacific/Apia).
 */
export function dayBounds(day: string | number, zone: string): DayBounds {
  const within =
    typeof day === 'string' ? DateTime.fromISO(day, { zone }) : DateTime.fromMillis(day, { zone });
  const date = within.toISODate();
  if (date === null || (typeof day === 'string' && date !== day)) {
    throw new DomainError('INVALID_ARGUMENT', `${zone} has no day ${day}`, { day, zone });
  }
  const start = firstInstantOf(within);
  // A day and a half on is on the next date whatever the clocks do, and is never on the one after.
  const end = firstInstantOf(DateTime.fromMillis(start + 36 * HOUR_MS, { zone }));
  return { date, start, end };
}

/**
 * Hours in a calendar day, which differ where clocks change.
 *
 * @param day - The day.
 * @returns Hours, usually 24.
 */
export function hoursInDay(day: PeriodBounds): number {
  return (day.end - day.start) / HOUR_MS;
}

/**
 * The hour in UTC that an instant belongs to.
 *
 * @param at - Instant [ms since epoch].
 * @returns The hour, half-open.
 */
export function utcHourBounds(at: number): PeriodBounds {
  const start = Math.floor(at / HOUR_MS) * HOUR_MS;
  return { start, end: start + HOUR_MS };
}

/**
 * Day bounds for folding series: remembers the day it answered last, so a series in order asks the calendar once a day.
 *
 * @param zone - IANA time zone of the room.
 * @returns A function from an instant [ms since epoch] to the {@link dayBounds} of its day.
 */
export function roomDayBoundsAt(zone: string): (at: number) => DayBounds {
  let last: DayBounds | null = null;
  return (at) => {
    if (last === null || at < last.start || at >= last.end) {
      last = dayBounds(at, zone);
    }
    return last;
  };
}

function firstInstantOf(within: DateTime): number {
  const midnight = within.startOf('day');
  // Where clocks go back over midnight it comes twice, and the calendar may name the later one. The same wall clock
  // read with the offset of the evening before is the earlier one, if it still falls on this date.
  const offsetBefore = midnight.minus({ hours: 3 }).offset;
  const earlier = midnight.plus({ milliseconds: (midnight.offset - offsetBefore) * MINUTE_MS });
  const isEarlierToday = earlier < midnight && earlier.toISODate() === midnight.toISODate();
  return (isEarlierToday ? earlier : midnight).toMillis();
}
