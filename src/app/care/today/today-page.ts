import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import { listTasks, type Task } from '@shared/contracts/care';
import { DateTime } from 'luxon';
import { filter } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { CareQueue } from '../../core/care/care-queue';
import { CareToday } from '../../core/care/care-today';
import { dayWords, taskTitle } from '../../core/care/task-words';
import { failureText } from '../../core/failure-text';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { NoteLine } from '../../ui/note-line/note-line';
import { EmptyState } from '../../ui/states/empty-state';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { AddCareDialog, type AddedCare } from './add-care/add-care-dialog';
import { TaskList } from './task-list/task-list';
import { todayGroups } from './today-groups';
import { Troubles } from './troubles/troubles';

/** How far ahead to look for what is next, when nothing is due [d]. */
const lookAheadDays = 60;

/** What is to be done today and what is late, on a phone in one hand. */
@Component({
  selector: 'app-today-page',
  templateUrl: './today-page.html',
  styleUrl: './today-page.scss',
  imports: [EmptyState, ErrorState, LoadingLines, MatButton, MatIcon, NoteLine, TaskList, Troubles],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TodayPage {
  private readonly api = inject(ApiClient);
  private readonly care = inject(CareToday);
  private readonly dialog = inject(MatDialog);
  private readonly format = inject(ReaderFormat);
  private readonly queue = inject(CareQueue);
  private readonly session = inject(Session);

  protected readonly days = this.care.days;
  protected readonly troubled = this.queue.troubled;
  protected readonly personId = computed(() => this.session.account()?.id ?? '');
  protected readonly mayDo = computed(() => this.session.may('helper'));
  protected readonly today = computed(() => this.care.today() ?? '');
  protected readonly knownTasks = computed(() => this.days()?.tasks ?? []);

  protected readonly problem = computed(() => {
    const failure = this.care.failure();
    return failure === null ? null : failureText(failure);
  });
  /** When what is shown was so, while the server can't be asked. */
  protected readonly asOf = computed(() => {
    const days = this.days();
    return days === null || this.care.failure() === null ? null : this.format.when(days.at);
  });

  protected readonly groups = computed(() => todayGroups(this.care.tasks(), this.today(), this.personId()));
  protected readonly sections = computed(() => {
    const { mine, uncovered, anybodys, others } = this.groups();
    return [
      { title: 'Yours', tasks: mine, namesHolder: false },
      { title: 'Nobody’s yet', tasks: uncovered, namesHolder: false },
      { title: 'Anybody’s', tasks: anybodys, namesHolder: false },
      { title: 'Others’', tasks: others, namesHolder: true },
    ].filter(({ tasks }) => tasks.length > 0);
  });
  protected readonly summary = computed(() => {
    const { dueCount, closedCount } = this.groups();
    if (dueCount === 0) return '';
    return closedCount === dueCount ? 'All done for today' : `${closedCount} of ${dueCount} done`;
  });
  protected readonly dayName = computed(() => (this.today() === '' ? '' : dayWords(this.today())));
  /** Unplanned care that the server doesn't have yet. */
  protected readonly added = computed(() => this.queue.waiting().filter(({ kind }) => kind === 'add'));

  private readonly ahead = rxResource({
    params: () => {
      const days = this.days();
      const isIdle = days !== null && this.groups().dueCount === 0 && this.groups().tomorrow.length === 0;
      return isIdle && this.care.failure() === null
        ? { roomId: days.roomId, from: days.tomorrow }
        : undefined;
    },
    stream: ({ params: { roomId, from } }) =>
      this.api.call(listTasks, { params: { roomId }, query: { from, to: daysAfter(from, lookAheadDays) } }),
  });
  /** What is next, when nothing is due today: "Next is Feed strawberries · B1 on Thu 3 Dec." */
  protected readonly next = computed(() => {
    const later = this.ahead.hasValue() ? this.ahead.value().filter(({ outcome }) => outcome === null) : [];
    const next = this.groups().tomorrow[0]?.task ?? later.toSorted(byDay)[0];
    if (next === undefined) return 'What routines plan appears here on its day, with what is late.';
    const isTomorrow = next.dueOn === this.days()?.tomorrow;
    return `Next is ${taskTitle(next)}, ${isTomorrow ? 'tomorrow' : `on ${dayWords(next.dueOn)}`}.`;
  });

  protected refresh(): void {
    this.care.refresh();
    this.queue.sendNow();
  }

  protected addCare(): void {
    this.dialog
      .open<AddCareDialog, unknown, AddedCare>(AddCareDialog, { data: this.days(), maxWidth: '480px' })
      .afterClosed()
      .pipe(filter((added) => added !== undefined))
      .subscribe((added) => void this.queue.add({ kind: 'add', ...added }, added.task.title));
  }

  protected dismiss(deed: Parameters<CareQueue['drop']>[0]): void {
    void this.queue.drop(deed);
  }

  protected sendAgain(deed: Parameters<CareQueue['sendAgain']>[0]): void {
    void this.queue.sendAgain(deed);
  }
}

function byDay(one: Task, other: Task): number {
  return one.dueOn.localeCompare(other.dueOn);
}

function daysAfter(day: string, days: number): string {
  return DateTime.fromISO(day, { zone: 'UTC' }).plus({ days }).toFormat('yyyy-MM-dd');
}
