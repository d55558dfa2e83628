import type { NewPlanting, PlantingDetail } from '@shared/contracts/plantings';
import type { Crop } from '@shared/growing/crops/crop';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { CropsService } from '../crops/crops-service';
import type { VarietiesService } from '../crops/varieties-service';
import type { Tx } from '../database/transactions';
import { conflict, invalidField } from '../http/request-problem';
import type { RoomsService } from '../rooms/rooms-service';
import type { SeedService } from '../seed/seed-service';
import { noteInstant } from './note-instant';
import type { NewEvent, PlantingEventsStore } from './planting-events-store';
import type { PlantingRecords } from './planting-records';
import type { PlantingsService } from './plantings-service';
import type { PlantingsStore } from './plantings-store';

/** What {@link PlantingStartService} works with. */
export interface PlantingStartParts {
  readonly plantings: PlantingsStore;
  readonly events: PlantingEventsStore;
  readonly records: PlantingRecords;
  readonly reader: PlantingsService;
  readonly rooms: Pick<RoomsService, 'requireShelf'>;
  readonly crops: CropsService;
  readonly varieties: VarietiesService;
  readonly seed: SeedService;
  readonly changes: RoomChanges;
  readonly now: Clock;
}

type Sowing = Extract<NewPlanting, { how: 'sown' }>;

/** Sows and brings plants in, corrects what is written of them, and removes what was a mistake. */
export class PlantingStartService {
  constructor(private readonly parts: PlantingStartParts) {}

  /**
   * Sows, or brings plants in.
   *
   * @param by - Who.
   * @param timeZone - Of the room.
   * @param planting - What, and where to.
   * @returns The planting.
   * @throws {@link RequestProblem} 404 for another room's shelf or lot, 422 for a time to come, an unknown crop or more
   *   seed than is left.
   */
  start(by: RoomAuthor, timeZone: string, planting: NewPlanting): Promise<PlantingDetail> {
    const { changes, reader } = this.parts;
    return changes.make(by, async (tx) => {
      const subjectId =
        planting.how === 'sown'
          ? await this.sow(tx, by, timeZone, planting)
          : await this.bringIn(tx, by, timeZone, planting);
      const result = await reader.detail(by.roomId, subjectId, tx);
      return { result, action: 'planting.start', subjectId, detail: { ...planting } };
    });
  }

  /** Corrects what is written of a planting. */
  change(
    by: RoomAuthor,
    plantingId: string,
    change: {
      readonly variety?: string | null | undefined;
      readonly source?: string | undefined;
      readonly depthMm?: number | null | undefined;
    },
  ): Promise<PlantingDetail> {
    const { changes, plantings, varieties, reader } = this.parts;
    return changes.make(by, async (tx) => {
      const { cropId } = await plantings.lock(tx, by.roomId, plantingId);
      if (cropId !== null) await varieties.ensure(tx, by.roomId, cropId, change.variety ?? null);
      await plantings.change(tx, plantingId, definedOf(change));
      const result = await reader.detail(by.roomId, plantingId, tx);
      return { result, action: 'planting.change', subjectId: plantingId, detail: { ...change } };
    });
  }

  /** Removes a planting; its seed goes back to the lot. 409 once anything has happened to it. */
  remove(by: RoomAuthor, plantingId: string): Promise<void> {
    const { changes, plantings, events } = this.parts;
    return changes.make(by, async (tx) => {
      const { crop, variety, origin } = await plantings.lock(tx, by.roomId, plantingId);
      if (origin === 'split') {
        throw conflict('SPLIT_OFF', 'These plants were parted from others. Undo the parting there instead.');
      }
      if ((await events.of(tx, plantingId)).length > 1) {
        throw conflict(
          'HAS_HISTORY',
          'Something has happened to this planting. End it, or undo its events first.',
        );
      }
      await plantings.remove(tx, plantingId);
      return {
        result: undefined,
        action: 'planting.remove',
        subjectId: plantingId,
        detail: { crop, variety },
      };
    });
  }

  private async sow(tx: Tx, by: RoomAuthor, timeZone: string, sowing: Sowing): Promise<string> {
    const { seed, crops } = this.parts;
    const { lotId, count, container, depthMm, note } = sowing;
    const at = noteInstant(sowing.at, this.parts.now());
    if (lotId === null) {
      if (sowing.cropId === undefined) throw invalidField('body.cropId', 'is needed without a seed lot');
      const crop = await crops.cropToGrow(tx, by.roomId, sowing.cropId);
      return this.begin(
        tx,
        by,
        timeZone,
        { ...sowing, crop, lotId, source: '', depthMm },
        {
          kind: 'sown',
          at,
          count,
          container,
          note,
        },
      );
    }
    const lot = await seed.lot(tx, by.roomId, lotId);
    if (sowing.cropId !== undefined && sowing.cropId !== lot.cropId) {
      throw invalidField('body.cropId', 'is another crop than that of the lot');
    }
    const crop = await crops.cropToGrow(tx, by.roomId, lot.cropId);
    const variety = sowing.variety ?? lot.variety;
    const plantingId = await this.begin(
      tx,
      by,
      timeZone,
      { shelfId: sowing.shelfId, variety, crop, lotId, source: '', depthMm },
      { kind: 'sown', at, count, container, note },
    );
    const { grams } = sowing;
    await seed.take(tx, by, lotId, {
      seeds: count,
      grams,
      reason: 'sown',
      at,
      plantingId,
      field: 'body.count',
    });
    return plantingId;
  }

  private async bringIn(
    tx: Tx,
    by: RoomAuthor,
    timeZone: string,
    planting: Extract<NewPlanting, { how: 'broughtIn' }>,
  ): Promise<string> {
    const { cropId, stage, count, container, note } = planting;
    const crop = await this.parts.crops.cropToGrow(tx, by.roomId, cropId);
    const at = noteInstant(planting.at, this.parts.now());
    const plants = { ...planting, crop, lotId: null, depthMm: null };
    return this.begin(tx, by, timeZone, plants, { kind: 'broughtIn', at, count, stage, container, note });
  }

  private async begin(
    tx: Tx,
    by: RoomAuthor,
    timeZone: string,
    plants: {
      readonly shelfId: string | null;
      readonly variety: string | null;
      readonly crop: Crop;
      readonly lotId: string | null;
      readonly source: string;
      readonly depthMm: number | null;
    },
    start: NewEvent,
  ): Promise<string> {
    const { rooms, varieties, records } = this.parts;
    const { shelfId, variety, crop, lotId, source, depthMm } = plants;
    if (shelfId !== null) await rooms.requireShelf(tx, by.roomId, shelfId);
    await varieties.ensure(tx, by.roomId, crop.id, variety);
    const { name, habit } = crop;
    return records.begin(
      tx,
      { roomId: by.roomId, cropId: crop.id, crop: name, variety, habit, lotId, source, depthMm },
      { ...start, shelfId, personId: by.personId },
      timeZone,
    );
  }
}

function definedOf<T extends object>(change: T): Partial<T> {
  return Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined)) as Partial<T>;
}
