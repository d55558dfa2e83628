import { ChangeDetectionStrategy, Component, computed, inject, output, viewChild } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { MatMenu, MatMenuModule } from '@angular/material/menu';
import type { Task } from '@shared/contracts/care';
import { dayAfter } from '@shared/growing/calendar-day';
import { Session } from '../../../core/session';
import { dayWords } from '../../day-words';
import { RotaData } from '../rota-data';
import { TaskMoves } from '../task-moves';

const offeredDays = 14;

/** What can be done with an open task of the week: the same by keyboard as by dragging, and more. */
@Component({
  selector: 'app-task-menu',
  template: `
    <mat-menu #menu="matMenu">
      <ng-template matMenuContent let-task="task">
        @if (mayMove()) {
          <button mat-menu-item type="button" [matMenuTriggerFor]="days" [matMenuTriggerData]="{ task }">
            <mat-icon aria-hidden="true">event</mat-icon>Move to another day
          </button>
          <button mat-menu-item type="button" [matMenuTriggerFor]="people" [matMenuTriggerData]="{ task }">
            <mat-icon aria-hidden="true">person</mat-icon>Give to somebody
          </button>
        }
        @if (canOffer(task)) {
          <button mat-menu-item type="button" (click)="offerWanted.emit(task)">
            <mat-icon aria-hidden="true">swap_horiz</mat-icon>Offer it to others
          </button>
        }
        @if (canWithdraw(task)) {
          <button mat-menu-item type="button" (click)="moves.withdraw(task)">
            <mat-icon aria-hidden="true">undo</mat-icon>Withdraw the offer
          </button>
        }
        @if (canTake(task)) {
          <button mat-menu-item type="button" (click)="moves.take(task)">
            <mat-icon aria-hidden="true">front_hand</mat-icon>Take it
          </button>
        } @else if (!isMine(task)) {
          <button mat-menu-item type="button" (click)="moves.takeOver(task)">
            <mat-icon aria-hidden="true">front_hand</mat-icon>Take it over
          </button>
        }
      </ng-template>
    </mat-menu>
    <mat-menu #days="matMenu">
      <ng-template matMenuContent let-task="task">
        @for (choice of dayChoices(); track choice.day) {
          <button
            mat-menu-item
            type="button"
            [disabled]="choice.day === task.dueOn"
            (click)="moves.move(task, { day: choice.day })"
          >
            {{ choice.words }}
          </button>
        }
      </ng-template>
    </mat-menu>
    <mat-menu #people="matMenu">
      <ng-template matMenuContent let-task="task">
        @for (person of data.people(); track person.personId) {
          <button
            mat-menu-item
            type="button"
            [disabled]="holds(task, person.personId)"
            (click)="moves.move(task, { personId: person.personId })"
          >
            {{ person.name }}
          </button>
        }
        @if (task.holders.length > 0) {
          <button mat-menu-item type="button" (click)="moves.move(task, { personId: null })">
            Leave it to the rota
          </button>
        }
      </ng-template>
    </mat-menu>
  `,
  imports: [MatIcon, MatMenuModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TaskMenu {
  readonly offerWanted = output<Task>();
  /** For a trigger that gives it `{ task }`. */
  readonly menu = viewChild.required<MatMenu>('menu');

  private readonly session = inject(Session);
  protected readonly data = inject(RotaData);
  protected readonly moves = inject(TaskMoves);

  private readonly self = computed(() => this.session.account()?.id ?? '');
  protected readonly mayMove = computed(() => this.session.may('grower'));
  protected readonly dayChoices = computed(() => {
    const [today, monday] = [this.data.today(), this.data.monday()];
    const first = monday > today ? monday : today;
    return Array.from({ length: offeredDays }, (_, index) => {
      const day = dayAfter(first, index);
      const words = dayWords(day, today);
      return { day, words: words.charAt(0).toUpperCase() + words.slice(1) };
    });
  });

  protected holds({ holders }: Task, personId: string): boolean {
    return holders.some((holder) => holder.personId === personId);
  }

  protected isMine(task: Task): boolean {
    return this.holds(task, this.self());
  }

  protected canOffer(task: Task): boolean {
    return task.swap === null && this.isMine(task);
  }

  protected canWithdraw({ swap }: Task): boolean {
    return swap !== null && (swap.offeredById === this.self() || this.session.may('grower'));
  }

  protected canTake(task: Task): boolean {
    const toPersonId = task.swap?.toPersonId ?? null;
    return task.swap !== null && !this.isMine(task) && (toPersonId === null || toPersonId === this.self());
  }
}
