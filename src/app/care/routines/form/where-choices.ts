import { computed, inject, Injectable } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { listPlantings } from '@shared/contracts/plantings';
import { ApiClient } from '../../../core/api-client';
import { failureText } from '../../../core/failure-text';
import { RoomShelves } from '../../../core/room-shelves';
import { Session } from '../../../core/session';
import { placeKey } from '../routine-groups';

/** Places of one kind to choose among. */
interface WhereGroup {
  readonly title: string;
  readonly choices: readonly { readonly key: string; readonly words: string }[];
}

/** More than grow in one room at a time. */
const mostPlantings = 200;

/** Where care can be due in the room. One for each page that lets somebody choose; needs `RoomShelves` beside it. */
@Injectable()
export class WhereChoices {
  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  private readonly shelves = inject(RoomShelves);

  readonly plantingsResource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) => this.api.call(listPlantings, { params, query: { limit: mostPlantings } }),
  });
  /** Null until all are known. */
  readonly groups = computed<readonly WhereGroup[] | null>(() => {
    if (!this.shelves.resource.hasValue() || !this.plantingsResource.hasValue()) return null;
    const racks = this.shelves.racks();
    return [
      {
        title: 'Racks',
        choices: racks.map(({ id, name }) => ({ key: placeKey({ at: 'rack', rackId: id }), words: name })),
      },
      {
        title: 'Shelves',
        choices: this.shelves.shelves().map(({ id, label }) => ({
          key: placeKey({ at: 'shelf', shelfId: id }),
          words: `Shelf ${label}`,
        })),
      },
      {
        title: 'Plantings',
        choices: this.plantingsResource
          .value()
          .plantings.map(({ id, crop, variety, shelfLabel }) => ({
            key: placeKey({ at: 'planting', plantingId: id }),
            words: [[crop, variety].filter((part) => part !== null).join(' '), shelfLabel]
              .filter((part) => part !== null)
              .join(' · '),
          }))
          .sort((one, other) => one.words.localeCompare(other.words, 'en-GB', { numeric: true })),
      },
    ].filter(({ choices }) => choices.length > 0);
  });
  /** Why they could not be fetched; null while nothing went wrong. */
  readonly failure = computed(() => {
    const error = this.shelves.resource.error() ?? this.plantingsResource.error();
    return error === undefined ? null : failureText(error);
  });

  /** Fetches them again. */
  reload(): void {
    this.shelves.resource.reload();
    this.plantingsResource.reload();
  }
}
