import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aMember } from '../builders/people';
import { aShelf } from '../builders/rooms';
import { Caller } from './caller';
import { startTestApplication, type TestApplication } from './test-application';

const minute = 60_000;

describe('a sensor that falls silent', () => {
  let application: TestApplication;
  beforeAll(async () => {
    application = await startTestApplication();
  });
  afterAll(() => application.stop());

  /** A device with two sensors on a shelf of a room with one member. */
  async function aWatchedDevice(): Promise<{
    post: (readings: Record<string, number>) => Promise<void>;
    roomId: string;
  }> {
    const { tx, express } = application;
    const shelf = await aShelf(tx);
    await aMember(tx, { roomId: shelf.roomId });
    const { device, token } = await aDevice(tx, { roomId: shelf.roomId });
    for (const key of ['air', 'root']) {
      const quantity = key === 'air' ? 'airTemperature' : 'rootZoneTemperature';
      const sensor = await aSensor(tx, { deviceId: device.id, key, quantity });
      await aPlacement(tx, { sensorId: sensor.id, shelfId: shelf.id });
    }
    const caller = Caller.withBearer(express, token);
    const post = async (readings: Record<string, number>): Promise<void> => {
      const pack = Object.entries(readings).map(([key, minutesAgo]) => ({
        n: key,
        t: (application.now.getTime() - minutesAgo * minute) / 1000,
        v: 20 + minutesAgo / 1000,
      }));
      await caller.call('post', '/devices/readings').send(pack).expect(200);
    };
    return { post, roomId: shelf.roomId };
  }

  async function silences(roomId: string): Promise<unknown[]> {
    await application.app.services.secondLookJob.run();
    return application.tx.query(
      `SELECT kind, urgency, cleared_at IS NULL AS open, told_at IS NOT NULL AS told
       FROM alert WHERE room_id = $1 AND kind IN ('sensorSilent', 'deviceSilent') ORDER BY kind, began_at`,
      [roomId],
    );
  }

  it('with its whole device is one alert about the device, which clears with the next reading', async () => {
    const { post, roomId } = await aWatchedDevice();
    await post({ air: 1, root: 1 });
    expect(await silences(roomId)).toEqual([]);
    const silent = { kind: 'deviceSilent', open: true, told: true };
    application.now = new Date(application.now.getTime() + 40 * minute);
    expect(await silences(roomId)).toEqual([{ ...silent, urgency: 'lookToday' }]);
    application.now = new Date(application.now.getTime() + 2 * 60 * minute);
    expect(await silences(roomId)).toEqual([{ ...silent, urgency: 'goNow' }]);
    await post({ air: 0, root: 0 });
    expect(await silences(roomId)).toEqual([{ ...silent, urgency: 'goNow', open: false }]);
  });

  it('alone, while its device goes on, is named alone', async () => {
    const { post, roomId } = await aWatchedDevice();
    await post({ air: 1, root: 1 });
    application.now = new Date(application.now.getTime() + 40 * minute);
    await post({ air: 20 });
    await post({ air: 0 });
    const silent = { kind: 'sensorSilent', urgency: 'lookToday', open: true, told: true };
    expect(await silences(roomId)).toEqual([silent]);
    await post({ root: 0 });
    expect(await silences(roomId)).toEqual([{ ...silent, open: false }]);
  });

  it('longer than its device is named alone once the device is back', async () => {
    const { post, roomId } = await aWatchedDevice();
    await post({ air: 1, root: 1 });
    application.now = new Date(application.now.getTime() + 60 * minute);
    await post({ air: 0 });
    const ofDevice = { kind: 'deviceSilent', urgency: 'lookToday', open: false, told: false };
    expect(await silences(roomId)).toEqual([ofDevice]);
    application.now = new Date(application.now.getTime() + 20 * minute);
    await post({ air: 0 });
    expect(await silences(roomId)).toEqual([ofDevice]);
    application.now = new Date(application.now.getTime() + 20 * minute);
    await post({ air: 0 });
    const alone = { kind: 'sensorSilent', urgency: 'lookToday', open: true, told: true };
    expect(await silences(roomId)).toEqual([ofDevice, alone]);
  });

  it('is not made out of a device that catches up with old readings', async () => {
    const { post, roomId } = await aWatchedDevice();
    await post({ air: 5_000, root: 5_000 });
    expect(await silences(roomId)).toEqual([]);
  });
});
