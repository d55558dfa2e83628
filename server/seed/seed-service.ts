import type { Photo } from '@shared/contracts/photos';
import type { SeedLot, SeedLotDetail, SeedsNeeded } from '@shared/contracts/seed';
import { expectedSeedlings, seedsNeeded } from '@shared/growing/seed-expectations';
import { compareUrgency, type SeedTrial } from '@shared/growing/seed-stock';
import { dayBounds } from '@shared/series/room-days';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { CropsService } from '../crops/crops-service';
import type { VarietiesService } from '../crops/varieties-service';
import type { Transactions, Tx } from '../database/transactions';
import { conflict, invalidField } from '../http/request-problem';
import type { GerminationTestsStore } from './germination-tests-store';
import type { LotChange, NewLot, SeedStore, StoredLot } from './seed-store';
import {
  ageOf,
  amountOf,
  lotExpectation,
  lotView,
  newestTrial,
  testView,
  type LotSurroundings,
} from './seed-views';

/** What the seed services work with. */
export interface SeedParts {
  readonly transactions: Transactions;
  readonly seed: SeedStore;
  readonly tests: GerminationTestsStore;
  readonly crops: CropsService;
  readonly varieties: VarietiesService;
  /** What came of the finished sowings of a lot. */
  readonly sowingsOf: (tx: Tx, lotId: string) => Promise<SeedTrial[]>;
  /** Photos of a lot, newest first. */
  readonly photosOf: (tx: Tx, lotId: string) => Promise<Photo[]>;
  readonly changes: RoomChanges;
  readonly now: Clock;
}

/** A room with its calendar. */
export interface RoomCalendar {
  readonly id: string;
  readonly timeZone: string;
}

/** The room's seed: what there is, how old it is, and what may be expected of it. */
export class SeedService {
  constructor(private readonly parts: SeedParts) {}

  /** The lots of a room, those to use first at the top. */
  async list(
    room: RoomCalendar,
    { withFinished, cropId }: { readonly withFinished: boolean; readonly cropId?: string | undefined },
  ): Promise<SeedLot[]> {
    const tx = this.parts.transactions.plain;
    const lots = (await this.parts.seed.ofRoom(tx, room.id)).filter(
      (lot) => (withFinished || lot.finishedOn === null) && (cropId === undefined || lot.cropId === cropId),
    );
    const seen: { lot: StoredLot; around: LotSurroundings }[] = [];
    for (const lot of lots) seen.push({ lot, around: await this.surroundings(tx, room, lot) });
    return seen
      .sort((one, other) => compareUrgency(ageOf(one.lot, one.around), ageOf(other.lot, other.around)))
      .map(({ lot, around }) => lotView(lot, around));
  }

  /** A lot with its story; 404 when the room has none such. */
  async detail(
    room: RoomCalendar,
    lotId: string,
    tx = this.parts.transactions.plain,
  ): Promise<SeedLotDetail> {
    const lot = await this.parts.seed.lot(tx, room.id, lotId);
    const around = await this.surroundings(tx, room, lot);
    const uses = await this.parts.seed.uses(tx, lotId);
    return {
      ...lotView(lot, around),
      tests: around.tests.map(testView),
      uses: uses.map(({ at, ...use }) => ({ ...use, at: at.toISOString() })),
      photos: [...around.photos],
    };
  }

  /** A lot as it is stored; 404 when the room has none such. */
  lot(tx: Tx, roomId: string, lotId: string): Promise<StoredLot> {
    return this.parts.seed.lot(tx, roomId, lotId);
  }

  /** Year of a lot, and what its own newest test found [%]; 404 when the room has none such. */
  async facts(
    tx: Tx,
    roomId: string,
    lotId: string,
  ): Promise<{ readonly packedYear: number | null; readonly testPct: number | null }> {
    const { packedYear } = await this.parts.seed.lot(tx, roomId, lotId);
    const trial = newestTrial(await this.parts.tests.ofLots(tx, [lotId]));
    return { packedYear, testPct: trial === null ? null : (100 * trial.up) / trial.seeds };
  }

  /** Adds a lot, and its variety when it is new. */
  add(by: RoomAuthor, timeZone: string, lot: NewLot): Promise<SeedLot> {
    const { changes, crops, varieties, seed } = this.parts;
    return changes.make(by, async (tx) => {
      await crops.cropToGrow(tx, by.roomId, lot.cropId);
      await varieties.ensure(tx, by.roomId, lot.cropId, lot.variety);
      const subjectId = await seed.add(tx, by.roomId, lot);
      const result = await this.view(tx, { id: by.roomId, timeZone }, subjectId);
      return { result, action: 'seed-lot.add', subjectId, detail: { ...lot } };
    });
  }

  /** Changes what is written of a lot, or puts it aside. */
  change(by: RoomAuthor, timeZone: string, lotId: string, change: LotChange): Promise<SeedLotDetail> {
    const { varieties, seed } = this.parts;
    return this.lotNoted(by, timeZone, lotId, 'seed-lot.change', change, async (tx, lot) => {
      await varieties.ensure(tx, by.roomId, lot.cropId, change.variety ?? null);
      await seed.change(tx, lotId, change);
    });
  }

