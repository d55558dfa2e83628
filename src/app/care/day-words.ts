import { formatDayAndYear, formatShortDay } from '@shared/format/room-time';
import { daysBetween } from '@shared/growing/calendar-day';

/**
 * A day as a person says it on another: "today", "tomorrow", "Wed 2 Dec"; far away with its year.
 *
 * @param day - `YYYY-MM-DD`.
 * @param today - The room's day.
 */
export function dayWords(day: string, today: string): string {
  const days = daysBetween(today, day);
  if (days === 0) return 'today';
  if (Math.abs(days) === 1) return days === 1 ? 'tomorrow' : 'yesterday';
  // A day of the calendar has no time zone, so it is written as UTC counts it.
  const at = `${day}T00:00:00Z`;
  return Math.abs(days) < 183 ? formatShortDay(at, 'UTC') : formatDayAndYear(at, 'UTC');
}
