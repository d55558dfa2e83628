import { isTime, kindOfCell, splitMeasured } from './cell-kinds';
import { LoggerFileError } from './logger-file-error';
import type { LoggerFileShape, LoggerSeries } from './logger-file-shape';
import { MAX_SERIES } from './logger-file-shape';
import { createNumberParser } from './number-text';
import { quantityRules } from './quantities';
import type { ReadingRejection, ReadingRejectionCode } from './reading-rejection';
import { rejectionMessages } from './reading-rejection';
import { createRecordSplitter } from './record-splitter';
import { rowIdentity, seriesColumnsOf, seriesInRow } from './row-series';
import { createTextDecoder } from './text-decoder';
import type { TimeTrack } from './time-reader';
import { createTimeReader, newTimeTrack } from './time-reader';
import { dimensionOf, storedValue, unitOfText } from './units';

/** Where the reader hands on what it finds; called synchronously, in the order of the file. */
export interface LoggerFileSink {
  /**
   * @param series - The same object for every reading of a series.
   * @param atMs - Instant, in milliseconds since 1970 (UTC).
   * @param value - Value in the stored unit of the series' quantity.
   * @param line - Line of the file, from 1.
   */
  onReading(series: LoggerSeries, atMs: number, value: number, line: number): void;
  onRejected(rejection: ReadingRejection): void;
}

/** What the file is read against. */
export interface LoggerFileReaderContext {
  /** Instant at which elapsed time is zero, in milliseconds since 1970; required for files with elapsed time. */
  readonly startAtMs?: number;
  /** Now, in milliseconds since 1970; readings more than two days after it are refused. */
  readonly referenceMs?: number;
}

/** Counts of a whole file. */
export interface LoggerFileTotals {
  /** Lines of the file. */
  lines: number;
  /** Lines with readings or with something refused. */
  rows: number;
  /** Readings handed on. */
  readings: number;
  /** Cells that say "no value". */
  missing: number;
  /** Lines and cells refused. */
  rejected: number;
  /** Lines that are not rows: blank, the header again, notes before and after the readings. */
  skippedLines: number;
}

/** Reads one file, piece by piece. */
export interface LoggerFileReader {
  /** Takes the next piece of the file; everything complete in it is handed on before this returns. */
  write(bytes: Uint8Array): void;
  /** Hands on what is left and returns the counts. */
  end(): LoggerFileTotals;
}

// Larger pieces make more short-lived cells than the young generation of the collector holds, which costs speed.
const PIECE_BYTES = 65_536;

/**
 * Makes the reader of one file. It keeps nothing of the file but the line it is in, whatever the size of the file.
 *
 * @param shape - How the file is laid out, as recognised or kept and as the person corrected it.
 * @param sink - Where readings and refusals go.
 * @throws {@link LoggerFileError} at once `START_REQUIRED`; from `write` and `end` whatever makes the rest of the
 * file unreadable: `MIXED_ENCODING`, `NUL_BYTE`, `LINE_TOO_LONG`, `UNCLOSED_QUOTE`, `TOO_MANY_SERIES`.
 */
export function createLoggerFileReader(
  shape: LoggerFileShape,
  sink: LoggerFileSink,
  context: LoggerFileReaderContext = {},
): LoggerFileReader {
  if (shape.timeFormat.kind === 'elapsed' && context.startAtMs === undefined) {
    throw new LoggerFileError(
      'START_REQUIRED',
      'The file counts time from a start that must be given.',
      1,
      1,
    );
  }
  const decoder = createTextDecoder(shape.encoding);
  const totals: LoggerFileTotals = {
    lines: 0,
    rows: 0,
    readings: 0,
    missing: 0,
    rejected: 0,
    skippedLines: 0,
  };
  const readRow = createRowReader(shape, sink, context, totals);
  const splitter = createRecordSplitter(shape, (cells, line) => {
    if (line >= shape.firstDataLine) readRow(cells, line);
    else totals.skippedLines += 1;
  });
  return {
    write(bytes) {
      for (let start = 0; start < bytes.length; start += PIECE_BYTES) {
        const text = decoder.write(bytes.subarray(start, start + PIECE_BYTES), splitter.linesBefore);
        splitter.write(text);
      }
    },
    end() {
      splitter.write(decoder.end(splitter.linesBefore));
      splitter.end();
      totals.lines = splitter.linesBefore;
      return totals;
    },
  };
}

/** A series with what reading its cells needs at hand. */
interface SeriesReader {
  readonly series: LoggerSeries;
  readonly low: number;
  readonly high: number;
  readonly isStoredUnit: boolean;
}

/** The series of rows that follow each other, with the memory of their times. */
interface RowGroup {
  readonly track: TimeTrack;
  readonly readers: readonly SeriesReader[];
}

