import type { Tx } from '../database/transactions';
import { RoomFrostEntity } from './room-frost-entity';
import { SowingChoiceEntity } from './sowing-choice-entity';

/** Frost dates as they are stored. */
export type StoredFrost = Pick<RoomFrostEntity, 'lastSpring' | 'firstAutumn' | 'note'>;

/** A crop on the calendar, with its task where that is still open. */
export interface StoredChoice {
  readonly cropId: string;
  readonly everyDays: number | null;
  readonly openTaskId: string | null;
}

/** Frost dates, and crops on sowing calendars. */
export class SowingStore {
  /** The frost dates of a room; none until somebody sets them. */
  async frost(tx: Tx, roomId: string): Promise<StoredFrost> {
    const held = await tx.findOneBy(RoomFrostEntity, { roomId });
    return held ?? { lastSpring: null, firstAutumn: null, note: '' };
  }

  /** Sets the frost dates of a room. */
  async setFrost(tx: Tx, roomId: string, frost: StoredFrost): Promise<void> {
    await tx.save(RoomFrostEntity, { ...frost, roomId });
  }

  /** The crops on a room's calendar. */
  choices(tx: Tx, roomId: string): Promise<StoredChoice[]> {
    return tx.query(
      `SELECT choice.crop_id AS "cropId", choice.every_days AS "everyDays", task.id AS "openTaskId"
       FROM sowing_choice AS choice LEFT JOIN task ON task.id = choice.task_id AND task.done_at IS NULL
       WHERE choice.room_id = $1 ORDER BY choice.crop_id`,
      [roomId],
    );
  }

  /** One of them, held until the transaction ends; null when the crop is not on it. */
  async lockChoice(tx: Tx, roomId: string, cropId: string): Promise<StoredChoice | null> {
    await tx.query('SELECT FROM sowing_choice WHERE room_id = $1 AND crop_id = $2 FOR UPDATE', [
      roomId,
      cropId,
    ]);
    return (await this.choices(tx, roomId)).find((choice) => choice.cropId === cropId) ?? null;
  }

  /** Puts a crop on the calendar, or changes how it is sown. */
  async choose(tx: Tx, roomId: string, cropId: string, everyDays: number | null): Promise<void> {
    await tx.upsert(SowingChoiceEntity, { roomId, cropId, everyDays }, ['roomId', 'cropId']);
  }

  /** Takes a crop off the calendar. */
  async unchoose(tx: Tx, roomId: string, cropId: string): Promise<void> {
    await tx.delete(SowingChoiceEntity, { roomId, cropId });
  }

  /** Remembers the task that was made of a crop. */
  async setTask(tx: Tx, roomId: string, cropId: string, taskId: string): Promise<void> {
    await tx.update(SowingChoiceEntity, { roomId, cropId }, { taskId });
  }

  /** Days on which crops were sown from a day on, by crop, in order. */
  async sownSince(tx: Tx, roomId: string, from: string): Promise<Map<string, string[]>> {
    const rows: { cropId: string; days: string[] }[] = await tx.query(
      `SELECT crop_id AS "cropId", array_agg(DISTINCT started_on::text ORDER BY started_on::text) AS days
       FROM planting WHERE room_id = $1 AND origin = 'sown' AND crop_id IS NOT NULL AND started_on >= $2
       GROUP BY crop_id`,
      [roomId, from],
    );
    return new Map(rows.map(({ cropId, days }) => [cropId, days]));
  }
}
