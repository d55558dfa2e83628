/** A point in time as it arrives from anywhere: a date, milliseconds since 1970, or ISO 8601 with an offset. */
export type Instant = Date | number | string;

type Style = Intl.DateTimeFormatOptions;

const locale = 'en-GB';
const styles = {
  time: { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' },
  day: { weekday: 'long', day: 'numeric', month: 'long' },
  shortDay: { weekday: 'short', day: 'numeric', month: 'short' },
  month: { month: 'long', year: 'numeric' },
  numericDay: { day: '2-digit', month: '2-digit', year: 'numeric' },
  dayAndYear: { day: 'numeric', month: 'short', year: 'numeric' },
} satisfies Record<string, Style>;

// Making a formatter costs far more than using one, and a chart asks thousands of times.
const formatters = new Map<string, Intl.DateTimeFormat>();

function format(at: Instant, zone: string, style: keyof typeof styles): string {
  const key = `${style} ${zone}`;
  const formatter =
    formatters.get(key) ?? new Intl.DateTimeFormat(locale, { ...styles[style], timeZone: zone });
  formatters.set(key, formatter);
  return formatter.format(new Date(at)).replaceAll(',', '');
}

/** The time of day in a room, on a 24 hour clock: "14:20". @param zone - IANA name. */
export function formatTime(at: Instant, zone: string): string {
  return format(at, zone, 'time');
}

/** The day in a room, said in full: "Tuesday 1 December". @param zone - IANA name. */
export function formatDay(at: Instant, zone: string): string {
  return format(at, zone, 'day');
}

/** The day in a room, said shortly: "Tue 1 Dec". @param zone - IANA name. */
export function formatShortDay(at: Instant, zone: string): string {
  return format(at, zone, 'shortDay');
}

/** The day in a room with its year: "1 Dec 2026". @param zone - IANA name. */
export function formatDayAndYear(at: Instant, zone: string): string {
  return format(at, zone, 'dayAndYear');
}

/** Day and time in a room: "Tue 1 Dec, 14:20". @param zone - IANA name. */
export function formatDayAndTime(at: Instant, zone: string): string {
  return `${formatShortDay(at, zone)}, ${formatTime(at, zone)}`;
}

/** The month in a room as addresses name it: "2026-12". @param zone - IANA name. */
export function formatMonth(at: Instant, zone: string): string {
  const [, month, year] = format(at, zone, 'numericDay').split('/');
  return `${year}-${month}`;
}

/** A month in words: "December 2026". @param month - `YYYY-MM`. */
export function sayMonth(month: string): string {
  return format(`${month}-01T00:00:00Z`, 'UTC', 'month');
}

const dayMs = 24 * 3600_000;

/**
 * When something was or will be, no longer than it need be: today only the time, else the day too, another year with
 * its year.
 *
 * @param zone - IANA name of the room's time zone, which says what "today" is.
 */
export function sayWhen(at: Instant, now: Instant, zone: string): string {
  const [day, today] = [formatDayAndYear(at, zone), formatDayAndYear(now, zone)];
  if (day === today) return formatTime(at, zone);
  // A day by the clock, near enough even when the clocks change: only the date is compared.
  const inDays = (days: number): string => formatDayAndYear(new Date(now).getTime() + days * dayMs, zone);
  if (day === inDays(-1)) return `yesterday ${formatTime(at, zone)}`;
  if (day === inDays(1)) return `tomorrow ${formatTime(at, zone)}`;
  const isThisYear = day.slice(-4) === today.slice(-4);
  return isThisYear ? formatDayAndTime(at, zone) : `${day}, ${formatTime(at, zone)}`;
}

/**
 * A length of time in its two largest units.
 *
 * @param ms - Milliseconds; what is below zero counts as zero.
 *
 * @example
 * formatDuration(11_400_000); // '3 h 10 min'
 */
export function formatDuration(ms: number): string {
  const seconds = Math.max(0, Math.floor(ms / 1000));
  if (seconds < 60) return `${seconds}\u00a0s`;
  const minutes = Math.floor(seconds / 60);
  if (minutes < 60) return `${minutes}\u00a0min`;
  const hours = Math.floor(minutes / 60);
  if (hours < 24) return joined(`${hours}\u00a0h`, minutes % 60, 'min');
  const days = Math.floor(hours / 24);
  return joined(`${days}\u00a0${days === 1 ? 'day' : 'days'}`, hours % 24, 'h');
}

function joined(large: string, rest: number, unit: string): string {
  return rest === 0 ? large : `${large} ${rest}\u00a0${unit}`;
}

/** How long ago something was: "4 s ago". A clock that runs ahead reads as "just now". */
export function formatAge(at: Instant, now: Instant): string {
  const ms = new Date(now).getTime() - new Date(at).getTime();
  return ms < 1000 ? 'just now' : `${formatDuration(ms)} ago`;
}
