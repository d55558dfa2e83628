import type { MeasuredQuantity } from '@shared/climate/quantity';
import type { Device, Sensor } from '@shared/contracts/devices';
import type { RoomAuthor } from '../audit/room-author';
import type { RoomChanges } from '../audit/room-changes';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import { conflict, invalidField } from '../http/request-problem';
import type { DeviceAccess } from '../http/route';
import type { RoomsService } from '../rooms/rooms-service';
import { deviceTokenHash, newDeviceToken } from './device-tokens';
import type { DevicesStore, NewSensor } from './devices-store';

/** What other areas keep that goes by where sensors are. */
export interface DeviceHooks {
  /** From an instant on the sensor is on another shelf, or on none; called in the transaction of the change. */
  onPlacementsChanged(tx: Tx, sensorId: string, from: Date): Promise<void>;
  /** The sensor was on its first shelf over this span [ms] already; called in the transaction of the change. */
  onPlacedEarlier(tx: Tx, sensorId: string, span: { from: number; to: number }): Promise<void>;
}

/** What {@link DevicesService} works with. */
export interface DevicesParts {
  readonly transactions: Transactions;
  readonly devices: DevicesStore;
  readonly rooms: Pick<RoomsService, 'requireShelf'>;
  readonly changes: RoomChanges;
  readonly hooks: DeviceHooks;
  readonly now: Clock;
}

/** From which instant a sensor is on which shelf. */
export interface NewPlacement {
  readonly shelfId: string;
  readonly from: Date;
}

/** The clock of whoever asks may be this far ahead. */
const CLOCK_TOLERANCE_MS = 120_000;

/**
 * From which reading a new light sensor counts as lit: above the light of an aisle or a window nearby, below that of
 * any growing lamp. Common practice, no source; a keeper sets another where it does not fit.
 */
const usualLightThreshold: Readonly<Partial<Record<MeasuredQuantity, number>>> = {
  ppfd: 10,
  illuminance: 700,
};

/** Devices with their tokens, their sensors, and where those are. */
export class DevicesService {
  constructor(private readonly parts: DevicesParts) {}

  /** The device behind a token; null for a token that is unknown, renewed or revoked. For access control. */
  deviceOf(token: string): Promise<DeviceAccess | null> {
    const { devices, transactions } = this.parts;
    return devices.withTokenHash(transactions.plain, deviceTokenHash(token));
  }

  /** Every device of a room with its sensors, revoked ones included. */
  list(roomId: string): Promise<Device[]> {
    return this.parts.devices.devices(this.parts.transactions.plain, roomId);
  }

  /** Adds a device; its token is in this answer and nowhere else. */
  add(by: RoomAuthor, name: string): Promise<{ device: Device; token: string }> {
    const token = newDeviceToken();
    return this.parts.changes.make(by, async (tx) => {
      const id = await this.parts.devices.add(tx, by.roomId, name, deviceTokenHash(token));
      const device = { id, name, lastSeenAt: null, batteryPct: null, revokedAt: null, sensors: [] };
      return { result: { device, token }, action: 'device.add', subjectId: id, detail: { name } };
    });
  }

  /** Gives a device a new token; the old one stops at once. */
  renewToken(by: RoomAuthor, deviceId: string): Promise<{ token: string }> {
    const token = newDeviceToken();
    return this.parts.changes.make(by, async (tx) => {
      const { name } = await this.parts.devices.lock(tx, by.roomId, deviceId);
      await this.parts.devices.setTokenHash(tx, deviceId, deviceTokenHash(token));
      return { result: { token }, action: 'device.renew-token', subjectId: deviceId, detail: { name } };
    });
  }

  /** Stops a device's token and takes its sensors off their shelves, so that nobody waits for them; readings stay. */
  revoke(by: RoomAuthor, deviceId: string): Promise<void> {
    const { devices, hooks, now } = this.parts;
    return this.parts.changes.make(by, async (tx) => {
      const { name } = await devices.lock(tx, by.roomId, deviceId);
      const at = now();
      for (const sensorId of await devices.revoke(tx, deviceId, at)) {
        await hooks.onPlacementsChanged(tx, sensorId, at);
      }
      return { result: undefined, action: 'device.revoke', subjectId: deviceId, detail: { name } };
    });
  }

