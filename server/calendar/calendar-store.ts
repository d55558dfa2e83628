import type { Task } from '@shared/contracts/care';
import { taskOf, tasksSelected, type TaskRow } from '../care/task-view';
import type { Tx } from '../database/transactions';
import { CalendarFeedEntity } from './calendar-feed-entity';

/** A task with the room that it is in. */
export type TaskOfRoom = Task & { readonly roomName: string };

/** Calendar feeds and what is in them. */
export class CalendarStore {
  /** When a person's link was made; null without one. */
  async madeAt(tx: Tx, personId: string): Promise<Date | null> {
    return (await tx.findOneBy(CalendarFeedEntity, { personId }))?.madeAt ?? null;
  }

  /** Makes a link, in place of the one before. */
  async set(tx: Tx, personId: string, secretHash: string, madeAt: Date): Promise<void> {
    await tx.upsert(CalendarFeedEntity, { personId, secretHash, madeAt }, ['personId']);
  }

  /** Ends a link. */
  async remove(tx: Tx, personId: string): Promise<void> {
    await tx.delete(CalendarFeedEntity, { personId });
  }

  /** Whose link it is; null for none. */
  async personOf(tx: Tx, secretHash: string): Promise<string | null> {
    return (await tx.findOneBy(CalendarFeedEntity, { secretHash }))?.personId ?? null;
  }

  /** Open tasks that a person holds in rooms where they are a member, by day. */
  async tasksOf(tx: Tx, personId: string): Promise<TaskOfRoom[]> {
    const rows: (TaskRow & { roomName: string })[] = await tx.query(
      `SELECT told.*, room.name AS "roomName"
       FROM (${tasksSelected} WHERE task.done_at IS NULL AND task.id IN (
         SELECT task_id FROM task_holder WHERE person_id = $1)) AS told
       JOIN task ON task.id = told.id
       JOIN room ON room.id = task.room_id
       JOIN membership ON membership.room_id = room.id AND membership.person_id = $1
       ORDER BY told."dueOn", told.id`,
      [personId],
    );
    return rows.map(({ roomName, ...row }) => ({ ...taskOf(row), roomName }));
  }
}
