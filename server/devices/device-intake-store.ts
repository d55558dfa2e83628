import type { MeasuredQuantity } from '@shared/climate/quantity';
import type { Tx } from '../database/transactions';

/** Queries for taking a device's readings. */
export class DeviceIntakeStore {
  /** The device's sensors in use, by the name that the device gives them. */
  async sensorsOf(
    tx: Tx,
    deviceId: string,
  ): Promise<Map<string, { id: string; quantity: MeasuredQuantity }>> {
    const rows: { key: string; id: string; quantity: MeasuredQuantity }[] = await tx.query(
      'SELECT key, id, quantity FROM sensor WHERE device_id = $1 AND retired_at IS NULL',
      [deviceId],
    );
    return new Map(rows.map(({ key, id, quantity }) => [key, { id, quantity }]));
  }

  /** Notes when the device has reported, and its battery where it said so. */
  async noteSeen(tx: Tx, deviceId: string, at: Date, batteryPct: number | null): Promise<void> {
    await tx.query(
      'UPDATE device SET last_seen_at = $2, battery_pct = coalesce($3, battery_pct) WHERE id = $1',
      [deviceId, at, batteryPct],
    );
  }

  /** The newest reading held of each of a device's sensors. */
  async newest(tx: Tx, deviceId: string): Promise<{ sensor: string; latestAt: Date | null }[]> {
    return tx.query(
      `SELECT s.key AS sensor, st.latest_at AS "latestAt"
       FROM sensor s LEFT JOIN sensor_state st ON st.sensor_id = s.id
       WHERE s.device_id = $1 AND s.retired_at IS NULL ORDER BY s.key`,
      [deviceId],
    );
  }
}