function createRowReader(
  shape: LoggerFileShape,
  sink: LoggerFileSink,
  context: LoggerFileReaderContext,
  totals: LoggerFileTotals,
): (cells: string[], line: number) => void {
  const parseNumber = createNumberParser(shape);
  const missingMarks = new Set(shape.missingMarks);
  const readTime = createTimeReader({
    format: shape.timeFormat,
    order: shape.order,
    parseNumber,
    startAtMs: context.startAtMs ?? null,
    referenceMs: context.referenceMs ?? null,
  });
  const groupOf = createGroups(shape);
  const columns = rowColumns(shape);

  const reject = (line: number, column: number, code: ReadingRejectionCode, text: string): void => {
    totals.rejected += 1;
    sink.onRejected({
      line,
      column: column + 1,
      code,
      text: text.slice(0, 80),
      message: rejectionMessages[code],
    });
  };

  /** The value in the stored unit; null where none is stated, undefined where it was refused. */
  const readSpecial = (cell: string, { series }: SeriesReader, line: number): number | null | undefined => {
    if (missingMarks.has(cell.toLowerCase())) return null;
    const measured = splitMeasured(cell);
    const unit = measured === null ? null : unitOfText(measured.unitText);
    const value = measured === null ? Number.NaN : parseNumber(measured.number);
    if (unit === null || Number.isNaN(value)) {
      reject(line, series.column, 'NOT_A_NUMBER', cell);
      return undefined;
    }
    if (dimensionOf(unit) !== quantityRules[series.quantity].dimension) {
      reject(line, series.column, 'UNIT_UNKNOWN', cell);
      return undefined;
    }
    return storedValue(unit, value);
  };

  const readCell = (cell: string, reader: SeriesReader, atMs: number, line: number): void => {
    const number = cell === '' ? Number.NaN : parseNumber(cell);
    const isPlain = !Number.isNaN(number);
    const stored = reader.isStoredUnit || !isPlain ? number : storedValue(reader.series.unit, number);
    const value = isPlain ? stored : readSpecial(cell.trim(), reader, line);
    if (value === null) totals.missing += 1;
    else if (value !== undefined && value >= reader.low && value <= reader.high) {
      totals.readings += 1;
      sink.onReading(reader.series, atMs, value, line);
    } else if (value !== undefined) reject(line, reader.series.column, 'VALUE_OUT_OF_RANGE', cell);
  };

  return (cells, line) => {
    const date = (cells[columns.date] ?? '').trim();
    if (isNote(shape, cells, date)) {
      totals.skippedLines += 1;
      return;
    }
    totals.rows += 1;
    if (cells.length <= columns.last) {
      reject(line, cells.length - 1, 'TOO_FEW_COLUMNS', cells.join(' '));
      return;
    }
    if (hasSurplus(cells, shape.columns.length)) {
      reject(line, shape.columns.length, 'TOO_MANY_COLUMNS', cells.slice(shape.columns.length).join(' '));
      return;
    }
    const clock = columns.clock === null ? null : (cells[columns.clock] ?? '').trim();
    const { track, readers } = groupOf(cells, line);
    const atMs = readTime(date, clock, track);
    if (typeof atMs !== 'number')
      reject(line, columns.date, atMs, clock === null ? date : `${date} ${clock}`);
    else if (readers.length === 0) reject(line, columns.name, 'QUANTITY_UNKNOWN', cells[columns.name] ?? '');
    else for (const reader of readers) readCell(cells[reader.series.column] as string, reader, atMs, line);
  };
}

/** Where a row keeps its time, and the last cell that it must have. */
interface RowColumns {
  readonly date: number;
  readonly clock: number | null;
  /** Cell that says what the row measures; the first cell where none does. */
  readonly name: number;
  readonly last: number;
}

function rowColumns(shape: LoggerFileShape): RowColumns {
  const indexOf = (roles: readonly string[]): number | null =>
    shape.columns.find(({ role }) => roles.includes(role))?.index ?? null;
  const read = shape.columns.filter(({ role, quantity }) =>
    role === 'quantity' ? quantity !== null : role !== 'ignore' && role !== 'rowNumber',
  );
  const date = indexOf(['time', 'date']);
  return {
    date: date ?? indexOf(['timeOfDay']) ?? 0,
    clock: date === null ? null : indexOf(['timeOfDay']),
    name: indexOf(['quantityName']) ?? 0,
    last: Math.max(...read.map(({ index }) => index)),
  };
}

/** Remembers the series by what names them in a row; a plain wide file has one group for all rows. */
function createGroups(shape: LoggerFileShape): (cells: readonly string[], line: number) => RowGroup {
  const columns = seriesColumnsOf(shape);
  const groups = new Map<string, RowGroup>();
  let seriesCount = 0;
  const makeGroup = (cells: readonly string[]): RowGroup => {
    const readers = seriesInRow(shape, cells).map((found): SeriesReader => {
      const { low, high } = quantityRules[found.quantity];
      const isStoredUnit = storedValue(found.unit, 1) === 1;
      return { series: { ...found, index: seriesCount++ }, low, high, isStoredUnit };
    });
    return { track: newTimeTrack(), readers };
  };
  return (cells, line) => {
    const identity = rowIdentity(columns, cells);
    const known = groups.get(identity);
    if (known !== undefined) return known;
    const group = makeGroup(cells);
    groups.set(identity, group);
    if (groups.size > MAX_SERIES || seriesCount > MAX_SERIES) {
      const message = `The file names more than ${MAX_SERIES} sensors and quantities.`;
      throw new LoggerFileError('TOO_MANY_SERIES', message, line, (columns.sensorName ?? 0) + 1);
    }
    return group;
  };
}

/**
 * A blank line, the header again, or words before or after the readings: no time, and no number where numbers are read.
 */
function isNote(shape: LoggerFileShape, cells: readonly string[], date: string): boolean {
  const first = date.charCodeAt(0);
  if (first >= 48 && first <= 57) return false;
  const isMeasured = shape.columns.some(
    ({ role, index }) =>
      (role === 'quantity' || role === 'value') && /^[+\-−]?[.,]?\d/.test((cells[index] ?? '').trim()),
  );
  return !isMeasured && !isTime(kindOfCell(date));
}

function hasSurplus(cells: readonly string[], width: number): boolean {
  return cells.length > width && cells.slice(width).some((cell) => cell.trim() !== '');
}
