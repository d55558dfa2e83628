import type { LoggerFileTotals } from '@shared/logger-files/logger-file-reader';
import { createLoggerFileReader } from '@shared/logger-files/logger-file-reader';
import type { LoggerFileShape, LoggerSeries } from '@shared/logger-files/logger-file-shape';
import type { ReadingRejection } from '@shared/logger-files/reading-rejection';
import type { RecognisedLoggerFile } from '@shared/logger-files/recognise-logger-file';
import { recogniseLoggerFile, SAMPLE_BYTES } from '@shared/logger-files/recognise-logger-file';

/** A reading with all that the reader said about it. */
export interface WholeReading {
  readonly series: LoggerSeries;
  readonly atMs: number;
  readonly value: number;
  readonly line: number;
}

/** Everything that came out of a file. */
export interface WholeFile {
  readonly readings: readonly WholeReading[];
  readonly rejected: readonly ReadingRejection[];
  readonly totals: LoggerFileTotals;
}

/** Recognises a file held in memory from its first part, as the server does. */
export function recogniseWhole(bytes: Uint8Array, zone: string, referenceMs: number): RecognisedLoggerFile {
  const truncated = bytes.length > SAMPLE_BYTES;
  return recogniseLoggerFile(bytes.subarray(0, SAMPLE_BYTES), { zone, truncated, referenceMs });
}

/** Reads a file held in memory in pieces of a size. */
export function readWhole(
  bytes: Uint8Array,
  shape: LoggerFileShape,
  context: { referenceMs?: number; startAtMs?: number } = {},
  pieceBytes = 65_536,
): WholeFile {
  const readings: WholeReading[] = [];
  const rejected: ReadingRejection[] = [];
  const reader = createLoggerFileReader(
    shape,
    {
      onReading: (series, atMs, value, line) => readings.push({ series, atMs, value, line }),
      onRejected: (rejection) => rejected.push(rejection),
    },
    context,
  );
  for (let start = 0; start < bytes.length; start += pieceBytes)
    reader.write(bytes.subarray(start, start + pieceBytes));
  return { readings, rejected, totals: reader.end() };
}
