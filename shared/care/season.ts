import { dayAfter } from '../growing/calendar-day';

/** Months in which something is due, 1 to 12, both ends included; from a later to an earlier one it goes over new year. */
export interface Season {
  readonly fromMonth: number;
  readonly toMonth: number;
}

/**
 * Whether a day falls into a season.
 *
 * @param day - `YYYY-MM-DD`.
 * @param season - Null for all year.
 *
 * @example
 * ```ts
 * isInSeason('2026-01-15', { fromMonth: 11, toMonth: 2 }); // true
 * ```
 */
export function isInSeason(day: string, season: Season | null): boolean {
  if (season === null) return true;
  const month = Number(day.slice(5, 7));
  const { fromMonth, toMonth } = season;
  return fromMonth <= toMonth
    ? month >= fromMonth && month <= toMonth
    : month >= fromMonth || month <= toMonth;
}

/** A season comes round within a year; closed days may keep it from being due a little longer. */
const FARTHEST_DAYS = 732;

/**
 * The first day from one on, that one included, on which care may be due.
 *
 * @param day - `YYYY-MM-DD`.
 * @param season - Null for all year.
 * @param isLeftOut - Other days on which it may not be.
 * @returns The day; null where two years have none.
 */
export function firstDayInSeason(
  day: string,
  season: Season | null,
  isLeftOut: (day: string) => boolean = () => false,
): string | null {
  for (let days = 0; days < FARTHEST_DAYS; days += 1) {
    const candidate = dayAfter(day, days);
    if (isInSeason(candidate, season) && !isLeftOut(candidate)) return candidate;
  }
  return null;
}
