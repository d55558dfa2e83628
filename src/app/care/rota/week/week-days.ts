import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatIconButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import type { MatMenu } from '@angular/material/menu';
import type { DutyDay } from '@shared/contracts/care-rota';
import { Session } from '../../../core/session';
import { RotaData } from '../rota-data';
import type { RotaRow } from './rota-week';
import { TaskChip } from './task-chip';
import { dayTitle } from './week-words';

const list = new Intl.ListFormat('en-GB');

/** The week as a list of days, for a phone. */
@Component({
  selector: 'app-week-days',
  templateUrl: './week-days.html',
  styleUrl: './week-days.scss',
  imports: [MatIcon, MatIconButton, TaskChip],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WeekDays {
  readonly days = input.required<readonly DutyDay[]>();
  readonly rows = input.required<readonly RotaRow[]>();
  readonly menu = input.required<MatMenu>();
  /** A day whose duty shall be set. */
  readonly dayChosen = output<DutyDay>();

  private readonly data = inject(RotaData);
  private readonly session = inject(Session);

  protected readonly mayAct = computed(() => this.session.may('helper'));
  protected readonly mayPlan = computed(() => this.session.may('keeper'));
  protected readonly lines = computed(() =>
    this.days().map((day, index) => {
      // A pair stands in two lines; here once is enough.
      const tasks = new Map(
        this.rows().flatMap(({ cells }) => (cells[index]?.tasks ?? []).map((task) => [task.id, task])),
      );
      return {
        day,
        title: dayTitle(day.day),
        isToday: day.day === this.data.today(),
        isOver: day.day < this.data.today(),
        duty: dutyWords(day),
        tasks: [...tasks.values()],
      };
    }),
  );
}

/** "On duty: Jo Ashdown. Away: Idris Vane." */
function dutyWords({ isClosed, onDuty, absent, note }: DutyDay): string {
  const names = (people: DutyDay['onDuty']): string => list.format(people.map(({ name }) => name));
  return [
    isClosed ? 'Closed.' : onDuty.length === 0 ? '' : `On duty: ${names(onDuty)}.`,
    absent.length === 0 ? '' : `Away: ${names(absent)}.`,
    note,
  ]
    .filter((part) => part !== '')
    .join(' ');
}
