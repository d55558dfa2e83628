import { DateTime } from 'luxon';
import type { Task } from '@shared/contracts/care';
import { csvLine } from '@shared/logger-files/csv-writing';

const header = [
  'closed at',
  'outcome',
  'kind',
  'title',
  'planting',
  'rack',
  'shelf',
  'due on',
  'in time until',
  'closed by',
  'millilitres',
  'grams',
  'count',
  'minutes',
  'note',
] as const;

/**
 * Closed tasks as CSV.
 *
 * @param tasks - In the order of their lines.
 * @param timeZone - Of the room, whose clock the instants are written by, with their offset.
 * @returns A header and a line a task (RFC 4180), with nothing that a spreadsheet would run.
 */
export function* careRecordCsv(tasks: Iterable<Task>, timeZone: string): Generator<string> {
  yield csvLine(header);
  for (const task of tasks) {
    const closedAt = task.doneAt === null ? null : DateTime.fromISO(task.doneAt, { zone: timeZone });
    yield csvLine([
      closedAt?.toISO({ suppressMilliseconds: true }) ?? null,
      task.outcome,
      task.kind,
      task.title,
      task.plantingLabel,
      task.rackName,
      task.shelfLabel,
      task.dueOn,
      task.inTimeUntil,
      task.doneByName,
      task.millilitres,
      task.grams,
      task.count,
      task.tookMinutes,
      task.note,
    ]);
  }
}
