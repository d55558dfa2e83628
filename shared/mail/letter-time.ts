import { DateTime } from 'luxon';
import { onClock } from './room-clock-time';

/** The morning whose letter is due, and the night that it tells of [ms, half-open]. */
export interface LetterMorning {
  /** The room's day, `YYYY-MM-DD`; a person gets one letter a day. */
  readonly day: string;
  readonly nightFrom: number;
  readonly nightTo: number;
}

/** A server that was away longer sends no letter for that day: the evening is no time for news of the morning. */
const LATEST_HOURS = 6;
/** The evening before, when the night that the letter tells of begins. */
const NIGHT_BEGINS = '20:00';

/**
 * Whose letter is due.
 *
 * @param letterAt - `HH:MM` on the room's clock.
 * @param now - The present [ms].
 * @param zone - IANA name of the room's time zone.
 * @returns The morning, from the letter's time on for six hours of the same day; null before and after.
 */
export function letterDue(letterAt: string, now: number, zone: string): LetterMorning | null {
  const local = DateTime.fromMillis(now, { zone });
  const dueAt = onClock(local, letterAt);
  if (local < dueAt || local >= dueAt.plus({ hours: LATEST_HOURS })) return null;
  return {
    day: local.toFormat('yyyy-MM-dd'),
    nightFrom: onClock(local.minus({ days: 1 }), NIGHT_BEGINS).toMillis(),
    nightTo: dueAt.toMillis(),
  };
}
