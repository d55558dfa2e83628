import type { WantedLightEntity } from '../../server/rooms/wanted-light-entity';
import { aStaffedRoom, type StaffedRoom } from '../api/room-callers';
import { startTestApplication, type TestApplication } from '../api/test-application';
import { aPlacement, aSensor } from '../builders/devices';
import { aLamp, aShelf, aWantedLight } from '../builders/rooms';
import { arranged, roadOver, send, unlitAndTight, type Sent } from './intake-harness';

const minute = 60_000;
const hour = 60 * minute;
const day = 24 * hour;
const step = 20 * minute;
// Dublin's midnight, in winter.
const start = Date.UTC(2026, 0, 12);
const luxPerUmol = 68;

/** Twelve hours a day at a strength [µmol m⁻² s⁻¹], of which 100 makes 4.32 mol/m² (12 × 3600 s). */
function lit(...strengths: readonly number[]): Sent<'light'>[] {
  const readings: Sent<'light'>[] = [];
  for (let at = start; at < start + (strengths.length + 0.2) * day; at += step) {
    const hourOfDay = ((at - start) % day) / hour;
    const strength = strengths[Math.floor((at - start) / day)] ?? 0;
    readings.push({ of: 'light', at, value: hourOfDay >= 6 && hourOfDay < 18 ? strength : 0 });
  }
  return readings;
}

describe('light sums of days against what a shelf wants', () => {
  let application: TestApplication;
  let staff: StaffedRoom;

  beforeAll(async () => {
    application = await startTestApplication();
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  async function aSeeingShelf(
    wants: Partial<WantedLightEntity> | null,
    quantity: 'ppfd' | 'illuminance' = 'ppfd',
  ) {
    const { tx } = application;
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    await aLamp(tx, { shelfId: shelf.id, luxPerUmol });
    if (wants !== null) await aWantedLight(tx, { shelfId: shelf.id, ...wants });
    const sensor = await aSensor(tx, {
      roomId: shelf.roomId,
      quantity,
      expectedIntervalS: step / 1_000,
      lightThreshold: quantity === 'ppfd' ? 5 : 5 * luxPerUmol,
    });
    await aPlacement(tx, { sensorId: sensor.id, shelfId: shelf.id });
    return { shelfId: shelf.id, sensors: { light: sensor.id } };
  }

  async function take(sensors: { light: string }, readings: readonly Sent<'light'>[], size = Infinity) {
    const road = roadOver(application.database.dataSource, unlitAndTight);
    const now = Math.max(...readings.map(({ at }) => at));
    for (let from = 0; from < readings.length; from += size) {
      const batch = readings.slice(from, from + size);
      await send(road, sensors, [batch], now);
      application.now = new Date(now);
      await application.app.services.secondLookJob.run();
    }
  }

  /** Days after the start at which alerts began and ended, and the lowest sum. */
  async function shortOf(sensors: { light: string }): Promise<[number, number | null, number][]> {
    const rows: { began_at: Date; ended_at: Date | null; peak_value: number }[] = await application.tx.query(
      `SELECT began_at, ended_at, peak_value FROM alert WHERE sensor_id = $1 AND kind = 'lightSumShort' ORDER BY began_at`,
      [sensors.light],
    );
    const days = (at: Date): number => (at.getTime() - start) / day;
    return rows.map((row) => [
      days(row.began_at),
      row.ended_at && days(row.ended_at),
      Number(row.peak_value.toFixed(1)),
    ]);
  }

  // By hand: 150 makes 6.5 mol/m² and 180 makes 7.8, which are short of 8; 190 makes 8.2, which is not.
  it.each([
    ['three short days, and on until one is not', lit(180, 150, 180, 190), [[1, 4, 6.5]]],
    ['three short days after a full one', lit(190, 180, 180, 180), [[2, null, 7.8]]],
    ['two short days at a time', lit(150, 150, 190, 150, 150, 190), []],
    ['days in the dark', lit(0, 0, 0), [[1, null, 0]]],
  ] as const)('%s', async (_, readings, found) => {
    const { sensors } = await aSeeingShelf({});
    await take(sensors, readings);
    expect(await shortOf(sensors)).toEqual(found);
  });

  it('are found alike from lux by the factor of the lamp', async () => {
    const { sensors } = await aSeeingShelf({}, 'illuminance');
    await take(
      sensors,
      lit(180, 150, 180, 190).map((reading) => ({ ...reading, value: reading.value * luxPerUmol })),
    );
    expect(await shortOf(sensors)).toEqual([[1, 4, 6.5]]);
  });

  it.each(['kept', 'nearly', 'random'])(
    'are the same when readings come in parts, %s in order',
    async (order) => {
      const { sensors } = await aSeeingShelf({});
      await take(sensors, arranged(lit(190, 150, 150, 150, 190, 190, 150, 150, 150), order, 7), 100);
      expect(await shortOf(sensors)).toEqual([
        [2, 5, 6.5],
        [7, null, 6.5],
      ]);
    },
  );

  it('of days that began before a shelf wanted any, or that want none, are nobody’s', async () => {
    const later = await aSeeingShelf({ since: new Date(start + hour) });
    const zero = await aSeeingShelf({ leastMolM2D: 0 });
    const none = await aSeeingShelf(null);
    for (const { sensors } of [later, zero, none]) {
      await take(sensors, lit(150, 150, 150));
      expect(await shortOf(sensors)).toEqual([]);
    }
  });

  it('that were short stand in history when a shelf wants less, and nothing is open any more', async () => {
    const { shelfId, sensors } = await aSeeingShelf({});
    await take(sensors, lit(150, 150, 150));
    application.now = new Date(start + 3.2 * day);
    await staff.grower.put(`${staff.path}/shelves/${shelfId}/wanted-light`, { leastMolM2D: 6 }).expect(200);
    expect(await shortOf(sensors)).toEqual([[1, 3.2, 6.5]]);
  });
});
