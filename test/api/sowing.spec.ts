import type { Task } from '@shared/contracts/care';
import type { DayLengthYear, FrostDates, SowingCalendar } from '@shared/contracts/sowing';
import { aPerson } from '../builders/people';
import { aSeedLot } from '../builders/seed';
import { fieldsOf, PlantingRoom } from './planting-room';
import { startTestApplication, type TestApplication } from './test-application';

describe('sowing', () => {
  let application: TestApplication;
  let room: PlantingRoom;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  beforeEach(async () => {
    application.now = new Date('2026-01-20T10:00:00Z');
    room = await PlantingRoom.in(application);
  });
  afterAll(() => application.stop());

  const frost = (body: object) => room.staff.grower.put(`${room.staff.path}/frost-dates`, body);
  const lastFrost = (on: string, wording: object = { kind: 'average' }) =>
    frost({ lastSpring: { on, wording }, firstAutumn: null, note: 'invented station' }).expect(200);
  const choose = async (cropId: string, everyDays: number | null = null): Promise<SowingCalendar> =>
    (await room.staff.grower.put(`${room.staff.path}/sowing/crops/${cropId}`, { everyDays }).expect(200))
      .body as SowingCalendar;
  const calendar = (): Promise<SowingCalendar> => room.read('/sowing');
  const place = (latitudeDeg: number) =>
    room.staff.keeper.patch(room.staff.path, { latitudeDeg, longitudeDeg: 0 }).expect(200);

  describe('frost dates', () => {
    it('say what their wording means: the two conventions are opposite in spring and alike in autumn', async () => {
      const stated = (kind: string) => ({ on: '05-15', wording: { kind, percent: 10 } });

      await frost({ lastSpring: stated('probability'), firstAutumn: stated('probability') }).expect(200);
      const byProbability = await room.read<FrostDates>('/frost-dates');
      await frost({ lastSpring: stated('percentile'), firstAutumn: stated('percentile') }).expect(200);
      const byPercentile = await room.read<FrostDates>('/frost-dates');

      expect([byProbability.lastSpringRisk, byProbability.firstAutumnRisk]).toEqual([0.1, 0.1]);
      expect([byPercentile.lastSpringRisk, byPercentile.firstAutumnRisk]).toEqual([0.9, 0.1]);
      expect(byProbability.explanation[0]).toContain('10 of 100 springs');
    });

    it('are none until they are set', async () => {
      expect(await room.read<FrostDates>('/frost-dates')).toMatchObject({
        lastSpring: null,
        lastSpringRisk: null,
        firstAutumn: null,
      });
    });

    it.each([
      ['a day of no month', { on: '02-30', wording: { kind: 'average' } }, 'body.lastSpring.on'],
      ['a day with a year', { on: '2026-05-15', wording: { kind: 'average' } }, 'body.lastSpring.on'],
      [
        'a probability of more than all',
        { on: '05-15', wording: { kind: 'probability', percent: 101 } },
        'body.lastSpring.wording.percent',
      ],
    ])('refuse %s', async (_, lastSpring, path) => {
      expect(fieldsOf(await frost({ lastSpring, firstAutumn: null }).expect(422))).toContain(path);
    });
  });

  describe('day length', () => {
    // US Naval Observatory, 51.5° N, 2023: 16 h 38 min on 21 June, 7 h 50 min on 22 December.
    it('is that of the room’s place through the year, with the onions that suit it', async () => {
      await place(51.5);

      const { days, longest, shortest, onionClasses } =
        await room.read<DayLengthYear>('/day-length?year=2023');

      expect(days).toHaveLength(365);
      expect(longest?.hours).toBeCloseTo(16.63, 1);
      expect(shortest?.hours).toBeCloseTo(7.83, 1);
      expect(longest?.day.slice(0, 7)).toBe('2023-06');
      expect(onionClasses).toEqual(['long']);
    });

    it('is unknown until the room has a place, and of this year unless named', async () => {
      expect(await room.read<DayLengthYear>('/day-length')).toMatchObject({
        latitudeDeg: null,
        year: 2026,
        days: [],
        longest: null,
        onionClasses: [],
      });
    });
  });

  describe('the calendar', () => {
    it('has the windows of chosen crops by source, and the lots and the transplanting that go with them', async () => {
      await lastFrost('05-15');
      const lot = await aSeedLot(application.tx, {
        roomId: room.staff.room.id,
        cropId: 'onion-long-day',
        packedYear: 2024,
        variety: 'Harvest Moon',
      });
      await choose('sweet-pepper');
      const { plans } = await choose('onion-long-day');

      expect(plans.map(({ cropId }) => cropId)).toEqual(['onion-long-day', 'sweet-pepper']);
      const [onion] = plans;
      // Longest raising 12 weeks, out 6 weeks before the frost: 18 weeks before 15 May is 9 January.
      expect(onion).toMatchObject({
        window: { opens: '2026-01-09' },
        standing: 'open',
        lastFrost: '2026-05-15',
        taskId: null,
        sownOn: [],
        lots: [{ lotId: lot.id, name: 'Harvest Moon, packed 2024', useFirst: true }],
      });
      expect(onion?.bySource.length).toBeGreaterThan(3);
      // Six weeks (Cornell) to twelve (Delaware, Utah, Purdue) after 9 January.
      expect(onion?.sowings).toMatchObject([
        { on: '2026-01-09', transplantFrom: '2026-02-20', transplantTo: '2026-04-03' },
      ]);
    });

    it('says what to sow this week, and no more once it was sown', async () => {
      await lastFrost('05-15');
      await choose('onion-long-day');
      expect((await calendar()).thisWeek).toMatchObject([{ cropId: 'onion-long-day', on: '2026-01-20' }]);

      await room.sown({ cropId: 'onion-long-day', at: '2026-01-18T09:00:00Z' });

      const { thisWeek, plans } = await calendar();
      expect(thisWeek).toEqual([]);
      expect(plans[0]?.sownOn).toEqual(['2026-01-18']);
    });

    it('has sowings that follow each other', async () => {
      await lastFrost('05-15');
      const { plans } = await choose('leek', 14);

      // Leek by garden lists: 10–14 weeks before the frost, 6 February less 14 days and so on; common practice: from 8 weeks.
      expect(plans[0]?.sowings.map(({ on }) => on)).toEqual([
        '2026-02-06',
        '2026-02-20',
        '2026-03-06',
        '2026-03-20',
      ]);
      expect(plans[0]?.everyDays).toBe(14);
    });

    it('says what is missing, and which onion does not suit the place', async () => {
      await place(10);
      const { plans } = await choose('onion-long-day');

      expect(plans[0]).toMatchObject({ window: null, standing: null, sowings: [] });
      expect(plans[0]?.warnings).toEqual([
        expect.stringContaining('last spring frost'),
        expect.stringContaining('Long-day onions'),
      ]);
    });

    it('loses a crop that is taken off, and refuses one that nobody has', async () => {
      await choose('leek');

      const after = await room.staff.grower.delete(`${room.staff.path}/sowing/crops/leek`).expect(200);

      expect((after.body as SowingCalendar).plans).toEqual([]);
      await room.staff.grower.put(`${room.staff.path}/sowing/crops/moon-leek`, {}).expect(404);
    });

    it('makes one care task of a sowing, until that is done', async () => {
      await lastFrost('05-15');
      await choose('leek');
      const make = (on: string) =>
        room.staff.grower.post(`${room.staff.path}/sowing/crops/leek/task`, {
          on,
          personId: room.staff.people.helper.id,
        });

      const first = (await make('2026-02-01').expect(201)).body as Task;
      const again = (await make('2026-02-08').expect(201)).body as Task;
      expect(first).toMatchObject({
        kind: 'sow',
        title: 'Sow Leek',
        detail: '6 mm deep.',
        dueOn: '2026-02-01',
      });
      expect(again.id).toBe(first.id);
      expect((await calendar()).plans[0]?.taskId).toBe(first.id);

      await room.staff.helper.put(`${room.staff.path}/tasks/${first.id}/completion`).expect(200);
      expect((await calendar()).plans[0]?.taskId).toBeNull();
      expect(((await make('2026-02-15').expect(201)).body as Task).id).not.toBe(first.id);
    });

    it('makes no task for a stranger, or of a crop that is not on it', async () => {
      await choose('leek');
      const stranger = await aPerson(application.tx);
      const path = (cropId: string): string => `${room.staff.path}/sowing/crops/${cropId}/task`;

      const refused = await room.staff.grower
        .post(path('leek'), { on: '2026-02-01', personId: stranger.id })
        .expect(422);
      expect(fieldsOf(refused)).toEqual(['body.personId']);
      await room.staff.grower.post(path('basil'), { on: '2026-02-01' }).expect(404);
    });
  });
});
