import { BreakpointObserver } from '@angular/cdk/layout';
import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { Task } from '@shared/contracts/care';
import type { DutyDay } from '@shared/contracts/care-rota';
import { formatDayAndYear } from '@shared/format/room-time';
import { dayAfter } from '@shared/growing/calendar-day';
import { filter, map } from 'rxjs';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { ErrorState } from '../../ui/states/error-state';
import { LoadingLines } from '../../ui/states/loading-lines';
import { OfferDialog, type Offer } from '../today/offer/offer-dialog';
import { DayDialog } from './duty/day-dialog';
import { DutyCard } from './duty/duty-card';
import { RotaData } from './rota-data';
import { ShareCard } from './share/share-card';
import { SwapsCard } from './swaps/swaps-card';
import { TaskMoves } from './task-moves';
import { TaskMenu } from './week/task-menu';
import { WeekDays } from './week/week-days';
import { WeekTable } from './week/week-table';

const isoDay = /^\d{4}-(0[1-9]|1[0-2])-(0[1-9]|[12]\d|3[01])$/;

/** Who does what in a week: as a table at a desk, as days on a phone. */
@Component({
  selector: 'app-rota-page',
  templateUrl: './rota-page.html',
  styleUrl: './rota-page.scss',
  imports: [
    DutyCard,
    ErrorState,
    LoadingLines,
    MatButton,
    MatIcon,
    MatIconButton,
    RouterLink,
    ShareCard,
    SwapsCard,
    TaskMenu,
    WeekDays,
    WeekTable,
  ],
  providers: [RotaData, TaskMoves],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RotaPage {
  /** From the address: any day of the week to show; this week without. */
  readonly week = input<string>();

  private readonly dialog = inject(MatDialog);
  private readonly moves = inject(TaskMoves);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);
  protected readonly data = inject(RotaData);

  protected readonly isWide = toSignal(
    inject(BreakpointObserver)
      .observe('(width >= 960px)')
      .pipe(map(({ matches }) => matches)),
    { initialValue: true },
  );
  protected readonly weekTitle = computed(() => {
    const [from, to] = [this.data.monday(), dayAfter(this.data.monday(), 6)].map((day) =>
      formatDayAndYear(`${day}T00:00:00Z`, 'UTC'),
    ) as [string, string];
    const isSameYear = from.slice(-4) === to.slice(-4);
    return `${isSameYear ? from.slice(0, -5) : from} to ${to}`;
  });
  protected readonly isThisWeek = computed(() => {
    const { from, to } = this.data.span();
    return from <= this.data.today() && this.data.today() < to;
  });
  protected readonly before = computed(() => dayAfter(this.data.monday(), -7));
  protected readonly after = computed(() => dayAfter(this.data.monday(), 7));
  protected readonly uncoveredWords = computed(() => {
    const count = this.data.rota()?.uncovered.length ?? 0;
    if (count === 0) return null;
    return count === 1 ? 'One task is short of hands.' : `${count} tasks are short of hands.`;
  });
  protected readonly help = computed(() => {
    if (!this.session.may('helper')) return null;
    if (!this.session.may('grower')) return 'A task’s menu offers it to others or takes one over.';
    return this.isWide()
      ? 'Drag a task to another day or person, or press it for its menu.'
      : 'Press a task to move it, give it away or take it over.';
  });

  constructor() {
    effect(() => {
      const day = this.week() ?? '';
      this.data.chosenDay.set(isoDay.test(day) && !Number.isNaN(Date.parse(day)) ? day : null);
    });
  }

  protected offer(task: Task): void {
    this.dialog
      .open<OfferDialog, string, Offer>(OfferDialog, { data: task.title, width: '460px', maxWidth: '96vw' })
      .afterClosed()
      .pipe(filter((offer) => offer !== undefined))
      .subscribe((offer) => this.moves.offer(task, offer));
  }

  protected changeDay(day: DutyDay): void {
    this.dialog
      .open<DayDialog, DutyDay, true>(DayDialog, { data: day, width: '460px', maxWidth: '96vw' })
      .afterClosed()
      .pipe(filter((isSet) => isSet === true))
      .subscribe(() => {
        this.data.refresh();
        this.notices.say('The day is set; open tasks follow it');
      });
  }
}
