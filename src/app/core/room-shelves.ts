import { computed, inject, Injectable } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { listRacks } from '@shared/contracts/rooms';
import { ApiClient } from './api-client';
import { Session } from './session';

/** Racks and shelves of the room. One for each page that lets somebody choose among them. */
@Injectable()
export class RoomShelves {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);

  readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) => this.api.call(listRacks, { params }),
  });

  /** Racks with their shelves from the top; empty until known. */
  readonly racks = computed(() => (this.resource.hasValue() ? this.resource.value() : []));
  /** Every shelf in the order of the room. */
  readonly shelves = computed(() => this.racks().flatMap(({ shelves }) => shelves));
}
