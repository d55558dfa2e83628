import type { PlantingStage } from '@shared/growing/planting-stage';
import { dayBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';

/** A stretch of time [ms], half-open. */
export interface Germination {
  readonly from: number;
  readonly to: number;
}

const waiting: readonly PlantingStage[] = ['sown', 'emerging'];

/** When shelves had something on them that waited to germinate. */
export class GerminationStore {
  /**
   * Looks it up.
   *
   * @param tx - To read with.
   * @param shelfIds - Any shelves.
   * @returns By shelf, for each planting: from the day it was sown to the end of the day on which its present stage
   *   began, or without an end while it waits. What came between its stages is not known.
   */
  async germinatingOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, Germination[]>> {
    const rows: {
      shelf_id: string;
      time_zone: string;
      stage: PlantingStage;
      started_on: string;
      stage_since: string;
    }[] = await tx.query(
      `SELECT shelf_id, room.time_zone, stage, started_on::text, stage_since::text
       FROM planting JOIN room ON room.id = planting.room_id WHERE shelf_id = ANY($1)`,
      [shelfIds],
    );
    const byShelf = new Map<string, Germination[]>();
    for (const row of rows) {
      const from = dayBounds(row.started_on, row.time_zone).start;
      const to = waiting.includes(row.stage) ? Infinity : dayBounds(row.stage_since, row.time_zone).end;
      byShelf.set(row.shelf_id, [...(byShelf.get(row.shelf_id) ?? []), { from, to }]);
    }
    return byShelf;
  }
}
