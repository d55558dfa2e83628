import { DateTime } from 'luxon';
import { minuteOf, onClock } from './room-clock-time';

/** A span of the room's clock, `HH:MM` each; it may cross midnight, and its ends differ. */
export interface QuietHours {
  readonly from: string;
  readonly to: string;
}

/**
 * When the quiet hours that hold at an instant end.
 *
 * @param hours - On the room's clock: start inclusive, end exclusive.
 * @param at - The instant [ms].
 * @param zone - IANA name of the room's time zone.
 * @returns Their end [ms]; null when they don't hold. An end that the clock skips in spring is taken as much later as
 *   the clock skips, one that comes twice in autumn as the first.
 */
export function quietUntil(hours: QuietHours, at: number, zone: string): number | null {
  const local = DateTime.fromMillis(at, { zone });
  const minute = local.hour * 60 + local.minute;
  const [from, to] = [minuteOf(hours.from), minuteOf(hours.to)];
  const isQuiet = from < to ? minute >= from && minute < to : minute >= from || minute < to;
  if (!isQuiet) return null;
  const today = onClock(local, hours.to).toMillis();
  return today > at ? today : onClock(local.plus({ days: 1 }), hours.to).toMillis();
}
