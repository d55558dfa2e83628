import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import type { CareDays, Task } from '@shared/contracts/care';
import { filter } from 'rxjs';
import type { Completion } from '../../../core/care/care-deed';
import { CareDesk } from '../../../core/care/care-desk';
import { CareQueue } from '../../../core/care/care-queue';
import { taskTitle } from '../../../core/care/task-words';
import type { ShownTask } from '../../../core/care/with-waiting';
import { Notices } from '../../../core/notices';
import { Session } from '../../../core/session';
import { Asking } from '../../../ui/dialogs/asking';
import { HandOver } from '../hand-over';
import { OfferDialog, type Offer } from '../offer/offer-dialog';
import { TaskDetails, type TaskDeed } from '../task-details/task-details';
import { TaskRow } from '../task-row/task-row';

/** Tasks to be ticked, one opened at a time. */
@Component({
  selector: 'app-task-list',
  templateUrl: './task-list.html',
  styleUrl: './task-list.scss',
  imports: [TaskDetails, TaskRow],
  providers: [HandOver],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TaskList {
  readonly tasks = input.required<readonly ShownTask[]>();
  /** What the tasks are from. */
  readonly days = input.required<CareDays>();
  /** The room's day, `YYYY-MM-DD`. */
  readonly today = input.required<string>();
  /** Whether each task says whose it is. */
  readonly namesHolder = input(true);
  /** Whether the server answers; without it nothing can be handed over. */
  readonly hasSignal = input(true);

  private readonly asking = inject(Asking);
  private readonly desk = inject(CareDesk);
  private readonly dialog = inject(MatDialog);
  private readonly handOver = inject(HandOver);
  private readonly notices = inject(Notices);
  private readonly queue = inject(CareQueue);
  private readonly session = inject(Session);

  protected readonly isHeldUp = this.queue.isHeldUp;
  protected readonly personId = computed(() => this.session.account()?.id ?? '');
  protected readonly mayDo = computed(() => this.session.may('helper'));
  protected readonly mayRemoveAny = computed(() => this.session.may('grower'));
  protected readonly openedId = signal<string | null>(null);

  protected open(taskId: string, isOpened: boolean): void {
    this.openedId.set(isOpened ? taskId : null);
  }

  protected tick({ task }: ShownTask): void {
    if (task.outcome === null) this.close(task, { outcome: 'done' });
    else void this.desk.takeBack(task);
  }

  protected close(task: Task, completion: Completion): void {
    if (this.openedId() === task.id) this.openedId.set(null);
    void this.desk.close(task, completion, (question) => this.asking.ask(question));
  }

  protected async photograph(task: Task, file: File): Promise<void> {
    await this.queue.add({ kind: 'photo', taskId: task.id, file, fileName: file.name }, taskTitle(task));
    this.notices.say('Photo kept; it goes out with the rest');
  }

  protected carryOut(deed: TaskDeed, task: Task): void {
    switch (deed) {
      case 'takeOver':
        this.handOver.takeOver(task);
        break;
      case 'take':
        this.handOver.take(task);
        break;
      case 'withdraw':
        this.handOver.withdraw(task);
        break;
      case 'offer':
        this.dialog
          .open<OfferDialog, string, Offer>(OfferDialog, { data: task.title, maxWidth: '480px' })
          .afterClosed()
          .pipe(filter((offer) => offer !== undefined))
          .subscribe(({ toPersonId, note }) => this.handOver.offer(task, toPersonId, note));
        break;
      case 'remove':
        this.asking
          .ask({
            title: `Remove “${task.title}”?`,
            text: 'Nobody planned it by a routine, so it does not come back.',
            confirm: 'Remove it',
            isDestructive: true,
          })
          .pipe(filter(Boolean))
          .subscribe(() => this.handOver.remove(task));
    }
  }
}
