import { dayAfter } from '../growing/calendar-day';
import { calendarDays, dayAfterDoing, type DayLimits } from './routine-days';

/** When care falls due. */
export type DueTiming =
  | { readonly how: 'calendar'; readonly rule: string; readonly startsOn: string }
  | { readonly how: 'afterDoing'; readonly everyDays: number; readonly startsOn: string }
  | { readonly how: 'byDrying'; readonly fallbackDays: number; readonly startsOn: string };

/** A rhythm that is rarer than this is told as far as it goes. */
const FARTHEST_DAYS = 366 * 3;

/**
 * The next days on which care will be due if it is done on each of them.
 *
 * @param timing - By drying counts as its fallback: nobody knows how thirsty the air will be.
 * @param limits - Season and closed days.
 * @param from - First day that counts, `YYYY-MM-DD`.
 * @param count - How many days.
 * @returns Days in order; fewer where three years have no more.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a rule that is none or a day that does not exist.
 *
 * @example
 * ```ts
 * comingDays({ how: 'afterDoing', everyDays: 4, startsOn: '2026-12-01' }, allYear, '2026-12-01', 2);
 * // ['2026-12-01', '2026-12-05']
 * ```
 */
export function comingDays(timing: DueTiming, limits: DayLimits, from: string, count: number): string[] {
  if (timing.how === 'calendar') {
    const first = timing.startsOn > from ? timing.startsOn : from;
    return calendarDays(timing, limits, first, dayAfter(first, FARTHEST_DAYS)).slice(0, count);
  }
  const everyDays = timing.how === 'afterDoing' ? timing.everyDays : timing.fallbackDays;
  const turns = { everyDays, startsOn: timing.startsOn };
  const days: string[] = [];
  let day = dayAfterDoing(turns, null, limits, from);
  while (day !== null && days.length < count) {
    days.push(day);
    day = dayAfterDoing(turns, { plannedFor: day, closedOn: day, outcome: 'done' }, limits, from);
  }
  return days;
}
