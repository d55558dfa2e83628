import { In, IsNull } from 'typeorm';
import type { PlantingSummary } from '@shared/contracts/board';
import type { Tx } from '../database/transactions';
import { PlantingEntity } from './planting-entity';

/** What grows where. */
export class PlantingsStore {
  /**
   * What grows on shelves now.
   *
   * @param tx - To read with.
   * @param shelfIds - Any shelves; each has an entry in the answer.
   * @returns By shelf: its plantings that have not ended, oldest first.
   */
  async plantingsOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, PlantingSummary[]>> {
    const plantings = await tx.find(PlantingEntity, {
      where: { shelfId: In([...shelfIds]), endedOn: IsNull() },
      order: { startedOn: 'ASC', createdAt: 'ASC', id: 'ASC' },
    });
    const byShelf = new Map<string | null, PlantingSummary[]>(shelfIds.map((shelfId) => [shelfId, []]));
    for (const planting of plantings) byShelf.get(planting.shelfId)?.push(summaryOf(planting));
    return byShelf as Map<string, PlantingSummary[]>;
  }
}

function summaryOf(planting: PlantingEntity): PlantingSummary {
  const { id, crop, variety, habit, count, stage, startedOn, stageSince } = planting;
  return { id, crop, variety, habit, count, stage, startedOn, stageSince };
}
