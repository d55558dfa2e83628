import type { Tx } from '../database/transactions';
import type { PastTask } from './care-history';

/** Writes what was done before anybody could have done it, in few statements. */
export class DemonstrationCareStore {
  /** The rack of a shelf. */
  async rackOf(tx: Tx, shelfId: string): Promise<string> {
    const rows: { rack_id: string }[] = await tx.query('SELECT rack_id FROM shelf WHERE id = $1', [shelfId]);
    return rows[0]?.rack_id ?? '';
  }

  /** The oldest planting of a crop that stands on a shelf. */
  async plantingOn(tx: Tx, roomId: string, shelfId: string, cropId: string): Promise<string> {
    const rows: { id: string }[] = await tx.query(
      `SELECT id FROM planting WHERE room_id = $1 AND shelf_id = $2 AND crop_id = $3 AND ended_on IS NULL
       ORDER BY started_at LIMIT 1`,
      [roomId, shelfId, cropId],
    );
    const row = rows[0];
    if (row === undefined) throw new Error(`The demonstration grows no ${cropId} there`);
    return row.id;
  }

  /** An open task that somebody holds alone, due on a day or after; null without one. */
  async comingTaskOf(tx: Tx, roomId: string, personId: string, from: string): Promise<string | null> {
    const rows: { id: string }[] = await tx.query(
      `SELECT task.id FROM task JOIN task_holder AS holder ON holder.task_id = task.id
       WHERE task.room_id = $1 AND task.done_at IS NULL AND holder.person_id = $2 AND task.due_on >= $3
       ORDER BY task.due_on, task.id LIMIT 1`,
      [roomId, personId, from],
    );
    return rows[0]?.id ?? null;
  }

  /** Writes tasks of a routine, who held them, and the water that they gave to its planting. */
  async addPast(tx: Tx, routineId: string, tasks: readonly PastTask[]): Promise<void> {
    const rows = JSON.stringify(
      tasks.map(({ id, day, closed }) => ({
        id,
        day,
        outcome: closed?.outcome ?? null,
        done_at: closed?.at ?? null,
        done_by: closed?.by ?? null,
        note: closed?.note ?? '',
        millilitres: closed?.millilitres ?? null,
        took_minutes: closed?.tookMinutes ?? null,
      })),
    );
    await tx.query(
      `INSERT INTO task (id, room_id, routine_id, routine_day, due_on, shelf_id, rack_id, planting_id, kind, title, detail,
         window_days, minutes, outcome, done_at, done_by, note, millilitres, took_minutes)
       SELECT past.id, room_id, routine.id, past.day, past.day, shelf_id, rack_id, planting_id, kind, title, detail,
         window_days, minutes, past.outcome, past.done_at, past.done_by, past.note, past.millilitres, past.took_minutes
       FROM routine CROSS JOIN jsonb_to_recordset($2::jsonb) AS past (id uuid, day date, outcome text, done_at timestamptz,
         done_by uuid, note text, millilitres float8, took_minutes int)
       WHERE routine.id = $1`,
      [routineId, rows],
    );
    const held = tasks.flatMap(({ id, holders }) => holders.map((personId) => ({ id, personId })));
    await tx.query('INSERT INTO task_holder SELECT * FROM unnest($1::uuid[], $2::uuid[])', [
      held.map(({ id }) => id),
      held.map(({ personId }) => personId),
    ]);
    await tx.query(
      `INSERT INTO planting_event (planting_id, seq, at, kind, millilitres, person_id, task_id)
       SELECT planting_id, row_number() OVER (ORDER BY done_at)
           + (SELECT max(seq) FROM planting_event WHERE planting_event.planting_id = task.planting_id),
         done_at, 'watered', millilitres, done_by, id
       FROM task WHERE routine_id = $1 AND planting_id IS NOT NULL AND outcome = 'done' AND kind = 'water'`,
      [routineId],
    );
  }
}
