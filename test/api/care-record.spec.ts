import { parse } from 'csv-parse/sync';
import type { CareCompliance, CareYields, PlantingDrying } from '@shared/contracts/care-record';
import type { Task } from '@shared/contracts/care';
import type { PlantingEventEntity } from '../../server/plantings/planting-event-entity';
import { TaskEntity } from '../../server/care/task-entity';
import { aRoutine, aTask } from '../builders/care';
import { aPlacement, aSensor } from '../builders/devices';
import { aPlanting, aPlantingEvent } from '../builders/plantings';
import { aShelf } from '../builders/rooms';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('the record of care', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let tx: TestApplication['tx'];

  beforeAll(async () => {
    application = await startTestApplication();
    tx = application.tx;
  });
  beforeEach(async () => {
    application.now = new Date('2026-04-15T10:00:00Z');
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  const closed = (day: string, overrides: Parameters<typeof aTask>[1] = {}): Promise<TaskEntity> =>
    aTask(tx, {
      roomId: staff.room.id,
      dueOn: day,
      doneAt: new Date(`${day}T09:00:00Z`),
      doneBy: staff.people.helper.id,
      ...overrides,
    });
  const read = async <T>(path: string): Promise<T> =>
    (await staff.viewer.get(`${staff.path}${path}`).expect(200)).body as T;
  type Page = { tasks: Task[]; nextCursor: string | null };

  it('is told page by page, newest first, without what is open', async () => {
    const [first, second, third] = [
      await closed('2026-04-10'),
      await closed('2026-04-11'),
      await closed('2026-04-12'),
    ];
    await aTask(tx, { roomId: staff.room.id });
    await aTask(tx, { doneAt: application.now });

    const page = await read<Page>('/care/record?limit=2');
    const rest = await read<Page>(`/care/record?limit=2&cursor=${page.nextCursor ?? ''}`);

    expect(page.tasks.map(({ id }) => id)).toEqual([third.id, second.id]);
    expect(rest).toMatchObject({ tasks: [{ id: first.id }], nextCursor: null });
  });

  it('is cut to a planting, a shelf, a person, a kind, or days of the room’s calendar', async () => {
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    const planting = await aPlanting(tx, { shelfId: shelf.id });
    const ofPlanting = await closed('2026-04-10', { plantingId: planting.id });
    const ofShelf = await closed('2026-04-11', { shelfId: shelf.id });
    const feeding = await closed('2026-04-12', { kind: 'feed', doneBy: staff.people.grower.id });
    // Half past midnight on the 13th in Dublin is still the 12th in UTC.
    const night = await closed('2026-04-13', { doneAt: new Date('2026-04-12T23:30:00Z') });
    const ids = async (query: string) =>
      (await read<Page>(`/care/record?${query}`)).tasks.map(({ id }) => id);

    expect(await ids(`plantingId=${planting.id}`)).toEqual([ofPlanting.id]);
    expect(await ids(`shelfId=${shelf.id}`)).toEqual([ofShelf.id, ofPlanting.id]);
    expect(await ids(`personId=${staff.people.grower.id}`)).toEqual([feeding.id]);
    expect(await ids('kind=feed')).toEqual([feeding.id]);
    expect(await ids('from=2026-04-13')).toEqual([night.id]);
    expect(await ids('to=2026-04-11')).toEqual([ofPlanting.id]);
  });

  it('is a CSV file by the room’s clock, which runs nothing in a spreadsheet', async () => {
    await closed('2026-04-10', {
      title: '=HYPERLINK("http://example.org")',
      note: 'two\nlines, "quoted"',
      grams: 12.5,
    });
    await closed('2026-04-11');

    const reply = await staff.grower.get(`${staff.path}/care/record.csv`).expect(200);

    expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(reply.headers['content-disposition']).toBe('attachment; filename=care.csv');
    const rows = parse(reply.text, { columns: true, record_delimiter: '\r\n' }) as Record<string, string>[];
    expect(rows).toHaveLength(2);
    expect(rows[0]).toMatchObject({
      'closed at': '2026-04-10T10:00:00+01:00',
      title: '\'=HYPERLINK("http://example.org")',
      note: 'two\nlines, "quoted"',
      grams: '12.5',
      'closed by': staff.people.helper.name,
    });
  });

  it('tells how much was in time, in all and by kind, of what had its time in the span', async () => {
    await closed('2026-04-10');
    await closed('2026-04-10', { outcome: 'notNeeded' });
    await closed('2026-04-10', { windowDays: 2, doneAt: new Date('2026-04-12T22:00:00Z') });
    await closed('2026-04-10', { doneAt: new Date('2026-04-11T09:00:00Z') });
    await closed('2026-04-10', { kind: 'feed', outcome: 'couldNot' });
    await aTask(tx, { roomId: staff.room.id, kind: 'feed', dueOn: '2026-04-11' });
    await aTask(tx, { roomId: staff.room.id }); // Due today: its time is not up.

    const found = await read<CareCompliance>('/care/compliance?from=2026-04-10&to=2026-04-16');

    const water = { due: 4, inTime: 3, late: 1, notDone: 0, share: 0.75 };
    const feed = { due: 2, inTime: 0, late: 0, notDone: 2, share: 0 };
    expect(found).toEqual({
      due: 6,
      inTime: 3,
      late: 1,
      notDone: 2,
      share: 0.5,
      kinds: [
        { kind: 'feed', ...feed },
        { kind: 'water', ...water },
      ],
    });
    expect(await read('/care/compliance?from=2026-01-01&to=2026-01-02')).toMatchObject({
      due: 0,
      share: null,
    });
  });

  it('adds harvests up by crop and planting', async () => {
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    const [one, other] = [
      await aPlanting(tx, { shelfId: shelf.id }),
      await aPlanting(tx, { shelfId: shelf.id }),
    ];
    const harvest = (plantingId: string, seq: number, more: Partial<PlantingEventEntity>) =>
      aPlantingEvent(tx, { plantingId, seq, kind: 'harvested', note: '', ...more });
    await harvest(one.id, 1, { grams: 120 });
    await harvest(one.id, 2, { grams: 80, count: 3 });
    await harvest(other.id, 1, { grams: 50 });
    await harvest(other.id, 2, { grams: 999, at: new Date('2026-04-02T09:00:00Z') });

    const { crops } = await read<CareYields>('/care/yields?from=2026-03-01&to=2026-04-01');

    expect(crops).toMatchObject([
      { crop: 'Lettuce', cropId: 'lettuce-cut-and-come', grams: 250, count: 3, harvests: 3 },
    ]);
    expect(crops[0]?.plantings.map(({ plantingId, grams }) => [plantingId, grams])).toEqual([
      [one.id, 200],
      [other.id, 50],
    ]);
  });

  describe('of a planting that dries', () => {
    /** A lettuce since 1 April in steady air of 1 kPa, watered every third day. */
    async function dryingLettuce(waterings: readonly number[]): Promise<string> {
      const shelf = await aShelf(tx, { roomId: staff.room.id });
      const sensor = await aSensor(tx, { roomId: staff.room.id, quantity: 'relativeHumidity' });
      await aPlacement(tx, {
        sensorId: sensor.id,
        shelfId: shelf.id,
        fromAt: new Date('2026-03-01T00:00:00Z'),
      });
      await tx.query(
        `INSERT INTO computed_hourly_summary
           (sensor_id, quantity, start_at, count, covered_ms, min, max, integral_ms, first_at_ms, last_at_ms, last_value)
         SELECT $1, 'vapourPressureDeficit', hour, 12, 3600000, 1, 1, 3600000, extract(epoch FROM hour) * 1000,
           extract(epoch FROM hour) * 1000 + 3300000, 1
         FROM generate_series('2026-03-31T00:00:00Z'::timestamptz, '2026-04-30T00:00:00Z', interval '1 hour') AS hour`,
        [sensor.id],
      );
      const { id } = await aPlanting(tx, { shelfId: shelf.id, startedOn: '2026-04-01' });
      for (const [index, day] of waterings.entries()) {
        const at = new Date(Date.parse('2026-04-01T09:00:00Z') + day * 86_400_000);
        await aPlantingEvent(tx, {
          plantingId: id,
          seq: index + 1,
          kind: 'watered',
          note: '',
          at,
          millilitres: 200,
        });
      }
      return id;
    }
    const everyThirdDay = [3, 6, 9, 12, 15];

    it('shows its waterings against the air, and what they taught', async () => {
      const id = await dryingLettuce(everyThirdDay);
      application.now = new Date('2026-04-17T09:00:00Z');

      const found = await read<PlantingDrying>(`/plantings/${id}/drying`);

      expect(found.spans).toHaveLength(6);
      expect(found.spans[0]).toMatchObject({
        to: '2026-04-04T09:00:00.000Z',
        millilitres: 200,
        isLearnedFrom: true,
      });
      expect(found.interval?.medianKPaH).toBeCloseTo(72, 0);
      expect(found.standing).toBe('notYet');
      expect(found.dueAt?.slice(0, 10)).toBe('2026-04-19');
      const heights = found.curve.map(({ integralKPaH }) => integralKPaH);
      expect(Math.max(...heights)).toBeGreaterThan(70);
      expect(heights.filter((height) => height === 0)).toHaveLength(6);
    });

    it('asks for water once it is as dry as it usually gets, not before', async () => {
      const plantingId = await dryingLettuce(everyThirdDay);
      const routine = await aRoutine(tx, {
        roomId: staff.room.id,
        plantingId,
        timing: 'byDrying',
        everyDays: 9,
        startsOn: '2026-04-01',
      });
      const due = async (at: string): Promise<string[]> => {
        application.now = new Date(at);
        await application.app.services.planning.planAhead();
        const tasks = await tx.find(TaskEntity, {
          where: { routineId: routine.id },
          order: { dueOn: 'ASC' },
        });
        return tasks.map(({ dueOn }) => dueOn);
      };

      expect(await due('2026-04-18T09:00:00Z')).toEqual([]);
      expect(await due('2026-04-19T10:00:00Z')).toEqual(['2026-04-19']);
      await staff.helper
        .put(
          `${staff.path}/tasks/${(await tx.findOneByOrFail(TaskEntity, { routineId: routine.id })).id}/completion`,
          {
            millilitres: 210,
          },
        )
        .expect(200);
      expect(await due('2026-04-21T09:00:00Z')).toEqual(['2026-04-19']);
      expect(await due('2026-04-22T11:00:00Z')).toEqual(['2026-04-19', '2026-04-22']);
    });

    it('goes by the days it was given until it has taught enough', async () => {
      const plantingId = await dryingLettuce([3, 6]);
      const routine = await aRoutine(tx, {
        roomId: staff.room.id,
        plantingId,
        timing: 'byDrying',
        everyDays: 4,
      });
      await application.app.services.planning.planAhead();
      const { id } = await tx.findOneByOrFail(TaskEntity, { routineId: routine.id, dueOn: '2026-04-15' });
      await staff.helper.put(`${staff.path}/tasks/${id}/completion`).expect(200);
      expect(await tx.countBy(TaskEntity, { routineId: routine.id, dueOn: '2026-04-19' })).toBe(1);
    });
  });
});
