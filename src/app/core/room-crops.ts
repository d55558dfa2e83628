import { computed, inject, Injectable } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { listCrops } from '@shared/contracts/crops';
import { ApiClient } from './api-client';
import { failureText } from './failure-text';
import { Session } from './session';

/** Crops of the library and of the room. One for each page that lets somebody choose among them. */
@Injectable()
export class RoomCrops {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);

  readonly resource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) => this.api.call(listCrops, { params }),
  });

  /** By name; null until known. */
  readonly all = computed(() => (this.resource.hasValue() ? this.resource.value() : null));
  /** Why they could not be fetched; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.resource.error();
    return error === undefined ? null : failureText(error);
  });

  /** Varieties of a crop that this room grows and that hold what is typed so far; reads signals. */
  varietiesOf(cropId: string | null, typed: string): readonly string[] {
    const known = this.all()?.find(({ id }) => id === cropId)?.varieties ?? [];
    const words = typed.trim().toLowerCase();
    return known.filter((name) => name.toLowerCase().includes(words));
  }
}
