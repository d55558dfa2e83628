import type { AuditStore } from '../audit/audit-store';
import type { Clock } from '../clock';
import type { Transactions } from '../database/transactions';
import { DevicesStore } from '../devices/devices-store';
import type { LiveFeed } from '../live/live-feed';
import type { IntakeParts } from '../readings/intake-parts';
import { BringInService } from './bring-in-service';
import { FileLocks } from './file-locks';
import { FileSensors } from './file-sensors';
import { LoggerFileRunner } from './logger-file-runner';
import { LoggerFileService } from './logger-file-service';
import { LoggerFileStore } from './logger-file-store';
import { ProfileStore } from './profile-store';

/** What logger files stand on. */
export interface LoggerFileFoundation {
  readonly transactions: Transactions;
  readonly road: Pick<IntakeParts, 'readings' | 'bulk'>;
  readonly audit: AuditStore;
  readonly feed: LiveFeed;
  readonly publishAlerts: (alertIds: readonly string[]) => Promise<void>;
  readonly now: Clock;
  readonly onError: (error: unknown) => void;
}

/**
 * Puts logger files together.
 *
 * @param foundation - What they stand on.
 * @returns The service for the routes, and the runner: call `failAbandoned()` at the start and every now and then, and
 *   `settled()` before the process ends.
 */
export function loggerFileParts(foundation: LoggerFileFoundation): {
  files: LoggerFileService;
  runner: LoggerFileRunner;
} {
  const { transactions, road, audit, feed, publishAlerts, now, onError } = foundation;
  const store = new LoggerFileStore();
  const profiles = new ProfileStore();
  const sensors = new FileSensors(new DevicesStore());
  const { readings, bulk } = road;
  const work = new BringInService({ transactions, store, profiles, sensors, readings, bulk, audit, now });
  const locks = new FileLocks(transactions);
  const runner = new LoggerFileRunner({ transactions, store, work, locks, feed, publishAlerts, onError });
  return { files: new LoggerFileService({ transactions, store, profiles, sensors, runner, now }), runner };
}
