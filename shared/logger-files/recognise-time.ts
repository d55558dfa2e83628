import { createClockParser, splitTime } from './clock-text';
import type { DateForm } from './date-text';
import { createDateParser, dateFormsOf } from './date-text';
import { elapsedUnitOfHeader, isElapsedUnit } from './elapsed-text';
import { headerSays } from './header-words';
import type {
  ElapsedUnit,
  LoggerFileShape,
  RecognitionQuestion,
  TimeFormat,
  TimeKind,
} from './logger-file-shape';
import { LoggerFileError } from './logger-file-error';
import { zoneOfName } from './local-time';
import type { NumberParser } from './number-text';
import { EARLIEST_READING_MS } from './time-reader';
import { chooseDateForm } from './choose-date-form';
import type { HeaderCell } from './recognise-header';
import type { SampleTable } from './recognise-table';

/** The columns that say when, and how to read them. */
export interface RecognisedTime {
  readonly roles: ReadonlyMap<number, 'time' | 'date' | 'timeOfDay'>;
  readonly format: TimeFormat;
  readonly order: LoggerFileShape['order'];
  readonly questions: readonly RecognitionQuestion[];
  /** One sentence on how the times are read. */
  readonly reason: string;
}

/** What the times of a sample are judged with. */
export interface TimeRecognitionContext {
  /** Zone of the room, for times that do not state theirs. */
  readonly zone: string;
  readonly parseNumber: NumberParser;
  /** Now, or null; a date after it speaks against an order of day and month. */
  readonly referenceMs: number | null;
}

/**
 * Finds the time columns: one with date and time; a date beside a time of day; a date alone; else numbers that count
 * seconds, milliseconds or days; else elapsed time.
 *
 * @throws {@link LoggerFileError} `NO_TIME`.
 */
export function recogniseTime(
  table: SampleTable,
  header: readonly HeaderCell[],
  context: TimeRecognitionContext,
): RecognisedTime {
  const calendar = calendarColumns(table, header);
  if (calendar !== null) return recogniseCalendar(table, header, calendar, context);
  const counted = recogniseCounted(table, header, context) ?? recogniseElapsed(table, header, context);
  if (counted !== null) return counted;
  const line = table.rows[0]?.line ?? 1;
  throw new LoggerFileError('NO_TIME', 'No column says when the readings were taken.', line, 1);
}

interface CalendarColumns {
  readonly date: number;
  readonly clock: number | null;
}

function calendarColumns({ kinds }: SampleTable, header: readonly HeaderCell[]): CalendarColumns | null {
  const inHeader = (index: number): boolean => headerSays(header[index]?.name ?? '', 'time');
  const ofKind = (kind: string): number => {
    const indexes = kinds.flatMap((found, index) => (found === kind ? [index] : []));
    return indexes.find(inHeader) ?? indexes[0] ?? -1;
  };
  const dateTime = ofKind('dateTime');
  if (dateTime >= 0) return { date: dateTime, clock: null };
  const date = ofKind('date');
  const clock = ofKind('clock');
  return date < 0 ? null : { date, clock: clock < 0 ? null : clock };
}

function recogniseCalendar(
  table: SampleTable,
  header: readonly HeaderCell[],
  columns: CalendarColumns,
  context: TimeRecognitionContext,
): RecognisedTime {
  const parseClock = createClockParser();
  let twelveHour = false;
  let hasOffset = false;
  const times = table.rows.flatMap(({ cells }) => {
    const cell = cells[columns.date] ?? '';
    const split =
      columns.clock === null ? splitTime(cell) : { date: cell, clock: cells[columns.clock] ?? '' };
    if (dateFormsOf(split.date).length === 0) return [];
    const clock = parseClock(split.clock);
    twelveHour ||= clock.isTwelveHour;
    hasOffset ||= clock.offsetMs !== null;
    return [{ date: split.date, clockMs: Number.isNaN(clock.clockMs) ? 0 : clock.clockMs }];
  });
  const choice = chooseDateForm(times, columns.date, twelveHour, context.referenceMs);
  const headerText = `${header[columns.date]?.name ?? ''} ${columns.clock === null ? '' : (header[columns.clock]?.name ?? '')}`;
  const parseDate = createDateParser(choice.form);
  const zone = zoneOfHeader(headerText) ?? context.zone;
  const roles = new Map<number, 'time' | 'date' | 'timeOfDay'>(
    columns.clock === null
      ? [[columns.date, 'time']]
      : [
          [columns.date, 'date'],
          [columns.clock, 'timeOfDay'],
        ],
  );
  return {
    roles,
    format: { ...calendarFormat(choice.form), twelveHour, hasOffset, zone, elapsedUnit: null },
    order: orderOf(times.map(({ date, clockMs }) => parseDate(date) * 86_400_000 + clockMs)),
    questions: choice.question === null ? [] : [choice.question],
    reason: `${choice.reason} ${hasOffset ? 'They state their offset from UTC.' : `They are read in the zone ${zone}.`}`,
  };
}

function calendarFormat(form: DateForm): Pick<TimeFormat, 'kind' | 'twoDigitYear'> {
  return { kind: form.order, twoDigitYear: form.isTwoDigitYear };
}

