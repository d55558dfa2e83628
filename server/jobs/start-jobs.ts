import type { Logger } from 'pino';
import type { App } from '../app';
import type { Transactions } from '../database/transactions';
import { RepeatingJob } from './repeating-job';
import { whenAlone } from './single-runner';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;
/** Partitions are made this far ahead of need. */
const AHEAD_MS = 62 * 24 * HOUR_MS;

/**
 * Starts what happens by the clock. Several processes may run this: each piece of work runs in one of them at a time.
 *
 * @param app - Whose services.
 * @param transactions - Of its database.
 * @param log - For rounds that failed.
 * @returns Stops them all, after the work in hand.
 */
export function startJobs(app: App, transactions: Transactions, log: Logger): () => Promise<void> {
  const { secondLookJob, escalationJob, morningLetterJob, careReminderJob } = app.services;
  const { advice, planning, loggerFiles } = app.services;
  const alone = (name: string, everyMs: number, work: () => Promise<void>): RepeatingJob =>
    new RepeatingJob(name, everyMs, async () => void (await whenAlone(transactions, name, work)), log);
  const jobs = [
    alone('second look', MINUTE_MS / 2, () => secondLookJob.run()),
    alone('logger files left behind', MINUTE_MS / 4, () => loggerFiles.failAbandoned()),
    alone('escalation', MINUTE_MS / 2, () => escalationJob.run()),
    alone('morning letters', MINUTE_MS, () => morningLetterJob.run()),
    alone('advice', 10 * MINUTE_MS, () => advice.refreshAll()),
    alone('tasks', HOUR_MS / 2, () => planning.planAhead()),
    alone('care reminders', 5 * MINUTE_MS, () => careReminderJob.run()),
    alone('partitions', 6 * HOUR_MS, async () => {
      const now = Date.now();
      await transactions.plain.query('SELECT ensure_reading_partitions($1, $2)', [
        new Date(now),
        new Date(now + AHEAD_MS),
      ]);
    }),
    alone('sweep', HOUR_MS, async () => {
      await transactions.plain.query('DELETE FROM rate_limit WHERE resets_at < now()');
      await transactions.plain.query(
        "DELETE FROM repeatable_request WHERE created_at < now() - interval '8 days'",
      );
    }),
  ];
  for (const job of jobs) job.start();
  app.outbox?.start();
  return async () => {
    await app.outbox?.stop();
    await Promise.all(jobs.map((job) => job.stop()));
    await loggerFiles.settled();
  };
}
