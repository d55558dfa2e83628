import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import {
  MAT_CHECKBOX_DEFAULT_OPTIONS,
  MatCheckbox,
  type MatCheckboxDefaultOptions,
} from '@angular/material/checkbox';
import { MatIcon } from '@angular/material/icon';
import type { Task } from '@shared/contracts/care';
import { formatShortDay } from '@shared/format/room-time';
import { ReaderFormat } from '../../core/reader-format';
import { lateness } from './lateness';

/** A task and whether it shall be done. */
export interface Tick {
  readonly task: Task;
  readonly isDone: boolean;
}

/** What is to be done today and what is late, to be ticked. */
@Component({
  selector: 'app-todays-care',
  templateUrl: './todays-care.html',
  styleUrl: './todays-care.scss',
  imports: [MatCheckbox, MatIcon],
  // A box shows what the server has stored, so it never ticks itself.
  providers: [
    {
      provide: MAT_CHECKBOX_DEFAULT_OPTIONS,
      useValue: { clickAction: 'noop' } satisfies MatCheckboxDefaultOptions,
    },
  ],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TodaysCare {
  readonly tasks = input.required<readonly Task[]>();
  /** The room's day, `YYYY-MM-DD`. */
  readonly today = input.required<string>();
  /** Whether the person may tick. */
  readonly mayTick = input(false);
  /** Tasks whose tick is under way. */
  readonly busyIds = input<ReadonlySet<string>>(new Set());

  readonly ticked = output<Tick>();

  private readonly format = inject(ReaderFormat);

  protected readonly items = computed(() =>
    this.tasks()
      .filter(({ dueOn }) => dueOn <= this.today())
      .map((task) => ({
        task,
        isDone: task.doneAt !== null,
        title: titleOf(task),
        late: task.doneAt === null ? lateness(task.dueOn, this.today()) : null,
        detail: task.doneAt === null ? task.detail : this.done(task, task.doneAt),
        initials: initialsOf(task.personName),
      })),
  );

  protected readonly comingUp = computed(() =>
    this.tasks()
      .filter(({ dueOn }) => dueOn > this.today())
      .map((task) => ({ id: task.id, title: titleOf(task), when: whenDue(task) })),
  );

  protected tick(task: Task): void {
    if (!this.mayTick() || this.busyIds().has(task.id)) return;
    this.ticked.emit({ task, isDone: task.doneAt === null });
  }

  /** "09:05 by Maren Oxley" */
  private done({ doneByName }: Task, doneAt: string): string {
    const when = this.format.when(doneAt);
    return doneByName === null ? when : `${when} by ${doneByName}`;
  }
}

/** "Feed strawberries · B1", the label never alone on a line. */
function titleOf({ title, shelfLabel }: Task): string {
  return shelfLabel === null ? title : `${title} ·\u00a0${shelfLabel}`;
}

/** "Thu 3 Dec · Maren Oxley". A day of the calendar has no time zone, so it is written as UTC counts it. */
function whenDue({ dueOn, personName }: Task): string {
  const day = formatShortDay(`${dueOn}T00:00:00Z`, 'UTC');
  return personName === null ? day : `${day} · ${personName}`;
}

/** First letters of the first and last name. */
function initialsOf(name: string | null): string {
  const words = (name ?? '').split(/\s+/).filter((word) => word !== '');
  return [words[0], ...words.slice(1).slice(-1)].map((word) => word?.charAt(0) ?? '').join('');
}
