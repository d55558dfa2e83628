import type { Tx } from '../database/transactions';
import type { ShelfTime } from './shelf-warmth';

/** A past sowing of a room that came up. */
export interface PastEmergence {
  readonly startedAt: Date;
  readonly firstUpAt: Date;
  readonly places: readonly ShelfTime[];
}

interface PlaceRow {
  readonly plantingId: string;
  readonly startedAt: Date;
  readonly firstUpAt: Date;
  readonly shelfId: string | null;
  readonly fromAt: Date;
  readonly toAt: Date | null;
}

/** Finds the sowings of a crop that came up in a room before. */
export class EmergencesStore {
  /** The newest of them, with where they stood until they were up. */
  async past(tx: Tx, roomId: string, cropId: string, most: number): Promise<PastEmergence[]> {
    const rows: PlaceRow[] = await tx.query(
      `WITH newest AS (
         SELECT id, started_at, first_up_at FROM planting
         WHERE room_id = $1 AND crop_id = $2 AND sown IS NOT NULL AND first_up_at > started_at
         ORDER BY first_up_at DESC, id LIMIT $3
       )
       SELECT newest.id AS "plantingId", newest.started_at AS "startedAt", newest.first_up_at AS "firstUpAt",
         place.shelf_id AS "shelfId", place.from_at AS "fromAt", place.to_at AS "toAt"
       FROM newest JOIN planting_place AS place ON place.planting_id = newest.id AND place.from_at < newest.first_up_at
       ORDER BY newest.first_up_at DESC, newest.id, place.from_at`,
      [roomId, cropId, most],
    );
    const byPlanting = new Map<string, { startedAt: Date; firstUpAt: Date; places: ShelfTime[] }>();
    for (const { plantingId, startedAt, firstUpAt, ...place } of rows) {
      const past = byPlanting.get(plantingId) ?? { startedAt, firstUpAt, places: [] };
      past.places.push(place);
      byPlanting.set(plantingId, past);
    }
    return [...byPlanting.values()];
  }
}
