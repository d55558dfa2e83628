import { dayAfter } from './calendar-day';
import {
  sowingStanding,
  sowingWindows,
  staggeredSowings,
  type SowingTimes,
  type SowingWindow,
} from './sowing-window';

/** Sown so many days before its window opens still counts as sown in it: nobody sows to the day. */
const EARLY_DAYS = 7;
/** What is due within so many days is due this week. */
const WEEK_DAYS = 6;

/** When to sow a crop next. */
export interface SowingPlan {
  readonly opens: string;
  readonly closes: string;
  readonly bySource: readonly SowingWindow[];
  readonly standing: 'notYet' | 'open' | 'past';
  /** The last frost that it is counted from, `YYYY-MM-DD`. */
  readonly lastFrost: string;
  /** Days on which to sow, one or one every so many days. */
  readonly sowings: readonly string[];
}

/**
 * A day of every year in one year.
 *
 * @param monthDay - `MM-DD`; 29 February counts as the 28th in a common year.
 * @param year - Which.
 * @returns `YYYY-MM-DD`.
 */
export function dayInYear(monthDay: string, year: number): string {
  const isLeapYear = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  const day = monthDay === '02-29' && !isLeapYear ? '02-28' : monthDay;
  return `${String(year).padStart(4, '0')}-${day}`;
}

/**
 * Plans the next sowing of a crop for planting out after the last frost.
 *
 * @param times - The crop's figures.
 * @param lastFrost - Of every spring, `MM-DD`.
 * @param today - `YYYY-MM-DD`.
 * @param everyDays - Days between sowings that follow each other; null for one sowing.
 * @returns The first window that has not closed, whichever year its frost is in; null for a crop without figures.
 */
export function planSowing(
  times: SowingTimes,
  lastFrost: string,
  today: string,
  everyDays: number | null,
): SowingPlan | null {
  const thisYear = Number(today.slice(0, 4));
  // A window may lie in the year before its frost, or, for what goes out late, after it.
  for (let year = thisYear - 1; year <= thisYear + 2; year += 1) {
    const frost = dayInYear(lastFrost, year);
    const windows = sowingWindows(times, frost);
    if (windows === null) return null;
    if (windows.closes < today) continue;
    const { opens, closes, bySource } = windows;
    return {
      opens,
      closes,
      bySource,
      standing: sowingStanding(windows, today),
      lastFrost: frost,
      sowings: everyDays === null ? [opens] : staggeredSowings(windows, everyDays),
    };
  }
  return null;
}

/**
 * Which of a plan's sowings were made.
 *
 * @param plan - The plan.
 * @param sownOn - Days on which the crop was sown, `YYYY-MM-DD`.
 * @returns Those in the window, or at most a week before it.
 */
export function sowingsInWindow({ opens, closes }: SowingPlan, sownOn: readonly string[]): string[] {
  const from = dayAfter(opens, -EARLY_DAYS);
  return sownOn.filter((day) => day >= from && day <= closes);
}

/**
 * The sowing that is due this week.
 *
 * @param plan - The plan.
 * @param sownOn - Days on which the crop was sown.
 * @param today - `YYYY-MM-DD`.
 * @returns The day to sow on, not before today; null when none is due within seven days, or it was made already.
 */
export function sowingDue(plan: SowingPlan, sownOn: readonly string[], today: string): string | null {
  const due = plan.sowings.filter((day) => day <= dayAfter(today, WEEK_DAYS)).at(-1);
  if (due === undefined) return null;
  const made = sowingsInWindow(plan, sownOn);
  const isMade = made.some((day) => day >= dayAfter(due, -EARLY_DAYS));
  if (isMade) return null;
  return due < today ? today : due;
}
