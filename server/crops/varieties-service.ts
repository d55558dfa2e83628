import type { Variety } from '@shared/contracts/crops';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Transactions, Tx } from '../database/transactions';
import { conflict } from '../http/request-problem';
import type { CropsService } from './crops-service';
import type { StoredVariety, VarietiesStore } from './varieties-store';

/** What {@link VarietiesService} works with. */
export interface VarietiesParts {
  readonly transactions: Transactions;
  readonly varieties: VarietiesStore;
  readonly crops: CropsService;
  readonly changes: RoomChanges;
}

/** The varieties that a room grows. */
export class VarietiesService {
  constructor(private readonly parts: VarietiesParts) {}

  /** All of a room, by crop and name. */
  async list(roomId: string): Promise<Variety[]> {
    const { transactions, varieties } = this.parts;
    const tx = transactions.plain;
    const found: Variety[] = [];
    for (const one of await varieties.ofRoom(tx, roomId)) found.push(await this.view(tx, roomId, one));
    // By name already; a stable sort keeps that order within a crop.
    return found.sort((one, other) => one.cropName.localeCompare(other.cropName, 'en'));
  }

  /** Adds a variety; 422 when the crop has one of that name, or is none. */
  add(by: RoomAuthor, variety: Omit<StoredVariety, 'id'>): Promise<Variety> {
    const { changes, crops, varieties } = this.parts;
    return changes.make(by, async (tx) => {
      await crops.cropToGrow(tx, by.roomId, variety.cropId);
      const id = await varieties.add(tx, by.roomId, variety);
      const result = await this.view(tx, by.roomId, { ...variety, id });
      return { result, action: 'variety.add', subjectId: id, detail: { ...variety } };
    });
  }

  /** Renames a variety, on its lots and plantings too, or changes its note. */
  change(
    by: RoomAuthor,
    varietyId: string,
    change: { readonly name?: string | undefined; readonly note?: string | undefined },
  ): Promise<Variety> {
    const { changes, varieties } = this.parts;
    return changes.make(by, async (tx) => {
      const before = await varieties.lock(tx, by.roomId, varietyId);
      const after = { ...before, name: change.name ?? before.name, note: change.note ?? before.note };
      await varieties.change(tx, varietyId, { name: after.name, note: after.note });
      if (after.name !== before.name) await varieties.rename(tx, by.roomId, before, after.name);
      const result = await this.view(tx, by.roomId, after);
      return { result, action: 'variety.change', subjectId: varietyId, detail: { ...change } };
    });
  }

  /** Removes a variety; 409 while a lot or a planting names it. */
  remove(by: RoomAuthor, varietyId: string): Promise<void> {
    const { changes, varieties } = this.parts;
    return changes.make(by, async (tx) => {
      const variety = await varieties.lock(tx, by.roomId, varietyId);
      const { cropId, name } = variety;
      if (await varieties.isNamed(tx, by.roomId, variety)) {
        throw conflict(
          'VARIETY_USED',
          `${name} is named by seed or plantings of this room. Rename it instead.`,
        );
      }
      await varieties.remove(tx, varietyId);
      return { result: undefined, action: 'variety.remove', subjectId: varietyId, detail: { cropId, name } };
    });
  }

  /** Adds the variety that a lot or a planting names, unless it is there. */
  async ensure(tx: Tx, roomId: string, cropId: string, name: string | null): Promise<void> {
    if (name !== null) await this.parts.varieties.ensure(tx, roomId, cropId, name);
  }

  private async view(tx: Tx, roomId: string, { id, cropId, name, note }: StoredVariety): Promise<Variety> {
    const crop = await this.parts.crops.crop(tx, roomId, cropId);
    return { id, cropId, cropName: crop?.name ?? cropId, name, note };
  }
}
