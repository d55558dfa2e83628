import type { PlantingSummary } from '@shared/contracts/board';
import type { Tx } from '../database/transactions';
import type { PlantingsStore } from './plantings-store';

/** What grows where, for the board and the shelf's page. */
export class PlantingsService {
  constructor(private readonly plantings: PlantingsStore) {}

  /** By shelf: its plantings that have not ended, oldest first. */
  plantingsOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, PlantingSummary[]>> {
    return this.plantings.plantingsOn(tx, shelfIds);
  }
}
