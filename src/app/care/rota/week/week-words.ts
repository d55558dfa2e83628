import { formatShortDay } from '@shared/format/room-time';
import type { RotaRow } from './rota-week';

/** "Tue 1 Dec". A day of the calendar has no time zone, so it is written as UTC counts it. */
export function dayTitle(day: string): string {
  return formatShortDay(`${day}T00:00:00Z`, 'UTC');
}

/** The beginning of a line. */
export function rowTitle({ kind, person }: RotaRow): string {
  if (person !== null) return person.name;
  return kind === 'uncovered' ? 'Short of hands' : 'Anybody';
}
