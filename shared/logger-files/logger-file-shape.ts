import type { DateOrder } from './date-text';
import type { DecimalMark, ThousandsMark } from './number-text';
import type { LoggerQuantity } from './quantities';
import type { LoggerUnit } from './units';

/** Encodings of text that are told apart. */
export type LoggerFileEncoding = 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252' | 'latin1';

/** What separates the cells of a line; `spaces` is a run of one or more. */
export type Delimiter = ',' | ';' | '\t' | '|' | 'spaces';

/** What a column holds. */
export type ColumnRole =
  | 'time'
  | 'date'
  | 'timeOfDay'
  | 'quantity'
  | 'sensorName'
  | 'quantityName'
  | 'value'
  | 'unit'
  | 'rowNumber'
  | 'ignore';

/** One column of the file. */
export interface LoggerColumn {
  /** Position from 0. */
  readonly index: number;
  /** Header as it stands in the file; '' where there is none. */
  readonly name: string;
  /** Unit as the file spells it; '' where it states none. */
  readonly unitText: string;
  readonly role: ColumnRole;
  /** What the column measures; null where the file does not say, and for columns that are not measured values. */
  readonly quantity: LoggerQuantity | null;
  /** Unit in which the values are read; null together with `quantity`. */
  readonly unit: LoggerUnit | null;
  /** One sentence on why it was read so. */
  readonly reason: string;
}

/** Ways to write an instant. */
export type TimeKind = DateOrder | 'unixSeconds' | 'unixMilliseconds' | 'spreadsheetDays' | 'elapsed';

/** Unit of elapsed time; `clock` is hours, minutes and seconds with colons. */
export type ElapsedUnit = 'clock' | 's' | 'min' | 'h' | 'd';

/** How the file writes its times. */
export interface TimeFormat {
  readonly kind: TimeKind;
  readonly twelveHour: boolean;
  readonly twoDigitYear: boolean;
  /** True where the times state their own offset from UTC. */
  readonly hasOffset: boolean;
  /** IANA zone or fixed offset (`UTC+01:00`) of times without an offset. */
  readonly zone: string;
  /** Only for `elapsed`. */
  readonly elapsedUnit: ElapsedUnit | null;
}

/** What a name in a long file's quantity column stands for; null where it is not kept. */
export type QuantityMeaning = { readonly quantity: LoggerQuantity; readonly unit: LoggerUnit } | null;

/** How a logger file is laid out: all that is needed to read it. Plain JSON, so it can be kept as a profile. */
export interface LoggerFileShape {
  readonly encoding: LoggerFileEncoding;
  readonly delimiter: Delimiter;
  readonly quote: '"' | "'";
  readonly lineEnd: 'CRLF' | 'LF' | 'CR';
  /** Line numbers of the header, from 1: none, one, or two lines. */
  readonly headerLines: readonly number[];
  /** Line number of the first row of readings, from 1. */
  readonly firstDataLine: number;
  readonly decimalMark: DecimalMark;
  readonly thousandsMark: ThousandsMark;
  readonly columns: readonly LoggerColumn[];
  /** True where rows begin with a number that the header has no cell for. */
  readonly rowNumberOffset: boolean;
  readonly layout: 'wide' | 'long';
  readonly timeFormat: TimeFormat;
  /** Whether the newest row comes last or first. */
  readonly order: 'ascending' | 'descending';
  /** Texts that mean "no value", in small letters. */
  readonly missingMarks: readonly string[];
  /** Long files: what the names in the quantity column stand for, by name as in the file. */
  readonly quantityNames: Readonly<Record<string, QuantityMeaning>>;
}

/** Texts that loggers write for a value that they do not have. Common practice, no source. */
export const usualMissingMarks: readonly string[] = [
  '',
  '-',
  '--',
  '---',
  '----',
  '—',
  '?',
  'nan',
  'na',
  'n/a',
  '#n/a',
  'null',
  'none',
  'nil',
  'err',
  'error',
  'fehler',
  'fail',
  'missing',
  'no data',
  'over',
  'open',
  'ol',
];

/** What only the person can decide. The shape already holds the likelier answer. */
export type RecognitionQuestionCode =
  'AMBIGUOUS_DAY_MONTH' | 'UNIT_QUESTIONED' | 'ELAPSED_NEEDS_START' | 'NO_HEADER_NAMES';

/** A question to the person, with what speaks for each answer. */
export interface RecognitionQuestion {
  readonly code: RecognitionQuestionCode;
  /** Column concerned, from 0. */
  readonly column: number;
  /** The question in a sentence. */
  readonly message: string;
  readonly evidence: Readonly<Record<string, string | number | null>>;
}

/** One finding that the shape rests on. */
export interface RecognitionEvidence {
  readonly subject: 'encoding' | 'delimiter' | 'header' | 'numbers' | 'time' | 'layout';
  readonly message: string;
}

/** One series of readings within a file: a column, or a sensor and quantity of a long file. */
export interface LoggerSeries {
  /** Stable within files of one shape: `2`, `Shelf 1|2`, or `Shelf 1|temperature`. */
  readonly key: string;
  /** Position in the order in which the series first appear, from 0. */
  readonly index: number;
  /** Sensor named in the row, '' where the file names none. */
  readonly sensorName: string;
  /** Column that the values stand in, from 0. */
  readonly column: number;
  /** Header of the column, or the quantity named in the row. */
  readonly name: string;
  readonly quantity: LoggerQuantity;
  /** Unit in the file; readings come out in the stored unit. */
  readonly unit: LoggerUnit;
}

/** Most columns that a file may have. */
export const MAX_COLUMNS = 512;

/** Most series that a file may hold. */
export const MAX_SERIES = 512;

/** Longest line, in characters. */
export const MAX_LINE_LENGTH = 1_000_000;
