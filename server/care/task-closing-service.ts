import type { Task, TaskCompletion } from '@shared/contracts/care';
import { roleSuffices, type Role } from '@shared/contracts/people';
import type { RoomAuthor } from '../audit/room-author';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { conflict, invalidField, RequestProblem } from '../http/request-problem';
import type { LiveFeed } from '../live/live-feed';
import type { HolderAssignment } from '../rota/holder-assignment';
import type { SwapsStore } from '../rota/swaps-store';
import type { TaskEffects } from './task-effects';
import type { TaskPlanningService } from './task-planning-service';
import type { TaskPlanningStore } from './task-planning-store';
import type { TasksStore } from './tasks-store';

/** What {@link TaskClosingService} works with. */
export interface TaskClosingParts {
  readonly transactions: Transactions;
  readonly tasks: TasksStore;
  readonly swaps: Pick<SwapsStore, 'settle'>;
  readonly assignment: Pick<HolderAssignment, 'hold'>;
  readonly planning: TaskPlanningService;
  readonly planned: Pick<TaskPlanningStore, 'removeNextTurn'>;
  readonly effects: TaskEffects;
  readonly feed: LiveFeed;
  readonly now: Clock;
}

/** A member with their role. */
type Doer = RoomAuthor & { readonly role: Role };

const DAY_MS = 86_400_000;
/** The clock of a phone may be this far ahead. */
const CLOCK_TOLERANCE_MS = 120_000;
/** What was ticked without a signal is taken for so many days. */
const LONGEST_WAIT_DAYS = 7;

/** Closes tasks, lets their routines go on from there, and takes it back. */
export class TaskClosingService {
  constructor(private readonly parts: TaskClosingParts) {}

  /**
   * Closes a task: done, not needed, or could not be done.
   *
   * @param by - Who did it; closing one's own again changes nothing.
   * @param timeZone - Of the room.
   * @param taskId - Which.
   * @param completion - What became of it.
   * @returns The task.
   * @throws {@link RequestProblem} 409 with who and when where somebody else closed it, 422 for an instant to come or
   *   long past, or where what was harvested can't have been.
   *
   * @remarks
   * Earlier turns of the same routine that are still open are closed as missed when a later one is done or found not
   * needed: the plants have what they wanted, and the record keeps that it was late. What could not be done makes up for
   * nothing.
   */
  async complete(by: Doer, timeZone: string, taskId: string, completion: TaskCompletion): Promise<Task> {
    const { tasks } = this.parts;
    const at = this.doneAt(completion.doneAt);
    return this.changed(
      by.roomId,
      async (tx) => {
        const task = await tasks.lock(tx, by.roomId, taskId);
        if (task.doneAt !== null) {
          if (task.doneBy === by.personId) return [];
          throw await this.closedByOther(tx, by.roomId, taskId);
        }
        const { outcome, note, millilitres, grams, count, tookMinutes } = completion;
        await tasks.close(tx, taskId, {
          outcome,
          at,
          by: by.personId,
          note,
          millilitres,
          grams,
          count,
          tookMinutes,
        });
        if (outcome === 'done') await this.parts.effects.write(tx, by, timeZone, task, { ...completion, at });
        await this.parts.swaps.settle(tx, taskId, at);
        const missed =
          task.routineId === null || outcome === 'couldNot' ? [] : await tasks.closeMissed(tx, task, at);
        const given = await this.parts.planning.planRoom(tx, by.roomId);
        return [taskId, ...missed, ...given];
      },
      taskId,
    );
  }

  /**
   * Takes back what was said of a task, with all that it wrote elsewhere and the turn that followed from it.
   *
   * @param by - Who; a helper their own.
   * @param timeZone - Of the room.
   * @param taskId - Which; an open one stays as it is.
   * @returns The task, open.
   * @throws {@link RequestProblem} 403 for somebody else's, 409 for one that a later one made up for.
   */
  reopen(by: Doer, timeZone: string, taskId: string): Promise<Task> {
    const { tasks, planned, planning, effects } = this.parts;
    return this.changed(
      by.roomId,
      async (tx) => {
        const task = await tasks.lock(tx, by.roomId, taskId);
        if (task.doneAt === null) return [];
        if (task.outcome === 'missed') {
          throw conflict(
            'MADE_UP',
            'A later turn made up for this one. Take that one back, and this opens again.',
          );
        }
        if (task.doneBy !== by.personId && !roleSuffices(by.role, 'grower')) {
          throw new RequestProblem(403, 'NOT_YOURS', 'Somebody else did this; ask them or a grower.');
        }
        await effects.takeBack(tx, by.roomId, timeZone, taskId);
        const madeUp = await tasks.reopen(tx, taskId);
        if (task.routineId !== null && task.routineDay !== null) {
          await planned.removeNextTurn(tx, task.routineId, task.routineDay);
        }
        const given = await planning.planRoom(tx, by.roomId);
        return [taskId, ...madeUp, ...given];
      },
      taskId,
    );
  }

  /** Makes a change and tells the dashboards of every task that it touched. */
  private async changed(
    roomId: string,
    change: (tx: Tx) => Promise<readonly string[]>,
    taskId: string,
  ): Promise<Task> {
    const { transactions, tasks, assignment, feed } = this.parts;
    const { task, touched } = await transactions.run(async (tx) => {
      await assignment.hold(tx, roomId);
      const ids = await change(tx);
      return { touched: await tasks.some(tx, roomId, ids), task: await tasks.task(tx, roomId, taskId) };
    });
    for (const one of touched) feed.publish(roomId, 'task:changed', one);
    return task;
  }

  private doneAt(said: string | undefined): Date {
    const now = this.parts.now().getTime();
    if (said === undefined) return new Date(now);
    const at = Date.parse(said);
    if (at > now + CLOCK_TOLERANCE_MS) throw invalidField('body.doneAt', 'is still to come');
    if (at < now - LONGEST_WAIT_DAYS * DAY_MS) {
      throw invalidField('body.doneAt', `is more than ${LONGEST_WAIT_DAYS} days ago`);
    }
    return new Date(Math.min(at, now));
  }

  private async closedByOther(tx: Tx, roomId: string, taskId: string): Promise<RequestProblem> {
    const { doneByName, doneAt, outcome } = await this.parts.tasks.task(tx, roomId, taskId);
    const who = doneByName ?? 'A later turn';
    return conflict('TASK_CLOSED', `${who} has seen to this already. Nothing was changed.`, {
      byName: doneByName,
      at: doneAt,
      outcome,
    });
  }
}
