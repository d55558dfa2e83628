import { DateTime } from 'luxon';

/**
 * An instant as a field for day and time shows it, by the room's clock: "2026-12-01T14:20".
 *
 * @param at - ISO 8601, or milliseconds since 1970.
 * @param zone - IANA name.
 */
export function fieldTime(at: string | number, zone: string): string {
  return DateTime.fromMillis(new Date(at).getTime(), { zone }).toFormat("yyyy-MM-dd'T'HH:mm");
}

/**
 * The instant of a day and time by the room's clock; an hour that a change of the clocks leaves out is the next one.
 *
 * @param typed - As a field for day and time gives it; empty for now.
 * @param zone - IANA name.
 * @returns ISO 8601 in UTC; undefined for now.
 */
export function typedInstant(typed: string, zone: string): string | undefined {
  if (typed === '') return undefined;
  return DateTime.fromISO(typed, { zone }).toUTC().toISO() ?? undefined;
}
