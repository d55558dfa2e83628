import type { Board } from '@shared/contracts/board';
import type { GerminationView } from '@shared/contracts/germination';
import { aPlacement, aSensor } from '../builders/devices';
import { aGerminationTest, aSeedLot } from '../builders/seed';
import { steadyHours } from '../builders/summaries';
import { GerminationCountEntity } from '../../server/seed/germination-count-entity';
import { PlantingRoom, problemOf } from './planting-room';
import { startTestApplication, type TestApplication } from './test-application';

const HOUR_MS = 3_600_000;
const sownAt = Date.parse('2026-04-01T09:00:00Z');

describe('germination', () => {
  let application: TestApplication;
  let room: PlantingRoom;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  beforeEach(async () => {
    application.now = new Date('2026-04-15T10:00:00Z');
    room = await PlantingRoom.in(application);
  });
  afterAll(() => application.stop());

  const germination = (id: string): Promise<GerminationView> => room.read(`/plantings/${id}/germination`);
  const onion = (more: object = {}) => room.sown({ cropId: 'onion-long-day', ...more });
  /** A steady shelf since the middle of March, measured at the roots unless said otherwise. */
  async function measured(
    value: number,
    quantity: 'rootZoneTemperature' | 'airTemperature' = 'rootZoneTemperature',
  ) {
    const { tx } = application;
    const sensor = await aSensor(tx, { roomId: room.staff.room.id, quantity });
    await aPlacement(tx, { sensorId: sensor.id, shelfId: room.shelf.id });
    const to = `${application.now.toISOString().slice(0, 13)}:00:00Z`;
    await steadyHours(tx, sensor.id, { from: '2026-03-10T00:00:00Z', to, value });
  }
  const daysAfterSowing = (at: string | null | undefined): number =>
    (Date.parse(at ?? '') - sownAt) / (24 * HOUR_MS);

  it('is counted on a phone and told as a curve with its figures', async () => {
    const { id } = await room.sown({ count: 20 });
    await room.counted(id, 0, '2026-04-05T09:00:00Z').expect(201);
    await room.counted(id, 4, '2026-04-06T09:00:00Z').expect(201);
    await room.counted(id, 12, '2026-04-08T09:00:00Z').expect(201);
    await room.counted(id, 16, '2026-04-11T09:00:00Z', { isLast: true }).expect(201);

    const view = await germination(id);

    // 16 up: (4·5 + 8·7 + 4·10)/16 = 7.25 d; half of them lie midway between day 5 and day 7.
    expect(view).toMatchObject({
      sown: 20,
      up: 16,
      percent: 80,
      firstDay: 5,
      lastDay: 10,
      spreadDays: 5,
      meanTimeDays: 7.25,
      t50Days: 6,
      isOpen: false,
      forecast: null,
    });
    expect(view.curve.map(({ day, up, percent }) => [day, up, percent])).toEqual([
      [4, 0, 0],
      [5, 4, 20],
      [7, 12, 60],
      [10, 16, 80],
    ]);
    // Wilson interval of 16 of 20.
    expect(view.verdict?.lowPct).toBeCloseTo(58.4, 1);
    expect(view.verdict?.highPct).toBeCloseTo(91.9, 1);
  });

  it('is compared with the lot’s own test, the standard and the age of the seed', async () => {
    const { tx } = application;
    const lot = await aSeedLot(tx, {
      roomId: room.staff.room.id,
      cropId: 'onion-long-day',
      packedYear: 2023,
    });
    const test = await aGerminationTest(tx, { lotId: lot.id, seeds: 50 });
    await tx.insert(GerminationCountEntity, { testId: test.id, day: 12, up: 45 });
    const { id } = await onion({ lotId: lot.id, count: 40 });
    await room.counted(id, 18, '2026-04-12T09:00:00Z', { isLast: true }).expect(201);

    const { verdict } = await germination(id);

    // Of 40 seeds at 90 % (test) or 70 % (7 CFR 201.31) eighteen are fewer than chance makes them; onion lives 1 to 2 years.
    expect(verdict).toMatchObject({
      lotPct: 90,
      againstLot: 'lower',
      standardPct: 70,
      againstStandard: 'lower',
      age: 'pastLife',
    });
  });

  // Steady 20 °C: 80/(20 − 2.5) = 4.57 d (Brewster 2008), 5 d (Harrington & Minges 1954), 219/(20 − 1.4) = 11.77 d
  // (Bierhuizen & Wagenvoort 1974). Hours are known by their means, so each may be an hour off.
  it('is forecast from the warmth of the shelf itself, by every source', async () => {
    application.now = new Date('2026-04-03T09:00:00Z');
    await measured(20);
    const { id } = await onion();

    const { forecast } = await germination(id);

    expect(forecast).toMatchObject({
      basis: 'published',
      measuredBy: 'rootZoneTemperature',
      isLate: false,
      causes: [],
    });
    expect(forecast?.outlookC).toBeCloseTo(20, 6);
    expect(forecast?.published).toHaveLength(3);
    expect(daysAfterSowing(forecast?.earliest?.at)).toBeCloseTo(4.57, 1);
    expect(daysAfterSowing(forecast?.latest?.at)).toBeCloseTo(11.77, 1);
    const board = await room.read<Board>('/board');
    expect(board.racks.flatMap(({ shelves }) => shelves).flatMap(({ sowings }) => sowings)).toEqual([
      {
        plantingId: id,
        sown: 20,
        up: 0,
        day: 2,
        expectedFrom: forecast?.earliest?.at,
        expectedTo: forecast?.latest?.at,
        isLate: false,
      },
    ]);
  });

  it('takes the air where the roots are not measured, and says so', async () => {
    application.now = new Date('2026-04-03T09:00:00Z');
    await measured(20, 'airTemperature');
    const { id } = await onion();

    expect((await germination(id)).forecast).toMatchObject({ measuredBy: 'airTemperature' });
  });

  it('is expected at no time where nothing was measured', async () => {
    const { id } = await onion();

    expect((await germination(id)).forecast).toMatchObject({
      measuredBy: null,
      outlookC: null,
      coverage: 0,
      earliest: null,
      latest: null,
      isLate: false,
    });
  });

  it('is late once every source’s time has passed, with what may be the cause', async () => {
    await measured(20);
    const lot = await aSeedLot(application.tx, {
      roomId: room.staff.room.id,
      cropId: 'onion-long-day',
      packedYear: 2023,
    });
    const { id } = await onion({ lotId: lot.id, depthMm: 20 });

    const { forecast } = await germination(id);

    expect(forecast?.isLate).toBe(true);
    expect(forecast?.causes.join(' ')).toMatch(/too old.*too deep/);
  });

  it('is forecast by the room’s own sowings once there are three', async () => {
    application.now = new Date('2026-04-03T09:00:00Z');
    await measured(20);
    for (const day of ['12', '14', '16']) {
      const past = await onion({ at: `2026-03-${day}T09:00:00Z` });
      const up = new Date(Date.parse(`2026-03-${day}T09:00:00Z`) + 6 * 24 * HOUR_MS);
      await room.counted(past.id, 3, up.toISOString(), { isLast: true }).expect(201);
    }
    const { id } = await onion();

    const { forecast } = await germination(id);

    expect(forecast?.basis).toBe('room');
    expect(daysAfterSowing(forecast?.earliest?.at)).toBeCloseTo(6, 1);
    expect(daysAfterSowing(forecast?.latest?.at)).toBeCloseTo(6, 1);
  });

  it('has no forecast once the first is up, and still says how many are', async () => {
    const { id } = await onion();
    await room.counted(id, 3).expect(201);

    expect(await germination(id)).toMatchObject({ isOpen: true, up: 3, forecast: null });
    const board = await room.read<Board>('/board');
    const [sowing] = board.racks.flatMap(({ shelves }) => shelves).flatMap(({ sowings }) => sowings);
    expect(sowing).toMatchObject({ up: 3, sown: 20, day: 14, expectedFrom: null });
  });

  it('of plants that were not sown here is a conflict', async () => {
    const plants = { how: 'broughtIn', cropId: 'bay', count: 2, shelfId: room.shelf.id };
    const { id } = (await room.start(plants).expect(201)).body as { id: string };

    const refused = await room.staff.viewer.get(`${room.staff.path}/plantings/${id}/germination`).expect(409);

    expect(problemOf(refused).code).toBe('NOT_SOWN');
  });
});
