import { isDeepStrictEqual } from 'node:util';
import { In } from 'typeorm';
import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { AdviceSubject } from '@shared/growing/advice/advice-tasks';
import type { Tx } from '../database/transactions';
import { AdviceTaskEntity } from './advice-task-entity';
import { ShelfAdviceEntity } from './shelf-advice-entity';

/** Advice without whose and since when. */
export type AdviceContent = ShelfAdviceEntity['content'];

/** Mean temperatures of a shelf [°C]; null where nothing was measured. */
export interface ShelfMeans {
  readonly shelfId: string;
  readonly airC: number | null;
  readonly rootZoneC: number | null;
}

/** Advice on shelves, what it asked for, and the temperatures it rests on. */
export class AdviceStore {
  /** Makes others who work out a room's advice wait until the transaction ends. */
  async lockRoom(tx: Tx, roomId: string): Promise<void> {
    await tx.query(`SELECT pg_advisory_xact_lock(hashtextextended('advice ' || $1, 0))`, [roomId]);
  }

  /** Advice on shelves as it was worked out last, by shelf. */
  async of(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, ShelfAdviceView>> {
    const found = await tx.find(ShelfAdviceEntity, { where: { shelfId: In([...shelfIds]) } });
    return new Map(found.map((advice) => [advice.shelfId, viewOf(advice)]));
  }

  /** Keeps the advice on a shelf; null when it is the one that was kept. */
  async keep(tx: Tx, shelfId: string, content: AdviceContent, since: Date): Promise<ShelfAdviceView | null> {
    const held = await tx.findOneBy(ShelfAdviceEntity, { shelfId });
    if (held !== null && isDeepStrictEqual(held.content, content)) return null;
    return viewOf(await tx.save(ShelfAdviceEntity, { shelfId, content, since }));
  }

  /** What advice on shelves asked for last. */
  asked(tx: Tx, shelfIds: readonly string[]): Promise<AdviceTaskEntity[]> {
    return tx.find(AdviceTaskEntity, { where: { shelfId: In([...shelfIds]) } });
  }

  /** Remembers what advice asks for. */
  async setAsked(
    tx: Tx,
    asked: Pick<AdviceTaskEntity, 'shelfId' | 'about' | 'change' | 'taskId'>,
  ): Promise<void> {
    await tx.upsert(AdviceTaskEntity, asked, ['shelfId', 'about']);
  }

  /** Forgets what advice asked for. */
  async forgetAsked(tx: Tx, shelfId: string, about: AdviceSubject): Promise<void> {
    await tx.delete(AdviceTaskEntity, { shelfId, about });
  }

  /** Time-weighted mean temperatures of shelves since an instant. */
  meansOf(tx: Tx, shelfIds: readonly string[], since: Date): Promise<ShelfMeans[]> {
    const mean = (quantity: string): string =>
      `sum(hour.integral_ms) FILTER (WHERE sensor.quantity = '${quantity}')
         / nullif(sum(hour.covered_ms) FILTER (WHERE sensor.quantity = '${quantity}'), 0)`;
    return tx.query(
      `SELECT place.shelf_id AS "shelfId", ${mean('airTemperature')} AS "airC",
         ${mean('rootZoneTemperature')} AS "rootZoneC"
       FROM placement AS place
       JOIN sensor ON sensor.id = place.sensor_id AND sensor.quantity IN ('airTemperature', 'rootZoneTemperature')
       JOIN hourly_summary AS hour ON hour.sensor_id = sensor.id AND hour.start_at >= greatest($2, place.from_at)
         AND (place.to_at IS NULL OR hour.start_at < place.to_at)
       WHERE place.shelf_id = ANY($1) GROUP BY place.shelf_id`,
      [shelfIds, since],
    );
  }
}

function viewOf({ shelfId, since, content }: ShelfAdviceEntity): ShelfAdviceView {
  return { ...content, shelfId, since: since.toISOString() };
}
