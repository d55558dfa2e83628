/** A rhythm as people choose it from a list. */
export type CalendarPreset =
  /** Every so many days. */
  | { readonly every: 'days'; readonly interval: number }
  /** On weekdays, 1 for Monday to 7; none for the weekday on which it starts. */
  | { readonly every: 'weeks'; readonly interval: number; readonly weekdays: readonly number[] }
  /** On a day of the month, 1 to 31; -1 for the last. */
  | { readonly every: 'monthDay'; readonly interval: number; readonly day: number }
  /** On the first to fourth of a weekday in the month; -1 for the last. */
  | {
      readonly every: 'monthWeekday';
      readonly interval: number;
      readonly nth: number;
      readonly weekday: number;
    }
  /** On a day of the year. */
  | { readonly every: 'year'; readonly month: number; readonly day: number };

const codes = ['MO', 'TU', 'WE', 'TH', 'FR', 'SA', 'SU'];
const wholeNumber = /^[1-9]\d*$/;

/**
 * A rhythm as a rule of RFC 5545.
 *
 * @example
 * ```ts
 * ruleOf({ every: 'weeks', interval: 2, weekdays: [4, 1] }); // 'FREQ=WEEKLY;INTERVAL=2;BYDAY=MO,TH'
 * ```
 */
export function ruleOf(preset: CalendarPreset): string {
  switch (preset.every) {
    case 'days':
      return parts('DAILY', preset.interval);
    case 'weeks': {
      const days = [...preset.weekdays].sort((one, other) => one - other).map(code);
      return parts('WEEKLY', preset.interval, days.length === 0 ? [] : [`BYDAY=${days.join(',')}`]);
    }
    case 'monthDay':
      return parts('MONTHLY', preset.interval, [`BYMONTHDAY=${preset.day}`]);
    case 'monthWeekday':
      return parts('MONTHLY', preset.interval, [`BYDAY=${preset.nth}${code(preset.weekday)}`]);
    case 'year':
      return parts('YEARLY', 1, [`BYMONTH=${preset.month}`, `BYMONTHDAY=${preset.day}`]);
  }
}

/**
 * The rhythm that a rule stands for.
 *
 * @param rule - Rule of RFC 5545 without `DTSTART`.
 * @returns Null for a rule that is none of the list's.
 */
export function presetOf(rule: string): CalendarPreset | null {
  const values = new Map(rule.split(';').map((part) => part.split('=', 2) as [string, string]));
  const take = (name: string): string | undefined => {
    const value = values.get(name);
    values.delete(name);
    return value;
  };
  const [frequency, typed] = [take('FREQ'), take('INTERVAL') ?? '1'];
  if (!wholeNumber.test(typed)) return null;
  const interval = Number(typed);
  const [byDay, byMonthDay, byMonth] = [take('BYDAY'), take('BYMONTHDAY'), take('BYMONTH')];
  if (values.size > 0) return null;
  if (frequency === 'YEARLY') return interval === 1 ? yearly(byDay, byMonthDay, byMonth) : null;
  if (byMonth !== undefined) return null;
  if (frequency === 'MONTHLY') return monthly(interval, byDay, byMonthDay);
  if (byMonthDay !== undefined) return null;
  if (frequency === 'WEEKLY') return weekly(interval, byDay);
  return frequency === 'DAILY' && byDay === undefined ? { every: 'days', interval } : null;
}

function parts(frequency: string, interval: number, others: readonly string[] = []): string {
  const each = interval === 1 ? [] : [`INTERVAL=${interval}`];
  return [`FREQ=${frequency}`, ...each, ...others].join(';');
}

function code(weekday: number): string {
  return codes[weekday - 1] ?? '';
}

function weekly(interval: number, byDay: string | undefined): CalendarPreset | null {
  const weekdays = byDay === undefined ? [] : byDay.split(',').map((one) => codes.indexOf(one) + 1);
  return weekdays.includes(0) ? null : { every: 'weeks', interval, weekdays };
}

function monthly(
  interval: number,
  byDay: string | undefined,
  byMonthDay: string | undefined,
): CalendarPreset | null {
  if (byDay !== undefined && byMonthDay !== undefined) return null;
  if (byMonthDay !== undefined) {
    const day = byMonthDay === '-1' ? -1 : dayOfMonth(byMonthDay);
    return day === null ? null : { every: 'monthDay', interval, day };
  }
  const [, nth, weekday] = /^\+?([1-4]|-1)(MO|TU|WE|TH|FR|SA|SU)$/.exec(byDay ?? '') ?? [];
  if (nth === undefined || weekday === undefined) return null;
  return { every: 'monthWeekday', interval, nth: Number(nth), weekday: codes.indexOf(weekday) + 1 };
}

function yearly(
  byDay: string | undefined,
  byMonthDay: string | undefined,
  byMonth: string | undefined,
): CalendarPreset | null {
  const day = dayOfMonth(byMonthDay ?? '');
  if (byDay !== undefined || day === null || !wholeNumber.test(byMonth ?? '')) return null;
  return { every: 'year', month: Number(byMonth), day };
}

function dayOfMonth(text: string): number | null {
  return wholeNumber.test(text) && Number(text) <= 31 ? Number(text) : null;
}
