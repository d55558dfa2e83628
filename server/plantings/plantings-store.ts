import { In, IsNull } from 'typeorm';
import type { PlantingSummary } from '@shared/contracts/board';
import type { Planting } from '@shared/contracts/plantings';
import type { Tx } from '../database/transactions';
import type { Cursor } from '../http/cursor';
import { notFound } from '../http/request-problem';
import { PlantingEntity } from './planting-entity';

/** Which plantings to list. */
export interface PlantingFilter {
  readonly state: 'growing' | 'ended' | 'all';
  readonly cropId?: string | undefined;
  readonly lotId?: string | undefined;
  readonly shelfId?: string | undefined;
  readonly after: Cursor | null;
  readonly limit: number;
}

/** A planting in a list, with the instant that it is ordered by. */
export interface ListedPlanting {
  readonly planting: Planting;
  readonly startedAt: Date;
}

/** What a new planting is beside what its events leave. */
export type NewPlantingRow = Pick<
  PlantingEntity,
  'roomId' | 'cropId' | 'crop' | 'variety' | 'habit' | 'lotId' | 'source' | 'depthMm'
>;

/** What events leave, in the words of the table. */
export type PlantingProjection = Omit<
  PlantingEntity,
  keyof NewPlantingRow | 'id' | 'createdAt' | 'room' | 'shelf' | 'lot'
>;

const plantings = `
  SELECT planting.id, planting.crop_id AS "cropId", planting.crop, planting.variety, planting.habit, planting.stage,
    planting.stage_since::text AS "stageSince", planting.started_on::text AS "startedOn",
    planting.ended_on::text AS "endedOn", planting.origin, planting.sown, planting.up, planting.count,
    planting.container, planting.shelf_id AS "shelfId", shelf.label AS "shelfLabel",
    planting.harvested_grams AS "harvestedGrams", planting.harvested_count AS "harvestedCount",
    planting.started_at AS "startedAt"
  FROM planting LEFT JOIN shelf ON shelf.id = planting.shelf_id
  WHERE planting.room_id = $1`;

/** What grows where, and what grew. */
export class PlantingsStore {
  /**
   * What grows on shelves now.
   *
   * @param tx - To read with.
   * @param shelfIds - Any shelves; each has an entry in the answer.
   * @returns By shelf: its plantings that have not ended, oldest first.
   */
  async plantingsOn(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, PlantingEntity[]>> {
    const found = await tx.find(PlantingEntity, {
      where: { shelfId: In([...shelfIds]), endedOn: IsNull() },
      order: { startedAt: 'ASC', createdAt: 'ASC', id: 'ASC' },
    });
    const byShelf = new Map<string | null, PlantingEntity[]>(shelfIds.map((shelfId) => [shelfId, []]));
    for (const planting of found) byShelf.get(planting.shelfId)?.push(planting);
    return byShelf as Map<string, PlantingEntity[]>;
  }

  /** Plantings of a room, newest first. */
  async list(tx: Tx, roomId: string, filter: PlantingFilter): Promise<ListedPlanting[]> {
    const { state, cropId, lotId, shelfId, after, limit } = filter;
    const rows: (Planting & { startedAt: Date })[] = await tx.query(
      `${plantings}
       AND ($2 = 'all' OR (planting.ended_on IS NULL) = ($2 = 'growing'))
       AND ($3::text IS NULL OR planting.crop_id = $3) AND ($4::uuid IS NULL OR planting.lot_id = $4)
       AND ($5::uuid IS NULL OR planting.shelf_id = $5)
       AND ($6::timestamptz IS NULL OR (planting.started_at, planting.id) < ($6, $7::uuid))
       ORDER BY planting.started_at DESC, planting.id DESC LIMIT $8`,
      [
        roomId,
        state,
        cropId ?? null,
        lotId ?? null,
        shelfId ?? null,
        after?.at ?? null,
        after?.id ?? null,
        limit,
      ],
    );
    return rows.map(({ startedAt, ...planting }) => ({ planting, startedAt }));
  }

  /** One planting as a list shows it; 404 when the room has none such. */
  async listed(tx: Tx, roomId: string, plantingId: string): Promise<ListedPlanting> {
    const rows: (Planting & { startedAt: Date })[] = await tx.query(`${plantings} AND planting.id = $2`, [
      roomId,
      plantingId,
    ]);
    const row = rows[0];
    if (row === undefined) throw notFound('planting');
    const { startedAt, ...planting } = row;
    return { planting, startedAt };
  }

  /** One planting; 404 when the room has none such. */
  async planting(tx: Tx, roomId: string, plantingId: string): Promise<PlantingEntity> {
    const found = await tx.findOneBy(PlantingEntity, { roomId, id: plantingId });
    if (found === null) throw notFound('planting');
    return found;
  }

  /** One planting, held until the transaction ends; 404 when the room has none such. */
  async lock(tx: Tx, roomId: string, plantingId: string): Promise<PlantingEntity> {
    const found = await tx.findOne(PlantingEntity, {
      where: { roomId, id: plantingId },
      lock: { mode: 'pessimistic_write' },
    });
    if (found === null) throw notFound('planting');
    return found;
  }

  /** Adds a planting and returns its id. */
  async add(tx: Tx, planting: NewPlantingRow & PlantingProjection): Promise<string> {
    return (await tx.save(PlantingEntity, planting)).id;
  }

  /** Writes what its events leave, or corrects what is written of it. */
  async change(
    tx: Tx,
    plantingId: string,
    change: Partial<PlantingProjection & Pick<NewPlantingRow, 'variety' | 'source' | 'depthMm'>>,
  ): Promise<void> {
    if (Object.keys(change).length > 0) await tx.update(PlantingEntity, { id: plantingId }, change);
  }

  /** Removes a planting with its story. */
  async remove(tx: Tx, plantingId: string): Promise<void> {
    await tx.delete(PlantingEntity, { id: plantingId });
  }

  /** What came of the finished sowings of a lot. */
  trialsOf(tx: Tx, lotId: string): Promise<{ seeds: number; up: number }[]> {
    return tx.query(
      `SELECT sown AS seeds, up FROM planting
       WHERE lot_id = $1 AND sown IS NOT NULL AND stage NOT IN ('sown', 'emerging') ORDER BY started_at`,
      [lotId],
    );
  }
}

/** A planting as a label and a drawing need it. */
export function summaryOf(planting: PlantingEntity): PlantingSummary {
  const { id, crop, variety, habit, count, stage, startedOn, stageSince } = planting;
  return { id, crop, variety, habit, count, stage, startedOn, stageSince };
}
