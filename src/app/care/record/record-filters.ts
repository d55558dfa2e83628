import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { careKinds } from '@shared/care/care-kind';
import { listPlantings } from '@shared/contracts/plantings';
import { ApiClient } from '../../core/api-client';
import { RoomMembers } from '../../core/room-members';
import { RoomShelves } from '../../core/room-shelves';
import { Session } from '../../core/session';
import { careKindLooks } from '../../ui/care-kind/care-kind-look';
import type { RecordFilter } from './record-filter';

/** More than a room has seen in years. */
const mostPlantings = 200;

/** Chooses what of the record is shown. */
@Component({
  selector: 'app-record-filters',
  templateUrl: './record-filters.html',
  styleUrl: './record-filters.scss',
  imports: [MatButton, MatFormFieldModule, MatInput, MatSelectModule],
  providers: [RoomShelves],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RecordFilters {
  readonly filter = input.required<RecordFilter>();
  /** The filter as it is to be from now on. */
  readonly chosen = output<RecordFilter>();

  private readonly api = inject(ApiClient);
  private readonly session = inject(Session);
  protected readonly members = inject(RoomMembers);
  protected readonly places = inject(RoomShelves);

  protected readonly kinds = careKinds.map((kind) => ({ kind, word: careKindLooks[kind].word }));
  private readonly plantingsResource = rxResource({
    params: () => {
      const roomId = this.session.roomId();
      return roomId === null ? undefined : { roomId };
    },
    stream: ({ params }) =>
      this.api.call(listPlantings, { params, query: { state: 'all', limit: mostPlantings } }),
  });
  protected readonly plantings = computed(() =>
    (this.plantingsResource.hasValue() ? this.plantingsResource.value().plantings : []).map(
      ({ id, crop, variety, shelfLabel }) => ({
        id,
        words: [[crop, variety].filter((part) => part !== null).join(' '), shelfLabel]
          .filter((part) => part !== null)
          .join(' · '),
      }),
    ),
  );
  protected readonly isFiltered = computed(() =>
    Object.values(this.filter()).some((part) => part !== undefined),
  );
  protected readonly isBackward = computed(() => {
    const { from, to } = this.filter();
    return from !== undefined && to !== undefined && from > to;
  });

  constructor() {
    this.members.want();
  }

  protected choose(part: RecordFilter): void {
    this.chosen.emit({ ...this.filter(), ...part });
  }

  /** An emptied field chooses nothing. */
  protected chooseDay(name: 'from' | 'to', day: string): void {
    this.choose({ [name]: day === '' ? undefined : day });
  }
}
