import type { Problem } from '@shared/contracts/problem';
import type { RangeTrial } from '@shared/contracts/rooms';
import { ReadingStore } from '../../server/readings/reading-store';
import { AlertEntity } from '../../server/alerts/alert-entity';
import { WantedRangeEntity } from '../../server/rooms/wanted-range-entity';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf } from '../builders/rooms';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;
const DAY_MS = 24 * HOUR_MS;

describe('trying a wanted range', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let now: number;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  beforeEach(async () => {
    application.now = new Date('2026-04-15T10:00:00Z');
    now = application.now.getTime();
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  /** A shelf with a thermometer every five minutes that reads 21 °C, but 28 °C for spans [hours ago, hours]. */
  async function aShelfThatWas(
    warm: readonly (readonly [hoursAgo: number, hours: number])[],
    days = 16,
  ): Promise<string> {
    const { tx } = application;
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    await warmSensor(shelf.id, warm, days);
    return `${staff.path}/shelves/${shelf.id}/wanted-ranges/airTemperature`;
  }
  async function warmSensor(
    shelfId: string,
    warm: readonly (readonly [hoursAgo: number, hours: number])[],
    days: number,
  ): Promise<void> {
    const { tx } = application;
    const { device } = await aDevice(tx, { roomId: staff.room.id });
    const sensor = await aSensor(tx, { deviceId: device.id });
    await aPlacement(tx, { sensorId: sensor.id, shelfId });
    const isWarm = (at: number): boolean =>
      warm.some(([ago, hours]) => at >= now - ago * HOUR_MS && at < now - (ago - hours) * HOUR_MS);
    const samples = Array.from({ length: (days * DAY_MS) / (5 * MINUTE_MS) }, (_, index) => {
      const at = now - days * DAY_MS + index * 5 * MINUTE_MS;
      return { at, value: isWarm(at) ? 28 : 21, flags: 0 };
    });
    const store = new ReadingStore();
    await store.ensurePartitions(tx, now - days * DAY_MS, now);
    await store.insert(tx, [{ sensorId: sensor.id, samples }], null);
  }
  const upTo = (high: number, changes: object = {}): object => ({
    lampsOn: { low: null, high },
    lampsOff: { low: null, high },
    holdMinutes: 15,
    clearingMargin: 0.5,
    ...changes,
  });
  const tried = async (path: string, body: object): Promise<RangeTrial> =>
    (await staff.grower.post(`${path}/trial`, body).expect(200)).body as RangeTrial;

  it('counts how often and how long alerts would have been open in the last fourteen days', async () => {
    const path = await aShelfThatWas([
      [14 * 24 + 10, 4], // Before those days.
      [200, 3],
      [100, 2],
      [50, 0.1], // Shorter than the patience.
    ]);
    const trial = await tried(path, upTo(26));

    expect(trial).toMatchObject({
      days: 14,
      above: { count: 2, totalMs: 5 * HOUR_MS, urgentCount: 0 },
      below: { count: 0, totalMs: 0, urgentCount: 0 },
    });
    expect(trial.episodes.map(({ beganAt }) => (now - Date.parse(beganAt)) / HOUR_MS)).toEqual([200, 100]);
    expect(trial.coverage).toBeGreaterThan(0.99);
  });

  it('goes by patience, margin and urgency as they are typed', async () => {
    const path = await aShelfThatWas([
      [200, 8],
      [100, 1],
    ]);
    expect((await tried(path, upTo(26))).above).toMatchObject({ count: 2, urgentCount: 1 });
    expect((await tried(path, upTo(26, { holdMinutes: 120 }))).above.count).toBe(1);
    expect((await tried(path, upTo(26, { clearingMargin: 6 }))).above.count).toBe(1);
    const calm = { urgency: { by: null, afterMinutes: null } };
    expect((await tried(path, upTo(26, calm))).above.urgentCount).toBe(0);
    expect((await tried(path, upTo(26, { urgency: { by: 1, afterMinutes: null } }))).above.urgentCount).toBe(
      2,
    );
    expect((await tried(path, upTo(30))).above.count).toBe(0);
  });

  it('counts every sensor of the shelf, as each would have opened its own', async () => {
    const { tx } = application;
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    await warmSensor(shelf.id, [[50, 2]], 14);
    await warmSensor(shelf.id, [[50, 2]], 14);
    const path = `${staff.path}/shelves/${shelf.id}/wanted-ranges/airTemperature`;
    expect((await tried(path, upTo(26))).above.count).toBe(2);
  });

  it('says for how much of that time there are readings', async () => {
    const path = await aShelfThatWas([], 7);
    expect((await tried(path, upTo(26))).coverage).toBeCloseTo(0.5, 2);
  });

  it('of a quantity that was never measured opens nothing', async () => {
    const shelf = await aShelf(application.tx, { roomId: staff.room.id });
    const path = `${staff.path}/shelves/${shelf.id}/wanted-ranges/vapourPressureDeficit`;
    expect(await tried(path, upTo(1.2))).toMatchObject({ above: { count: 0 }, episodes: [], coverage: 0 });
  });

  it('sets nothing', async () => {
    const path = await aShelfThatWas([[50, 2]]);
    await tried(path, upTo(26));
    expect(await application.tx.countBy(WantedRangeEntity, {})).toBe(0);
    expect(await application.tx.countBy(AlertEntity, { roomId: staff.room.id })).toBe(0);
  });

  it('with limits the wrong way round is refused, saying where', async () => {
    const path = await aShelfThatWas([], 1);
    const refused = await staff.grower
      .post(`${path}/trial`, upTo(26, { lampsOn: { low: 27, high: 26 } }))
      .expect(422);
    expect((refused.body as Problem).errors?.map((problem) => problem.path)).toEqual(['body.lampsOn.high']);
  });
});
