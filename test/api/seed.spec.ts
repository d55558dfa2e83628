import type { Problem } from '@shared/contracts/problem';
import type { SeedLot, SeedLotDetail, SeedsNeeded } from '@shared/contracts/seed';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { aSeedLot } from '../builders/seed';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('seed lots', () => {
  let application: TestApplication;
  let staff: StaffedRoom;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  beforeEach(async () => {
    application.now = new Date('2026-04-15T10:00:00Z');
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  const packet = { cropId: 'onion-long-day', unit: 'seeds', amount: 100 };
  const added = async (body: object): Promise<SeedLot> =>
    (await staff.grower.post(`${staff.path}/seed-lots`, { ...packet, ...body }).expect(201)).body as SeedLot;
  const detail = async (lotId: string): Promise<SeedLotDetail> =>
    (await staff.viewer.get(`${staff.path}/seed-lots/${lotId}`).expect(200)).body as SeedLotDetail;
  const listed = async (query = ''): Promise<SeedLot[]> =>
    (await staff.viewer.get(`${staff.path}/seed-lots${query}`).expect(200)).body as SeedLot[];
  const problem = (reply: { body: unknown }): Problem => reply.body as Problem;
  const fields = (reply: { body: unknown }): (string | undefined)[] | undefined =>
    problem(reply).errors?.map(({ path }) => path);

  it('keep all that is written on the packet', async () => {
    const body = {
      variety: 'Harvest Moon',
      source: 'swap at the village hall',
      packedYear: 2025,
      seedsPerGram: 250,
      price: 3.2,
      currency: 'EUR',
      lotNumber: '17/4',
      note: 'kept in the fridge',
    };

    const { id } = await added(body);

    expect(await detail(id)).toMatchObject({
      ...packet,
      ...body,
      cropName: 'Onion, long-day',
      left: 100,
      seedsLeft: 100,
      finishedOn: null,
      photo: null,
      uses: [],
      tests: [],
    });
    expect((await staff.viewer.get(`${staff.path}/varieties`)).body).toMatchObject([
      { cropId: 'onion-long-day', name: 'Harvest Moon' },
    ]);
  });

  it('are listed with those to use first at the top, by age against the life of their seed', async () => {
    const young = await added({ packedYear: 2026 });
    const unknown = await added({});
    const old = await added({ packedYear: 2024 });

    const lots = await listed();

    expect(lots.map(({ id }) => id)).toEqual([old.id, young.id, unknown.id]);
    expect(lots.map(({ age }) => [age.years, age.standing, age.useFirst])).toEqual([
      [2, 'doubtful', true],
      [0, 'withinLife', false],
      [null, null, false],
    ]);
  });

  it('leave the list when they are put aside, and come back when asked for', async () => {
    const { id } = await added({ packedYear: 2020 });
    await staff.grower.patch(`${staff.path}/seed-lots/${id}`, { finishedOn: '2026-04-15' }).expect(200);

    expect(await listed()).toEqual([]);
    const [lot] = await listed('?finished=with&cropId=onion-long-day');
    expect(lot).toMatchObject({ id, finishedOn: '2026-04-15', age: { useFirst: false } });
    expect(await listed('?finished=with&cropId=leek')).toEqual([]);
  });

  it('are recounted, up or down, and say by whom', async () => {
    const { id } = await added({});
    const recount = (left: number, note = '') =>
      staff.grower.put(`${staff.path}/seed-lots/${id}/left`, { left, note }).expect(200);

    await recount(40, 'mice');
    application.now = new Date('2026-04-16T10:00:00Z');
    await recount(55);

    const { left, uses } = await detail(id);
    expect(left).toBe(55);
    expect(uses).toMatchObject([
      { reason: 'recounted', amount: -15, at: '2026-04-16T10:00:00.000Z' },
      { reason: 'recounted', amount: 60, note: 'mice', personName: staff.people.grower.name },
    ]);
  });

  it('in grams know their seeds by seeds a gram, and else say that they don’t', async () => {
    const weighed = await added({ unit: 'grams', amount: 2.5, seedsPerGram: 250 });
    const unknown = await added({ unit: 'grams', amount: 2.5 });

    expect([weighed.seedsLeft, unknown.seedsLeft]).toEqual([625, null]);
  });

  it('can be removed while nothing was used of them, and not after', async () => {
    const unused = await added({});
    const used = await added({});
    await staff.grower.put(`${staff.path}/seed-lots/${used.id}/left`, { left: 90 }).expect(200);

    await staff.grower.delete(`${staff.path}/seed-lots/${unused.id}`).expect(204);
    const refused = await staff.grower.delete(`${staff.path}/seed-lots/${used.id}`).expect(409);

    expect(problem(refused).code).toBe('LOT_USED');
    expect((await listed()).map(({ id }) => id)).toEqual([used.id]);
    const entries = await application.tx.findBy(AuditEntryEntity, { subjectId: unused.id });
    expect(entries.map(({ action }) => action).sort()).toEqual(['seed-lot.add', 'seed-lot.remove']);
  });

  it.each([
    ['an unknown crop', { cropId: 'moon-onion' }, ['body.cropId']],
    ['nothing in it', { amount: 0 }, ['body.amount']],
    ['a currency that is none', { price: 2, currency: 'euro' }, ['body.currency']],
    ['a year of no packet', { packedYear: 20 }, ['body.packedYear']],
  ])('with %s are refused', async (_, body, paths) => {
    const reply = await staff.grower.post(`${staff.path}/seed-lots`, { ...packet, ...body }).expect(422);

    expect(fields(reply)).toEqual(paths);
    expect(await listed()).toEqual([]);
  });

  describe('germination tests', () => {
    const begin = (lotId: string, body: object = {}) =>
      staff.grower.post(`${staff.path}/seed-lots/${lotId}/tests`, {
        startedOn: '2026-04-01',
        seeds: 20,
        ...body,
      });
    const begun = async (lotId: string): Promise<string> => {
      const { tests } = (await begin(lotId).expect(201)).body as SeedLotDetail;
      return tests[0]?.id ?? '';
    };
    const count = (lotId: string, testId: string, on: string, up: number) =>
      staff.helper.put(`${staff.path}/seed-lots/${lotId}/tests/${testId}/counts`, { on, up });

    it('take their seeds from the lot, and give them back when removed', async () => {
      const { id } = await added({});
      const testId = await begun(id);

      expect(await detail(id)).toMatchObject({ left: 80, uses: [{ reason: 'tested', amount: 20 }] });

      await staff.grower.delete(`${staff.path}/seed-lots/${id}/tests/${testId}`).expect(200);
      expect(await detail(id)).toMatchObject({ left: 100, uses: [], tests: [] });
    });

    it('say what to expect of the lot once they are counted: percent, interval, days', async () => {
      const { id } = await added({});
      const testId = await begun(id);
      expect((await detail(id)).expectation?.basis).toBe('standard');

      await count(id, testId, '2026-04-06', 4).expect(200);
      await count(id, testId, '2026-04-08', 9).expect(200);
      await count(id, testId, '2026-04-08', 12).expect(200);
      await count(id, testId, '2026-04-11', 16).expect(200);

      const { tests, expectation } = await detail(id);
      expect(tests[0]?.counts).toEqual([
        { day: 5, up: 4 },
        { day: 7, up: 12 },
        { day: 10, up: 16 },
      ]);
      // (4·5 + 8·7 + 4·10)/16 days; half of 16 lies midway between day 5 and day 7.
      expect(tests[0]).toMatchObject({ meanTimeDays: 7.25, t50Days: 6, result: { percent: 80 } });
      expect(expectation).toMatchObject({ percent: 80, basis: 'test', source: 'own test: 16 of 20' });
      // Wilson interval of 16 of 20: 58.4 to 91.9 %.
      expect(expectation?.lowPct).toBeCloseTo(58.4, 1);
      expect(expectation?.highPct).toBeCloseTo(91.9, 1);
    });

    it.each([
      ['more than were tried', '2026-04-06', 21, 'body.up'],
      ['fewer than before', '2026-04-08', 3, 'body.up'],
      ['more than afterwards', '2026-04-03', 5, 'body.up'],
      ['before they were put out', '2026-03-31', 0, 'body.on'],
      ['tomorrow', '2026-04-16', 5, 'body.on'],
    ])('refuse a count of %s', async (_, on, up, path) => {
      const { id } = await added({});
      const testId = await begun(id);
      await count(id, testId, '2026-04-05', 4).expect(200);

      expect(fields(await count(id, testId, on, up).expect(422))).toEqual([path]);
      expect((await detail(id)).tests[0]?.counts).toEqual([{ day: 4, up: 4 }]);
    });

    it('with more seeds than are left, or begun tomorrow, are refused and take nothing', async () => {
      const { id } = await added({});

      expect(fields(await begin(id, { seeds: 101 }).expect(422))).toEqual(['body.seeds']);
      expect(fields(await begin(id, { startedOn: '2026-04-16' }).expect(422))).toEqual(['body.startedOn']);
      expect(await detail(id)).toMatchObject({ left: 100, tests: [] });
    });

    it('of a lot in grams without seeds a gram say that grams are needed', async () => {
      const { id } = await added({ unit: 'grams', amount: 2 });

      expect(fields(await begin(id).expect(422))).toEqual(['body.grams']);
    });
  });

  describe('seeds for a number of plants', () => {
    const needed = (lotId: string, query: string) =>
      staff.viewer.get(`${staff.path}/seed-lots/${lotId}/seeds-needed?${query}`);

    // Cumulative binomial tables, p = 0.7: at least 10 of 17 in 0.895 of sowings, at least 10 of 18 in 0.940.
    it('follow from the germination of the lot and the certainty wanted', async () => {
      const { id } = await added({ amount: 15 });

      const reply = (await needed(id, 'plants=10').expect(200)).body as SeedsNeeded;

      expect(reply).toMatchObject({ takes: reply.seeds, germination: { percent: 70, basis: 'standard' } });
      expect(reply.seeds).toBe(18);
      expect(reply.isEnoughLeft).toBe(false);
    });

    it('of a crop without any figure are not guessed', async () => {
      const lot = await aSeedLot(application.tx, { roomId: staff.room.id, cropId: 'lemongrass' });

      expect(problem(await needed(lot.id, 'plants=10').expect(409)).code).toBe('GERMINATION_UNKNOWN');
    });
  });
});
