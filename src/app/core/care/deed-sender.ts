import { inject, Injectable } from '@angular/core';
import { addTask, addTaskPhoto, completeTask, reopenTask, type Task } from '@shared/contracts/care';
import { taskOutcomes } from '@shared/care/task-outcome';
import { filter, firstValueFrom, map, Subject, type Observable } from 'rxjs';
import { ApiClient } from '../api-client';
import { asApiFailure, type ApiFailure } from '../api-failure';
import { failureText } from '../failure-text';
import type { Completion, KeptDeed, Trouble } from './care-deed';
import type { Delivery } from './deliver-in-order';

/** Tells the server of deeds, each under its key. */
@Injectable({ providedIn: 'root' })
export class DeedSender {
  private readonly api = inject(ApiClient);
  private readonly stored = new Subject<Task>();

  /** Tasks as they are once the server has a deed. */
  readonly taken = this.stored.asObservable();

  /** Sends one. Never fails: what went wrong is the delivery. */
  async send(deed: KeptDeed): Promise<Delivery> {
    try {
      this.stored.next(await this.tell(deed));
      return { is: 'taken' };
    } catch (error) {
      return deliveryOf(asApiFailure(error));
    }
  }

  private async tell(deed: KeptDeed): Promise<Task> {
    const { roomId, key } = deed;
    switch (deed.kind) {
      case 'close':
        return this.close(roomId, deed.taskId, deed.completion, key);
      case 'reopen':
        return firstValueFrom(
          this.api.call(reopenTask, { params: { roomId, taskId: deed.taskId }, idempotencyKey: key }),
        );
      case 'photo':
        return firstValueFrom(this.upload(deed));
      case 'add': {
        const added = await firstValueFrom(
          this.api.call(addTask, { params: { roomId }, body: deed.task, idempotencyKey: key }),
        );
        return deed.completion === null
          ? added
          : this.close(roomId, added.id, deed.completion, `${key}-done`);
      }
    }
  }

  private close(roomId: string, taskId: string, body: Completion, idempotencyKey: string): Promise<Task> {
    return firstValueFrom(this.api.call(completeTask, { params: { roomId, taskId }, body, idempotencyKey }));
  }

  private upload({
    roomId,
    taskId,
    file,
    fileName,
    key,
  }: Extract<KeptDeed, { kind: 'photo' }>): Observable<Task> {
    const form = new FormData();
    form.append('file', file, fileName);
    return this.api.upload(addTaskPhoto, { params: { roomId, taskId }, form, idempotencyKey: key }).pipe(
      filter((step) => step.type === 'answered'),
      map(({ reply }) => reply),
    );
  }
}

/** What a failed call means for a deed. */
export function deliveryOf(failure: ApiFailure): Delivery {
  const { kind, code, retryAfterS } = failure;
  // A page that was open while somebody signed in anew has an old token; asking who is signed in brings the new one.
  const isPassing =
    ['offline', 'signedOut', 'tooMany'].includes(kind) || code === 'STILL_RUNNING' || code === 'CROSS_SITE';
  if (isPassing) return { is: 'unanswered', retryAfterS };
  const trouble = troubleOf(failure);
  return kind === 'server' ? { is: 'failed', trouble } : { is: 'refused', trouble };
}

function troubleOf(failure: ApiFailure): Trouble {
  const { byName = null, at = null, outcome = null } = failure.problem?.facts ?? {};
  return {
    isConflict: failure.code === 'TASK_CLOSED',
    text: failureText(failure),
    byName: textOf(byName),
    at: textOf(at),
    outcome: taskOutcomes.find((known) => known === outcome) ?? null,
  };
}

function textOf(fact: string | number | null): string | null {
  return fact === null ? null : String(fact);
}
