import { dayBounds } from './room-days';
import type { PeriodBounds } from './period-summary';

/**
 * The calendar month of a place.
 *
 * @param month - `YYYY-MM`.
 * @param zone - IANA time zone, such as `Europe/Dublin`.
 * @returns The month, from its first instant up to the first instant of the next [ms since epoch].
 * @throws DomainError `INVALID_ARGUMENT` for an unknown zone or a malformed month.
 */
export function monthBounds(month: string, zone: string): PeriodBounds {
  const [year = NaN, number = NaN] = month.split('-').map(Number);
  const next = number === 12 ? `${year + 1}-01` : `${year}-${String(number + 1).padStart(2, '0')}`;
  return { start: dayBounds(`${month}-01`, zone).start, end: dayBounds(`${next}-01`, zone).start };
}
