import type { Routine, ShelfEvent, Task } from '@shared/contracts/care';
import { IsNull } from 'typeorm';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { RoutineEntity } from './routine-entity';
import { ShelfEventEntity } from './shelf-event-entity';

/** A routine as far as its tasks need it. */
export type RoutineToPlan = Pick<RoutineEntity, 'id' | 'rule' | 'startsOn' | 'plannedTo'>;

/** A routine to add; its tasks are planned from `plannedTo` on. */
export interface NewRoutine extends Omit<Routine, 'id'> {
  readonly plannedTo: string;
}

/** Something done or seen on a shelf, to be noted. */
export interface NewShelfEvent extends Pick<ShelfEvent, 'shelfId' | 'kind' | 'text'> {
  readonly at: Date;
  readonly personId: string;
}

type TaskRow = Omit<Task, 'doneAt'> & { readonly doneAt: Date | null };
type EventRow = Omit<ShelfEvent, 'at'> & { readonly at: Date };

const tasksOfRoom = `
  SELECT task.id, task.kind, task.title, task.detail, task.shelf_id AS "shelfId", shelf.label AS "shelfLabel",
    task.due_on::text AS "dueOn", task.person_id AS "personId", person.name AS "personName",
    task.done_at AS "doneAt", doer.name AS "doneByName", task.note
  FROM task
  LEFT JOIN shelf ON shelf.id = task.shelf_id
  LEFT JOIN person ON person.id = task.person_id
  LEFT JOIN person AS doer ON doer.id = task.done_by
  WHERE task.room_id = $1`;

const events = `
  SELECT event.id, event.shelf_id AS "shelfId", event.at, event.kind, event.text, person.name AS "personName"
  FROM shelf_event AS event LEFT JOIN person ON person.id = event.person_id`;

/** Tasks, the routines that they come from, and what happened on shelves. */
export class CareStore {
  /** Tasks due from a day up to another, and those before that are not done; by day, then by title. */
  async tasks(tx: Tx, roomId: string, from: string, to: string): Promise<Task[]> {
    const rows: TaskRow[] = await tx.query(
      `${tasksOfRoom} AND task.due_on < $3 AND (task.due_on >= $2 OR task.done_at IS NULL)
       ORDER BY task.due_on, task.title, shelf.label, task.id`,
      [roomId, from, to],
    );
    return rows.map(asTask);
  }

  /** One task; 404 when the room has no such task. */
  async task(tx: Tx, roomId: string, taskId: string): Promise<Task> {
    const rows: TaskRow[] = await tx.query(`${tasksOfRoom} AND task.id = $2`, [roomId, taskId]);
    const row = rows[0];
    if (row === undefined) throw notFound('task');
    return asTask(row);
  }

  /** Ticks a task; false when it was ticked before. */
  async complete(
    tx: Tx,
    roomId: string,
    taskId: string,
    done: { at: Date; by: string; note: string },
  ): Promise<boolean> {
    const [, changed]: [unknown[], number] = await tx.query(
      `UPDATE task SET done_at = $3, done_by = $4, note = $5
       WHERE id = $2 AND room_id = $1 AND done_at IS NULL`,
      [roomId, taskId, done.at, done.by, done.note],
    );
    return changed === 1;
  }

  /** Takes a tick back; false when there was none. */
  async reopen(tx: Tx, roomId: string, taskId: string): Promise<boolean> {
    const [, changed]: [unknown[], number] = await tx.query(
      `UPDATE task SET done_at = NULL, done_by = NULL, note = ''
       WHERE id = $2 AND room_id = $1 AND done_at IS NOT NULL`,
      [roomId, taskId],
    );
    return changed === 1;
  }

  /** The routines of a room that go on, by title. */
  async routines(tx: Tx, roomId: string): Promise<Routine[]> {
    const routines = await tx.find(RoutineEntity, {
      where: { roomId, endedAt: IsNull() },
      order: { title: 'ASC', id: 'ASC' },
    });
    return routines.map(({ id, kind, title, detail, shelfId, rule, startsOn, personId }) => ({
      id,
      kind,
      title,
      detail,
      shelfId,
      rule,
      startsOn,
      personId,
    }));
  }

  /** Adds a routine and returns its id. */
  async addRoutine(tx: Tx, roomId: string, routine: NewRoutine): Promise<string> {
    const { id } = await tx.save(RoutineEntity, { ...routine, roomId });
    return id;
  }

  /** The routines of a room that go on, on shelves still in use, whose tasks are not all planned before a day; held. */
  routinesToPlan(tx: Tx, roomId: string, before: string): Promise<RoutineToPlan[]> {
    return tx.query(
      `SELECT routine.id, routine.rule, routine.starts_on::text AS "startsOn", routine.planned_to::text AS "plannedTo"
       FROM routine LEFT JOIN shelf ON shelf.id = routine.shelf_id
       WHERE routine.room_id = $1 AND routine.ended_at IS NULL AND shelf.retired_at IS NULL
         AND (routine.planned_to IS NULL OR routine.planned_to < $2)
       ORDER BY routine.id FOR UPDATE OF routine`,
      [roomId, before],
    );
  }

  /** Makes the tasks of a routine on days; what exists already stays. */
  async addTasks(tx: Tx, routineId: string, days: readonly string[]): Promise<void> {
    await tx.query(
      `INSERT INTO task (room_id, routine_id, shelf_id, kind, title, detail, due_on, person_id)
       SELECT room_id, id, shelf_id, kind, title, detail, day, person_id
       FROM routine CROSS JOIN unnest($2::date[]) AS day WHERE id = $1
       ON CONFLICT DO NOTHING`,
      [routineId, days],
    );
  }

  /** Remembers that every task before a day is planned. */
  async setPlannedTo(tx: Tx, routineId: string, plannedTo: string): Promise<void> {
    await tx.update(RoutineEntity, { id: routineId }, { plannedTo });
  }

  /** Notes what was done or seen, and returns its id. */
  async addEvent(tx: Tx, event: NewShelfEvent): Promise<string> {
    const { id } = await tx.save(ShelfEventEntity, event);
    return id;
  }

  /** One event. */
  async event(tx: Tx, eventId: string): Promise<ShelfEvent> {
    const rows: EventRow[] = await tx.query(`${events} WHERE event.id = $1`, [eventId]);
    const row = rows[0];
    if (row === undefined) throw notFound('event');
    return asEvent(row);
  }

  /** What was done or seen on a shelf from an instant up to another, in order. */
  async eventsOf(tx: Tx, shelfId: string, from: Date, to: Date): Promise<ShelfEvent[]> {
    const rows: EventRow[] = await tx.query(
      `${events} WHERE event.shelf_id = $1 AND event.at >= $2 AND event.at < $3 ORDER BY event.at, event.id`,
      [shelfId, from, to],
    );
    return rows.map(asEvent);
  }
}

function asTask({ doneAt, ...task }: TaskRow): Task {
  return { ...task, doneAt: doneAt?.toISOString() ?? null };
}

function asEvent({ at, ...event }: EventRow): ShelfEvent {
  return { ...event, at: at.toISOString() };
}
