import type { CarePlace } from '@shared/contracts/care-place';
import { roleSuffices } from '@shared/contracts/people';
import type { Tx } from '../database/transactions';
import { invalidField, notFound } from '../http/request-problem';
import type { PeopleService } from '../people/people-service';
import type { PlantingsStore } from '../plantings/plantings-store';
import type { RoomsService } from '../rooms/rooms-service';

/** Checks where care is due, and by whom. */
export class CarePlaces {
  constructor(
    private readonly rooms: Pick<RoomsService, 'requireShelf' | 'racksOf'>,
    private readonly people: Pick<PeopleService, 'membershipOf'>,
    private readonly plantings: PlantingsStore,
  ) {}

  /** 404 unless the room has such a place; 422 for a planting that has ended. */
  async requirePlace(tx: Tx, roomId: string, place: CarePlace): Promise<void> {
    if (place.at === 'shelf') await this.rooms.requireShelf(tx, roomId, place.shelfId);
    if (place.at === 'rack') {
      const racks = await this.rooms.racksOf(roomId);
      if (!racks.some(({ id }) => id === place.rackId)) throw notFound('rack');
    }
    if (place.at !== 'planting') return;
    const { endedOn } = await this.plantings.planting(tx, roomId, place.plantingId);
    if (endedOn !== null) throw invalidField('body.place.plantingId', 'has ended');
  }

  /** 422 unless all are members of the room who may do care. */
  async requireCarers(roomId: string, personIds: readonly string[], field: string): Promise<void> {
    for (const personId of personIds) {
      const member = await this.people.membershipOf(personId, roomId);
      if (member === null) throw invalidField(field, 'names somebody who is no member of this room');
      if (!roleSuffices(member.role, 'helper')) {
        throw invalidField(field, 'names a viewer, who can’t do care');
      }
    }
  }

  /** The crop of a planting, null where it is none with figures; 404 when the room has no such planting. */
  async cropOf(tx: Tx, roomId: string, plantingId: string): Promise<string | null> {
    const { cropId, endedOn } = await this.plantings.planting(tx, roomId, plantingId);
    if (endedOn !== null) throw invalidField('params.plantingId', 'has ended');
    return cropId;
  }
}
