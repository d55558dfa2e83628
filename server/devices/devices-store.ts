import type { MeasuredQuantity } from '@shared/climate/quantity';
import type { Device, Sensor } from '@shared/contracts/devices';
import type { Tx } from '../database/transactions';
import { violatedConstraint } from '../database/violated-constraint';
import { conflict, invalidField, notFound } from '../http/request-problem';
import type { DeviceAccess } from '../http/route';
import { DeviceEntity } from './device-entity';
import { PlacementEntity } from './placement-entity';
import { SensorEntity } from './sensor-entity';

/** A sensor to add. */
export interface NewSensor {
  readonly key: string;
  readonly quantity: MeasuredQuantity;
  readonly expectedIntervalS: number;
  readonly lightThreshold: number | null;
}

type SensorRow = Omit<Sensor, 'latestAt'> & { readonly latestAt: Date | null };

const sensorsOfRoom = `
  SELECT sensor.id, sensor.device_id AS "deviceId", sensor.key, sensor.quantity,
    sensor.expected_interval_s AS "expectedIntervalS", sensor.light_threshold AS "lightThreshold",
    placement.shelf_id AS "shelfId", state.latest_at AS "latestAt"
  FROM sensor
  LEFT JOIN placement ON placement.sensor_id = sensor.id AND placement.to_at IS NULL
  LEFT JOIN sensor_state AS state ON state.sensor_id = sensor.id
  WHERE sensor.room_id = $1 AND sensor.retired_at IS NULL`;

/** Devices, their tokens' hashes, their sensors and where those are and were. */
export class DevicesStore {
  /** Every device of a room with its sensors, by name. */
  async devices(tx: Tx, roomId: string): Promise<Device[]> {
    const devices = await tx.find(DeviceEntity, { where: { roomId }, order: { name: 'ASC', id: 'ASC' } });
    const rows: SensorRow[] = await tx.query(`${sensorsOfRoom} ORDER BY sensor.key`, [roomId]);
    const sensors = rows.map(asSensor);
    return devices.map((device) => ({
      id: device.id,
      name: device.name,
      lastSeenAt: device.lastSeenAt?.toISOString() ?? null,
      batteryPct: device.batteryPct,
      revokedAt: device.revokedAt?.toISOString() ?? null,
      sensors: sensors.filter(({ deviceId }) => deviceId === device.id),
    }));
  }

  /** The device whose token has this hash, unless it was revoked. */
  async withTokenHash(tx: Tx, tokenHash: string): Promise<DeviceAccess | null> {
    const rows: DeviceAccess[] = await tx.query(
      `SELECT id, room_id AS "roomId" FROM device WHERE token_hash = $1 AND revoked_at IS NULL`,
      [tokenHash],
    );
    return rows[0] ?? null;
  }

  /** Adds a device and returns its id. */
  async add(tx: Tx, roomId: string, name: string, tokenHash: string): Promise<string> {
    const { id } = await tx.save(DeviceEntity, { roomId, name, tokenHash });
    return id;
  }

  /** Holds a device that is in use until the transaction ends; 404 when the room has no such device. */
  async lock(tx: Tx, roomId: string, deviceId: string): Promise<DeviceEntity> {
    const device = await tx
      .createQueryBuilder(DeviceEntity, 'device')
      .where('device.id = :deviceId AND device.roomId = :roomId AND device.revokedAt IS NULL', {
        deviceId,
        roomId,
      })
      .setLock('pessimistic_write')
      .getOne();
    if (device === null) throw notFound('device');
    return device;
  }

  /** Keeps another token's hash. */
  async setTokenHash(tx: Tx, deviceId: string, tokenHash: string): Promise<void> {
    await tx.update(DeviceEntity, { id: deviceId }, { tokenHash });
  }

  /** Stops a device, and returns the ids of its sensors that left their shelves by it. */
  async revoke(tx: Tx, deviceId: string, at: Date): Promise<string[]> {
    await tx.update(DeviceEntity, { id: deviceId }, { revokedAt: at });
    const [left]: [{ sensorId: string }[], number] = await tx.query(
      `UPDATE placement SET to_at = $2
       FROM sensor WHERE sensor.id = placement.sensor_id AND sensor.device_id = $1
         AND placement.to_at IS NULL AND placement.from_at < $2
       RETURNING placement.sensor_id AS "sensorId"`,
      [deviceId, at],
    );
    return left.map(({ sensorId }) => sensorId);
  }

  /** Adds a sensor and returns its id. */
  async addSensor(tx: Tx, roomId: string, deviceId: string, sensor: NewSensor): Promise<string> {
    try {
      const { id } = await tx.save(SensorEntity, { ...sensor, roomId, deviceId });
      return id;
    } catch (error) {
      if (violatedConstraint(error) !== 'sensor_device_key_key') throw error;
      throw invalidField('body.key', 'is the key of another sensor of this device');
    }
  }

  /** One sensor with where it is now; 404 when the room has no such sensor. */
  async sensor(tx: Tx, roomId: string, sensorId: string): Promise<Sensor> {
    const rows: SensorRow[] = await tx.query(`${sensorsOfRoom} AND sensor.id = $2`, [roomId, sensorId]);
    const row = rows[0];
    if (row === undefined) throw notFound('sensor');
    return asSensor(row);
  }

  /** Holds a sensor until the transaction ends; 404 when the room has no such sensor. */
  async lockSensor(tx: Tx, roomId: string, sensorId: string): Promise<void> {
    const rows: unknown[] = await tx.query(
      `SELECT FROM sensor WHERE id = $1 AND room_id = $2 AND retired_at IS NULL FOR UPDATE`,
      [sensorId, roomId],
    );
    if (rows.length === 0) throw notFound('sensor');
  }

  /** The newest placement of a sensor, or null. */
  newestPlacement(tx: Tx, sensorId: string): Promise<PlacementEntity | null> {
    return tx.findOne(PlacementEntity, { where: { sensorId }, order: { fromAt: 'DESC' } });
  }

  /** The first placement of a sensor, or null. */
  firstPlacement(tx: Tx, sensorId: string): Promise<PlacementEntity | null> {
    return tx.findOne(PlacementEntity, { where: { sensorId }, order: { fromAt: 'ASC' } });
  }

  /** Moves a placement to another shelf, for all of its time. */
  async correctPlacement(tx: Tx, placementId: string, shelfId: string): Promise<void> {
    await tx.update(PlacementEntity, { id: placementId }, { shelfId });
  }

  /** Has a placement begin at another time. */
  async beginPlacement(tx: Tx, placementId: string, at: Date): Promise<void> {
    await tx.update(PlacementEntity, { id: placementId }, { fromAt: at });
  }

  /** Ends a placement. */
  async endPlacement(tx: Tx, placementId: string, at: Date): Promise<void> {
    await tx.update(PlacementEntity, { id: placementId }, { toAt: at });
  }

  /** Puts a sensor on a shelf from an instant on. */
  async addPlacement(tx: Tx, sensorId: string, shelfId: string, fromAt: Date): Promise<void> {
    try {
      await tx.insert(PlacementEntity, { sensorId, shelfId, fromAt });
    } catch (error) {
      if (violatedConstraint(error) !== 'placement_one_shelf_at_a_time') throw error;
      throw conflict('PLACED_ELSEWHERE', 'The sensor is on another shelf at that time.');
    }
  }
}

function asSensor({ latestAt, ...sensor }: SensorRow): Sensor {
  return { ...sensor, latestAt: latestAt?.toISOString() ?? null };
}
