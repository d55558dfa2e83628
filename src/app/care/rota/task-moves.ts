import { inject, Injectable } from '@angular/core';
import { handedOver } from '@shared/care/hand-over';
import { assignTask, moveTask, takeOverTask, type Task } from '@shared/contracts/care';
import { offerSwap, takeSwap, withdrawSwap } from '@shared/contracts/care-rota';
import { concatMap, of, type Observable } from 'rxjs';
import { ApiClient, newIdempotencyKey } from '../../core/api-client';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import { dayWords } from '../day-words';
import type { Offer } from '../today/offer/offer-dialog';
import { RotaData } from './rota-data';

/** Where a task goes: to another day, to somebody, or back to the rota (null). */
export interface Destination {
  readonly day?: string;
  readonly personId?: string | null;
  /** Whose part of a pair goes over; without, the task goes as a whole. */
  readonly fromPersonId?: string | undefined;
}

/** Moves tasks of the shown week between days and people, says so and offers the way back. */
@Injectable()
export class TaskMoves {
  private readonly api = inject(ApiClient);
  private readonly data = inject(RotaData);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  /** Moves a task; where nothing would change, nothing is sent. */
  move(task: Task, destination: Destination): void {
    this.send(task, destination).subscribe({
      next: (moved) => {
        if (moved === task) return;
        this.data.refresh();
        const said = this.words(task, moved);
        // A day that is over can't be moved to again.
        if (moved.dueOn !== task.dueOn && task.dueOn < this.data.today()) this.notices.say(said);
        else this.notices.sayUndoable(said).subscribe(() => this.moveBack(task, moved));
      },
      error: (error: unknown) => this.fail(error),
    });
  }

  /** Takes a task over from whoever holds it. */
  takeOver(task: Task): void {
    this.done(
      this.api.call(takeOverTask, { params: this.params(task) }),
      `“${task.title}” is yours. ${task.personName === null ? '' : `${task.personName} is told.`}`.trim(),
    );
  }

  /** Offers a task to one member, or to all who help (null). */
  offer(task: Task, { toPersonId, note }: Offer): void {
    this.done(
      this.api.call(offerSwap, {
        params: this.params(task),
        body: { toPersonId, note },
        idempotencyKey: newIdempotencyKey(),
      }),
      `“${task.title}” is on offer. It stays yours until somebody takes it.`,
    );
  }

  /** Takes what somebody offers. */
  take(task: Task): void {
    const { swap } = task;
    if (swap === null) return;
    this.done(
      this.api.call(takeSwap, { params: { ...this.params(task), swapId: swap.id } }),
      `“${task.title}” is yours. ${swap.offeredByName} is told.`,
    );
  }

  /** Withdraws an offer. */
  withdraw(task: Task): void {
    const { swap } = task;
    if (swap === null) return;
    this.done(
      this.api.call(withdrawSwap, { params: { ...this.params(task), swapId: swap.id } }),
      `“${task.title}” is no longer on offer`,
    );
  }

  private done(call: Observable<unknown>, said: string): void {
    call.subscribe({
      next: () => {
        this.data.refresh();
        this.notices.say(said);
      },
      error: (error: unknown) => this.fail(error),
    });
  }

  private send(task: Task, { day, personId, fromPersonId }: Destination): Observable<Task> {
    const params = this.params(task);
    const moved =
      day === undefined || day === task.dueOn
        ? of(task)
        : this.api.call(moveTask, { params, body: { dueOn: day } });
    return moved.pipe(
      concatMap((now) => {
        const personIds = holdersAfter(now, personId, fromPersonId);
        return personIds === null ? of(now) : this.api.call(assignTask, { params, body: { personIds } });
      }),
    );
  }

  private moveBack(before: Task, moved: Task): void {
    const params = this.params(before);
    const back =
      moved.dueOn === before.dueOn
        ? of(moved)
        : this.api.call(moveTask, { params, body: { dueOn: before.dueOn } });
    const personIds = idsOf(before);
    back
      .pipe(
        concatMap((now) =>
          isSame(idsOf(now), personIds)
            ? of(now)
            : this.api.call(assignTask, { params, body: { personIds } }),
        ),
      )
      .subscribe({
        next: () => this.data.refresh(),
        error: (error: unknown) => this.fail(error),
      });
  }

  /** "“Feed” moved to Thu 3 Dec, with Jo Ashdown" */
  private words(before: Task, { title, dueOn, personName }: Task): string {
    const who = personName === null ? 'with nobody yet' : `with ${personName}`;
    if (dueOn === before.dueOn) return `“${title}” is now ${who}`;
    return `“${title}” moved to ${dayWords(dueOn, this.data.today())}, ${who}`;
  }

  /** Somebody else may have been quicker: what is shown is fetched again. */
  private fail(error: unknown): void {
    this.data.refresh();
    this.notices.sayFailure(error);
  }

  private params({ id }: Task): { readonly roomId: string; readonly taskId: string } {
    return { roomId: this.session.roomId() ?? '', taskId: id };
  }
}

/** Who is to hold it; null where that is as it is. */
function holdersAfter(
  task: Task,
  personId: string | null | undefined,
  fromPersonId: string | undefined,
): string[] | null {
  const before = idsOf(task);
  if (personId === undefined || (personId !== null && before.includes(personId))) return null;
  if (personId === null) return before.length === 0 ? null : [];
  return before.length > 1 && fromPersonId !== undefined
    ? handedOver(before, fromPersonId, personId)
    : [personId];
}

function idsOf({ holders }: Task): string[] {
  return holders.map(({ personId }) => personId);
}

function isSame(one: readonly string[], other: readonly string[]): boolean {
  return one.length === other.length && one.every((personId) => other.includes(personId));
}
