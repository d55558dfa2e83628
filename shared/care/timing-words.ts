import { presetOf, type CalendarPreset } from './calendar-preset';
import type { DueTiming } from './coming-days';
import { weekdayOf } from './rota';
import type { Season } from './season';

/** Weekdays from Monday on. */
export const weekdayNames: readonly string[] = [
  'Monday',
  'Tuesday',
  'Wednesday',
  'Thursday',
  'Friday',
  'Saturday',
  'Sunday',
];
/** Months from January on. */
export const monthNames: readonly string[] = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];

const list = new Intl.ListFormat('en-GB');
const ordinals = new Intl.PluralRules('en-GB', { type: 'ordinal' });
const endings: Readonly<Record<string, string>> = { one: 'st', two: 'nd', few: 'rd', other: 'th' };
const nthNames = ['first', 'second', 'third', 'fourth'];

/** A timing whose first day may still be open, as that of care which is only offered. */
type SayableTiming =
  | { readonly how: 'calendar'; readonly rule: string; readonly startsOn?: string }
  | { readonly how: 'afterDoing'; readonly everyDays: number }
  | { readonly how: 'byDrying'; readonly fallbackDays: number };

/**
 * When care is due, in words that go on a line: "every 3 days, March to October", "4 days after the last time".
 *
 * @param timing - With or without its first day.
 * @param season - Null for all year.
 */
export function sayTiming(timing: SayableTiming | DueTiming, season: Season | null): string {
  const when = timing.how === 'calendar' ? sayRule(timing.rule, timing.startsOn ?? null) : sayTurns(timing);
  return season === null ? when : `${when}, ${saySeason(season)}`;
}

/** "March to October", "only in May". */
export function saySeason({ fromMonth, toMonth }: Season): string {
  const [from, to] = [monthNames[fromMonth - 1] ?? '', monthNames[toMonth - 1] ?? ''];
  return fromMonth === toMonth ? `only in ${from}` : `${from} to ${to}`;
}

/** "1st", "22nd". */
export function ordinal(number: number): string {
  return `${number}${endings[ordinals.select(number)] ?? 'th'}`;
}

function sayTurns(timing: Exclude<SayableTiming, { readonly how: 'calendar' }>): string {
  if (timing.how === 'byDrying')
    return `when the pot has dried, about ${sayInterval(timing.fallbackDays, 'day')}`;
  return `${timing.everyDays === 1 ? 'a day' : `${timing.everyDays} days`} after the last time`;
}

function sayRule(rule: string, startsOn: string | null): string {
  const preset = presetOf(rule);
  return preset === null ? `by its own rule, ${rule}` : sayPreset(preset, startsOn);
}

function sayPreset(preset: CalendarPreset, startsOn: string | null): string {
  switch (preset.every) {
    case 'days':
      return sayInterval(preset.interval, 'day');
    case 'weeks':
      return sayWeeks(preset.interval, preset.weekdays, startsOn);
    case 'monthDay': {
      const day = preset.day === -1 ? 'last day' : ordinal(preset.day);
      return `on the ${day} of ${sayInterval(preset.interval, 'month')}`;
    }
    case 'monthWeekday': {
      const nth = nthNames[preset.nth - 1] ?? 'last';
      return `on the ${nth} ${weekdayName(preset.weekday)} of ${sayInterval(preset.interval, 'month')}`;
    }
    case 'year':
      return `every year on ${preset.day} ${monthNames[preset.month - 1] ?? ''}`;
  }
}

function sayWeeks(interval: number, chosen: readonly number[], startsOn: string | null): string {
  const weekdays = chosen.length > 0 || startsOn === null ? chosen : [weekdayOf(startsOn)];
  if (weekdays.length === 0) return sayInterval(interval, 'week');
  const sorted = [...weekdays].sort((one, other) => one - other);
  const run = runOf(sorted);
  if (run !== null) return interval === 1 ? `every day from ${run}` : `every ${interval} weeks, ${run}`;
  const days = list.format(sorted.map(weekdayName));
  return interval === 1 ? `every ${days}` : `every ${interval} weeks on ${days}`;
}

/** "Monday to Friday", where more than three follow each other. */
function runOf(sorted: readonly number[]): string | null {
  const [first, last] = [sorted[0] ?? 0, sorted.at(-1) ?? 0];
  const isRun = sorted.length > 3 && last - first === sorted.length - 1;
  return isRun ? `${weekdayName(first)} to ${weekdayName(last)}` : null;
}

function weekdayName(weekday: number): string {
  return weekdayNames[weekday - 1] ?? '';
}

function sayInterval(interval: number, unit: string): string {
  return interval === 1 ? `every ${unit}` : `every ${interval} ${unit}s`;
}
