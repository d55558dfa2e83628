import type { SowingNow } from '@shared/contracts/germination';
import { formatShortDay } from '@shared/format/room-time';

/**
 * How a sowing comes up, for its label: "12 of 40 up", "up 2 to 6 Dec"; null when nothing can be said.
 *
 * @param zone - IANA name of the room's time zone.
 */
export function sowingNote(
  { up, sown, expectedFrom, expectedTo, isLate }: SowingNow,
  zone: string,
): string | null {
  if (up > 0) return `${up} of ${sown} up`;
  if (isLate) return 'late';
  if (expectedFrom === null || expectedTo === null) return null;
  const [from, to] = [dayOf(expectedFrom, zone), dayOf(expectedTo, zone)];
  if (from === to) return `up about ${to}`;
  const [fromDay, fromMonth] = from.split(' ');
  return `up ${fromMonth === to.split(' ')[1] ? fromDay : from} to ${to}`;
}

/** "2 Dec" */
function dayOf(instant: string, zone: string): string {
  return formatShortDay(instant, zone).replace(/^\w+ /, '');
}
