import { computed, inject, Injectable, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { listMembers, roleSuffices } from '@shared/contracts/people';
import { ApiClient } from './api-client';
import { failureText } from './failure-text';
import { Session } from './session';

/** The room's members, fetched once somebody wants to choose one. */
@Injectable({ providedIn: 'root' })
export class RoomMembers {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly isWanted = signal(false);

  private readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null || !this.isWanted() ? undefined : { roomId };
    },
    stream: ({ params }) => this.api.call(listMembers, { params }),
  });

  /** Who may do care and look after alerts, the person themselves first; null until it is known. */
  readonly caring = computed(() => {
    if (!this.resource.hasValue()) return null;
    const self = this.session.account()?.id;
    const caring = this.resource.value().filter(({ role }) => roleSuffices(role, 'helper'));
    return [
      ...caring.filter(({ personId }) => personId === self),
      ...caring.filter(({ personId }) => personId !== self),
    ];
  });
  /** Why they could not be fetched; null when they were. */
  readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  /** Fetches them, unless they are there already. A page wants them early: a menu must not grow once it is open. */
  want(): void {
    if (this.resource.error() !== undefined) this.resource.reload();
    this.isWanted.set(true);
  }
}
