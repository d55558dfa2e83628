import type { DifferingChoice, FileFailure, LoggerFileStatus } from '@shared/contracts/logger-files';
import { LoggerFileError } from '@shared/logger-files/logger-file-error';
import type { Transactions } from '../database/transactions';
import { isDatabaseAway } from '../http/error-answer';
import { conflict } from '../http/request-problem';
import type { LiveFeed } from '../live/live-feed';
import { SensorGone, WorkCancelled, type BringInService } from './bring-in-service';
import type { FileLocks } from './file-locks';
import type { OnProgress } from './file-work';
import type { LoggerFileEntity } from './logger-file-entity';
import type { LoggerFileStore, RunningStatus } from './logger-file-store';

/** What {@link LoggerFileRunner} works with. */
export interface RunnerParts {
  readonly transactions: Transactions;
  readonly store: LoggerFileStore;
  readonly work: BringInService;
  readonly locks: FileLocks;
  readonly feed: LiveFeed;
  /** Tells dashboards of alerts, after the commit. */
  readonly publishAlerts: (alertIds: readonly string[]) => Promise<void>;
  readonly onError: (error: unknown) => void;
}

/** What a file may be before each kind of work. */
const allowedBefore: Readonly<Record<RunningStatus, readonly LoggerFileStatus[]>> = {
  checking: ['uploaded', 'checked', 'failed', 'cancelled', 'takenOut'],
  bringingIn: ['uploaded', 'checked', 'failed', 'cancelled', 'takenOut'],
  takingOut: ['broughtIn'],
};

/** Files that one process works on at the same time; each needs three connections. */
const MOST_AT_ONCE = 2;
/** Progress is told at most four times a second. */
const PROGRESS_EVERY_MS = 250;

const stopped: FileFailure = {
  code: 'SERVER_STOPPED',
  message: 'The server stopped while it was at work on this file. Try again.',
  line: null,
  column: null,
};

/**
 * Works on files in the background. What is known of the work is in the database, so any process can show it, stop it,
 * and find out that the one at work is no more.
 */
export class LoggerFileRunner {
  private running = 0;
  private readonly waiting: (() => void)[] = [];
  private readonly inHand = new Set<Promise<void>>();

  constructor(private readonly parts: RunnerParts) {}

  /**
   * Begins to check a file, to bring it in, or to take it out.
   *
   * @param file - The file.
   * @param personId - Who wants that.
   * @param deed - What.
   * @returns Once begun: the end of the work, which never fails; the file says how it went.
   * @throws RequestProblem 409 when the file is in another's hands, or in a state that does not allow it.
   */
  async begin(file: LoggerFileEntity, personId: string, deed: RunnerDeed): Promise<{ done: Promise<void> }> {
    const { locks, store, transactions } = this.parts;
    if (!(await locks.take(file.id))) throw atWork();
    try {
      if (!(await store.begin(transactions.plain, file.id, deed.status, allowedBefore[deed.status]))) {
        throw conflict('WRONG_STATE', 'The file is not in a state that allows this.');
      }
    } catch (error) {
      await locks.release(file.id);
      throw error;
    }
    await this.publish(file);
    const done = this.run(file, personId, deed);
    this.inHand.add(done);
    void done.finally(() => this.inHand.delete(done));
    return { done };
  }

  /** Finds work that was left behind by a process that is no more, and says so. */
  async failAbandoned(): Promise<void> {
    const { store, transactions, locks } = this.parts;
    for (const { id, roomId, status } of await store.running(transactions.plain)) {
      if (!(await locks.take(id))) continue;
      try {
        const before = status === 'takingOut' ? 'broughtIn' : 'failed';
        await store.end(transactions.plain, id, status, { status: before, failure: stopped });
        await this.publish({ id, roomId });
      } finally {
        await locks.release(id);
      }
    }
  }

  /** Waits for the work in hand. */
  async settled(): Promise<void> {
    await Promise.all(this.inHand);
  }

  private async run(file: LoggerFileEntity, personId: string, deed: RunnerDeed): Promise<void> {
    const { locks, publishAlerts, onError } = this.parts;
    await this.turn();
    try {
      const alertIds = await this.work(file, personId, deed);
      await publishAlerts(alertIds);
    } catch (error) {
      await this.fail(file, deed.status, error).catch(onError);
    } finally {
      this.passOn();
      await locks.release(file.id);
      await this.publish(file).catch(onError);
    }
  }

  private async work(file: LoggerFileEntity, personId: string, deed: RunnerDeed): Promise<readonly string[]> {
    const { work } = this.parts;
    const onProgress = this.progressOf(file, deed.status);
    if (deed.status === 'bringingIn') {
      return work.bringIn(file, deed.differing, { personId, onProgress });
    }
    if (deed.status === 'takingOut') return work.takeOut(file, personId);
    await work.check(file, onProgress);
    return [];
  }

  private async fail(file: LoggerFileEntity, status: RunningStatus, error: unknown): Promise<void> {
    const { store, transactions, onError } = this.parts;
    if (error instanceof WorkCancelled) {
      await store.end(transactions.plain, file.id, status, { status: 'cancelled' });
      return;
    }
    const failure = failureOf(error);
    if (failure.code === 'INTERNAL') onError(error);
    const after = status === 'takingOut' ? 'broughtIn' : 'failed';
    await store.end(transactions.plain, file.id, status, { status: after, failure });
  }

  private progressOf(file: LoggerFileEntity, status: RunningStatus): OnProgress {
    const { store, transactions } = this.parts;
    let toldAt = performance.now();
    return async (bytesDone) => {
      const now = performance.now();
      if (now - toldAt < PROGRESS_EVERY_MS) return;
      toldAt = now;
      const isCancelled = await store.progress(transactions.plain, file.id, status, bytesDone);
      if (isCancelled) throw new WorkCancelled();
      await this.publish(file);
    };
  }

  private async publish({ id, roomId }: Pick<LoggerFileEntity, 'id' | 'roomId'>): Promise<void> {
    const { store, transactions, feed } = this.parts;
    const listed = await store.listed(transactions.plain, id);
    if (listed !== null) feed.publish(roomId, 'loggerFile:changed', listed);
  }

  private async turn(): Promise<void> {
    if (this.running < MOST_AT_ONCE) {
      this.running += 1;
      return;
    }
    // Whoever leaves hands the place on.
    await new Promise<void>((resolve) => this.waiting.push(resolve));
  }

  private passOn(): void {
    const next = this.waiting.shift();
    if (next === undefined) this.running -= 1;
    else next();
  }
}

/** What is to be done with a file. */
export type RunnerDeed =
  | { readonly status: 'checking' | 'takingOut' }
  | { readonly status: 'bringingIn'; readonly differing: DifferingChoice };

function atWork(): Error {
  return conflict('AT_WORK', 'This file is being worked on already.');
}

function failureOf(error: unknown): FileFailure {
  if (error instanceof LoggerFileError) {
    return { code: error.code, message: error.message, line: error.line, column: error.column };
  }
  const place = { line: null, column: null };
  if (error instanceof SensorGone) {
    const message = 'A sensor that this file was matched to is not there any more. Match it again.';
    return { code: 'SENSOR_GONE', message, ...place };
  }
  if (isDatabaseAway(error)) {
    const message = 'The database went away. Try again.';
    return { code: 'DATABASE_AWAY', message, ...place };
  }
  const message = 'Something went wrong on our side. Try again.';
  return { code: 'INTERNAL', message, ...place };
}
