import { dayAfter } from '../growing/calendar-day';
import { dueDays } from './recurrence';
import { firstDayInSeason, isInSeason, type Season } from './season';
import type { TaskOutcome } from './task-outcome';

/** On which days care may not be due at all. */
export interface DayLimits {
  readonly season: Season | null;
  /** Days on which nobody comes, for care that heeds them. */
  readonly isClosed: (day: string) => boolean;
}

/** What became of a task whose routine counts from its being done. */
export interface ClosedTurn {
  /** The day for which the routine had planned it. */
  readonly plannedFor: string;
  readonly closedOn: string;
  readonly outcome: TaskOutcome;
}

/**
 * The days on which care by the calendar is due. What would fall on a closed day or out of season is left out.
 *
 * @param calendar - RFC 5545 rule and first day.
 * @param limits - Season and closed days.
 * @param from - First day of the span asked for.
 * @param to - The day after its last.
 * @returns Days in order.
 * @throws {@link DomainError} `INVALID_ARGUMENT` as {@link dueDays}.
 */
export function calendarDays(
  { rule, startsOn }: { readonly rule: string; readonly startsOn: string },
  { season, isClosed }: DayLimits,
  from: string,
  to: string,
): string[] {
  return dueDays(rule, startsOn, from, to).filter((day) => isInSeason(day, season) && !isClosed(day));
}

/**
 * The day on which care that counts from its last doing is due next: so many days after it was done or found not
 * needed, and again on the next day when it could not be done. A season or closed days put it off.
 *
 * @param every - Days after doing, and the first day of the routine.
 * @param last - The turn before; null for the first.
 * @param limits - Season and closed days.
 * @param earliest - Not before this day, so that a routine that is new makes nothing late.
 * @returns The day; null where season and closed days leave none within two years.
 *
 * @remarks
 * Found not needed counts as looked after: a look that finds the soil still wet is what the care was for. A day that was
 * planned before is not planned again, so that care done early has its next turn on a later day.
 */
export function dayAfterDoing(
  { everyDays, startsOn }: { readonly everyDays: number; readonly startsOn: string },
  last: ClosedTurn | null,
  { season, isClosed }: DayLimits,
  earliest: string,
): string | null {
  if (last === null) return firstDayInSeason(later(startsOn, earliest), season, isClosed);
  const wanted = dayAfter(last.closedOn, last.outcome === 'couldNot' ? 1 : everyDays);
  return firstDayInSeason(later(wanted, dayAfter(last.plannedFor, 1)), season, isClosed);
}

/**
 * The day on which a planting that is dry is to be watered: today, unless today's turn was planned and closed already.
 *
 * @param today - The day on which it was found dry.
 * @param last - The turn before; null for the first.
 * @param limits - Season and closed days.
 * @returns The day; null where season and closed days leave none within two years.
 */
export function dayOfDryness(
  today: string,
  last: Pick<ClosedTurn, 'plannedFor'> | null,
  { season, isClosed }: DayLimits,
): string | null {
  const from = last === null ? today : later(today, dayAfter(last.plannedFor, 1));
  return firstDayInSeason(from, season, isClosed);
}

function later(one: string, other: string): string {
  return one > other ? one : other;
}
