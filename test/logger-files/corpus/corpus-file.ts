import type { LoggerFileErrorCode } from '@shared/logger-files/logger-file-error';
import type { RecognitionQuestionCode } from '@shared/logger-files/logger-file-shape';
import type { LoggerQuantity } from '@shared/logger-files/quantities';
import type { ReadingRejectionCode } from '@shared/logger-files/reading-rejection';
import iconv from 'iconv-lite';

/** A reading as a corpus file expects it: quantity, instant, value in the stored unit, sensor where rows name one. */
export type ExpectedReading = readonly [
  quantity: LoggerQuantity,
  at: string,
  value: number,
  sensorName?: string,
];

/** A refused line or cell: where, and why. */
export type ExpectedRejection = readonly [code: ReadingRejectionCode, line: number, column: number];

/** One file of the corpus. All contents are invented. */
export interface CorpusFile {
  /** What is special about the file; also the title of its test. */
  readonly says: string;
  readonly bytes: Uint8Array;
  /** Zone of the room; Europe/Berlin where it does not matter. */
  readonly zone?: string;
  /** Instant at which elapsed time is zero. */
  readonly startAt?: string;
  readonly readings?: readonly ExpectedReading[];
  readonly rejected?: readonly ExpectedRejection[];
  readonly questions?: readonly RecognitionQuestionCode[];
  /** The whole file is refused. */
  readonly error?: { readonly code: LoggerFileErrorCode; readonly line: number; readonly column: number };
}

/** The day on which the corpus is read. */
export const CORPUS_TODAY = Date.UTC(2026, 5, 1);

/** Lines as a UTF-8 file with a line feed after each. */
export function lines(...text: string[]): Uint8Array {
  return encoded('utf-8', ...text);
}

/** Lines in an encoding of iconv-lite. */
export function encoded(encoding: string, ...text: string[]): Uint8Array {
  return iconv.encode(text.map((line) => `${line}\n`).join(''), encoding);
}

/** Two rows of temperature and humidity, ten minutes apart from 08:00 UTC on 20 January 2026. */
export const twoRows: readonly ExpectedReading[] = [
  ['airTemperature', '2026-01-20T08:00:00.000Z', 21.5],
  ['relativeHumidity', '2026-01-20T08:00:00.000Z', 60.2],
  ['airTemperature', '2026-01-20T08:10:00.000Z', 21.6],
  ['relativeHumidity', '2026-01-20T08:10:00.000Z', 59.8],
];

/** One temperature at each instant. */
export function temperatures(...entries: (readonly [at: string, value: number])[]): ExpectedReading[] {
  return entries.map(([at, value]) => ['airTemperature', new Date(at).toISOString(), value]);
}
