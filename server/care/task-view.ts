import type { Task } from '@shared/contracts/care';
import { routineWho } from './routine-who';

/** A task as {@link taskColumns} read it. */
export type TaskRow = Omit<Task, 'doneAt' | 'personName'> & { readonly doneAt: Date | null };

/** Whether the room of a `task` keeps a rota; while it keeps none, care is anybody's. */
const keepsRota = `EXISTS (SELECT 1 FROM duty_weekday_person AS duty WHERE duty.room_id = task.room_id)`;

/** Every task with all that the API tells of it; to be followed by a condition on `task`. */
export const tasksSelected = `
  SELECT task.id, task.routine_id AS "routineId", task.kind, task.title, task.detail,
    coalesce(routine.steps, '{}') AS steps, coalesce(routine.amount, '') AS amount, task.minutes,
    task.planting_id AS "plantingId", concat_ws(' ', planting.crop, planting.variety) AS "plantingLabel",
    task.rack_id AS "rackId", rack.name AS "rackName", shelf.id AS "shelfId", shelf.label AS "shelfLabel",
    task.due_on::text AS "dueOn", (task.due_on + task.window_days)::text AS "inTimeUntil",
    CASE WHEN task.routine_day <> task.due_on THEN task.routine_day::text END AS "movedFrom",
    held.holders,
    CASE
      WHEN held.count >= CASE WHEN fallsTo.who = 'pair' AND NOT task.is_by_hand THEN 2 ELSE 1 END THEN 'held'
      WHEN held.count > 0 THEN 'short'
      WHEN fallsTo.who = 'onDuty' AND NOT ${keepsRota} THEN 'anybody'
      ELSE 'uncovered'
    END AS cover,
    (SELECT json_build_object(
        'id', swap.id, 'offeredById', swap.offered_by, 'offeredByName', offerer.name, 'toPersonId', swap.to_person,
        'toPersonName', addressee.name, 'note', swap.note, 'offeredAt', swap.offered_at)
      FROM task_swap AS swap JOIN person AS offerer ON offerer.id = swap.offered_by
      LEFT JOIN person AS addressee ON addressee.id = swap.to_person
      WHERE swap.task_id = task.id AND swap.ended_at IS NULL) AS swap,
    task.outcome, task.done_at AS "doneAt", task.done_by AS "doneById", doer.name AS "doneByName", task.note,
    task.millilitres, task.grams, task.count, task.took_minutes AS "tookMinutes",
    ARRAY(SELECT photo.id FROM photo WHERE photo.task_id = task.id ORDER BY photo.at, photo.id) AS "photoIds"
  FROM task
  LEFT JOIN routine ON routine.id = task.routine_id
  LEFT JOIN planting ON planting.id = task.planting_id
  LEFT JOIN rack ON rack.id = task.rack_id
  LEFT JOIN shelf ON shelf.id = coalesce(task.shelf_id, planting.shelf_id)
  LEFT JOIN person AS doer ON doer.id = task.done_by
  CROSS JOIN LATERAL (SELECT ${routineWho} AS who) AS fallsTo
  CROSS JOIN LATERAL (
    SELECT count(*)::int AS count, coalesce(
      json_agg(json_build_object('personId', holder.id, 'name', holder.name) ORDER BY holder.name, holder.id), '[]'
    ) AS holders
    FROM task_holder JOIN person AS holder ON holder.id = task_holder.person_id WHERE task_holder.task_id = task.id
  ) AS held`;

/**
 * A task as the API tells it.
 *
 * @param row - As it was read.
 * @returns The task.
 */
export function taskOf({ doneAt, plantingLabel, ...row }: TaskRow): Task {
  return {
    ...row,
    plantingLabel: plantingLabel === '' ? null : plantingLabel,
    personName: row.holders.length === 0 ? null : row.holders.map(({ name }) => name).join(' and '),
    doneAt: doneAt?.toISOString() ?? null,
  };
}
