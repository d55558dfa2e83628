import type { LampHoursPlan } from '@shared/climate/lamp-hours';
import type { Quantity } from '@shared/climate/quantity';
import type { LampHours, WantedLight, WantedRange } from '@shared/contracts/rooms';
import { In } from 'typeorm';
import type { Tx } from '../database/transactions';
import { LampPlanEntity } from './lamp-plan-entity';
import { columnsOf, rangeOf } from './range-columns';
import { WantedLightEntity } from './wanted-light-entity';
import { WantedRangeEntity } from './wanted-range-entity';

/** A plan with whose it is. */
export interface StoredLampPlan extends LampHoursPlan {
  readonly shelfId: string;
  readonly timeZone: string;
}

/** Lamp hours with their history, wanted ranges and wanted light. */
export class ShelfPlansStore {
  /** Every plan of shelves that begins before an instant, in order, with the time zone of its room. */
  async lampPlans(tx: Tx, shelfIds: readonly string[], before: Date): Promise<StoredLampPlan[]> {
    const rows: (Omit<StoredLampPlan, 'validFrom'> & { validFrom: Date })[] = await tx.query(
      `SELECT shelf_id AS "shelfId", valid_from AS "validFrom", switches_on AS "switchesOn",
         switches_off AS "switchesOff", room.time_zone AS "timeZone"
       FROM lamp_plan JOIN shelf ON shelf.id = shelf_id JOIN room ON room.id = shelf.room_id
       WHERE shelf_id = ANY($1) AND valid_from < $2 ORDER BY shelf_id, valid_from`,
      [shelfIds, before],
    );
    return rows.map((row) => ({ ...row, validFrom: row.validFrom.getTime() }));
  }

  /** Lamp hours from an instant on; a plan of the same instant is replaced. */
  async setLampHours(tx: Tx, shelfId: string, validFrom: Date, hours: LampHours): Promise<void> {
    await tx.upsert(LampPlanEntity, { shelfId, validFrom, ...hours }, ['shelfId', 'validFrom']);
  }

  /** What shelves want, by shelf and quantity. */
  async wantedRanges(tx: Tx, shelfIds: readonly string[]): Promise<(WantedRange & { shelfId: string })[]> {
    const ranges = await tx.find(WantedRangeEntity, {
      where: { shelfId: In([...shelfIds]) },
      order: { shelfId: 'ASC', quantity: 'ASC' },
    });
    return ranges.map((range) => ({
      ...rangeOf(range),
      shelfId: range.shelfId,
      source: range.source,
      since: range.since.toISOString(),
    }));
  }

  /** Sets what a shelf wants of one quantity. */
  async setWantedRange(tx: Tx, shelfId: string, wanted: WantedRange): Promise<void> {
    const { quantity, source, since } = wanted;
    await tx.upsert(
      WantedRangeEntity,
      { shelfId, quantity, ...columnsOf(wanted), source, since: new Date(since) },
      ['shelfId', 'quantity'],
    );
  }

  /** Takes a wanted range away; false when there was none. */
  async clearWantedRange(tx: Tx, shelfId: string, quantity: Quantity): Promise<boolean> {
    const { affected } = await tx.delete(WantedRangeEntity, { shelfId, quantity });
    return affected === 1;
  }

  /** What shelves want of a day's light, by shelf. */
  async wantedLight(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedLight>> {
    const wanted = await tx.findBy(WantedLightEntity, { shelfId: In([...shelfIds]) });
    return new Map(
      wanted.map(({ shelfId, leastMolM2D, source, reason, since }) => [
        shelfId,
        { leastMolM2D, source, reason, since: since.toISOString() },
      ]),
    );
  }

  /** Sets what a shelf wants of a day's light. */
  async setWantedLight(tx: Tx, shelfId: string, wanted: WantedLight): Promise<void> {
    await tx.upsert(WantedLightEntity, { shelfId, ...wanted, since: new Date(wanted.since) }, ['shelfId']);
  }

  /** Takes away what someone set for a shelf; false when they did not. */
  async clearWantedLight(tx: Tx, shelfId: string, source: WantedLight['source']): Promise<boolean> {
    const { affected } = await tx.delete(WantedLightEntity, { shelfId, source });
    return affected === 1;
  }
}
