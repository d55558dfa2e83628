import { DateTime } from 'luxon';

/** A time until which an alert may be quiet. */
export interface QuietChoice {
  /** "For an hour" */
  readonly words: string;
  /** [ms since 1970 UTC] */
  readonly until: number;
}

const HOUR_MS = 3_600_000;
/** When the evening begins for who looks in once more. Common practice, no source. */
const EVENING_HOUR = 20;
/** When the day's first look is over. Common practice, no source. */
const MORNING_HOUR = 8;

/**
 * The times until which somebody would let an alert be quiet.
 *
 * @param now - The present [ms since 1970 UTC].
 * @param zone - IANA name of the room's time zone.
 * @returns In order: an hour, this evening unless that is within the hour, tomorrow morning (before dawn: this morning).
 */
export function quietChoices(now: number, zone: string): QuietChoice[] {
  const local = DateTime.fromMillis(now, { zone });
  const inAnHour = now + HOUR_MS;
  const at = (day: DateTime, hour: number): number => day.startOf('day').set({ hour }).toMillis();
  const evening = at(local, EVENING_HOUR);
  const thisMorning = at(local, MORNING_HOUR);
  return [
    { words: 'For an hour', until: inAnHour },
    ...(thisMorning > inAnHour ? [{ words: 'Until this morning', until: thisMorning }] : []),
    ...(evening > inAnHour ? [{ words: 'Until this evening', until: evening }] : []),
    { words: 'Until tomorrow morning', until: at(local.plus({ days: 1 }), MORNING_HOUR) },
  ];
}

/**
 * The instant at which a room's clock shows a date and time, as a browser's field gives them.
 *
 * @param text - `YYYY-MM-DDTHH:MM`.
 * @param zone - IANA name of the room's time zone.
 * @returns The instant [ms since 1970 UTC], as much later as the clock skips where that time is skipped; null for what
 *   is no date and time.
 */
export function instantOnClock(text: string, zone: string): number | null {
  const local = DateTime.fromISO(text, { zone });
  return local.isValid && /^\d{4}-\d\d-\d\dT\d\d:\d\d/.test(text) ? local.toMillis() : null;
}

/**
 * What a room's clock shows at an instant, as a browser's field takes it.
 *
 * @param at - The instant [ms since 1970 UTC].
 * @param zone - IANA name of the room's time zone.
 * @returns `YYYY-MM-DDTHH:MM`.
 */
export function clockAt(at: number, zone: string): string {
  return DateTime.fromMillis(at, { zone }).toFormat("yyyy-MM-dd'T'HH:mm");
}
