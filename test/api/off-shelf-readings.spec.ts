import type { Problem } from '@shared/contracts/problem';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { PlacementEntity } from '../../server/devices/placement-entity';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf } from '../builders/rooms';
import { fileOf, fileRoad, fileStart, fileStep, type FileRoad } from './file-road';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

const HOUR = 3_600_000;
const at = (hours: number): Date => new Date(fileStart + hours * HOUR);
const iso = (hours: number): string => at(hours).toISOString();
/** The last row before some hour of the file. */
const lastBefore = (hours: number): string => new Date(fileStart + hours * HOUR - fileStep).toISOString();

describe('readings of a file that were taken while their sensor was on no shelf', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let road: FileRoad;

  beforeAll(async () => {
    application = await startTestApplication();
    staff = await aStaffedRoom(application);
    road = fileRoad(application, staff);
  });
  afterAll(() => application.stop());

  interface Stay {
    readonly from: Date;
    readonly to?: Date;
  }

  /** A thermometer and a hygrometer, each time on a shelf of their own. */
  async function sensorsWith(...stays: Stay[]): Promise<{ ids: string[]; labels: string[] }> {
    const { tx } = application;
    const { device } = await aDevice(tx, { roomId: staff.room.id });
    const made = [
      await aSensor(tx, { deviceId: device.id, quantity: 'airTemperature' }),
      await aSensor(tx, { deviceId: device.id, quantity: 'relativeHumidity' }),
    ];
    const labels: string[] = [];
    for (const { from, to } of stays) {
      const shelf = await aShelf(tx, { roomId: staff.room.id });
      labels.push(shelf.label);
      for (const { id: sensorId } of made) {
        await aPlacement(tx, { sensorId, shelfId: shelf.id, fromAt: from, toAt: to ?? null });
      }
    }
    return { ids: made.map(({ id }) => id), labels };
  }

  const placedSince = (sensorId: string, since: string) =>
    staff.grower.patch(`${staff.path}/sensors/${sensorId}/placements/first`, { since });
  const problemOf = (reply: { body: unknown }): Problem => reply.body as Problem;

  it('are told by the check and by the bring-in, with their span and the sensor’s first shelf', async () => {
    const { ids, labels } = await sensorsWith({ from: at(10), to: at(15) }, { from: at(18) });
    const [temperature = ''] = ids;
    const file = await road.uploaded(fileOf(240));
    await road.matched(file, [temperature]);

    const off = { sensorId: temperature, firstShelf: { label: labels[0], since: iso(10) } };
    const offShelf = [
      { ...off, when: 'beforeFirstShelf', count: 120, from: iso(0), to: lastBefore(10) },
      { ...off, when: 'betweenShelves', count: 36, from: iso(15), to: lastBefore(18) },
    ];
    expect(await road.done(file.id, 'check')).toMatchObject({ result: { fresh: 240, offShelf } });
    expect(await road.done(file.id, 'bring-in')).toMatchObject({ result: { fresh: 240, offShelf } });
  });

  it('are all of a sensor without a shelf, and none of one made for the file', async () => {
    const { ids } = await sensorsWith();
    const file = await road.uploaded(fileOf(12));
    await road.matched(file, ids.slice(0, 1));
    expect(await road.done(file.id, 'check')).toMatchObject({
      result: { offShelf: [{ sensorId: ids[0], when: 'neverOnShelf', count: 12, firstShelf: null }] },
    });
    expect(problemOf(await placedSince(ids[0] ?? '', iso(0)).expect(409)).code).toBe('NEVER_PLACED');

    const series = file.series.map(({ key }) => ({ key, newSensor: { shelfId: null } }));
    await staff.grower.put(`${staff.path}/logger-files/${file.id}/matches`, { series }).expect(200);
    expect(await road.done(file.id, 'check')).toMatchObject({ result: { offShelf: [] } });
    expect(await road.done(file.id, 'bring-in')).toMatchObject({ result: { offShelf: [] } });
  });

  /** What shelves show of a thermometer and a hygrometer, whichever they are. */
  async function shown(ids: readonly string[]): Promise<unknown> {
    const { tx } = application;
    const [temperature, humidity] = ids;
    return {
      computed: await tx.query(
        `SELECT quantity, start_at, count, covered_ms, min, max, integral_ms FROM computed_hourly_summary
         WHERE sensor_id = $1 ORDER BY quantity, start_at`,
        [humidity],
      ),
      sums: await tx.query(
        'SELECT start_at, count, covered_ms, integral_ms FROM hourly_summary WHERE sensor_id = $1 ORDER BY start_at',
        [temperature],
      ),
      alerts: await tx.query(
        `SELECT quantity, began_at, opened_at, ended_at, cleared_at, peak_value FROM alert
         WHERE sensor_id = ANY($1) ORDER BY began_at, quantity`,
        [ids],
      ),
    };
  }

  it('belong to the first shelf as if they always had, once somebody says that the sensor was there', async () => {
    // Dangerous heat in the hours before the sensors were put on their shelf by the book.
    application.now = at(24); // So that nothing has fallen silent.
    const heated = fileOf(288, (row) => (row >= 24 && row < 60 ? { t: '44.0' } : {}));
    const always = await sensorsWith({ from: at(0) });
    const later = await sensorsWith({ from: at(12) });
    for (const { ids } of [always, later]) {
      const file = await road.uploaded(heated);
      await road.matched(file, ids);
      await road.done(file.id, 'bring-in');
    }
    expect(await shown(later.ids)).not.toEqual(await shown(always.ids));

    for (const id of later.ids) await placedSince(id, iso(0)).expect(200);

    expect(await shown(later.ids)).toEqual(await shown(always.ids));
    expect(await shown(always.ids)).toMatchObject({ alerts: [{ began_at: at(2) }] });
    const [placement] = await application.tx.findBy(PlacementEntity, { sensorId: later.ids[0] ?? '' });
    expect(placement).toMatchObject({ fromAt: at(0), toAt: null });
    const notes = await application.tx.findBy(AuditEntryEntity, { subjectId: later.ids[0] ?? '' });
    expect(notes).toMatchObject([
      { action: 'sensor.place-earlier', detail: { was: iso(12), since: iso(0) } },
    ]);
  });

  it('stay where they are when that is said of a later time, and when it was known already', async () => {
    const { ids } = await sensorsWith({ from: at(12) });
    const [id = ''] = ids;
    const refused = problemOf(await placedSince(id, iso(13)).expect(422));
    expect(refused.errors).toMatchObject([{ path: 'body.since' }]);
    await placedSince(id, iso(12)).expect(200);
    const [placement] = await application.tx.findBy(PlacementEntity, { sensorId: id });
    expect(placement?.fromAt).toEqual(at(12));
  });
});
