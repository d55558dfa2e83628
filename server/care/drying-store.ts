import type { Watering } from '@shared/growing/drying';
import type { Tx } from '../database/transactions';

/** What drying is worked out from. */
export class DryingStore {
  /** Waterings of a planting since an instant, in order. */
  async waterings(tx: Tx, plantingId: string, since: Date): Promise<Watering[]> {
    const rows: { at: Date; millilitres: number | null }[] = await tx.query(
      `SELECT at, millilitres FROM planting_event
       WHERE planting_id = $1 AND kind = 'watered' AND at >= $2 ORDER BY at, seq`,
      [plantingId, since],
    );
    return rows.map(({ at, millilitres }) => ({ at: at.getTime(), millilitres }));
  }

  /** Days after which a planting's routine by drying falls back; null without one. */
  async fallbackDays(tx: Tx, plantingId: string): Promise<number | null> {
    const rows: { every_days: number }[] = await tx.query(
      `SELECT every_days FROM routine
       WHERE planting_id = $1 AND timing = 'byDrying' AND ended_at IS NULL ORDER BY created_at LIMIT 1`,
      [plantingId],
    );
    return rows[0]?.every_days ?? null;
  }
}
