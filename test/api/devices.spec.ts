import { createHash } from 'node:crypto';
import type { Device, Sensor } from '@shared/contracts/devices';
import type { Problem } from '@shared/contracts/problem';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { DeviceEntity } from '../../server/devices/device-entity';
import { PlacementEntity } from '../../server/devices/placement-entity';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf } from '../builders/rooms';
import { Caller } from './caller';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('devices', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let tx: TestApplication['tx'];

  beforeAll(async () => {
    application = await startTestApplication();
    tx = application.tx;
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  const here = () => ({ roomId: staff.room.id });
  const problemOf = (reply: { body: unknown }): Problem => reply.body as Problem;

  /** 401 for a token that is not taken; a reading of an unknown sensor is only refused. */
  const statusWith = async (token: string): Promise<number> => {
    const pack = [{ n: 'no-such-sensor', t: 1_776_247_200, v: 1 }];
    const reply = await Caller.withBearer(application.express, token)
      .call('post', '/devices/readings')
      .set('Content-Type', 'application/senml+json')
      .send(JSON.stringify(pack));
    return reply.status;
  };

  describe('a token', () => {
    it('is shown once, works, and only its hash is kept', async () => {
      const reply = await staff.keeper.post(`${staff.path}/devices`, { name: 'Rack A' }).expect(201);
      const { device, token } = reply.body as { device: Device; token: string };

      expect(token).toMatch(/^[\w-]{43}$/); // 32 bytes in base64url
      expect(device).toEqual({
        id: device.id,
        name: 'Rack A',
        lastSeenAt: null,
        batteryPct: null,
        revokedAt: null,
        sensors: [],
      });
      expect(await statusWith(token)).toBe(200);
      const kept = await tx.findOneByOrFail(DeviceEntity, { id: device.id });
      expect(kept.tokenHash).toBe(createHash('sha256').update(token).digest('hex'));
      const notes = await tx.findBy(AuditEntryEntity, { subjectId: device.id });
      expect(JSON.stringify([notes, (await staff.keeper.get(`${staff.path}/devices`)).body])).not.toContain(
        token,
      );
    });

    it('is renewed: the new one works and the old one stops at once', async () => {
      const { device, token } = await aDevice(tx, here());

      const reply = await staff.keeper.post(`${staff.path}/devices/${device.id}/token`).expect(200);

      expect(await statusWith(token)).toBe(401);
      expect(await statusWith((reply.body as { token: string }).token)).toBe(200);
    });

    it('of a revoked device stops, and its sensors leave their shelves', async () => {
      const { device, token } = await aDevice(tx, here());
      const sensor = await aSensor(tx, { deviceId: device.id });
      await aPlacement(tx, { sensorId: sensor.id });

      await staff.keeper.delete(`${staff.path}/devices/${device.id}`).expect(204);

      expect(await statusWith(token)).toBe(401);
      const [placement] = await tx.findBy(PlacementEntity, { sensorId: sensor.id });
      expect(placement?.toAt).toEqual(application.now);
      const listed = (await staff.viewer.get(`${staff.path}/devices`)).body as Device[];
      expect(listed.find(({ id }) => id === device.id)).toMatchObject({
        revokedAt: application.now.toISOString(),
        sensors: [{ id: sensor.id, shelfId: null }],
      });
      await staff.keeper.post(`${staff.path}/devices/${device.id}/token`).expect(404);
    });

    it.each(['', 'short', 'x'.repeat(43)])('that nobody was given (%j) is refused', async (token) => {
      expect(await statusWith(token)).toBe(401);
    });
  });

  describe('a sensor', () => {
    const add = (deviceId: string, body: object) =>
      staff.keeper.post(`${staff.path}/devices/${deviceId}/sensors`, body);

    it('is added without a place, and listed with its device', async () => {
      const { device } = await aDevice(tx, here());

      const reply = await add(device.id, {
        key: 'air',
        quantity: 'airTemperature',
        expectedIntervalS: 60,
      }).expect(201);

      expect(reply.body).toEqual({
        id: (reply.body as Sensor).id,
        deviceId: device.id,
        key: 'air',
        quantity: 'airTemperature',
        expectedIntervalS: 60,
        lightThreshold: null,
        shelfId: null,
        latestAt: null,
      });
      const listed = (await staff.viewer.get(`${staff.path}/devices`)).body as Device[];
      expect(listed.find(({ id }) => id === device.id)?.sensors).toEqual([reply.body]);
    });

    it('of light sees light from a usual value on, or from the one given', async () => {
      const { device } = await aDevice(tx, here());
      const light = { quantity: 'ppfd', expectedIntervalS: 60 };

      const usual = await add(device.id, { ...light, key: 'a' }).expect(201);
      const given = await add(device.id, { ...light, key: 'b', lightThreshold: 0 }).expect(201);
      const refused = await add(device.id, {
        ...light,
        key: 'c',
        quantity: 'airTemperature',
        lightThreshold: 5,
      }).expect(422);

      expect((usual.body as Sensor).lightThreshold).toBe(10);
      expect((given.body as Sensor).lightThreshold).toBe(0);
      expect(problemOf(refused).errors?.map(({ path }) => path)).toEqual(['body.lightThreshold']);
    });

    it('has a key of its own on its device', async () => {
      const { deviceId } = await aSensor(tx, { ...here(), key: 'air' });

      const refused = await add(deviceId, {
        key: 'air',
        quantity: 'relativeHumidity',
        expectedIntervalS: 60,
      }).expect(422);

      expect(problemOf(refused).errors?.map(({ path }) => path)).toEqual(['body.key']);
    });
  });

  describe('placing a sensor', () => {
    const place = (sensorId: string, shelfId: string, from: string) =>
      staff.keeper.post(`${staff.path}/sensors/${sensorId}/placements`, { shelfId, from });
    const history = async (sensorId: string): Promise<unknown[]> => {
      const placements = await tx.find(PlacementEntity, { where: { sensorId }, order: { fromAt: 'ASC' } });
      return placements.map(({ shelfId, fromAt, toAt }) => [
        shelfId,
        fromAt.toISOString(),
        toAt?.toISOString() ?? null,
      ]);
    };
    const [march, april] = ['2026-03-01T00:00:00.000Z', '2026-04-01T00:00:00.000Z'];

    it('on another shelf ends the earlier placement where the new one begins', async () => {
      const [first, second] = [await aShelf(tx, here()), await aShelf(tx, here())];
      const sensor = await aSensor(tx, here());

      await place(sensor.id, first.id, march).expect(201);
      const reply = await place(sensor.id, second.id, '2026-04-01T01:00:00+01:00').expect(201);

      expect((reply.body as Sensor).shelfId).toBe(second.id);
      expect(await history(sensor.id)).toEqual([
        [first.id, march, april],
        [second.id, april, null],
      ]);
    });

    it('from the very instant of the last placement corrects it', async () => {
      const [wrong, right] = [await aShelf(tx, here()), await aShelf(tx, here())];
      const sensor = await aSensor(tx, here());
      await place(sensor.id, wrong.id, march).expect(201);

      await place(sensor.id, right.id, march).expect(201);

      expect(await history(sensor.id)).toEqual([[right.id, march, null]]);
    });

    it('where it is already changes nothing', async () => {
      const shelf = await aShelf(tx, here());
      const sensor = await aSensor(tx, here());
      await place(sensor.id, shelf.id, march).expect(201);

      await place(sensor.id, shelf.id, april).expect(201);

      expect(await history(sensor.id)).toEqual([[shelf.id, march, null]]);
    });

    it('before its last placement is refused, and so is a time to come', async () => {
      const [first, second] = [await aShelf(tx, here()), await aShelf(tx, here())];
      const sensor = await aSensor(tx, here());
      await place(sensor.id, first.id, april).expect(201);

      const early = await place(sensor.id, second.id, march).expect(409);
      const late = await place(sensor.id, second.id, '2026-04-15T10:03:00Z').expect(422);

      expect(problemOf(early).code).toBe('PLACED_LATER');
      expect(problemOf(late).errors?.map(({ path }) => path)).toEqual(['body.from']);
      expect(await history(sensor.id)).toEqual([[first.id, april, null]]);
    });

    it('twice at once leaves it on one shelf', async () => {
      const [first, second] = [await aShelf(tx, here()), await aShelf(tx, here())];
      const sensor = await aSensor(tx, here());

      await Promise.all([place(sensor.id, first.id, march), place(sensor.id, second.id, march)]);

      expect(await history(sensor.id)).toHaveLength(1);
    });

    it('on a retired shelf or one of another room is refused', async () => {
      const retired = await aShelf(tx, { ...here(), retiredAt: new Date(march) });
      const foreign = await aShelf(tx);
      const sensor = await aSensor(tx, here());

      await place(sensor.id, retired.id, april).expect(404);
      await place(sensor.id, foreign.id, april).expect(404);
    });
  });
});
