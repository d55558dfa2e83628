import type { Task } from '@shared/contracts/care';
import { IsNull } from 'typeorm';
import type { Tx } from '../database/transactions';
import type { CareStore } from './care-store';
import { TaskEntity } from './task-entity';

/** A task of no routine, to be opened. */
export type OpenTask = Pick<
  TaskEntity,
  'roomId' | 'shelfId' | 'kind' | 'title' | 'detail' | 'dueOn' | 'personId'
>;

/** Opens single tasks for what other areas find due, and takes them back. */
export class OpenTasks {
  constructor(private readonly care: CareStore) {}

  /** Opens a task and tells it. */
  async open(tx: Tx, task: OpenTask): Promise<Task> {
    const { id } = await tx.save(TaskEntity, task);
    return this.care.task(tx, task.roomId, id);
  }

  /** Takes a task back that is not done; false when it was done or is gone. */
  async withdraw(tx: Tx, taskId: string): Promise<boolean> {
    return (await tx.delete(TaskEntity, { id: taskId, doneAt: IsNull() })).affected === 1;
  }
}