  /** Says what is left of a lot. */
  recount(
    by: RoomAuthor,
    timeZone: string,
    lotId: string,
    count: { readonly left: number; readonly note: string },
  ): Promise<SeedLotDetail> {
    const { seed, now } = this.parts;
    return this.lotNoted(by, timeZone, lotId, 'seed-lot.recount', count, (tx, lot) =>
      seed.addUse(tx, {
        lotId,
        at: now(),
        reason: 'recounted',
        amount: lot.left - count.left,
        note: count.note,
        personId: by.personId,
      }),
    );
  }

  /** Removes a lot; 409 when something was used of it, which would lose where plants came from. */
  remove(by: RoomAuthor, lotId: string): Promise<void> {
    const { changes, seed } = this.parts;
    return changes.make(by, async (tx) => {
      const { cropId, variety } = await seed.lock(tx, by.roomId, lotId);
      if ((await seed.uses(tx, lotId)).length > 0) {
        throw conflict('LOT_USED', 'Seed of this lot was used already. Put it aside instead.');
      }
      await seed.remove(tx, lotId);
      return { result: undefined, action: 'seed-lot.remove', subjectId: lotId, detail: { cropId, variety } };
    });
  }

  /**
   * Seeds to sow for a number of plants.
   *
   * @param room - Whose lot.
   * @param lotId - Which.
   * @param wanted - Plants, and the share of sowings in which it should be enough.
   * @returns Seeds, what to expect of them, and what that takes of the lot.
   * @throws {@link RequestProblem} 409 `GERMINATION_UNKNOWN` without a test, a sowing or a standard.
   */
  async needed(
    room: RoomCalendar,
    lotId: string,
    wanted: { readonly plants: number; readonly certainty: number },
  ): Promise<SeedsNeeded> {
    const tx = this.parts.transactions.plain;
    const lot = await this.parts.seed.lot(tx, room.id, lotId);
    const germination = lotExpectation(await this.surroundings(tx, room, lot));
    if (germination === null) {
      throw conflict(
        'GERMINATION_UNKNOWN',
        'Nothing is known of how this seed germinates: no test, no sowing, no standard. Test some on damp paper.',
      );
    }
    const seeds = seedsNeeded(wanted.plants, germination.percent, wanted.certainty);
    const takes = seeds === null ? null : amountOf(lot, seeds);
    return {
      seeds,
      expected: seeds === null ? null : expectedSeedlings(seeds, germination.percent),
      germination,
      takes,
      isEnoughLeft: takes === null ? null : takes <= lot.left,
    };
  }

  /**
   * Takes seed out of a lot.
   *
   * @param tx - Of the change.
   * @param by - Who.
   * @param lotId - Of the room, else 404.
   * @param take - Seeds, the grams where the person weighed them, why and when, and the field that a problem names.
   * @returns The lot.
   * @throws {@link RequestProblem} 422 when less is left or grams are needed, 409 for a lot put aside.
   */
  async take(
    tx: Tx,
    by: RoomAuthor,
    lotId: string,
    take: {
      readonly seeds: number;
      readonly grams: number | null;
      readonly reason: 'sown' | 'tested';
      readonly at: Date;
      readonly testId?: string;
      readonly plantingId?: string;
      readonly field: string;
    },
  ): Promise<StoredLot> {
    const { seed } = this.parts;
    const lot = await seed.lock(tx, by.roomId, lotId);
    if (lot.finishedOn !== null)
      throw conflict('LOT_FINISHED', 'This lot was put aside. Take it up again first.');
    const amount = lot.unit === 'grams' && take.grams !== null ? take.grams : amountOf(lot, take.seeds);
    if (amount === null)
      throw invalidField('body.grams', 'is needed: this lot is in grams, without seeds a gram');
    if (amount > lot.left) {
      const unit = lot.unit === 'seeds' ? 'seeds' : 'g';
      throw invalidField(
        take.field,
        `is more than is left of the lot: ${lot.left} ${unit}. Recount it if there is more`,
      );
    }
    const { reason, at, testId, plantingId } = take;
    await seed.addUse(tx, {
      lotId,
      at,
      reason,
      amount,
      personId: by.personId,
      ...(testId === undefined ? {} : { testId }),
      ...(plantingId === undefined ? {} : { plantingId }),
    });
    return lot;
  }

  /** Changes a lot under a lock, and tells it anew. */
  lotNoted(
    by: RoomAuthor,
    timeZone: string,
    lotId: string,
    action: string,
    detail: object,
    work: (tx: Tx, lot: StoredLot) => Promise<void>,
  ): Promise<SeedLotDetail> {
    return this.parts.changes.make(by, async (tx) => {
      await work(tx, await this.parts.seed.lock(tx, by.roomId, lotId));
      const result = await this.detail({ id: by.roomId, timeZone }, lotId, tx);
      return { result, action, subjectId: lotId, detail: { ...detail } };
    });
  }

  private async view(tx: Tx, room: RoomCalendar, lotId: string): Promise<SeedLot> {
    const lot = await this.parts.seed.lot(tx, room.id, lotId);
    return lotView(lot, await this.surroundings(tx, room, lot));
  }

  private async surroundings(tx: Tx, room: RoomCalendar, lot: StoredLot): Promise<LotSurroundings> {
    const { crops, tests, now } = this.parts;
    return {
      crop: await crops.crop(tx, room.id, lot.cropId),
      tests: await tests.ofLots(tx, [lot.id]),
      sowings: await this.parts.sowingsOf(tx, lot.id),
      photos: await this.parts.photosOf(tx, lot.id),
      today: dayBounds(now().getTime(), room.timeZone).date,
    };
  }
}
