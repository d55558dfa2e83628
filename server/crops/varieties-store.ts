import type { Tx } from '../database/transactions';
import { violatedConstraint } from '../database/violated-constraint';
import { invalidField, notFound } from '../http/request-problem';
import { VarietyEntity } from './variety-entity';

/** A variety as it is stored. */
export type StoredVariety = Pick<VarietyEntity, 'id' | 'cropId' | 'name' | 'note'>;

/** The varieties of rooms. */
export class VarietiesStore {
  /** All of a room. */
  ofRoom(tx: Tx, roomId: string): Promise<StoredVariety[]> {
    return tx.find(VarietyEntity, { where: { roomId }, order: { name: 'ASC' } });
  }

  /** One, held until the transaction ends; 404 when the room has none such. */
  async lock(tx: Tx, roomId: string, id: string): Promise<StoredVariety> {
    const found = await tx.findOne(VarietyEntity, {
      where: { roomId, id },
      lock: { mode: 'pessimistic_write' },
    });
    if (found === null) throw notFound('variety');
    return found;
  }

  /** Adds a variety and returns its id; 422 when the crop has one of that name. */
  async add(tx: Tx, roomId: string, variety: Omit<StoredVariety, 'id'>): Promise<string> {
    return withFreeName(async () => (await tx.save(VarietyEntity, { ...variety, roomId })).id);
  }

  /** Adds a variety that is not there yet. */
  async ensure(tx: Tx, roomId: string, cropId: string, name: string): Promise<void> {
    await tx.query(
      `INSERT INTO variety (room_id, crop_id, name) VALUES ($1, $2, $3)
       ON CONFLICT ON CONSTRAINT variety_room_crop_name_key DO NOTHING`,
      [roomId, cropId, name],
    );
  }

  /** Changes name or note; 422 when the crop has another of that name. */
  async change(tx: Tx, id: string, change: Partial<Pick<StoredVariety, 'name' | 'note'>>): Promise<void> {
    await withFreeName(() => tx.update(VarietyEntity, { id }, change));
  }

  /** Gives lots and plantings of a variety its new name. */
  async rename(tx: Tx, roomId: string, { cropId, name }: StoredVariety, to: string): Promise<void> {
    for (const table of ['seed_lot', 'planting']) {
      await tx.query(
        `UPDATE ${table} SET variety = $4 WHERE room_id = $1 AND crop_id = $2 AND variety = $3`,
        [roomId, cropId, name, to],
      );
    }
  }

  /** Whether a lot or a planting names a variety. */
  async isNamed(tx: Tx, roomId: string, { cropId, name }: StoredVariety): Promise<boolean> {
    const rows: unknown[] = await tx.query(
      `SELECT FROM seed_lot WHERE room_id = $1 AND crop_id = $2 AND variety = $3
       UNION ALL SELECT FROM planting WHERE room_id = $1 AND crop_id = $2 AND variety = $3 LIMIT 1`,
      [roomId, cropId, name],
    );
    return rows.length > 0;
  }

  /** Removes a variety. */
  async remove(tx: Tx, id: string): Promise<void> {
    await tx.delete(VarietyEntity, { id });
  }
}

async function withFreeName<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (violatedConstraint(error) !== 'variety_room_crop_name_key') throw error;
    throw invalidField('body.name', 'is the name of another variety of this crop');
  }
}