  /** Adds a sensor to a device; 422 when the device has one of that key, or when a threshold is no use to it. */
  async addSensor(
    by: RoomAuthor,
    deviceId: string,
    sensor: Omit<NewSensor, 'lightThreshold'> & { lightThreshold?: number | null | undefined },
  ): Promise<Sensor> {
    const { devices } = this.parts;
    const usual = usualLightThreshold[sensor.quantity] ?? null;
    const given = sensor.lightThreshold ?? null;
    if (usual === null && given !== null) {
      throw invalidField('body.lightThreshold', 'is only for sensors of light');
    }
    return this.parts.changes.make(by, async (tx) => {
      await devices.lock(tx, by.roomId, deviceId);
      const added = { ...sensor, lightThreshold: given ?? usual };
      const subjectId = await devices.addSensor(tx, by.roomId, deviceId, added);
      const result = await devices.sensor(tx, by.roomId, subjectId);
      return { result, action: 'sensor.add', subjectId, detail: { ...added, deviceId } };
    });
  }

  /**
   * Puts a sensor on a shelf from an instant on. Earlier readings stay where they were taken; a placement of the same
   * instant is corrected.
   *
   * @param by - Who does it.
   * @param sensorId - Which sensor.
   * @param placement - Where and from when.
   * @returns The sensor as it is placed now.
   * @throws {@link RequestProblem} 404 for a sensor or shelf of another room, 409 `PLACED_LATER` when a later placement
   *   is known, 422 for an instant that is still to come.
   */
  async place(by: RoomAuthor, sensorId: string, placement: NewPlacement): Promise<Sensor> {
    const { devices, rooms, hooks, now } = this.parts;
    const { shelfId, from } = placement;
    if (from.getTime() > now().getTime() + CLOCK_TOLERANCE_MS) {
      throw invalidField('body.from', 'is still to come');
    }
    return this.parts.changes.make(by, async (tx) => {
      await devices.lockSensor(tx, by.roomId, sensorId);
      await rooms.requireShelf(tx, by.roomId, shelfId);
      if (await this.move(tx, sensorId, placement)) await hooks.onPlacementsChanged(tx, sensorId, from);
      const result = await devices.sensor(tx, by.roomId, sensorId);
      const detail = { shelfId, from: from.toISOString() };
      return { result, action: 'sensor.place', subjectId: sensorId, detail };
    });
  }

  /**
   * Says that a sensor was on its first shelf earlier than was known. Only time in which it was on no shelf changes hands,
   * so nothing that any shelf shows is taken away; where it was in between, nobody has said, and nobody guesses.
   *
   * @param by - Who says so.
   * @param sensorId - Which sensor.
   * @param since - Since when; what is known already changes nothing.
   * @returns The sensor as it is placed now.
   * @throws {@link RequestProblem} 404 for a sensor of another room, 409 `NEVER_PLACED` for one without a shelf, 422 for
   *   an instant after its first.
   */
  async placeEarlier(by: RoomAuthor, sensorId: string, since: Date): Promise<Sensor> {
    const { devices, hooks } = this.parts;
    return this.parts.changes.make(by, async (tx) => {
      await devices.lockSensor(tx, by.roomId, sensorId);
      const first = await devices.firstPlacement(tx, sensorId);
      if (first === null) throw conflict('NEVER_PLACED', 'The sensor was never put on a shelf.');
      if (since > first.fromAt)
        throw invalidField('body.since', 'is after the sensor was put on its first shelf');
      if (since < first.fromAt) {
        await devices.beginPlacement(tx, first.id, since);
        await hooks.onPlacedEarlier(tx, sensorId, { from: since.getTime(), to: first.fromAt.getTime() - 1 });
      }
      const result = await devices.sensor(tx, by.roomId, sensorId);
      const detail = { shelfId: first.shelfId, since: since.toISOString(), was: first.fromAt.toISOString() };
      return { result, action: 'sensor.place-earlier', subjectId: sensorId, detail };
    });
  }

  /** False when the sensor is there already. */
  private async move(tx: Tx, sensorId: string, { shelfId, from }: NewPlacement): Promise<boolean> {
    const { devices } = this.parts;
    const newest = await devices.newestPlacement(tx, sensorId);
    if (newest !== null) {
      if (newest.fromAt > from) {
        throw conflict(
          'PLACED_LATER',
          'The sensor was placed again after that time; its history can’t be changed.',
        );
      }
      if (newest.shelfId === shelfId && newest.toAt === null) return false;
      if (newest.fromAt.getTime() === from.getTime()) {
        await devices.correctPlacement(tx, newest.id, shelfId);
        return true;
      }
      if (newest.toAt === null || newest.toAt > from) await devices.endPlacement(tx, newest.id, from);
    }
    await devices.addPlacement(tx, sensorId, shelfId, from);
    return true;
  }
}
