import { setImmediate as othersTurn } from 'node:timers/promises';
import type { LoggerFileResult } from '@shared/contracts/logger-file-result';
import type { Tx } from '../database/transactions';
import type { BulkBatch } from '../readings/bulk-columns';
import { OutOfOrder, type BulkCounts } from '../readings/bulk-intake';
import type { OpenBulkIntake } from '../readings/bulk-intake-service';
import { FileReadings, type FileReading } from './file-readings';
import { contentOf } from './logger-file-content';
import { StagedReadings } from './staged-readings';

/** Called with every piece of a file that was read; throws to stop. */
export type OnProgress = (bytesDone: number) => Promise<void>;

/** A file with all that reading it needs. */
export interface FileToRead extends FileReading {
  readonly id: string;
}

/** What a whole file came to. */
export interface FileOutcome {
  readonly result: LoggerFileResult;
  readonly readings: FileReadings;
  /** Alerts that changed. */
  readonly alertIds: readonly string[];
}

/** How a file's readings are passed on. */
export interface Passage {
  /** For the file's parts. */
  readonly plain: Tx;
  /** A transaction that sorts them, for a file that is not in order; null to refuse such a file. */
  readonly sorter: Tx | null;
  /** Begins to take them. */
  readonly open: () => Promise<OpenBulkIntake>;
  readonly onProgress: OnProgress;
}

/** Read at a time, in a few milliseconds; live readings wait that long at each of their steps. */
const SLICE_BYTES = 4_096;

/**
 * Hands a file's readings on in order of time. Most files are in order and stream straight through; another one is sorted
 * by the database first.
 *
 * @param file - The file.
 * @param passage - Where to.
 * @returns What the file came to, after everything was taken.
 * @throws {@link OutOfOrder} for a file that has to be sorted; `LoggerFileError` where it can't be read on.
 */
export async function passReadings(file: FileToRead, passage: Passage): Promise<FileOutcome> {
  const readings = new FileReadings(file);
  const staged = passage.sorter === null ? null : await StagedReadings.begin(passage.sorter);
  let opened = staged === null ? await passage.open() : null;
  try {
    const take = async (batch: BulkBatch): Promise<void> => (staged ?? opened?.intake)?.take(batch);
    let bytesDone = 0;
    for await (const piece of contentOf(passage.plain, file.id) as AsyncIterable<Buffer>) {
      for (let from = 0; from < piece.length; from += SLICE_BYTES) {
        await take(readings.read(piece.subarray(from, from + SLICE_BYTES)));
        await othersTurn();
      }
      bytesDone += piece.length;
      await passage.onProgress(bytesDone);
    }
    await take(readings.end());
    opened ??= await passage.open();
    for await (const batch of staged?.inOrder() ?? []) {
      await opened.intake.take(batch);
      await passage.onProgress(bytesDone);
    }
    await opened.intake.finish();
    const alertIds = opened.writer?.alertIds ?? [];
    return { result: resultOf(readings, opened.intake.counts), readings, alertIds };
  } catch (error) {
    await opened?.writer?.abandon();
    throw error;
  }
}

/**
 * Tries a file as it is, and sorted if that turns out to be needed.
 *
 * @param isDescending - The file is known to be newest first.
 * @param attempt - Does it all, in a transaction of its own.
 */
export async function inWhateverOrder<T>(
  isDescending: boolean,
  attempt: (isSorted: boolean) => Promise<T>,
): Promise<T> {
  if (isDescending) return attempt(true);
  try {
    return await attempt(false);
  } catch (error) {
    if (!(error instanceof OutOfOrder)) throw error;
    return attempt(true);
  }
}

function resultOf(readings: FileReadings, counts: BulkCounts): LoggerFileResult {
  const { fresh, alreadyHeld, different, heldLive, flagged } = counts;
  const { rejected, missing, statistics, offShelf } = readings;
  return {
    read: fresh + alreadyHeld + different + rejected,
    fresh,
    alreadyHeld,
    different,
    rejected,
    missing,
    heldLive,
    flagged,
    from: statistics.span === null ? null : new Date(statistics.span.from).toISOString(),
    to: statistics.span === null ? null : new Date(statistics.span.to).toISOString(),
    ...statistics.rhythm(),
    rejectedByCode: Object.fromEntries(readings.rejectedByCode),
    offShelf: offShelf.found(),
  };
}
