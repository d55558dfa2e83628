import { CsvError, parse } from 'csv-parse/sync';
import { LoggerFileError } from './logger-file-error';
import type { Delimiter, LoggerFileShape } from './logger-file-shape';
import { MAX_LINE_LENGTH } from './logger-file-shape';

/** Takes the cells of one line and its line number, from 1. */
export type RecordHandler = (cells: string[], line: number) => void;

/** Cuts text that arrives in pieces into lines and cells. */
export interface RecordSplitter {
  /** Takes the next piece of text; complete lines are handed on at once. */
  write(text: string): void;
  /** Hands on the last line, which may have no line end. */
  end(): void;
  /** Number of lines handed on or skipped so far. */
  readonly linesBefore: number;
}

// A quoted cell may run over several lines, but a row of readings is never this long: the quote was not closed.
const MAX_QUOTED_LENGTH = 65_536;

/**
 * Makes a splitter for one file.
 *
 * @param shape - Delimiter and quote of the file.
 * @param onRecord - Called for every line; a blank line has one empty cell.
 * @remarks
 * Memory is bounded by the longest line. Text without a single quote is split directly, which is four times as fast as
 * a full CSV parser and gives the same cells; text with quotes goes through csv-parse.
 * @throws {@link LoggerFileError} from `write` and `end`: `LINE_TOO_LONG`, `UNCLOSED_QUOTE`.
 */
export function createRecordSplitter(
  { delimiter, quote }: Pick<LoggerFileShape, 'delimiter' | 'quote'>,
  onRecord: RecordHandler,
): RecordSplitter {
  let rest = '';
  let linesBefore = 0;

  const splitPlain = (block: string): void => {
    for (const line of block.split('\n')) {
      linesBefore += 1;
      if (line.length > MAX_LINE_LENGTH) throw lineTooLong(linesBefore);
      onRecord(delimiter === 'spaces' ? splitAtSpaces(line) : line.split(delimiter), linesBefore);
    }
  };

  const splitQuoted = (block: string, isEnd: boolean): string => {
    const { records, open } = parseQuoted(block, delimiter, quote);
    for (const cells of records) {
      linesBefore += 1;
      onRecord(cells, linesBefore);
      for (const cell of cells) linesBefore += countLineEnds(cell);
    }
    if (open === null) return '';
    if (isEnd || open.text.length > MAX_QUOTED_LENGTH) throw unclosedQuote(linesBefore + 1, open.column);
    return open.text;
  };

  return {
    get linesBefore() {
      return linesBefore;
    },
    write(text) {
      rest += text;
      const end = endOfLastLine(rest);
      if (end > 0) {
        const block = normaliseLineEnds(rest.slice(0, end));
        const afterBlock = rest.slice(end);
        rest = '';
        if (block.includes(quote)) rest = splitQuoted(block, false);
        else splitPlain(block.slice(0, -1));
        rest += afterBlock;
      }
      if (rest.length > MAX_LINE_LENGTH) throw lineTooLong(linesBefore + 1);
    },
    end() {
      if (rest === '') return;
      const block = normaliseLineEnds(rest.endsWith('\n') || rest.endsWith('\r') ? rest : `${rest}\n`);
      rest = '';
      if (block.includes(quote)) splitQuoted(block, true);
      else splitPlain(block.slice(0, -1));
    },
  };
}

/** Index after the last line end that is surely whole: a CR at the very end may be half of a CRLF. */
function endOfLastLine(text: string): number {
  const lineFeed = text.lastIndexOf('\n');
  if (lineFeed === text.length - 1) return lineFeed + 1;
  return Math.max(lineFeed, text.length < 2 ? -1 : text.lastIndexOf('\r', text.length - 2)) + 1;
}

function normaliseLineEnds(text: string): string {
  return text.includes('\r') ? text.replace(/\r\n?/g, '\n') : text;
}

function splitAtSpaces(line: string): string[] {
  return line.trim().split(/ +/);
}

function countLineEnds(text: string): number {
  return text.includes('\n') ? text.split('\n').length - 1 : 0;
}

interface QuotedBlock {
  readonly records: string[][];
  /** What begins with the row in which a quote is still open, and the cell of that quote, from 1. */
  readonly open: { readonly text: string; readonly column: number } | null;
}

function parseQuoted(block: string, delimiter: Delimiter, quote: string): QuotedBlock {
  const parseRecords = (text: string, to = -1): string[][] => {
    const records = parse(text, {
      delimiter: delimiter === 'spaces' ? ' ' : delimiter,
      quote,
      escape: quote,
      record_delimiter: '\n',
      relax_quotes: true,
      relax_column_count: true,
      max_record_size: MAX_LINE_LENGTH,
      to,
    });
    return delimiter === 'spaces' ? records.map(withoutBlankCells) : records;
  };
  try {
    return { records: parseRecords(block), open: null };
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const complete = Number(error['records']);
    const records = complete === 0 ? [] : parseRecords(block, complete);
    const lines = records.flat().reduce((count, cell) => count + countLineEnds(cell), records.length);
    return { records, open: { text: fromLine(block, lines), column: Number(error['column']) + 1 } };
  }
}

function fromLine(text: string, lines: number): string {
  let start = 0;
  for (let line = 0; line < lines; line += 1) start = text.indexOf('\n', start) + 1;
  return text.slice(start);
}

function withoutBlankCells(cells: string[]): string[] {
  const filled = cells.filter((cell) => cell !== '');
  return filled.length === 0 ? [''] : filled;
}

function unclosedQuote(line: number, column: number): LoggerFileError {
  return new LoggerFileError(
    'UNCLOSED_QUOTE',
    'A quotation mark is opened here and never closed, so the rest of the file would be one cell.',
    line,
    column,
  );
}

function lineTooLong(line: number): LoggerFileError {
  return new LoggerFileError(
    'LINE_TOO_LONG',
    `This line is longer than ${MAX_LINE_LENGTH.toLocaleString('en')} characters; a row of readings never is.`,
    line,
    MAX_LINE_LENGTH + 1,
  );
}
