import { inject, Injectable, signal } from '@angular/core';
import { removeTask, takeOverTask, type Task } from '@shared/contracts/care';
import { offerSwap, takeSwap, withdrawSwap } from '@shared/contracts/care-rota';
import { finalize, type Observable } from 'rxjs';
import { ApiClient, newIdempotencyKey } from '../../core/api-client';
import { CareToday } from '../../core/care/care-today';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';

/** Gives tasks from one person to another. The server must know at once, so nothing here waits for a signal. */
@Injectable()
export class HandOver {
  private readonly api = inject(ApiClient);
  private readonly care = inject(CareToday);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);
  private readonly busy = signal(false);

  /** Whether one is under way. */
  readonly isBusy = this.busy.asReadonly();

  takeOver(task: Task): void {
    const from = task.personName;
    this.carryOut(this.api.call(takeOverTask, { params: this.params(task) }), (now) => {
      this.care.takeOver(now);
      this.notices.say(from === null ? 'It is yours' : `It is yours; ${from} will be told`);
    });
  }

  take({ swap }: Task): void {
    if (swap === null) return;
    const params = { roomId: this.roomId(), swapId: swap.id };
    this.carryOut(this.api.call(takeSwap, { params }), (now) => {
      this.care.takeOver(now);
      this.notices.say(`It is yours; ${swap.offeredByName} will be told`);
    });
  }

  offer(task: Task, toPersonId: string | null, note: string): void {
    const call = this.api.call(offerSwap, {
      params: this.params(task),
      body: { toPersonId, note },
      idempotencyKey: newIdempotencyKey(),
    });
    this.carryOut(call, (offered) => {
      this.care.takeOver(offered.task);
      this.notices.say('Offered. It stays yours until somebody takes it');
    });
  }

  withdraw({ swap }: Task): void {
    if (swap === null) return;
    const params = { roomId: this.roomId(), swapId: swap.id };
    this.carryOut(this.api.call(withdrawSwap, { params }), () => {
      this.care.refresh();
      this.notices.say('Offer withdrawn; the task stays yours');
    });
  }

  remove(task: Task): void {
    this.carryOut(this.api.call(removeTask, { params: this.params(task) }), () => {
      this.care.refresh();
      this.notices.say(`Removed: ${task.title}`);
    });
  }

  private carryOut<T>(call: Observable<T>, done: (reply: T) => void): void {
    if (this.busy()) return;
    this.busy.set(true);
    call.pipe(finalize(() => this.busy.set(false))).subscribe({
      next: done,
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }

  private params({ id }: Task): { roomId: string; taskId: string } {
    return { roomId: this.roomId(), taskId: id };
  }

  private roomId(): string {
    return this.session.roomId() ?? '';
  }
}
