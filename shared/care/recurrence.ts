import { DateTime } from 'luxon';
import { RRule } from 'rrule';

import { DomainError } from '../errors/domain-error';

const positive = /^[1-9]\d{0,3}$/;
const listOf = (one: string): RegExp => new RegExp(`^${one}(,${one})*$`);
const weekday = '(?:MO|TU|WE|TH|FR|SA|SU)';

/** The parts of a rule that days can follow, and how their values are written (RFC 5545 §3.3.10). */
const grammar: Readonly<Record<string, RegExp>> = {
  FREQ: /^(DAILY|WEEKLY|MONTHLY|YEARLY)$/,
  INTERVAL: positive,
  COUNT: positive,
  UNTIL: /^\d{8}$/,
  WKST: new RegExp(`^${weekday}$`),
  BYDAY: listOf(`(?:[+-]?[1-9]\\d?)?${weekday}`),
  BYMONTH: listOf('(?:[1-9]|1[0-2])'),
  BYMONTHDAY: listOf('[+-]?(?:[1-9]|[12]\\d|3[01])'),
  BYYEARDAY: listOf('[+-]?[1-9]\\d{0,2}'),
  BYWEEKNO: listOf('[+-]?[1-9]\\d?'),
  BYSETPOS: listOf('[+-]?[1-9]\\d{0,2}'),
};

/** Which parts go with which frequency only (RFC 5545 §3.3.10). */
const frequenciesOf: Readonly<Record<string, readonly string[]>> = {
  BYMONTHDAY: ['DAILY', 'MONTHLY', 'YEARLY'],
  BYYEARDAY: ['YEARLY'],
  BYWEEKNO: ['YEARLY'],
};

/**
 * The days on which something recurs.
 *
 * @param rule - Recurrence rule without `DTSTART`, such as `FREQ=DAILY;INTERVAL=4` (RFC 5545 §3.3.10). Days have no
 *   hours, so frequencies below a day and `BYHOUR` and the like are refused, and `UNTIL` is a date.
 * @param startsOn - First day, `YYYY-MM-DD`; `INTERVAL` and `COUNT` count from it.
 * @param from - First day of the span asked for.
 * @param to - The day after its last.
 * @returns The due days in the span, in order, as `YYYY-MM-DD`. They are calendar days, the same in every time zone.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a rule that is not one or a day that does not exist.
 *
 * @example
 * ```ts
 * dueDays('FREQ=WEEKLY;BYDAY=MO,TH', '2026-03-02', '2026-03-02', '2026-03-09'); // ['2026-03-02', '2026-03-05']
 * ```
 */
export function dueDays(rule: string, startsOn: string, from: string, to: string): string[] {
  requireRule(rule);
  const [dtstart, first, end] = [startsOn, from, to].map(midnight) as [Date, Date, Date];
  const options = RRule.parseString(rule);
  // A rule that never falls due, such as 30 February, would otherwise be searched until the year 9999.
  const last = new Date(end.getTime() - 1);
  const until =
    options.until !== null && options.until !== undefined && options.until < last ? options.until : last;
  if (until < first || until < dtstart) return [];
  return new RRule({ ...options, dtstart, until }, true).between(first, last, true).map(isoDate);
}

/**
 * Refuses what is no rule.
 *
 * @param rule - As a person or program wrote it.
 * @throws {@link DomainError} `INVALID_ARGUMENT` with a message that says what is wrong.
 */
export function requireRule(rule: string): void {
  const parts = rule.split(';').map((part) => part.split('='));
  const values = new Map<string, string>();
  for (const [name = '', value = ''] of parts) {
    const form = grammar[name];
    if (form === undefined)
      refuse(rule, `${name === '' ? 'an empty part' : name} is no part of a rule for days`);
    if (values.has(name)) refuse(rule, `${name} comes twice`);
    if (!form.test(value)) refuse(rule, `${name} can’t be ${value === '' ? 'empty' : value}`);
    values.set(name, value);
  }
  requireFitting(rule, values);
}

function requireFitting(rule: string, values: ReadonlyMap<string, string>): void {
  const frequency = values.get('FREQ');
  if (frequency === undefined) refuse(rule, 'FREQ is missing');
  for (const [part, frequencies] of Object.entries(frequenciesOf)) {
    if (values.has(part) && !frequencies.includes(frequency))
      refuse(rule, `${part} does not go with ${frequency}`);
  }
  const isNumbered = /\d/.test(values.get('BYDAY') ?? '');
  if (isNumbered && (!['MONTHLY', 'YEARLY'].includes(frequency) || values.has('BYWEEKNO'))) {
    refuse(rule, 'numbered weekdays go with months and years only');
  }
  if (values.has('COUNT') && values.has('UNTIL')) refuse(rule, 'COUNT and UNTIL exclude each other');
  if (values.has('BYSETPOS') && ![...values.keys()].some((part) => /^BY(?!SETPOS)/.test(part))) {
    refuse(rule, 'BYSETPOS needs another BY part');
  }
  const until = values.get('UNTIL');
  if (until !== undefined && !DateTime.fromFormat(until, 'yyyyMMdd').isValid)
    refuse(rule, `there is no day ${until}`);
}

function refuse(rule: string, reason: string): never {
  throw new DomainError('INVALID_ARGUMENT', `Not a recurrence rule: ${reason}`, { rule });
}

function midnight(day: string): Date {
  const at = DateTime.fromISO(day, { zone: 'utc' });
  if (!/^\d{4}-\d\d-\d\d$/.test(day) || !at.isValid) {
    throw new DomainError('INVALID_ARGUMENT', `There is no day ${day}`, { day });
  }
  return at.toJSDate();
}

function isoDate(at: Date): string {
  return at.toISOString().slice(0, 10);
}
