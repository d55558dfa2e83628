import { ChangeDetectionStrategy, Component, computed, inject, input, model, output } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import type { TaskOutcome } from '@shared/care/task-outcome';
import { lateness } from '../../../core/care/lateness';
import { dayWords, holderWords, outcomeWord, taskTitle } from '../../../core/care/task-words';
import type { ShownTask } from '../../../core/care/with-waiting';
import { ReaderFormat } from '../../../core/reader-format';
import { careKindLooks } from '../../../ui/care-kind/care-kind-look';
import { Tick } from '../../../ui/tick/tick';

const tickIcons: Readonly<Record<TaskOutcome, string>> = {
  done: 'check',
  notNeeded: 'remove',
  couldNot: 'close',
  missed: 'close',
};

/** One task: its tick, what it is, whose and how late. What belongs to it opens below. */
@Component({
  selector: 'app-task-row',
  templateUrl: './task-row.html',
  styleUrl: './task-row.scss',
  imports: [MatIcon, Tick],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TaskRow {
  readonly shown = input.required<ShownTask>();
  /** The room's day, `YYYY-MM-DD`. */
  readonly today = input.required<string>();
  readonly mayDo = input(false);
  /** What waits does so for a signal. */
  readonly isHeldUp = input(false);
  /** Whether to say whose it is. */
  readonly namesHolder = input(true);
  readonly isOpened = model(false);

  readonly ticked = output();

  private readonly format = inject(ReaderFormat);
  protected readonly task = computed(() => this.shown().task);
  protected readonly title = computed(() => taskTitle(this.task()));
  protected readonly isClosed = computed(() => this.task().outcome !== null);
  protected readonly kindIcon = computed(() => careKindLooks[this.task().kind].icon);
  protected readonly tickIcon = computed(() => tickIcons[this.task().outcome ?? 'done']);
  protected readonly detailsId = computed(() => `task-${this.task().id}`);

  protected readonly late = computed(() =>
    this.isClosed() ? null : lateness(this.task().inTimeUntil, this.today()),
  );
  /** How long there is, where the window is open for longer than today. */
  protected readonly until = computed(() => {
    const { inTimeUntil, dueOn } = this.task();
    if (this.isClosed() || inTimeUntil <= this.today() || dueOn > this.today()) return null;
    return `until ${dayWords(inTimeUntil)}`;
  });

  /** Whose, or by whom and when. */
  protected readonly words = computed(() => {
    const task = this.task();
    if (task.outcome !== null && task.doneAt !== null) {
      const by = task.doneByName === null ? '' : ` by ${task.doneByName}`;
      return `${outcomeWord(task.outcome)} ${this.format.when(task.doneAt)}${by}`;
    }
    const offered = task.swap === null ? null : offerWords(task.swap);
    const holder = this.namesHolder() || task.cover === 'short' ? holderWords(task) : null;
    const place =
      task.plantingLabel !== null && !task.title.includes(task.plantingLabel) ? task.plantingLabel : null;
    return [place, holder, `${task.minutes}\u00a0min`, offered].filter((part) => part !== null).join(' · ');
  });

  protected readonly waits = computed(() => {
    if (!this.shown().isWaiting) return null;
    return this.isHeldUp() ? 'Waits for signal' : 'On its way';
  });
}

function offerWords({ offeredByName, toPersonName }: NonNullable<ShownTask['task']['swap']>): string {
  return toPersonName === null
    ? `${offeredByName} would like to hand it over`
    : `${offeredByName} offers it to ${toPersonName}`;
}
