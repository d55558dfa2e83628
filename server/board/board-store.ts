import type { MeasuredQuantity } from '@shared/climate/quantity';
import type { Tx } from '../database/transactions';

/** A shelf with what the board shows beside its readings. */
export interface ShelfRow {
  readonly rackId: string;
  readonly rackName: string;
  readonly rackNote: string;
  /** Null for a rack without shelves. */
  readonly shelfId: string | null;
  readonly label: string;
  readonly leafOffsetC: number;
  readonly heatMatOn: boolean | null;
  readonly hasLamp: boolean;
}

/** The newest reading of a sensor on a shelf. */
export interface LatestReading {
  readonly shelfId: string;
  readonly sensorId: string;
  readonly quantity: MeasuredQuantity;
  readonly expectedIntervalS: number;
  readonly lightThreshold: number | null;
  readonly luxPerUmol: number | null;
  /** Its device reports by itself; sensors that files speak for never do. */
  readonly isLive: boolean;
  readonly at: number | null;
  readonly value: number;
  readonly flags: number;
}

/** A light sensor's day so far. */
export interface LightToday {
  readonly sensorId: string;
  readonly aboveThresholdMs: number | null;
  readonly integralMs: number;
}

/** Queries for the room as it is now. */
export class BoardStore {
  /** Racks with their shelves in use, in the order they are drawn. */
  async shelves(tx: Tx, roomId: string): Promise<ShelfRow[]> {
    const rows: Record<string, never>[] = await tx.query(
      `SELECT r.id AS "rackId", r.name AS "rackName", r.note AS "rackNote", s.id AS "shelfId",
              coalesce(s.label, '') AS label, coalesce(s.leaf_offset_c, 0) AS "leafOffsetC", m.is_on AS "heatMatOn",
              EXISTS (SELECT 1 FROM lamp l WHERE l.shelf_id = s.id AND l.removed_on IS NULL) AS "hasLamp"
       FROM rack r
       LEFT JOIN shelf s ON s.rack_id = r.id AND s.retired_at IS NULL
       LEFT JOIN heat_mat m ON m.shelf_id = s.id
       WHERE r.room_id = $1 ORDER BY r.position, r.id, s.position, s.id`,
      [roomId],
    );
    return rows as unknown as ShelfRow[];
  }

  /** The newest reading of every sensor that is now on one of the shelves. */
  async latest(tx: Tx, shelfIds: readonly string[]): Promise<LatestReading[]> {
    const rows: (Omit<LatestReading, 'at'> & { at: Date | null })[] = await tx.query(
      `SELECT p.shelf_id AS "shelfId", s.id AS "sensorId", s.quantity, s.expected_interval_s AS "expectedIntervalS",
              s.light_threshold AS "lightThreshold", st.latest_at AS at, st.latest_value AS value,
              st.latest_flags AS flags,
              d.last_seen_at IS NOT NULL AND d.revoked_at IS NULL AS "isLive",
              (SELECT l.lux_per_umol FROM lamp l WHERE l.shelf_id = p.shelf_id AND l.removed_on IS NULL
               ORDER BY l.fitted_on DESC, l.id LIMIT 1) AS "luxPerUmol"
       FROM placement p
       JOIN sensor s ON s.id = p.sensor_id AND s.retired_at IS NULL
       JOIN device d ON d.id = s.device_id
       LEFT JOIN sensor_state st ON st.sensor_id = s.id
       WHERE p.shelf_id = ANY($1) AND p.to_at IS NULL
       ORDER BY p.shelf_id, st.latest_at DESC NULLS LAST, s.id`,
      [shelfIds],
    );
    return rows.map((row) => ({ ...row, at: row.at?.getTime() ?? null }));
  }

  /** Sums of the day that began at an instant. */
  async lightOfDay(tx: Tx, sensorIds: readonly string[], dayStart: Date): Promise<LightToday[]> {
    return tx.query(
      `SELECT sensor_id AS "sensorId", above_threshold_ms AS "aboveThresholdMs", integral_ms AS "integralMs"
       FROM daily_summary WHERE sensor_id = ANY($1) AND start_at = $2`,
      [sensorIds, dayStart],
    );
  }
}
