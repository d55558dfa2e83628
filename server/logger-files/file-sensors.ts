import type { MeasuredQuantity } from '@shared/climate/quantity';
import type { MatchableSensor } from '@shared/logger-files/propose-matches';
import type { Tx } from '../database/transactions';
import { deviceTokenHash, newDeviceToken } from '../devices/device-tokens';
import type { DevicesStore } from '../devices/devices-store';
import type { PlacedSensor } from './off-shelf-count';

/** A series that gets a sensor of its own. */
export interface SensorWish {
  readonly key: string;
  readonly name: string;
  readonly quantity: MeasuredQuantity;
  readonly shelfId: string | null;
}

/** What new sensors have in common. */
export interface NewSensors {
  readonly roomId: string;
  /** Of the file that they come from. */
  readonly fileName: string;
  /** Step between its rows [s]. */
  readonly intervalS: number;
  /** The first reading. */
  readonly from: Date;
  readonly wishes: readonly SensorWish[];
}

/** A light sensor sees light above this. Common practice, no source. */
const lightThresholds: Partial<Record<MeasuredQuantity, number>> = { ppfd: 5, illuminance: 300 };

/** Finds and makes the sensors that the series of a file belong to. */
export class FileSensors {
  constructor(private readonly devices: DevicesStore) {}

  /** The room's sensors with what a file may call them. */
  async matchable(tx: Tx, roomId: string): Promise<MatchableSensor[]> {
    return tx.query(
      `SELECT sensor.id, sensor.quantity, shelf.label AS "shelfLabel", sensor.key AS label, device.name AS "deviceName"
       FROM sensor
       JOIN device ON device.id = sensor.device_id
       LEFT JOIN placement ON placement.sensor_id = sensor.id AND placement.to_at IS NULL
       LEFT JOIN shelf ON shelf.id = placement.shelf_id
       WHERE sensor.room_id = $1 AND sensor.retired_at IS NULL ORDER BY sensor.id`,
      [roomId],
    );
  }

  /** Where these sensors were; null for null. */
  async placed(tx: Tx, sensorIds: readonly (string | null)[]): Promise<(PlacedSensor | null)[]> {
    const rows: { sensor_id: string; label: string; from_at: Date; to_at: Date | null }[] = await tx.query(
      `SELECT placement.sensor_id, shelf.label, placement.from_at, placement.to_at
       FROM placement JOIN shelf ON shelf.id = placement.shelf_id
       WHERE placement.sensor_id = ANY($1) ORDER BY placement.from_at`,
      [sensorIds.filter((id) => id !== null)],
    );
    return sensorIds.map((sensorId) => {
      if (sensorId === null) return null;
      const stays = rows
        .filter((row) => row.sensor_id === sensorId)
        .map((row) => ({
          shelfLabel: row.label,
          from: row.from_at.getTime(),
          to: row.to_at?.getTime() ?? Infinity,
        }));
      return { sensorId, stays };
    });
  }

  /** Which of these shelves the room has. */
  async shelvesOf(tx: Tx, roomId: string, shelfIds: readonly string[]): Promise<Set<string>> {
    const rows: { id: string }[] = await tx.query(
      'SELECT id FROM shelf WHERE room_id = $1 AND id = ANY($2)',
      [roomId, shelfIds],
    );
    return new Set(rows.map(({ id }) => id));
  }

  /**
   * Makes sensors for a file, on a device that stands for the logger and never reports by itself.
   *
   * @returns The device, and the sensors by the keys of their series.
   */
  async make(tx: Tx, { roomId, fileName, intervalS, from, wishes }: NewSensors): Promise<MadeSensors> {
    // Nobody ever learns this token.
    const deviceId = await this.devices.add(tx, roomId, fileName, deviceTokenHash(newDeviceToken()));
    const sensorIds = new Map<string, string>();
    for (const [index, { key, name, quantity, shelfId }] of wishes.entries()) {
      const sensorId = await this.devices.addSensor(tx, roomId, deviceId, {
        key: `${name.slice(0, 60) || quantity} ${index + 1}`,
        quantity,
        expectedIntervalS: Math.max(1, Math.round(intervalS)),
        lightThreshold: lightThresholds[quantity] ?? null,
      });
      if (shelfId !== null) await this.devices.addPlacement(tx, sensorId, shelfId, from);
      sensorIds.set(key, sensorId);
    }
    return { deviceId, sensorIds };
  }

  /** Removes the device that was made for a file, if nothing is held of its sensors any more. */
  async unmake(tx: Tx, deviceId: string): Promise<boolean> {
    const rows: { is_empty: boolean }[] = await tx.query(
      `SELECT NOT EXISTS (
         SELECT 1 FROM sensor CROSS JOIN LATERAL (SELECT 1 FROM reading WHERE sensor_id = sensor.id LIMIT 1) AS held
         WHERE sensor.device_id = $1
       ) AS is_empty`,
      [deviceId],
    );
    if (rows[0]?.is_empty !== true) return false;
    await tx.query('DELETE FROM device WHERE id = $1', [deviceId]);
    return true;
  }
}

/** What {@link FileSensors.make} made. */
export interface MadeSensors {
  readonly deviceId: string;
  readonly sensorIds: ReadonlyMap<string, string>;
}
