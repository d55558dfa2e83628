import type { Task } from '@shared/contracts/care';
import type { Tx } from '../database/transactions';
import type { HolderAssignment } from '../rota/holder-assignment';
import type { NewTask, TasksStore } from './tasks-store';

/** A task of no routine, to be opened for somebody or, without, for whoever is on duty. */
export type OpenTask = NewTask & { readonly personId: string | null };

/** Opens single tasks for what other areas find due, and takes them back. */
export class OpenTasks {
  constructor(
    private readonly tasks: TasksStore,
    private readonly assignment: HolderAssignment,
  ) {}

  /** Opens a task and tells it. */
  async open(tx: Tx, { personId, ...task }: OpenTask): Promise<Task> {
    const id = await this.tasks.add(tx, task, personId === null ? [] : [personId]);
    await this.assignment.share(tx, task.roomId);
    return this.tasks.task(tx, task.roomId, id);
  }

  /** Takes a task back that is not done; false when it was done or is gone. */
  withdraw(tx: Tx, taskId: string): Promise<boolean> {
    return this.tasks.removeOpen(tx, taskId);
  }

  /** One task; 404 when the room has no such task. */
  task(tx: Tx, roomId: string, taskId: string): Promise<Task> {
    return this.tasks.task(tx, roomId, taskId);
  }
}
