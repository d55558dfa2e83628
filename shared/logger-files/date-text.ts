import { monthOfName } from './month-names';

/** Orders in which a date can be written. `iso` is year first with hyphens or without separators. */
export type DateOrder = 'iso' | 'yearFirst' | 'dayFirst' | 'monthFirst' | 'monthName';

/** How the dates of a file are written. */
export interface DateForm {
  readonly order: DateOrder;
  readonly isTwoDigitYear: boolean;
}

/** Days since 1 January 1970, or NaN where the text is no such date. */
export type DateParser = (text: string) => number;

const DAY_MS = 86_400_000;

const compactDate = /^(\d{4})(\d{2})(\d{2})$/;
const hyphenatedDate = /^(\d{4})-(\d{1,2})-(\d{1,2})$/;
const yearFirstDate = /^(\d{4})([/. ])(\d{1,2})\2(\d{1,2})\.?$/;
const twoDigitYearFirstDate = /^(\d{2})([-/.])(\d{1,2})\2(\d{1,2})$/;
const yearLastDate = /^(\d{1,2})([-/. ]) ?(\d{1,2})\2 ?(\d{4})$/;
const twoDigitYearLastDate = /^(\d{1,2})([-/. ]) ?(\d{1,2})\2 ?(\d{2})$/;

/**
 * Makes the function that reads dates of one form. It remembers the last date, because rows of a day follow each
 * other.
 */
export function createDateParser(form: DateForm): DateParser {
  const parse = parserOf(form);
  let lastText = '';
  let lastDay = Number.NaN;
  return (text) => {
    if (text !== lastText) {
      lastDay = parse(text);
      lastText = text;
    }
    return lastDay;
  };
}

/** Every form in which a text is a valid date; empty where it is none. */
export function dateFormsOf(text: string): DateForm[] {
  if (text.length < 6 || text.length > 40 || !/\d/.test(text)) return [];
  return allForms.filter((form) => !Number.isNaN(parserOf(form)(text)));
}

const allForms: readonly DateForm[] = [
  { order: 'iso', isTwoDigitYear: false },
  { order: 'yearFirst', isTwoDigitYear: false },
  { order: 'dayFirst', isTwoDigitYear: false },
  { order: 'monthFirst', isTwoDigitYear: false },
  { order: 'monthName', isTwoDigitYear: false },
  { order: 'dayFirst', isTwoDigitYear: true },
  { order: 'monthFirst', isTwoDigitYear: true },
  { order: 'yearFirst', isTwoDigitYear: true },
];

function parserOf({ order, isTwoDigitYear }: DateForm): DateParser {
  switch (order) {
    case 'iso':
      return (text) => dayOfParts(hyphenatedDate.exec(text) ?? compactDate.exec(text), 1, 2, 3);
    case 'yearFirst':
      return isTwoDigitYear
        ? (text) => dayOfParts(twoDigitYearFirstDate.exec(text), 1, 3, 4)
        : (text) => dayOfParts(yearFirstDate.exec(text), 1, 3, 4);
    case 'dayFirst': {
      const pattern = isTwoDigitYear ? twoDigitYearLastDate : yearLastDate;
      return (text) => dayOfParts(pattern.exec(text), 4, 3, 1);
    }
    case 'monthFirst': {
      const pattern = isTwoDigitYear ? twoDigitYearLastDate : yearLastDate;
      return (text) => dayOfParts(pattern.exec(text), 4, 1, 3);
    }
    case 'monthName':
      return dayOfNamedMonth;
  }
}

function dayOfParts(parts: RegExpExecArray | null, year: number, month: number, day: number): number {
  if (parts === null) return Number.NaN;
  return dayOf(fullYear(parts[year] ?? ''), Number(parts[month]), Number(parts[day]));
}

// Words beside the month (weekdays, "de", "of") say nothing that the numbers do not.
function dayOfNamedMonth(text: string): number {
  if (!/\p{L}{3}/u.test(text)) return Number.NaN;
  const tokens = text.slice(0, 40).split(/[\s\-/.,]+/);
  const months = tokens.map(monthOfName).filter((month) => month !== null);
  const numbers = tokens.flatMap((token) => /^(\d+)(?:st|nd|rd|th|er|º|ª)?$/.exec(token)?.[1] ?? []);
  const [month] = months;
  const [first, second] = numbers;
  if (month === undefined || first === undefined || second === undefined || numbers.length > 2)
    return Number.NaN;
  return first.length === 4
    ? dayOf(fullYear(first), month, Number(second))
    : dayOf(fullYear(second), month, Number(first));
}

// Two digits: 90 to 99 are the last century, because no reading from before 1990 is accepted.
function fullYear(text: string): number {
  const year = Number(text);
  if (text.length === 4) return year;
  if (text.length !== 2) return Number.NaN;
  return year >= 90 ? 1900 + year : 2000 + year;
}

function dayOf(year: number, month: number, day: number): number {
  if (!(year >= 1000) || month < 1 || month > 12 || day < 1 || day > 31) return Number.NaN;
  const date = new Date(Date.UTC(year, month - 1, day));
  return date.getUTCDate() === day ? date.getTime() / DAY_MS : Number.NaN;
}
