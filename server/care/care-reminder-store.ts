import type { Task } from '@shared/contracts/care';
import type { Tx } from '../database/transactions';
import type { TasksStore } from './tasks-store';

/** Which tasks people are to be told of. */
export class CareReminderStore {
  constructor(private readonly tasks: Pick<TasksStore, 'some'>) {}

  /** Open tasks that are in time until today and nobody was reminded of; they count as told from now on. */
  async takeEnding(tx: Tx, roomId: string, today: string, now: Date): Promise<Task[]> {
    return this.take(tx, roomId, 'reminded_at', 'due_on + window_days = $2', today, now);
  }

  /** Open tasks that became late and keepers were not told of; they count as told from now on. */
  async takeLate(tx: Tx, roomId: string, today: string, now: Date): Promise<Task[]> {
    return this.take(tx, roomId, 'told_late_at', 'due_on + window_days < $2', today, now);
  }

  private async take(
    tx: Tx,
    roomId: string,
    told: 'reminded_at' | 'told_late_at',
    condition: string,
    today: string,
    now: Date,
  ): Promise<Task[]> {
    const [rows]: [{ id: string }[], number] = await tx.query(
      `UPDATE task SET ${told} = $3
       WHERE room_id = $1 AND done_at IS NULL AND ${told} IS NULL AND ${condition} RETURNING id`,
      [roomId, today, now],
    );
    return this.tasks.some(
      tx,
      roomId,
      rows.map(({ id }) => id),
    );
  }
}
