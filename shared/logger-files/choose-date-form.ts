import type { DateForm } from './date-text';
import { createDateParser, dateFormsOf } from './date-text';
import type { RecognitionQuestion } from './logger-file-shape';

/** A date with the time of day beside it. */
export interface DatedRow {
  readonly date: string;
  /** Milliseconds since midnight. */
  readonly clockMs: number;
}

/** The form in which the dates are read, and the question that is left. */
export interface DateFormChoice {
  readonly form: DateForm;
  readonly question: RecognitionQuestion | null;
  readonly reason: string;
}

const DAY_MS = 86_400_000;

/**
 * Chooses the form of a column of dates from all its rows: first by which forms every date is valid in, then by dates that
 * would lie in the future, then by the order and the spacing of the rows. What is still open is asked.
 *
 * @param rows - The dates of the sample in the order of the file.
 * @param column - Column of the dates, from 0, for the question.
 * @param isTwelveHour - True where times state AM and PM; then month first is the likelier provisional answer.
 * @param referenceMs - Now, or null where it is not known.
 */
export function chooseDateForm(
  rows: readonly DatedRow[],
  column: number,
  isTwelveHour: boolean,
  referenceMs: number | null,
): DateFormChoice {
  const valid = formsOfMost(rows);
  const [only] = valid;
  if (only === undefined) throw new RangeError('A column of dates needs at least one date');
  if (valid.length === 1) return { form: only, question: null, reason: `Dates are ${words(only)}.` };
  // With full stops the day comes first wherever that is possible (common practice, no source).
  const pointed = valid.find((form) => form.order === 'dayFirst');
  if (pointed !== undefined && rows.every(({ date }) => /^\d{1,2}\.\s?\d{1,2}\./.test(date))) {
    return {
      form: pointed,
      question: null,
      reason: `Dates are ${words(pointed)}, as usual with full stops.`,
    };
  }
  const timelines = valid.map((form) => timelineOf(rows, form));
  const past = timelines.filter(({ lastMs }) => referenceMs === null || lastMs <= referenceMs + 2 * DAY_MS);
  const likely = past.length > 0 ? past : timelines;
  const ordered = likely.filter(
    ({ disorder }) => disorder === Math.min(...likely.map((line) => line.disorder)),
  );
  const spaced = ordered.filter(
    ({ longestGapMs }) => longestGapMs * 5 < Math.max(...ordered.map((line) => line.longestGapMs)),
  );
  const decided = spaced.length === 1 ? spaced : ordered;
  const [chosen] = decided;
  if (decided.length === 1 && chosen !== undefined) {
    const why =
      likely.length === 1 ? 'otherwise they lie in the future' : 'only so the rows follow each other';
    return { form: chosen.form, question: null, reason: `Dates are ${words(chosen.form)}: ${why}.` };
  }
  return ask(decided, rows, column, isTwelveHour);
}

function ask(
  open: readonly Timeline[],
  rows: readonly DatedRow[],
  column: number,
  isTwelveHour: boolean,
): DateFormChoice {
  const wanted = isTwelveHour ? 'monthFirst' : 'dayFirst';
  const form = (open.find((line) => line.form.order === wanted) ?? open[0])?.form as DateForm;
  const readings = open.map(
    (line) => [line.form.order, new Date(line.firstMs).toISOString().slice(0, 10)] as const,
  );
  return {
    form,
    question: {
      code: 'AMBIGUOUS_DAY_MONTH',
      column,
      message: `“${rows[0]?.date ?? ''}” can be read in ${open.length} ways, and no row of the file decides. Which is right?`,
      evidence: {
        first: rows[0]?.date ?? '',
        last: rows.at(-1)?.date ?? '',
        differentDates: new Set(rows.map(({ date }) => date)).size,
        ...Object.fromEntries(readings),
      },
    },
    reason: `Dates may be ${open.map((line) => words(line.form)).join(' or ')}.`,
  };
}

/** The forms in which nearly every date is valid; a damaged row does not rule a form out. */
function formsOfMost(rows: readonly DatedRow[]): DateForm[] {
  const dates = new Map<string, number>();
  for (const { date } of rows) dates.set(date, (dates.get(date) ?? 0) + 1);
  const counts = new Map<string, { form: DateForm; count: number }>();
  for (const [date, times] of dates) {
    for (const form of dateFormsOf(date)) {
      const entry = counts.get(words(form)) ?? { form, count: 0 };
      entry.count += times;
      counts.set(words(form), entry);
    }
  }
  const most = Math.max(0, ...[...counts.values()].map(({ count }) => count));
  return [...counts.values()].filter(({ count }) => count === most).map(({ form }) => form);
}

interface Timeline {
  readonly form: DateForm;
  readonly firstMs: number;
  readonly lastMs: number;
  /** Rows that go against the direction of the others. */
  readonly disorder: number;
  readonly longestGapMs: number;
}

function timelineOf(rows: readonly DatedRow[], form: DateForm): Timeline {
  const parse = createDateParser(form);
  const times = rows
    .map(({ date, clockMs }) => parse(date) * DAY_MS + clockMs)
    .filter((time) => !Number.isNaN(time));
  let rises = 0;
  let falls = 0;
  let longestGapMs = 0;
  times.forEach((time, index) => {
    const step = time - (times[index - 1] ?? time);
    if (step > 0) rises += 1;
    if (step < 0) falls += 1;
    longestGapMs = Math.max(longestGapMs, Math.abs(step));
  });
  const lastMs = times.reduce((latest, time) => Math.max(latest, time), Number.NEGATIVE_INFINITY);
  return { form, firstMs: times[0] ?? Number.NaN, lastMs, disorder: Math.min(rises, falls), longestGapMs };
}

function words({ order, isTwoDigitYear }: DateForm): string {
  const orders = {
    iso: 'ISO 8601',
    yearFirst: 'year first',
    dayFirst: 'day first',
    monthFirst: 'month first',
    monthName: 'with the name of the month',
  };
  return `${orders[order]}${isTwoDigitYear ? ' with a two-digit year' : ''}`;
}
