import type { Season } from '@shared/care/season';
import type { ClosedTurn } from '@shared/care/routine-days';
import type { Tx } from '../database/transactions';
import { RoutineEntity } from './routine-entity';
import { TaskEntity } from './task-entity';

interface Planned {
  readonly id: string;
  readonly startsOn: string;
  readonly season: Season | null;
  readonly skipsClosedDays: boolean;
}

/** A routine by the calendar whose tasks are planned up to a day, exclusive. */
export interface CalendarToPlan extends Planned {
  readonly rule: string;
  readonly plannedTo: string | null;
}

/** A routine that counts from its last doing and has no task open. */
export interface TurnToPlan extends Planned {
  readonly timing: 'afterDoing' | 'byDrying';
  readonly plantingId: string | null;
  readonly everyDays: number;
  /** The turn before, null for the first. */
  readonly last: ClosedTurn | null;
}

const seasonColumn = `CASE WHEN routine.season_from IS NOT NULL
  THEN json_build_object('fromMonth', routine.season_from, 'toMonth', routine.season_to) END AS season`;

/** Goes on, where it is about something that is still there. */
const goingOn = `routine.room_id = $1 AND routine.ended_at IS NULL AND shelf.retired_at IS NULL`;

/** Which tasks routines are to have, and have. */
export class TaskPlanningStore {
  /** Calendar routines of a room that go on, on shelves in use, not planned up to a day; held. */
  calendars(tx: Tx, roomId: string, before: string): Promise<CalendarToPlan[]> {
    return tx.query(
      `SELECT routine.id, routine.rule, routine.starts_on::text AS "startsOn", routine.planned_to::text AS "plannedTo",
         routine.skips_closed_days AS "skipsClosedDays", ${seasonColumn}
       FROM routine LEFT JOIN shelf ON shelf.id = routine.shelf_id
       WHERE ${goingOn} AND routine.timing = 'calendar'
         AND (routine.planned_to IS NULL OR routine.planned_to < $2)
       ORDER BY routine.id FOR UPDATE OF routine`,
      [roomId, before],
    );
  }

  /** Routines of a room that count from their last doing, go on, and have no task open; held. */
  turns(tx: Tx, roomId: string, timeZone: string): Promise<TurnToPlan[]> {
    return tx.query(
      `SELECT routine.id, routine.timing, routine.planting_id AS "plantingId", routine.every_days AS "everyDays",
         routine.starts_on::text AS "startsOn", routine.skips_closed_days AS "skipsClosedDays", ${seasonColumn},
         (SELECT json_build_object(
             'plannedFor', routine_day, 'closedOn', (done_at AT TIME ZONE $2)::date, 'outcome', outcome)
           FROM task WHERE task.routine_id = routine.id AND task.outcome <> 'missed'
           ORDER BY done_at DESC, id LIMIT 1) AS last
       FROM routine LEFT JOIN shelf ON shelf.id = routine.shelf_id
       WHERE ${goingOn} AND routine.timing <> 'calendar'
         AND NOT EXISTS (SELECT FROM task WHERE task.routine_id = routine.id AND task.done_at IS NULL)
       ORDER BY routine.id FOR UPDATE OF routine`,
      [roomId, timeZone],
    );
  }

  /** Makes the tasks of a routine on days; what exists already stays. */
  async addTasks(tx: Tx, routineId: string, days: readonly string[]): Promise<void> {
    await tx.query(
      `INSERT INTO task (room_id, routine_id, routine_day, due_on, shelf_id, rack_id, planting_id, kind, title, detail,
         window_days, minutes)
       SELECT room_id, id, day, day, shelf_id, rack_id, planting_id, kind, title, detail, window_days, minutes
       FROM routine CROSS JOIN unnest($2::date[]) AS day WHERE id = $1
       ON CONFLICT DO NOTHING`,
      [routineId, days],
    );
  }

  /** Remembers that every task before a day is planned. */
  async setPlannedTo(tx: Tx, routineId: string, plannedTo: string): Promise<void> {
    await tx.update(RoutineEntity, { id: routineId }, { plannedTo });
  }

  /** Lets open tasks from a day on say and be what their routine is now; their holders are chosen anew. */
  async renew(tx: Tx, routineId: string, from: string): Promise<void> {
    await tx.query(
      `UPDATE task SET shelf_id = routine.shelf_id, rack_id = routine.rack_id, planting_id = routine.planting_id,
         kind = routine.kind, title = routine.title, detail = routine.detail, window_days = routine.window_days,
         minutes = routine.minutes
       FROM routine
       WHERE routine.id = $1 AND task.routine_id = $1 AND task.done_at IS NULL AND task.due_on >= $2`,
      [routineId, from],
    );
  }

  /** Takes open tasks of a routine away that its rule no longer has on days from one on; moved ones stay. */
  async removeOthers(tx: Tx, routineId: string, from: string, days: readonly string[]): Promise<void> {
    await tx.query(
      `DELETE FROM task WHERE routine_id = $1 AND done_at IS NULL AND routine_day >= $2 AND due_on = routine_day
         AND NOT (routine_day = ANY($3::date[]))`,
      [routineId, from, days],
    );
  }

  /** Calendar routines of a room that heed closed days. */
  heedingClosedDays(tx: Tx, roomId: string): Promise<CalendarToPlan[]> {
    return tx.query(
      `SELECT routine.id, routine.rule, routine.starts_on::text AS "startsOn", routine.planned_to::text AS "plannedTo",
         routine.skips_closed_days AS "skipsClosedDays", ${seasonColumn}
       FROM routine LEFT JOIN shelf ON shelf.id = routine.shelf_id
       WHERE ${goingOn} AND routine.timing = 'calendar' AND routine.skips_closed_days
       ORDER BY routine.id FOR UPDATE OF routine`,
      [roomId],
    );
  }

  /** Open turns of routines that heed closed days and count from their last doing, due on a day or after. */
  turnsHeedingClosedDays(
    tx: Tx,
    roomId: string,
    from: string,
  ): Promise<{ id: string; dueOn: string; season: Season | null }[]> {
    return tx.query(
      `SELECT task.id, task.due_on::text AS "dueOn", ${seasonColumn}
       FROM task JOIN routine ON routine.id = task.routine_id
       WHERE task.room_id = $1 AND task.done_at IS NULL AND task.due_on >= $2
         AND routine.timing <> 'calendar' AND routine.skips_closed_days
       ORDER BY task.id FOR UPDATE OF task`,
      [roomId, from],
    );
  }

  /** Puts a task off to another day. */
  async putOff(tx: Tx, taskId: string, day: string): Promise<void> {
    await tx.update(TaskEntity, { id: taskId }, { dueOn: day });
  }

  /** Takes away the turn that closing a task had opened, unless it is closed itself; returns its id. */
  async removeNextTurn(tx: Tx, routineId: string, after: string): Promise<string[]> {
    const [rows]: [{ id: string }[], number] = await tx.query(
      `DELETE FROM task USING routine
       WHERE task.routine_id = $1 AND routine.id = $1 AND routine.timing <> 'calendar' AND task.done_at IS NULL
         AND task.routine_day > $2 RETURNING task.id`,
      [routineId, after],
    );
    return rows.map(({ id }) => id);
  }
}
