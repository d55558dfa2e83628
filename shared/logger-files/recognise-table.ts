import type { CellKind } from './cell-kinds';
import { isTime, kindOfCell } from './cell-kinds';
import { headerSays, meaningOfHeader } from './header-words';
import { LoggerFileError } from './logger-file-error';
import type { Delimiter } from './logger-file-shape';
import { MAX_COLUMNS, MAX_LINE_LENGTH } from './logger-file-shape';
import { createRecordSplitter } from './record-splitter';

/** One line of the sample, cut into cells without surrounding space. */
export interface SampleRow {
  readonly line: number;
  readonly cells: readonly string[];
}

/** A sample cut into rows and columns. */
export interface SampleTable {
  readonly delimiter: Delimiter;
  readonly quote: '"' | "'";
  /** Rows before the first row of readings, blank lines left out. */
  readonly head: readonly SampleRow[];
  /** The first row of readings and the rows after it that look like it. */
  readonly rows: readonly SampleRow[];
  /** What most cells of each column are. */
  readonly kinds: readonly CellKind[];
}

// Two preferences meet in a tie: a character that separates nothing else, and fewer columns of text.
const delimiters: readonly Delimiter[] = ['\t', ';', '|', ',', 'spaces'];

/** Lines that delimiters are compared by; more would not change which of them wins. */
const JUDGED_LINES = 500;

/**
 * Cuts a sample into a table: tries each delimiter and takes the one whose rows agree best with being a table of
 * times and numbers.
 *
 * @param text - Decoded start of the file.
 * @param isTruncated - True where the file goes on, so that its last line may be cut.
 * @throws {@link LoggerFileError} `LINE_TOO_LONG`, `UNCLOSED_QUOTE`, `TOO_MANY_COLUMNS`, `ONE_COLUMN`, `HEADER_ONLY`,
 * `NO_TIME` or `NO_VALUES`, with the line.
 */
export function recogniseTable(text: string, isTruncated: boolean): SampleTable {
  const quote = quoteOf(text);
  const judged = firstLines(text, JUDGED_LINES);
  const isPart = isTruncated || judged.length < text.length;
  const candidates = delimiters.map((delimiter) => tableOf(judged, delimiter, quote, isPart));
  const tables = candidates.filter((candidate) => candidate.score > 0);
  const best = tables.reduce<Candidate | null>(
    (winner, candidate) => (winner === null || candidate.score > winner.score ? candidate : winner),
    null,
  );
  const lost = candidates.find(
    ({ error, rows, delimiter }) => error !== null && rows.length === 0 && delimiter !== 'spaces',
  );
  const error = best?.error ?? lost?.error ?? null;
  if (error !== null) throw error;
  refuseWide(best === null ? candidates : [best]);
  if (best === null) throw refusalOf(candidates);
  const { delimiter, kinds } = best;
  const { rows, error: laterError } = rowsOf(text, delimiter, quote, isTruncated);
  if (laterError !== null) throw laterError;
  const first = rows.findIndex((row) => fits(row, kinds));
  return {
    delimiter,
    quote,
    head: rows.slice(0, first),
    rows: rows.slice(first).filter((row) => fits(row, kinds)),
    kinds,
  };
}

interface Candidate {
  readonly delimiter: Delimiter;
  readonly rows: readonly SampleRow[];
  readonly kinds: readonly CellKind[];
  readonly score: number;
  /** What stopped the cutting, or null; the rows are those before it. */
  readonly error: LoggerFileError | null;
}

/** Tells whether the numbers of a column are as long as seconds or milliseconds since 1970, which no measured value is. */
function isUnixTime(rows: readonly SampleRow[], index: number): boolean {
  const numbers = rows.map(({ cells }) => cells[index] ?? '').filter((cell) => kindOfCell(cell) === 'number');
  return numbers.every((cell) => /^\d{9,10}(\.\d+)?$|^\d{12,13}$/.test(cell));
}

function firstLines(text: string, count: number): string {
  let end = 0;
  for (let line = 0; line < count; line += 1) {
    const next = text.slice(end, end + MAX_LINE_LENGTH).search(/[\r\n]/);
    if (next < 0) return text;
    end += next + 1;
  }
  return text.slice(0, end);
}

function quoteOf(text: string): '"' | "'" {
  const lines = text.split('\n', 200);
  const quoted = lines.filter((line) => /(^|[,;\t|])'[^']*'(?=[,;\t|\r]|$)/.test(line));
  return !text.includes('"') && quoted.length > lines.length / 2 ? "'" : '"';
}

function tableOf(text: string, delimiter: Delimiter, quote: '"' | "'", isTruncated: boolean): Candidate {
  const { rows, error } = rowsOf(text, delimiter, quote, isTruncated);
  const width = usualWidth(rows);
  const ofWidth = rows.filter((row) => row.cells.length === width);
  // The end of a short file may be a footer and its start is the header, so the middle speaks for the columns.
  const spoken = ofWidth.length > 8 ? ofWidth.slice(Math.floor(ofWidth.length / 4)) : ofWidth.slice(-6);
  const kinds = Array.from({ length: Math.min(width, MAX_COLUMNS) }, (_, index) => usualKind(spoken, index));
  const fitting = ofWidth.filter((row) => fits(row, kinds)).length;
  const typed = kinds.filter((kind) => kind !== 'text').length;
  const hasTime = kinds.some(
    (kind, index) => isTime(kind) || (kind === 'number' && isUnixTime(spoken, index)),
  );
  const isTable = width > 1 && fitting > 0 && kinds.includes('number');
  const score = isTable ? (fitting / rows.length) * (typed / width + (hasTime ? 1 : 0)) : 0;
  return { delimiter, rows, kinds, score, error };
}

