import { createHash, randomBytes } from 'node:crypto';
import type { Tx } from '../../server/database/transactions';
import { DeviceEntity } from '../../server/devices/device-entity';
import { PlacementEntity } from '../../server/devices/placement-entity';
import { SensorEntity } from '../../server/devices/sensor-entity';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { aRoom, aShelf } from './rooms';
import { nextNumber, stored } from './stored';

/** A device with the token that it reports with. */
export interface DeviceWithToken {
  readonly device: DeviceEntity;
  readonly token: string;
}

/** A device in a room. */
export async function aDevice(tx: Tx, overrides: Partial<DeviceEntity> = {}): Promise<DeviceWithToken> {
  const token = randomBytes(32).toString('base64url');
  const device = await stored(tx, DeviceEntity, {
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    name: `Device ${nextNumber()}`,
    tokenHash: createHash('sha256').update(token).digest('hex'),
    ...overrides,
  });
  return { device, token };
}

/** A thermometer of a device of the same room, reporting every five minutes. */
export async function aSensor(tx: Tx, overrides: Partial<SensorEntity> = {}): Promise<SensorEntity> {
  const device =
    overrides.deviceId === undefined
      ? (await aDevice(tx, overrides.roomId === undefined ? {} : { roomId: overrides.roomId })).device
      : await tx.findOneByOrFail(DeviceEntity, { id: overrides.deviceId });
  return stored(tx, SensorEntity, {
    roomId: device.roomId,
    deviceId: device.id,
    key: `sensor-${nextNumber()}`,
    quantity: 'airTemperature',
    expectedIntervalS: 300,
    ...overrides,
  });
}

/** A sensor on a shelf of the same room since the start of 2026. */
export async function aPlacement(tx: Tx, overrides: Partial<PlacementEntity> = {}): Promise<PlacementEntity> {
  const sensor = await sensorFor(tx, overrides);
  return stored(tx, PlacementEntity, {
    sensorId: sensor.id,
    shelfId: overrides.shelfId ?? (await aShelf(tx, { roomId: sensor.roomId })).id,
    fromAt: new Date('2026-01-01T00:00:00Z'),
    ...overrides,
  });
}

async function sensorFor(
  tx: Tx,
  { sensorId, shelfId }: Pick<Partial<PlacementEntity>, 'sensorId' | 'shelfId'>,
): Promise<SensorEntity> {
  if (sensorId !== undefined) return tx.findOneByOrFail(SensorEntity, { id: sensorId });
  if (shelfId === undefined) return aSensor(tx);
  const { roomId } = await tx.findOneByOrFail(ShelfEntity, { id: shelfId });
  return aSensor(tx, { roomId });
}