/** A zone stated in a header, as in `Time (UTC)` or `Date Time, GMT+01:00`. */
function zoneOfHeader(header: string): string | null {
  const parts = /\b(?:UTC|GMT)\s*(?:([+-]\d{1,2})(?::?(\d{2}))?)?/i.exec(header.replace('−', '-'));
  if (parts === null) return null;
  const [, hours, minutes] = parts;
  if (hours === undefined) return 'UTC';
  const name = `UTC${hours}${minutes === undefined ? '' : `:${minutes}`}`;
  return zoneOfName(name) === null ? null : name;
}

const COUNTED_END_MS = Date.UTC(2100, 0, 1);
const countedKinds = [
  { kind: 'unixMilliseconds', toMs: (value: number) => value, words: 'milliseconds since 1970' },
  { kind: 'unixSeconds', toMs: (value: number) => value * 1000, words: 'seconds since 1970' },
  {
    kind: 'spreadsheetDays',
    toMs: (value: number) => (value - 25_569) * 86_400_000,
    words: 'serial days of a spreadsheet',
  },
] as const satisfies readonly { kind: TimeKind; toMs: (value: number) => number; words: string }[];

function recogniseCounted(
  table: SampleTable,
  header: readonly HeaderCell[],
  context: TimeRecognitionContext,
): RecognisedTime | null {
  for (const index of numberColumns(table, header)) {
    const values = numbersOf(table, index, context.parseNumber);
    for (const { kind, toMs, words } of countedKinds) {
      const isInRange = values.every(
        (value) => toMs(value) >= EARLIEST_READING_MS && toMs(value) < COUNTED_END_MS,
      );
      // Light in lux reaches the serial days of our years too, but it does not climb steadily.
      if (!isInRange || !isSteady(values)) continue;
      return {
        roles: new Map([[index, 'time']]),
        format: numericFormat(kind, kind === 'spreadsheetDays' ? context.zone : 'UTC', null),
        order: orderOf(values),
        questions: [],
        reason: `The times are ${words}.`,
      };
    }
  }
  return null;
}

const countedWords: Readonly<Record<ElapsedUnit, string>> = {
  clock: 'time',
  s: 'seconds',
  min: 'minutes',
  h: 'hours',
  d: 'days',
};

function recogniseElapsed(
  table: SampleTable,
  header: readonly HeaderCell[],
  context: TimeRecognitionContext,
): RecognisedTime | null {
  const clock = table.kinds.indexOf('clock');
  const counted = numberColumns(table, header).find((index) => {
    const name = header[index]?.name ?? '';
    const values = numbersOf(table, index, context.parseNumber);
    // A bare unit may also head a duration that was measured, which does not climb from zero.
    const says =
      headerSays(name, 'elapsed') ||
      headerSays(name, 'time') ||
      (isElapsedUnit(name) && values[0] === 0 && orderOf(values) === 'ascending');
    return says && isSteady(values);
  });
  const index = clock >= 0 ? clock : counted;
  if (index === undefined) return null;
  const { name = '', unitLine = '' } = header[index] ?? {};
  const unit: ElapsedUnit = clock >= 0 ? 'clock' : (elapsedUnitOfHeader(`${name} ${unitLine}`) ?? 's');
  const first = table.rows[0]?.cells[index] ?? '';
  const question: RecognitionQuestion = {
    code: 'ELAPSED_NEEDS_START',
    column: index,
    message: `The file counts ${countedWords[unit]} from a start that it does not state. When did the logger start (time zero)?`,
    evidence: { first, last: table.rows.at(-1)?.cells[index] ?? '', unit },
  };
  return {
    roles: new Map([[index, 'time']]),
    format: numericFormat('elapsed', context.zone, unit),
    order: 'ascending',
    questions: [question],
    reason: `The times count ${countedWords[unit]} from the start of the logger.`,
  };
}

function numericFormat(kind: TimeKind, zone: string, elapsedUnit: ElapsedUnit | null): TimeFormat {
  return { kind, twelveHour: false, twoDigitYear: false, hasOffset: false, zone, elapsedUnit };
}

/** Columns of numbers, those that the header calls a time first. */
function numberColumns({ kinds }: SampleTable, header: readonly HeaderCell[]): number[] {
  const indexes = kinds.flatMap((kind, index) => (kind === 'number' ? [index] : []));
  const isNamed = (index: number): boolean => headerSays(header[index]?.name ?? '', 'time');
  return [...indexes.filter(isNamed), ...indexes.filter((index) => !isNamed(index))];
}

function numbersOf(table: SampleTable, index: number, parseNumber: NumberParser): number[] {
  return table.rows
    .map(({ cells }) => parseNumber(cells[index] ?? ''))
    .filter((value) => !Number.isNaN(value));
}

function isSteady(values: readonly number[]): boolean {
  const rises = values.every((value, index) => index === 0 || value >= (values[index - 1] as number));
  const falls = values.every((value, index) => index === 0 || value <= (values[index - 1] as number));
  return values.length > 0 && (rises || falls) && (values.length < 2 || values[0] !== values.at(-1));
}

function orderOf(times: readonly number[]): LoggerFileShape['order'] {
  let rising = 0;
  let falling = 0;
  times.forEach((time, index) => {
    const previous = times[index - 1] ?? time;
    if (time > previous) rising += 1;
    if (time < previous) falling += 1;
  });
  return falling > rising ? 'descending' : 'ascending';
}
