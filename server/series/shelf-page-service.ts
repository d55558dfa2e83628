import type { PlantingSummary } from '@shared/contracts/board';
import type { Rack, Shelf, WantedLight, WantedRange } from '@shared/contracts/rooms';
import type { ShelfDetail } from '@shared/contracts/series';
import type { Transactions, Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import type { SeriesStore } from './series-store';

/** What a shelf's page shows that other areas keep. */
export interface ShelfPageSources {
  racksOf(roomId: string): Promise<Rack[]>;
  plantingsOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, PlantingSummary[]>>;
  wantedRangesOf(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedRange[]>>;
  wantedLightOf(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedLight>>;
}

/** A shelf as its own page shows it. */
export class ShelfPageService {
  constructor(
    private readonly transactions: Transactions,
    private readonly store: SeriesStore,
    private readonly sources: ShelfPageSources,
  ) {}

  /**
   * The page of a shelf.
   *
   * @param roomId - Of which room.
   * @param shelfId - Which.
   * @returns The shelf with what it carries and wants.
   * @throws RequestProblem 404 when the room has no such shelf.
   */
  async page(roomId: string, shelfId: string): Promise<ShelfDetail> {
    const tx = this.transactions.plain;
    const { rack, shelf } = await this.find(roomId, shelfId);
    const { quantities, firstAt } = await this.store.everMeasured(tx, shelfId);
    const hasDeficit = quantities.includes('airTemperature') && quantities.includes('relativeHumidity');
    return {
      shelf,
      rackName: rack.name,
      tier: rack.shelves.findIndex(({ id }) => id === shelfId) + 1,
      tiers: rack.shelves.length,
      plantings: (await this.sources.plantingsOn(tx, [shelfId])).get(shelfId) ?? [],
      wantedRanges: (await this.sources.wantedRangesOf(tx, [shelfId])).get(shelfId) ?? [],
      wantedLight: (await this.sources.wantedLightOf(tx, [shelfId])).get(shelfId) ?? null,
      quantities: hasDeficit ? [...quantities, 'vapourPressureDeficit'] : quantities,
      firstAt: firstAt?.toISOString() ?? null,
    };
  }

  /**
   * Refuses shelves of other rooms.
   *
   * @param roomId - Of which room.
   * @param shelfId - Which.
   * @throws RequestProblem 404 when the room has no such shelf.
   */
  async requireShelf(roomId: string, shelfId: string): Promise<void> {
    await this.find(roomId, shelfId);
  }

  private async find(roomId: string, shelfId: string): Promise<{ rack: Rack; shelf: Shelf }> {
    for (const rack of await this.sources.racksOf(roomId)) {
      const shelf = rack.shelves.find(({ id }) => id === shelfId);
      if (shelf !== undefined) return { rack, shelf };
    }
    throw notFound('shelf');
  }
}
