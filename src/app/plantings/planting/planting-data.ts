import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { getGermination } from '@shared/contracts/germination';
import { observePlanting, stepPlanting, undoPlantingEvent } from '@shared/contracts/planting-events';
import { getPlantingProgress } from '@shared/contracts/planting-progress';
import { getPlanting, mergePlanting, splitPlanting } from '@shared/contracts/plantings';
import { map, merge, switchMap, tap, type Observable } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { LiveConnection } from '../../core/live-connection';
import { Notices } from '../../core/notices';
import { Session } from '../../core/session';
import type { Deed } from '../note/deed';

/** What a planting's page shows, and what is done to the planting. One for each page. */
@Injectable()
export class PlantingData {
  private readonly api = inject(ApiClient);
  private readonly notices = inject(Notices);
  private readonly session = inject(Session);

  /** Which planting; null until the address is known. */
  readonly plantingId = signal<string | null>(null);
  /** Parameters of every call about it; undefined until it is known which. */
  readonly params = computed(
    () => {
      const [roomId, plantingId] = [this.session.roomId(), this.plantingId()];
      return roomId === null || plantingId === null ? undefined : { roomId, plantingId };
    },
    { equal: (a, b) => a?.roomId === b?.roomId && a?.plantingId === b?.plantingId },
  );

  readonly resource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getPlanting, { params }),
  });
  /** Null until it is there. */
  readonly planting = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  /** Why it is not there; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  private readonly isSown = computed(() => this.planting()?.origin === 'sown');
  readonly germinationResource = rxResource({
    params: () => (this.isSown() ? this.params() : undefined),
    stream: ({ params }) => this.api.call(getGermination, { params }),
  });
  /** Null until it is there, and for what was not sown. */
  readonly germination = computed(() =>
    this.germinationResource.hasValue() ? this.germinationResource.value() : null,
  );

  readonly progressResource = rxResource({
    params: this.params,
    stream: ({ params }) => this.api.call(getPlantingProgress, { params }),
  });
  /** Null until it is there. */
  readonly progress = computed(() =>
    this.progressResource.hasValue() ? this.progressResource.value() : null,
  );

  constructor() {
    const live = inject(LiveConnection);
    merge(live.on('room:changed'), live.caughtUp)
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.refresh());
  }

  /** Fetches everything about the planting anew. */
  refresh(): void {
    this.resource.reload();
    this.refreshFigures();
  }

  /**
   * Does or notes something, shows the planting as it is then, and says so with a way back.
   *
   * @param deed - What.
   * @param done - What was done, in words.
   * @param idempotencyKey - The same while it is tried again.
   * @returns Emits once it is kept.
   */
  take(deed: Deed, done: string, idempotencyKey: string): Observable<void> {
    return this.send(deed, idempotencyKey).pipe(
      switchMap(() => this.api.call(getPlanting, { params: this.requireParams() })),
      tap((planting) => {
        this.resource.set(planting);
        this.refreshFigures();
        this.offerUndo(done, planting.undoableEventId);
      }),
      map(() => undefined),
    );
  }

  /** Takes back what was noted last. */
  undo(eventId: string): void {
    this.api.call(undoPlantingEvent, { params: { ...this.requireParams(), eventId } }).subscribe({
      next: () => {
        this.refresh();
        this.notices.say('Taken back');
      },
      error: (error: unknown) => this.notices.sayFailure(error),
    });
  }

  private send(deed: Deed, idempotencyKey: string): Observable<unknown> {
    const params = this.requireParams();
    switch (deed.via) {
      case 'observation':
        return this.api.call(observePlanting, { params, body: deed.body, idempotencyKey });
      case 'step':
        return this.api.call(stepPlanting, { params, body: deed.body, idempotencyKey });
      case 'split':
        return this.api.call(splitPlanting, { params, body: deed.body, idempotencyKey });
      case 'merge':
        return this.api.call(mergePlanting, { params, body: deed.body, idempotencyKey });
    }
  }

  private offerUndo(done: string, eventId: string | null): void {
    if (eventId === null) this.notices.say(done);
    else this.notices.sayUndoable(done).subscribe(() => this.undo(eventId));
  }

  private refreshFigures(): void {
    this.germinationResource.reload();
    this.progressResource.reload();
  }

  private requireParams(): { readonly roomId: string; readonly plantingId: string } {
    const params = this.params();
    if (params === undefined) throw new Error('No planting is shown');
    return params;
  }
}
