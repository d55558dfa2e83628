import { dayAfter, daysBetween } from '@shared/growing/calendar-day';
import { formatShortDay } from '@shared/format/room-time';

/** Part of the calendar's breadth, both 0 to 1. */
export interface CalendarPart {
  readonly start: number;
  readonly breadth: number;
}

/** The months that the calendar shows. */
export interface CalendarSpan {
  /** First day, and the first day after the last, `YYYY-MM-DD`. */
  readonly from: string;
  readonly to: string;
  readonly months: readonly (CalendarPart & { readonly label: string })[];
}

const shownMonths = 12;

/** Twelve months from the one of a day on. */
export function calendarSpan(today: string): CalendarSpan {
  const firsts = Array.from({ length: shownMonths + 1 }, (_, month) => firstOfMonth(today, month));
  const [from, to] = [firsts[0] ?? today, firsts[shownMonths] ?? today];
  const days = daysBetween(from, to);
  const months = firsts.slice(0, shownMonths).map((first, month) => {
    const next = firsts[month + 1] ?? to;
    return {
      label: formatShortDay(`${first}T00:00:00Z`, 'UTC').split(' ')[2] ?? '',
      start: daysBetween(from, first) / days,
      breadth: daysBetween(first, next) / days,
    };
  });
  return { from, to, months };
}

/**
 * Where days lie on the calendar, cut to it.
 *
 * @param opens - First day.
 * @param closes - Last day, which counts.
 * @returns Null outside it.
 */
export function partOf(
  { from, to }: Pick<CalendarSpan, 'from' | 'to'>,
  opens: string,
  closes: string,
): CalendarPart | null {
  const days = daysBetween(from, to);
  const start = Math.max(0, daysBetween(from, opens));
  const end = Math.min(days, daysBetween(from, dayAfter(closes, 1)));
  return end > start ? { start: start / days, breadth: (end - start) / days } : null;
}

function firstOfMonth(day: string, later: number): string {
  const [year = 0, month = 1] = day.split('-').map(Number);
  return new Date(Date.UTC(year, month - 1 + later, 1)).toISOString().slice(0, 10);
}
