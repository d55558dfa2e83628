import type { Assignment, TaskToAssign, TaskWho } from '@shared/care/assign-holders';
import { routineWho } from '../care/routine-who';
import type { Tx } from '../database/transactions';

/** An open task, and whom it falls to. */
export type OpenTask = Omit<TaskToAssign, 'day' | 'who'> & { readonly dueOn: string } & TaskWho;

/** What sharing care out reads and writes. */
export class AssignmentStore {
  /** Open tasks of a room. */
  openTasks(tx: Tx, roomId: string): Promise<OpenTask[]> {
    return tx.query(
      `SELECT task.id, task.due_on::text AS "dueOn", task.minutes, task.is_by_hand AS "isByHand",
         ${routineWho} AS how,
         ARRAY(SELECT person_id FROM task_holder WHERE task_id = task.id ORDER BY person_id) AS holders,
         ARRAY(SELECT person_id FROM routine_person WHERE routine_id = task.routine_id ORDER BY position) AS "personIds"
       FROM task LEFT JOIN routine ON routine.id = task.routine_id
       WHERE task.room_id = $1 AND task.done_at IS NULL ORDER BY task.due_on, task.id`,
      [roomId],
    );
  }

  /** Minutes that people spent on care of a room since an instant. */
  async minutesSince(tx: Tx, roomId: string, since: Date): Promise<Map<string, number>> {
    const rows: { person_id: string; minutes: number }[] = await tx.query(
      `SELECT done_by AS person_id, sum(coalesce(took_minutes, minutes))::int AS minutes
       FROM task WHERE room_id = $1 AND done_at >= $2 AND outcome IN ('done', 'notNeeded') AND done_by IS NOT NULL
       GROUP BY done_by`,
      [roomId, since],
    );
    return new Map(rows.map((row) => [row.person_id, row.minutes]));
  }

  /** Writes who holds tasks now. */
  async save(tx: Tx, assignments: readonly Assignment[]): Promise<void> {
    const taskIds = assignments.map(({ taskId }) => taskId);
    const held = assignments.flatMap(({ taskId, holders }) =>
      holders.map((personId) => ({ taskId, personId })),
    );
    await tx.query('DELETE FROM task_holder WHERE task_id = ANY($1)', [taskIds]);
    await tx.query(
      `INSERT INTO task_holder (task_id, person_id) SELECT * FROM unnest($1::uuid[], $2::uuid[])`,
      [held.map(({ taskId }) => taskId), held.map(({ personId }) => personId)],
    );
    await tx.query(
      `UPDATE task SET is_by_hand = by_hand
       FROM unnest($1::uuid[], $2::boolean[]) AS given (task_id, by_hand) WHERE task.id = given.task_id`,
      [taskIds, assignments.map(({ isByHand }) => isByHand)],
    );
  }
}
