import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { Task } from '@shared/contracts/care';
import { lateness } from '../../core/care/lateness';
import { dayWords, outcomeWord, taskTitle } from '../../core/care/task-words';
import type { ShownTask } from '../../core/care/with-waiting';
import { ReaderFormat } from '../../core/reader-format';
import { Tick } from '../../ui/tick/tick';

/** What is to be done today and what is late, to be ticked; all else about it is on care's own page. */
@Component({
  selector: 'app-todays-care',
  templateUrl: './todays-care.html',
  styleUrl: './todays-care.scss',
  imports: [MatIcon, RouterLink, Tick],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TodaysCare {
  readonly tasks = input.required<readonly ShownTask[]>();
  /** The room's day, `YYYY-MM-DD`. */
  readonly today = input.required<string>();
  /** Whether the person may tick. */
  readonly mayTick = input(false);
  /** What waits does so for a signal. */
  readonly isHeldUp = input(false);

  readonly ticked = output<Task>();

  private readonly format = inject(ReaderFormat);

  protected readonly items = computed(() =>
    this.tasks()
      .filter(({ task }) => task.dueOn <= this.today())
      .map(({ task, isWaiting }) => ({
        task,
        isDone: task.outcome !== null,
        title: taskTitle(task),
        late: task.outcome === null ? lateness(task.inTimeUntil, this.today()) : null,
        detail: task.doneAt === null ? task.detail : this.closed(task, task.doneAt),
        waits: isWaiting && this.isHeldUp(),
        initials: initialsOf(task.personName),
      })),
  );

  protected readonly comingUp = computed(() =>
    this.tasks()
      .filter(({ task }) => task.dueOn > this.today())
      .map(({ task }) => ({ id: task.id, title: taskTitle(task), when: whenDue(task) })),
  );

  /** "09:05 by Maren Oxley", "Not needed, 09:05 by Maren Oxley" */
  private closed({ doneByName, outcome }: Task, doneAt: string): string {
    const when = this.format.when(doneAt);
    const said = doneByName === null ? when : `${when} by ${doneByName}`;
    return outcome === null || outcome === 'done' ? said : `${outcomeWord(outcome)}, ${said}`;
  }
}

/** "Thu 3 Dec · Maren Oxley" */
function whenDue({ dueOn, personName }: Task): string {
  const day = dayWords(dueOn);
  return personName === null ? day : `${day} · ${personName}`;
}

/** First letters of the first and last name. */
function initialsOf(name: string | null): string {
  const words = (name ?? '').split(/\s+/).filter((word) => word !== '');
  return [words[0], ...words.slice(1).slice(-1)].map((word) => word?.charAt(0) ?? '').join('');
}