function rowsOf(
  text: string,
  delimiter: Delimiter,
  quote: '"' | "'",
  isTruncated: boolean,
): Pick<Candidate, 'rows' | 'error'> {
  const rows: SampleRow[] = [];
  const splitter = createRecordSplitter({ delimiter, quote }, (cells, line) => {
    const isBlank = cells.length === 1 && (cells[0] ?? '').trim() === '';
    if (!isBlank) rows.push({ line, cells: cells.map((cell) => cell.trim()) });
  });
  try {
    splitter.write(text);
    if (!isTruncated) splitter.end();
  } catch (error) {
    if (!(error instanceof LoggerFileError)) throw error;
    return { rows, error };
  }
  if (rows.length > 0) return { rows, error: null };
  const message =
    'The first line does not end within the part of the file that was looked at; a row of readings never is so long.';
  throw new LoggerFileError('LINE_TOO_LONG', message, 1, Math.min(text.length, MAX_LINE_LENGTH) + 1);
}

/** The commonest number of cells; of two as common, the larger. */
function usualWidth(rows: readonly SampleRow[]): number {
  const counts = new Map<number, number>();
  for (const { cells } of rows) counts.set(cells.length, (counts.get(cells.length) ?? 0) + 1);
  return [...counts].reduce(
    (best, [width, count]) =>
      count > best[1] || (count === best[1] && width > best[0]) ? [width, count] : best,
    [0, 0],
  )[0];
}

/**
 * What a column holds, told from the cells that are times or numbers as soon as they are a fifth: in a short file the header, and
 * in a damaged one the words that stand for values, may be as many.
 */
function usualKind(rows: readonly SampleRow[], index: number): CellKind {
  const counts = new Map<CellKind, number>();
  for (const { cells } of rows) {
    const kind = kindOfCell(cells[index] ?? '');
    if (kind !== 'missing') counts.set(kind, (counts.get(kind) ?? 0) + 1);
  }
  const filled = [...counts.values()].reduce((sum, count) => sum + count, 0);
  const typed = [...counts].filter(([kind]) => kind !== 'text').sort((a, b) => b[1] - a[1]);
  const [usual] = typed;
  if (usual !== undefined && typed.reduce((sum, [, count]) => sum + count, 0) * 5 >= filled) return usual[0];
  return filled === 0 ? 'missing' : 'text';
}

/** Tells whether a row is one of readings: it has its times, and a number or nothing where numbers are usual. */
function fits(row: SampleRow, kinds: readonly CellKind[]): boolean {
  if (row.cells.length !== kinds.length) return false;
  const hasTime = kinds.some(isTime);
  const agrees = (kind: CellKind, index: number): boolean => {
    const found = kindOfCell(row.cells[index] ?? '');
    return found === kind || found === 'missing' || isBothTimes(kind, found);
  };
  const numbers = kinds.flatMap((kind, index) => (kind === 'number' ? [agrees(kind, index)] : []));
  if (!hasTime) return numbers.every(Boolean) && row.cells.some((cell) => kindOfCell(cell) === 'number');
  const isTimed = kinds.every(
    (kind, index) => !isTime(kind) || (row.cells[index] !== '' && agrees(kind, index)),
  );
  return isTimed && numbers.some(Boolean);
}

// A whole number can be a compact date by accident, and midnight may be written as a date alone.
function isBothTimes(usual: CellKind, found: CellKind): boolean {
  return (usual === 'dateTime' && found === 'date') || (usual === 'number' && found === 'date');
}

function refuseWide(candidates: readonly Candidate[]): void {
  for (const { rows } of candidates) {
    const wide = rows.find((row) => row.cells.length > MAX_COLUMNS);
    if (wide === undefined) continue;
    const message = `The file has ${wide.cells.length} columns; at most ${MAX_COLUMNS} can be brought in.`;
    throw new LoggerFileError('TOO_MANY_COLUMNS', message, wide.line, MAX_COLUMNS + 1);
  }
}

function refusalOf(candidates: readonly Candidate[]): LoggerFileError {
  const headed = candidates.find(({ rows }) =>
    rows.some((row) => row.cells.length > 1 && isHeader(row.cells)),
  );
  const header = headed?.rows.find((row) => isHeader(row.cells));
  if (header !== undefined) {
    return new LoggerFileError(
      'HEADER_ONLY',
      'The file has a header but no readings below it.',
      header.line,
      1,
    );
  }
  const line = candidates[0]?.rows[0]?.line ?? 1;
  const isOneColumn = candidates.every(({ rows }) => usualWidth(rows) < 2);
  return isOneColumn
    ? new LoggerFileError(
        'ONE_COLUMN',
        'The file has a single column; readings need a time and a value.',
        line,
        1,
      )
    : new LoggerFileError('NO_VALUES', 'No line of the file holds a time and a number.', line, 1);
}

function isHeader(cells: readonly string[]): boolean {
  return (
    cells.some((cell) => headerSays(cell, 'time')) && cells.some((cell) => meaningOfHeader(cell) !== null)
  );
}
