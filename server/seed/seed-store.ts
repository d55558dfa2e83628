import type { SeedUnit } from '@shared/contracts/seed';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { SeedLotEntity } from './seed-lot-entity';
import { SeedUseEntity, type SeedUseReason } from './seed-use-entity';

/** A lot as it is stored, with what is left of it. */
export interface StoredLot {
  readonly id: string;
  readonly cropId: string;
  readonly variety: string | null;
  readonly source: string;
  readonly packedYear: number | null;
  readonly unit: SeedUnit;
  readonly amount: number;
  readonly left: number;
  readonly seedsPerGram: number | null;
  readonly price: number | null;
  readonly currency: string | null;
  readonly lotNumber: string;
  readonly note: string;
  readonly finishedOn: string | null;
}

/** A lot to add. */
export type NewLot = Omit<StoredLot, 'id' | 'left' | 'finishedOn'>;
/** What can be changed of a lot. */
export type LotChange = {
  readonly [Key in keyof Omit<NewLot, 'cropId' | 'unit' | 'amount'>]?: NewLot[Key] | undefined;
} & {
  readonly finishedOn?: string | null | undefined;
};

/** Something used of a lot. */
export interface StoredUse {
  readonly id: string;
  readonly at: Date;
  readonly reason: SeedUseReason;
  readonly amount: number;
  readonly note: string;
  readonly plantingId: string | null;
  readonly personName: string | null;
}

// Sums of binary fractions carry dust in their last digits; nobody weighs seed finer than this.
const lots = `
  SELECT lot.id, lot.crop_id AS "cropId", lot.variety, lot.source, lot.packed_year AS "packedYear", lot.unit,
    lot.amount, round((lot.amount - coalesce(used.amount, 0))::numeric, 6)::float8 AS "left",
    lot.seeds_per_gram AS "seedsPerGram", lot.price::float8 AS price, lot.currency, lot.lot_number AS "lotNumber",
    lot.note, lot.finished_on::text AS "finishedOn"
  FROM seed_lot AS lot
  LEFT JOIN LATERAL (SELECT sum(amount) AS amount FROM seed_use WHERE lot_id = lot.id) AS used ON true
  WHERE lot.room_id = $1`;

/** Seed lots and what was used of them. */
export class SeedStore {
  /** The lots of a room, oldest packet first. */
  ofRoom(tx: Tx, roomId: string): Promise<StoredLot[]> {
    return tx.query(`${lots} ORDER BY lot.packed_year NULLS LAST, lot.created_at, lot.id`, [roomId]);
  }

  /** One lot; 404 when the room has none such. */
  async lot(tx: Tx, roomId: string, lotId: string): Promise<StoredLot> {
    const rows: StoredLot[] = await tx.query(`${lots} AND lot.id = $2`, [roomId, lotId]);
    const lot = rows[0];
    if (lot === undefined) throw notFound('seed lot');
    return lot;
  }

  /** One lot, held until the transaction ends, so that nobody else takes from it; 404 when the room has none such. */
  async lock(tx: Tx, roomId: string, lotId: string): Promise<StoredLot> {
    await tx.query('SELECT FROM seed_lot WHERE room_id = $1 AND id = $2 FOR UPDATE', [roomId, lotId]);
    return this.lot(tx, roomId, lotId);
  }

  /** Adds a lot and returns its id. */
  async add(tx: Tx, roomId: string, lot: NewLot): Promise<string> {
    const { id } = await tx.save(SeedLotEntity, { ...lot, roomId, price: numericText(lot.price) });
    return id;
  }

  /** Changes what is given. */
  async change(tx: Tx, lotId: string, { price, ...change }: LotChange): Promise<void> {
    const changed = { ...change, ...(price === undefined ? {} : { price: numericText(price) }) };
    if (Object.keys(changed).length > 0) await tx.update(SeedLotEntity, { id: lotId }, changed);
  }

  /** Removes a lot with its tests. */
  async remove(tx: Tx, lotId: string): Promise<void> {
    await tx.delete(SeedLotEntity, { id: lotId });
  }

  /** What was used of a lot, newest first. */
  uses(tx: Tx, lotId: string): Promise<StoredUse[]> {
    return tx.query(
      `SELECT seed_use.id, seed_use.at, seed_use.reason, seed_use.amount, seed_use.note,
         seed_use.planting_id AS "plantingId", person.name AS "personName"
       FROM seed_use LEFT JOIN person ON person.id = seed_use.person_id
       WHERE seed_use.lot_id = $1 ORDER BY seed_use.at DESC, seed_use.id`,
      [lotId],
    );
  }

  /** Notes that something was used. */
  async addUse(
    tx: Tx,
    use: Pick<SeedUseEntity, 'lotId' | 'at' | 'reason' | 'amount' | 'personId'> &
      Partial<Pick<SeedUseEntity, 'testId' | 'plantingId' | 'note'>>,
  ): Promise<void> {
    await tx.insert(SeedUseEntity, use);
  }
}

function numericText(price: number | null): string | null {
  return price === null ? null : price.toFixed(2);
}
