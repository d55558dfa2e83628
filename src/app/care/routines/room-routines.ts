import { computed, inject, Injectable } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { listRoutines } from '@shared/contracts/care-routines';
import { auditTime, merge } from 'rxjs';
import { ApiClient } from '../../core/api-client';
import { failureText } from '../../core/failure-text';
import { LiveConnection } from '../../core/live-connection';
import { Session } from '../../core/session';

/** A morning's ticks come one after another; when something is due next needn't follow each at once. */
const followAfterMs = 1_000;

/** The routines of the room that go on. One for each page. */
@Injectable()
export class RoomRoutines {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);

  readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) => this.api.call(listRoutines, { params, query: {} }),
  });
  /** Null until they are there. */
  readonly all = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  /** Why they are not there; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  constructor() {
    const live = inject(LiveConnection);
    merge(live.on('task:changed'), live.on('room:changed'), live.caughtUp)
      .pipe(auditTime(followAfterMs), takeUntilDestroyed())
      .subscribe(() => this.resource.reload());
  }
}
