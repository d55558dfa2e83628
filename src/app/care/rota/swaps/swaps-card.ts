import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import type { SwapOffer } from '@shared/contracts/care-rota';
import { taskTitle } from '../../../core/care/task-words';
import { failureText } from '../../../core/failure-text';
import { Session } from '../../../core/session';
import { ErrorState } from '../../../ui/states/error-state';
import { dayWords } from '../../day-words';
import { RotaData } from '../rota-data';
import { TaskMoves } from '../task-moves';

/** Tasks that somebody would like to hand over. */
@Component({
  selector: 'app-swaps-card',
  template: `
    <h2>On offer</h2>
    @if (lines(); as lines) {
      <ul>
        @for (line of lines; track line.offer.id) {
          <li>
            <div>
              <b>{{ line.title }}</b>
              <p>{{ line.words }}</p>
              @if (line.offer.note !== '') {
                <p>“{{ line.offer.note }}”</p>
              }
            </div>
            @if (line.canTake) {
              <button matButton="filled" type="button" (click)="moves.take(line.offer.task)">
                Take it<span class="read-out-only">: {{ line.title }}</span>
              </button>
            }
            @if (line.canWithdraw) {
              <button matButton="outlined" type="button" (click)="moves.withdraw(line.offer.task)">
                Withdraw<span class="read-out-only">: {{ line.title }}</span>
              </button>
            }
          </li>
        } @empty {
          <li>
            <p>
              Nothing. Whoever can’t do a task offers it from the task’s menu; it stays theirs until taken.
            </p>
          </li>
        }
      </ul>
    } @else if (failure(); as failure) {
      <app-error-state [message]="failure" (retried)="data.swapsResource.reload()" />
    }
  `,
  styleUrl: '../rota-card.scss',
  imports: [ErrorState, MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SwapsCard {
  private readonly session = inject(Session);
  protected readonly data = inject(RotaData);
  protected readonly moves = inject(TaskMoves);

  protected readonly lines = computed(() => {
    if (!this.data.swapsResource.hasValue()) return null;
    return this.data.swapsResource.value().map((offer) => ({
      offer,
      title: taskTitle(offer.task),
      words: this.words(offer),
      canTake: this.canTake(offer),
      canWithdraw: offer.offeredById === this.self() || this.session.may('grower'),
    }));
  });
  protected readonly failure = computed(() => {
    const error = this.data.swapsResource.error();
    return error === undefined ? null : failureText(error);
  });
  private readonly self = computed(() => this.session.account()?.id ?? '');

  private canTake({ toPersonId, task }: SwapOffer): boolean {
    const isForMe = toPersonId === null || toPersonId === this.self();
    const holdsIt = task.holders.some(({ personId }) => personId === this.self());
    return this.session.may('helper') && isForMe && !holdsIt;
  }

  /** "Thu 3 Dec, from Jo Ashdown to anybody" */
  private words({ task, offeredByName, toPersonName }: SwapOffer): string {
    return `${dayWords(task.dueOn, this.data.today())}, from ${offeredByName} to ${toPersonName ?? 'anybody'}`;
  }
}
