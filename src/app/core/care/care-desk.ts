import { inject, Injectable } from '@angular/core';
import type { Task } from '@shared/contracts/care';
import type { Observable } from 'rxjs';
import { Notices } from '../notices';
import type { PlanQuestion } from '../plan-change';
import { PlanChanges } from '../plan-changes';
import type { Completion } from './care-deed';
import { CareQueue } from './care-queue';
import { outcomeWord, taskTitle } from './task-words';

/** Closes tasks with a way back, wherever they are shown. */
@Injectable({ providedIn: 'root' })
export class CareDesk {
  private readonly queue = inject(CareQueue);
  private readonly plans = inject(PlanChanges);
  private readonly notices = inject(Notices);

  /**
   * Says what became of a task; it can be taken back for ten seconds from the notice, and later at the task.
   *
   * @param task - As it is shown, open.
   * @param completion - What became of it.
   * @param ask - Asks the person, where lamps or a mat were switched otherwise than planned.
   */
  async close(
    task: Task,
    completion: Completion,
    ask: (question: PlanQuestion) => Observable<boolean>,
  ): Promise<void> {
    const title = taskTitle(task);
    await this.queue.add({ kind: 'close', taskId: task.id, completion }, title);
    const { outcome = 'done' } = completion;
    const undone =
      outcome === 'done'
        ? this.plans.sayTicked(task, ask)
        : this.notices.sayUndoable(`${outcomeWord(outcome)}: ${task.title}`);
    undone.subscribe(() => void this.takeBack(task));
  }

  /** Opens a task again. */
  async takeBack(task: Task): Promise<void> {
    await this.queue.takeBack(task.id, taskTitle(task));
  }
}
