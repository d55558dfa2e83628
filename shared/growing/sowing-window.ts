import { requireInRange } from '../errors/domain-error';
import { dayAfter } from './calendar-day';
import type { Figure, Span } from './crops/figure';

const DAYS_PER_WEEK = 7;

/** What a crop's sowing date follows from. */
export interface SowingTimes {
  /** Weeks from sowing to a plant that can go out, one entry a source. */
  readonly weeksToTransplant: readonly Figure<Span>[];
  /** Weeks after the last frost at which it goes out, negative for before; null for a crop that stays in. */
  readonly plantingOutWeeks: Figure<Span> | null;
  /** Weeks before the last frost at which sources say to sow, without saying why. */
  readonly sowBeforeFrostWeeks: readonly Figure<Span>[];
}

/** Days on which to sow by one source. */
export interface SowingWindow {
  /** First day, `YYYY-MM-DD`. */
  readonly opens: string;
  /** Last day, `YYYY-MM-DD`. */
  readonly closes: string;
  readonly source: string;
}

/** When to sow: the windows of the sources, and the days from the earliest to the latest of them. */
export interface SowingWindows {
  readonly opens: string;
  readonly closes: string;
  readonly bySource: readonly SowingWindow[];
}

/**
 * When to sow a crop for planting out after a place's last frost.
 *
 * @param times - The crop's figures, for example `crop.sowing`.
 * @param lastFrost - Last spring frost, `YYYY-MM-DD`: the date of even chances, or the person's own.
 * @returns A window a source and their union; null for a crop without figures.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a date that is none.
 *
 * @remarks
 * Earliest: planted out as soon as possible after the longest raising. Latest: planted out as late as possible after the
 * shortest. Sources disagree (onion transplants take 6–8 weeks at Cornell, 10–12 at Purdue), so they are shown side by
 * side and not averaged.
 */
export function sowingWindows(times: SowingTimes, lastFrost: string): SowingWindows | null {
  const bySource = [...windowsByRaising(times, lastFrost), ...windowsByRule(times, lastFrost)];
  const opens = bySource.map((window) => window.opens).sort();
  const closes = bySource.map((window) => window.closes).sort();
  const [first] = opens;
  const last = closes.at(-1);
  return first === undefined || last === undefined ? null : { opens: first, closes: last, bySource };
}

function windowsByRaising(
  { weeksToTransplant, plantingOutWeeks }: SowingTimes,
  lastFrost: string,
): SowingWindow[] {
  if (plantingOutWeeks === null) return [];
  const out = plantingOutWeeks.value;
  return weeksToTransplant.map(({ value, source }) => ({
    opens: weeksAfter(lastFrost, out.low - value.high),
    closes: weeksAfter(lastFrost, out.high - value.low),
    source,
  }));
}

function windowsByRule({ sowBeforeFrostWeeks }: SowingTimes, lastFrost: string): SowingWindow[] {
  return sowBeforeFrostWeeks.map(({ value, source }) => ({
    opens: weeksAfter(lastFrost, -value.high),
    closes: weeksAfter(lastFrost, -value.low),
    source,
  }));
}

/**
 * Where a day lies against a window.
 *
 * @param window - First and last day, `YYYY-MM-DD`.
 * @param day - `YYYY-MM-DD`.
 * @returns `open` on the first and last day too.
 */
export function sowingStanding(
  window: Pick<SowingWindow, 'opens' | 'closes'>,
  day: string,
): 'notYet' | 'open' | 'past' {
  if (day < window.opens) return 'notYet';
  return day > window.closes ? 'past' : 'open';
}

/**
 * Days for sowings that follow each other, so that a crop is ready bit by bit.
 *
 * @param window - First and last day for a sowing, `YYYY-MM-DD`.
 * @param everyDays - Days between sowings, a whole number from 1 to 366.
 * @returns The first day and every one after it that is still in the window.
 * @throws {@link DomainError} `OUT_OF_RANGE` for another interval, `INVALID_ARGUMENT` for a date that is none.
 */
export function staggeredSowings(
  window: Pick<SowingWindow, 'opens' | 'closes'>,
  everyDays: number,
): string[] {
  requireInRange('everyDays', everyDays, 1, 366);
  const days: string[] = [];
  for (let day = window.opens; day <= window.closes; day = dayAfter(day, everyDays)) days.push(day);
  return days;
}

/** Days on which a sowing is expected to be ready to go out. */
export interface TransplantDates {
  readonly earliest: string;
  readonly latest: string;
  /** Which sources give the two ends. */
  readonly source: string;
}

/**
 * When a sowing will be big enough to plant out.
 *
 * @param times - The crop's figures.
 * @param sownOn - `YYYY-MM-DD`.
 * @returns The span of all sources; null for a crop without figures.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a date that is none.
 */
export function transplantDates(
  { weeksToTransplant }: Pick<SowingTimes, 'weeksToTransplant'>,
  sownOn: string,
): TransplantDates | null {
  if (weeksToTransplant.length === 0) return null;
  const shortest = Math.min(...weeksToTransplant.map(({ value }) => value.low));
  const longest = Math.max(...weeksToTransplant.map(({ value }) => value.high));
  const decisive = weeksToTransplant.filter(({ value }) => value.low === shortest || value.high === longest);
  return {
    earliest: weeksAfter(sownOn, shortest),
    latest: weeksAfter(sownOn, longest),
    source: [...new Set(decisive.map(({ source }) => source))].join('; '),
  };
}

function weeksAfter(day: string, weeks: number): string {
  return dayAfter(day, weeks * DAYS_PER_WEEK);
}
