import { ChangeDetectionStrategy, Component, computed, inject, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { Task } from '@shared/contracts/care';
import { formatDay } from '@shared/format/room-time';
import { dayBounds } from '@shared/series/room-days';
import { amountWords, outcomeWord, taskTitle } from '../../core/care/task-words';
import { ReaderFormat } from '../../core/reader-format';
import { Session } from '../../core/session';
import { careKindLooks } from '../../ui/care-kind/care-kind-look';
import { EmptyState } from '../../ui/states/empty-state';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { RecordData } from './record-data';

/** What was done, by the day on which it was closed, the newest first. */
@Component({
  selector: 'app-record-list',
  templateUrl: './record-list.html',
  styleUrl: './record-list.scss',
  imports: [EmptyState, ErrorState, LoadingLines, MatButton, MatIcon, RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RecordList {
  readonly allWanted = output();

  private readonly format = inject(ReaderFormat);
  private readonly session = inject(Session);
  protected readonly data = inject(RecordData);

  protected readonly isFiltered = computed(() =>
    Object.values(this.data.filter() ?? {}).some((part) => part !== undefined),
  );
  protected readonly days = computed(() => {
    const days = new Map<string, { title: string; lines: ReturnType<RecordList['line']>[] }>();
    for (const task of this.data.tasks() ?? []) {
      const closedAt = task.doneAt ?? `${task.dueOn}T00:00:00Z`;
      const zone = this.session.timeZone();
      const day = dayBounds(Date.parse(closedAt), zone).date;
      const held = days.get(day) ?? { title: this.dayTitle(closedAt, day), lines: [] };
      held.lines.push(this.line(task));
      days.set(day, held);
    }
    return [...days.values()];
  });

  /** "Monday 30 November"; of another year with its year. */
  private dayTitle(at: string, day: string): string {
    const words = formatDay(at, this.session.timeZone());
    return day.slice(0, 4) === this.format.today().slice(0, 4) ? words : `${words} ${day.slice(0, 4)}`;
  }

  private line(task: Task) {
    const { outcome, doneAt, doneByName, plantingLabel, dueOn, inTimeUntil, note, tookMinutes } = task;
    const closedOn = doneAt === null ? null : dayBounds(Date.parse(doneAt), this.session.timeZone()).date;
    return {
      task,
      title: taskTitle(task),
      plantingLabel,
      look: outcome === 'done' ? careKindLooks[task.kind].icon : 'do_not_disturb_on',
      outcome: outcome === null || outcome === 'done' ? null : outcomeWord(outcome),
      amounts: [amountWords(task), tookMinutes === null ? '' : `took ${tookMinutes}\u00a0min`]
        .filter((part) => part !== '')
        .join(' · '),
      note,
      by: doneAt === null ? '' : [this.format.time(doneAt), doneByName].filter(Boolean).join(' by '),
      late:
        outcome === 'done' && closedOn !== null && closedOn > inTimeUntil
          ? `due ${this.format.day(dueOn)}`
          : null,
    };
  }
}
