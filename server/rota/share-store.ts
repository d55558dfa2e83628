import type { CareShare } from '@shared/contracts/care-rota';
import type { Tx } from '../database/transactions';

/** How care was and is shared out. */
export class ShareStore {
  /** What each member who helps did and holds, of tasks due in a span; by name. */
  shares(
    tx: Tx,
    roomId: string,
    { from, to }: { readonly from: string; readonly to: string },
  ): Promise<CareShare[]> {
    return tx.query(
      `SELECT person.id AS "personId", person.name,
         count(due.id) FILTER (WHERE due.is_done)::int AS "doneTasks",
         coalesce(sum(due.minutes) FILTER (WHERE due.is_done), 0)::int AS "doneMinutes",
         count(due.id) FILTER (WHERE NOT due.is_done)::int AS "openTasks",
         coalesce(sum(due.minutes) FILTER (WHERE NOT due.is_done), 0)::int AS "openMinutes"
       FROM membership
       JOIN person ON person.id = membership.person_id
       LEFT JOIN (
         SELECT id, done_by AS person_id, coalesce(took_minutes, minutes) AS minutes, true AS is_done
         FROM task WHERE room_id = $1 AND due_on >= $2 AND due_on < $3 AND outcome IN ('done', 'notNeeded')
         UNION ALL
         SELECT task.id, holder.person_id, task.minutes, false
         FROM task JOIN task_holder AS holder ON holder.task_id = task.id
         WHERE task.room_id = $1 AND task.due_on >= $2 AND task.due_on < $3 AND task.done_at IS NULL
       ) AS due ON due.person_id = person.id
       WHERE membership.room_id = $1 AND membership.role <> 'viewer'
       GROUP BY person.id, person.name ORDER BY person.name, person.id`,
      [roomId, from, to],
    );
  }
}
