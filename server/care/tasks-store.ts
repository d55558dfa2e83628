import { IsNull } from 'typeorm';
import type { Task } from '@shared/contracts/care';
import type { TaskOutcome } from '@shared/care/task-outcome';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { TaskEntity } from './task-entity';
import { TaskHolderEntity } from './task-holder-entity';
import { taskOf, tasksSelected, type TaskRow } from './task-view';

/** A task of no routine. */
export type NewTask = Pick<TaskEntity, 'roomId' | 'kind' | 'title' | 'detail' | 'dueOn'> &
  Partial<Pick<TaskEntity, 'shelfId' | 'rackId' | 'plantingId' | 'windowDays' | 'minutes'>>;

/** How a task was closed. */
export interface Closing {
  readonly outcome: TaskOutcome;
  readonly at: Date;
  readonly by: string;
  readonly note: string;
  readonly millilitres: number | null;
  readonly grams: number | null;
  readonly count: number | null;
  readonly tookMinutes: number | null;
}

const asNothingSaid = {
  outcome: null,
  doneAt: null,
  doneBy: null,
  note: '',
  millilitres: null,
  grams: null,
  count: null,
  tookMinutes: null,
  madeUpBy: null,
};

/** Tasks and who holds them. */
export class TasksStore {
  /** Tasks due from a day up to another, and those before that are still open; by day, then by title. */
  async tasks(tx: Tx, roomId: string, from: string, to: string): Promise<Task[]> {
    const rows: TaskRow[] = await tx.query(
      `${tasksSelected} WHERE task.room_id = $1 AND task.due_on < $3 AND (task.due_on >= $2 OR task.done_at IS NULL)
       ORDER BY task.due_on, task.title, shelf.label, task.id`,
      [roomId, from, to],
    );
    return rows.map(taskOf);
  }

  /** One task; 404 when the room has no such task. */
  async task(tx: Tx, roomId: string, taskId: string): Promise<Task> {
    const [found] = await this.some(tx, roomId, [taskId]);
    if (found === undefined) throw notFound('task');
    return found;
  }

  /** Tasks of a room by id, by day. */
  async some(tx: Tx, roomId: string, taskIds: readonly string[]): Promise<Task[]> {
    const rows: TaskRow[] = await tx.query(
      `${tasksSelected} WHERE task.room_id = $1 AND task.id = ANY($2) ORDER BY task.due_on, task.id`,
      [roomId, taskIds],
    );
    return rows.map(taskOf);
  }

  /** One task, held until the transaction ends; 404 when the room has no such task. */
  async lock(tx: Tx, roomId: string, taskId: string): Promise<TaskEntity> {
    const found = await tx.findOne(TaskEntity, {
      where: { roomId, id: taskId },
      lock: { mode: 'pessimistic_write' },
    });
    if (found === null) throw notFound('task');
    return found;
  }

  /** Adds a task of no routine, held by those who are named, and returns its id. */
  async add(tx: Tx, task: NewTask, personIds: readonly string[]): Promise<string> {
    const { id } = await tx.save(TaskEntity, { ...task, isByHand: personIds.length > 0 });
    await this.setHolders(tx, id, personIds);
    return id;
  }

  /** Removes a task that is open; false when it was closed or is gone. */
  async removeOpen(tx: Tx, taskId: string): Promise<boolean> {
    return (await tx.delete(TaskEntity, { id: taskId, doneAt: IsNull() })).affected === 1;
  }

  /** Moves a task to another day. */
  async move(tx: Tx, taskId: string, dueOn: string): Promise<void> {
    await tx.update(TaskEntity, { id: taskId }, { dueOn });
  }

  /** Says who holds a task; chosen by hand unless the rota chose. */
  async hold(tx: Tx, taskId: string, personIds: readonly string[], isByHand: boolean): Promise<void> {
    await tx.update(TaskEntity, { id: taskId }, { isByHand });
    await this.setHolders(tx, taskId, personIds);
  }

  /** Ids of those who hold a task. */
  async holders(tx: Tx, taskId: string): Promise<string[]> {
    const held = await tx.find(TaskHolderEntity, { where: { taskId }, order: { personId: 'ASC' } });
    return held.map(({ personId }) => personId);
  }

  /** Closes a task. */
  async close(tx: Tx, taskId: string, { at, by, ...said }: Closing): Promise<void> {
    await tx.update(TaskEntity, { id: taskId }, { ...said, doneAt: at, doneBy: by });
  }

  /** Closes the open tasks of a routine that were due before one that was done, as missed; returns their ids. */
  async closeMissed(tx: Tx, by: Pick<TaskEntity, 'id' | 'routineId' | 'dueOn'>, at: Date): Promise<string[]> {
    const [rows]: [{ id: string }[], number] = await tx.query(
      `UPDATE task SET outcome = 'missed', done_at = $4, made_up_by = $1
       WHERE routine_id = $2 AND due_on < $3 AND done_at IS NULL RETURNING id`,
      [by.id, by.routineId, by.dueOn, at],
    );
    return rows.map(({ id }) => id);
  }

  /** Opens a task again, with those that it had made up for; returns the ids of those. */
  async reopen(tx: Tx, taskId: string): Promise<string[]> {
    const madeUp = await tx.find(TaskEntity, { where: { madeUpBy: taskId }, select: { id: true } });
    for (const { id } of [{ id: taskId }, ...madeUp]) await tx.update(TaskEntity, { id }, asNothingSaid);
    return madeUp.map(({ id }) => id);
  }

  private async setHolders(tx: Tx, taskId: string, personIds: readonly string[]): Promise<void> {
    await tx.delete(TaskHolderEntity, { taskId });
    if (personIds.length === 0) return;
    await tx.insert(
      TaskHolderEntity,
      personIds.map((personId) => ({ taskId, personId })),
    );
  }
}
