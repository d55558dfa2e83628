import { CdkDrag, CdkDropList, CdkDropListGroup, type CdkDragDrop } from '@angular/cdk/drag-drop';
import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import type { MatMenu } from '@angular/material/menu';
import type { Task } from '@shared/contracts/care';
import type { DutyDay } from '@shared/contracts/care-rota';
import { Session } from '../../../core/session';
import { RotaData } from '../rota-data';
import { TaskMoves } from '../task-moves';
import { dayTitle, rowTitle } from './week-words';
import type { RotaCell, RotaRow } from './rota-week';
import { TaskChip } from './task-chip';

/** Where something is dropped. */
interface Spot {
  readonly row: RotaRow;
  readonly day: string;
}

/** The week as a table of people by days, in which tasks can be dragged to another day or person. */
@Component({
  selector: 'app-week-table',
  templateUrl: './week-table.html',
  styleUrl: './week-table.scss',
  imports: [CdkDrag, CdkDropList, CdkDropListGroup, MatIcon, TaskChip],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WeekTable {
  readonly days = input.required<readonly DutyDay[]>();
  readonly rows = input.required<readonly RotaRow[]>();
  readonly menu = input.required<MatMenu>();
  /** A day whose duty shall be set. */
  readonly dayChosen = output<DutyDay>();

  private readonly moves = inject(TaskMoves);
  private readonly session = inject(Session);
  protected readonly data = inject(RotaData);

  protected readonly mayAct = computed(() => this.session.may('helper'));
  protected readonly mayMove = computed(() => this.session.may('grower'));
  protected readonly mayPlan = computed(() => this.session.may('keeper'));
  protected readonly heads = computed(() =>
    this.days().map((day) => ({
      day,
      title: dayTitle(day.day),
      isToday: day.day === this.data.today(),
      isOver: day.day < this.data.today(),
    })),
  );
  protected readonly lines = computed(() =>
    this.rows().map((row) => ({
      row,
      key: row.person?.personId ?? row.kind,
      title: rowTitle(row),
      isSelf: row.person !== null && row.person.personId === this.session.account()?.id,
    })),
  );

  protected spot(row: RotaRow, { day }: RotaCell): Spot {
    return { row, day };
  }

  /** Nothing can be put on a day that is over. */
  protected readonly canEnter = (_drag: CdkDrag<Task>, { data }: CdkDropList<Spot>): boolean =>
    data.day >= this.data.today();

  protected drop({ item, container, previousContainer }: CdkDragDrop<Spot, Spot, Task>): void {
    if (container === previousContainer) return;
    const [to, from] = [container.data, previousContainer.data];
    // From the line of what is short, a task goes as a whole; from a person's, their part of it.
    this.moves.move(item.data, {
      day: to.day,
      ...(to.row === from.row && to.row.person === null ? {} : { personId: to.row.person?.personId ?? null }),
      fromPersonId: from.row.person?.personId,
    });
  }
}
