import { cropById } from '@shared/growing/crops/crop-library';
import { dayBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';
import { VarietiesStore } from '../crops/varieties-store';
import { PlantingEventsStore } from '../plantings/planting-events-store';
import { PlantingRecords } from '../plantings/planting-records';
import { PlantingsStore } from '../plantings/plantings-store';
import { GerminationTestsStore } from '../seed/germination-tests-store';
import { PhotosStore } from '../photos/photos-store';
import { shrinkPhoto } from '../photos/shrink-photo';
import { SeedStore } from '../seed/seed-store';
import { SowingStore } from '../sowing/sowing-store';
import { drawTray } from './draw-photo';
import {
  demonstrationFrost,
  demonstrationLots,
  demonstrationPlantings,
  demonstrationSowings,
  type DemonstrationHappening,
  type DemonstrationLot,
  type DemonstrationPlanting,
} from './growing-content';

/** The room that is filled. */
export interface FilledRoom {
  readonly roomId: string;
  readonly zone: string;
  /** Instant of the filling [ms]. */
  readonly now: number;
  /** Id by label. */
  readonly shelves: ReadonlyMap<string, string>;
  /** Whoever did all this. */
  readonly personId: string | null;
}

const DAY_MS = 86_400_000;
const CURRENCY = 'EUR';

/** Fills the seed drawer and lets everything grow that the demonstration shows. */
export class DemonstrationGrowing {
  private readonly seed = new SeedStore();
  private readonly tests = new GerminationTestsStore();
  private readonly varieties = new VarietiesStore();
  private readonly photos = new PhotosStore();
  private readonly sowing = new SowingStore();
  private readonly records = new PlantingRecords(new PlantingsStore(), new PlantingEventsStore());

  /** Writes lots, tests, plantings with all that happened to them, and the sowing calendar. */
  async fill(tx: Tx, room: FilledRoom): Promise<void> {
    const lots = new Map<string, { readonly id: string; readonly lot: DemonstrationLot }>();
    for (const lot of demonstrationLots) lots.set(lot.key, { id: await this.addLot(tx, room, lot), lot });
    for (const planting of demonstrationPlantings) await this.grow(tx, room, planting, lots);
    await this.sowing.setFrost(tx, room.roomId, demonstrationFrost);
    for (const { cropId, everyDays } of demonstrationSowings) {
      await this.sowing.choose(tx, room.roomId, cropId, everyDays);
    }
  }

  private async addLot(tx: Tx, room: FilledRoom, lot: DemonstrationLot): Promise<string> {
    const { key: _, packedYearsAgo, test, price, ...written } = lot;
    await this.varieties.ensure(tx, room.roomId, lot.cropId, lot.variety);
    const thisYear = Number(dayBounds(room.now, room.zone).date.slice(0, 4));
    const id = await this.seed.add(tx, room.roomId, {
      ...written,
      price,
      currency: price === null ? null : CURRENCY,
      packedYear: thisYear - packedYearsAgo,
    });
    if (test !== null) await this.addTest(tx, room, id, lot, test);
    return id;
  }

  private async addTest(
    tx: Tx,
    room: FilledRoom,
    lotId: string,
    lot: DemonstrationLot,
    test: NonNullable<DemonstrationLot['test']>,
  ): Promise<void> {
    const { seeds } = test;
    const startedOn = dayBounds(room.now - test.daysAgo * DAY_MS, room.zone).date;
    const testId = await this.tests.add(tx, {
      lotId,
      startedOn,
      seeds,
      note: 'On damp paper, on top of the cupboard.',
    });
    for (const [day, up] of test.counts) await this.tests.count(tx, testId, day, up);
    const at = instantOf(room, { daysAgo: test.daysAgo, clock: '12:00' });
    const amount = amountOf(lot, seeds);
    await this.seed.addUse(tx, { lotId, at, reason: 'tested', amount, testId, personId: room.personId });
  }

  private async grow(
    tx: Tx,
    room: FilledRoom,
    planting: DemonstrationPlanting,
    lots: ReadonlyMap<string, { readonly id: string; readonly lot: DemonstrationLot }>,
  ): Promise<void> {
    const { cropId, variety, source, depthMm, story } = planting;
    const [start, ...later] = story;
    const crop = cropById(cropId);
    if (crop === null || start === undefined) throw new Error(`The demonstration grows no ${cropId}`);
    if (variety !== null) await this.varieties.ensure(tx, room.roomId, cropId, variety);
    const from = lots.get(planting.lot ?? '');
    const plantingId = await this.records.begin(
      tx,
      {
        roomId: room.roomId,
        cropId,
        crop: crop.name,
        variety,
        habit: crop.habit,
        lotId: from?.id ?? null,
        source,
        depthMm,
      },
      { ...this.event(room, start), shelfId: room.shelves.get(planting.shelf) ?? null },
      room.zone,
    );
    for (const happening of later) {
      await this.records.append(tx, plantingId, this.event(room, happening), room.zone);
    }
    if (planting.pictured !== null) await this.picture(tx, room, plantingId, planting.pictured);
    if (from === undefined) return;
    await this.seed.addUse(tx, {
      lotId: from.id,
      at: instantOf(room, start),
      reason: 'sown',
      amount: amountOf(from.lot, start.count ?? 0),
      plantingId,
      personId: room.personId,
    });
  }

  private async picture(tx: Tx, room: FilledRoom, plantingId: string, up: number): Promise<void> {
    const { roomId, personId, now } = room;
    const photo = await shrinkPhoto(await drawTray(up));
    const caption = `${up} up (drawn, as all this is invented)`;
    await this.photos.add(tx, { ...photo, roomId, plantingId, at: new Date(now), caption, personId });
  }

  private event(room: FilledRoom, { daysAgo, clock, ...event }: DemonstrationHappening) {
    return { ...event, at: instantOf(room, { daysAgo, clock }), personId: room.personId };
  }
}

function amountOf({ unit, seedsPerGram }: DemonstrationLot, seeds: number): number {
  return unit === 'seeds' ? seeds : seeds / (seedsPerGram ?? 1);
}

/** A time of the room's clock so many days ago, and never one to come. */
function instantOf(
  { now, zone }: FilledRoom,
  { daysAgo, clock }: { readonly daysAgo: number; readonly clock: string },
): Date {
  const { start } = dayBounds(dayBounds(now - daysAgo * DAY_MS, zone).date, zone);
  const [hours = 0, minutes = 0] = clock.split(':').map(Number);
  return new Date(Math.min(now, start + (hours * 60 + minutes) * 60_000));
}
