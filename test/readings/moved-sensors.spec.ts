import type { AlertKind } from '@shared/alerts/alert-rule';
import type { MeasuredQuantity } from '@shared/climate/quantity';
import { aStaffedRoom, type StaffedRoom } from '../api/room-callers';
import { startTestApplication, type TestApplication } from '../api/test-application';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf } from '../builders/rooms';
import { roadOver, send, unlitAndTight } from './intake-harness';

type Name = 'air' | 'otherAir' | 'humidity' | 'rootZone';

const minute = 60_000;
const start = Date.UTC(2026, 0, 12, 12);
const quantities: Readonly<Record<Name, MeasuredQuantity>> = {
  air: 'airTemperature',
  otherAir: 'airTemperature',
  humidity: 'relativeHumidity',
  rootZone: 'rootZoneTemperature',
};

/** A shelf whose sensors make an alert together: what each reads, and which of them is then put elsewhere. */
interface Joined {
  readonly kind: AlertKind;
  readonly readings: Partial<Readonly<Record<Name, number>>>;
  readonly moved: Name;
}

const apart = { air: 20, otherAir: 24 };
// The dew point at 20 °C and 90 % is 18.3 °C.
const coldPot = { air: 20, humidity: 90, rootZone: 15 };
const hotMat = { air: 20, rootZone: 27 };

describe('an alert that rests on several sensors', () => {
  let application: TestApplication;
  let staff: StaffedRoom;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  beforeEach(async () => {
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  async function sensorsFor({
    readings,
  }: Joined): Promise<{ shelfId: string; sensors: Record<Name, string> }> {
    const { tx } = application;
    const { id: shelfId } = await aShelf(tx, { roomId: staff.room.id });
    const { device } = await aDevice(tx, { roomId: staff.room.id });
    const sensors: Partial<Record<Name, string>> = {};
    for (const name of Object.keys(readings) as Name[]) {
      const { id: sensorId } = await aSensor(tx, { deviceId: device.id, quantity: quantities[name] });
      await aPlacement(tx, { sensorId, shelfId });
      sensors[name] = sensorId;
    }
    return { shelfId, sensors: sensors as Record<Name, string> };
  }

  /** Readings every five minutes, each a moment after the other, and a second look at them. */
  async function measure(
    sensors: Record<Name, string>,
    readings: Joined['readings'],
    fromMinute: number,
    toMinute: number,
  ): Promise<void> {
    const now = start + toMinute * minute;
    const sent = Object.entries(readings).flatMap(([of, value], place) =>
      Array.from({ length: (toMinute - fromMinute) / 5 }, (_, index) => ({
        of: of as Name,
        at: start + (fromMinute + 5 * index) * minute + place * 1_000,
        value: value + Math.sin(index) / 10,
      })),
    );
    await send(roadOver(application.database.dataSource, unlitAndTight), sensors, [sent], now);
    application.now = new Date(now);
    await application.app.services.secondLookJob.run();
  }

  async function alertsOn(shelfId: string, kind: AlertKind): Promise<(number | null)[][]> {
    const rows: { began_at: Date; cleared_at: Date | null }[] = await application.tx.query(
      'SELECT began_at, cleared_at FROM alert WHERE shelf_id = $1 AND kind = $2 ORDER BY began_at',
      [shelfId, kind],
    );
    const minutes = (at: Date): number => Math.floor((at.getTime() - start) / minute);
    return rows.map((row) => [minutes(row.began_at), row.cleared_at && minutes(row.cleared_at)]);
  }

  function moveAway(sensorId: string, shelfId: string) {
    const from = application.now.toISOString();
    return staff.keeper.post(`${staff.path}/sensors/${sensorId}/placements`, { shelfId, from }).expect(201);
  }

  it.each<Joined>([
    { kind: 'sensorsDisagree', readings: apart, moved: 'air' },
    { kind: 'sensorsDisagree', readings: apart, moved: 'otherAir' },
    { kind: 'condensation', readings: coldPot, moved: 'air' },
    { kind: 'condensation', readings: coldPot, moved: 'humidity' },
    { kind: 'condensation', readings: coldPot, moved: 'rootZone' },
    { kind: 'matStuckOn', readings: hotMat, moved: 'air' },
    { kind: 'matStuckOn', readings: hotMat, moved: 'rootZone' },
    // One that is too cold remains, beside the hygrometer.
    { kind: 'condensation', readings: { ...coldPot, otherAir: 20 }, moved: 'otherAir' },
  ])('($kind) ends when its $moved is put elsewhere, and stays in history', async (joined) => {
    const { shelfId, sensors } = await sensorsFor(joined);
    await measure(sensors, joined.readings, 0, 130);
    expect(await alertsOn(shelfId, joined.kind)).toEqual([[0, null]]);

    const { id: elsewhere } = await aShelf(application.tx, { roomId: staff.room.id });
    await moveAway(sensors[joined.moved], elsewhere);
    expect(await alertsOn(shelfId, joined.kind)).toEqual([[0, 130]]);

    await measure(sensors, joined.readings, 130, 160);
    await measure(sensors, joined.readings, 160, 300);
    const [first] = await alertsOn(shelfId, joined.kind);
    expect(first).toEqual([0, 130]);
    expect(await alertsOn(elsewhere, joined.kind)).toEqual([]);
  });

  it('stays open when a sensor that was there long ago is put elsewhere once more', async () => {
    const joined: Joined = { kind: 'sensorsDisagree', readings: apart, moved: 'air' };
    const { shelfId, sensors } = await sensorsFor(joined);
    const wanderer = await aSensor(application.tx, { roomId: staff.room.id });
    const left = new Date('2026-01-02T00:00:00Z');
    await aPlacement(application.tx, { sensorId: wanderer.id, shelfId, toAt: left });
    await aPlacement(application.tx, { sensorId: wanderer.id, fromAt: left });
    await measure(sensors, joined.readings, 0, 130);
    await moveAway(wanderer.id, (await aShelf(application.tx, { roomId: staff.room.id })).id);
    expect(await alertsOn(shelfId, joined.kind)).toEqual([[0, null]]);
  });
});
