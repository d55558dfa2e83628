import { inject, Injectable } from '@angular/core';
import { getShelfAdvice } from '@shared/contracts/advice';
import type { Task } from '@shared/contracts/care';
import { listMembers, roleSuffices } from '@shared/contracts/people';
import { listRacks, setHeatMat, setLampHours, type Shelf } from '@shared/contracts/rooms';
import { catchError, filter, forkJoin, map, of, switchMap, type Observable } from 'rxjs';
import { ApiClient } from './api-client';
import { Notices } from './notices';
import {
  isSwitching,
  nowPlanned,
  planChangeOf,
  planQuestion,
  stillPlanned,
  type PlanChange,
  type PlanQuestion,
} from './plan-change';
import { Session } from './session';

/** Who may plan, in the order of a sentence. */
const eitherOf = new Intl.ListFormat('en-GB', { type: 'disjunction' });

/** Changes what is planned for shelves where advice asks for it, and offers to after care that did it by hand. */
@Injectable({ providedIn: 'root' })
export class PlanChanges {
  private readonly api = inject(ApiClient);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  /**
   * Says that a task is ticked. Where it switched lamps or mat otherwise than the plan has it, who may is asked to change
   * the plan too, and everybody else is told who may.
   *
   * @param task - As it was ticked.
   * @param ask - Asks the person; emits whether they agree.
   * @returns Emits when the person wants the tick back.
   */
  sayTicked(task: Task, ask: (question: PlanQuestion) => Observable<boolean>): Observable<void> {
    const ticked = `Ticked: ${task.title}`;
    return this.changeAfter(task).pipe(
      switchMap((change) => {
        if (change === null) return this.notices.sayUndoable(ticked);
        if (!this.session.may('grower'))
          return this.whoMay().pipe(
            switchMap((names) =>
              this.notices.sayUndoable(`${ticked}. ${stillPlanned(change)}; ${names} can change that.`),
            ),
          );
        ask(planQuestion(change))
          .pipe(filter(Boolean))
          .subscribe({
            next: () => this.make(change),
            error: (error: unknown) => this.notices.sayFailure(error),
          });
        return this.notices.sayUndoable(ticked);
      }),
    );
  }

  /** Makes a change and says so, with a way back. */
  make(change: PlanChange): void {
    this.set(change, 'after').subscribe({
      next: () =>
        this.notices.sayUndoable(nowPlanned(change)).subscribe(() =>
          this.set(change, 'before').subscribe({
            error: (error: unknown) => this.notices.sayFailure(error),
          }),
        ),
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }

  private set(change: PlanChange, which: 'before' | 'after'): Observable<Shelf> {
    const params = { roomId: this.roomId(), shelfId: change.shelfId };
    return change.about === 'lamps'
      ? this.api.call(setLampHours, { params, body: change[which] })
      : this.api.call(setHeatMat, { params, body: { isOn: change[which] } });
  }

  /** What may be unplanned after a task. The task is ticked either way: without an answer nothing is offered. */
  private changeAfter(task: Task): Observable<PlanChange | null> {
    const { shelfId } = task;
    if (shelfId === null || !isSwitching(task)) return of(null);
    const roomId = this.roomId();
    return forkJoin({
      racks: this.api.call(listRacks, { params: { roomId } }),
      advice: this.api.call(getShelfAdvice, { params: { roomId, shelfId } }),
    }).pipe(
      map(({ racks, advice }) =>
        planChangeOf(
          task,
          racks.flatMap(({ shelves }) => shelves),
          advice,
        ),
      ),
      catchError(() => of(null)),
    );
  }

  private whoMay(): Observable<string> {
    return this.api.call(listMembers, { params: { roomId: this.roomId() } }).pipe(
      map((members) =>
        eitherOf.format(members.filter(({ role }) => roleSuffices(role, 'grower')).map(({ name }) => name)),
      ),
      catchError(() => of('a grower or keeper')),
    );
  }

  private roomId(): string {
    return this.session.roomId() ?? '';
  }
}
