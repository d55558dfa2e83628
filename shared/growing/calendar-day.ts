import { DateTime } from 'luxon';

import { DomainError } from '../errors/domain-error';

const ISO_DAY = /^\d{4}-\d\d-\d\d$/;

/**
 * The day so many days after another. Calendar days have no clock, so a change of the clocks neither adds nor takes one.
 *
 * @param day - `YYYY-MM-DD`.
 * @param days - Whole days, negative for before; a fraction is rounded to the nearest day.
 * @returns `YYYY-MM-DD`.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a day that does not exist.
 *
 * @example
 * ```ts
 * dayAfter('2024-05-01', -70); // '2024-02-21', over 29 February
 * ```
 */
export function dayAfter(day: string, days: number): string {
  return isoDay(dateOf(day).plus({ days: Math.round(days) }));
}

/**
 * Days from one calendar day to another.
 *
 * @param from - `YYYY-MM-DD`.
 * @param to - `YYYY-MM-DD`.
 * @returns Whole days, negative when `to` comes first.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a day that does not exist.
 */
export function daysBetween(from: string, to: string): number {
  return dateOf(to).diff(dateOf(from), 'days').days;
}

/**
 * The number of a day in its year.
 *
 * @param day - `YYYY-MM-DD`.
 * @returns 1 on 1 January, up to 365 or 366.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a day that does not exist.
 */
export function dayOfYear(day: string): number {
  return dateOf(day).ordinal;
}

function dateOf(day: string): DateTime {
  const date = DateTime.fromISO(day, { zone: 'utc' });
  if (!ISO_DAY.test(day) || !date.isValid) {
    throw new DomainError('INVALID_ARGUMENT', `There is no day ${day}`, { day });
  }
  return date;
}

function isoDay(date: DateTime): string {
  return date.toISODate() ?? '';
}
