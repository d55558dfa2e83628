import type { PlantingProgress } from '@shared/contracts/planting-progress';
import { aPlacement, aSensor } from '../builders/devices';
import { aLamp, aLampPlan, aShelf } from '../builders/rooms';
import { litDays, steadyHours } from '../builders/summaries';
import { PlantingRoom } from './planting-room';
import { startTestApplication, type TestApplication } from './test-application';

describe('the progress of a planting', () => {
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

  const progress = (id: string): Promise<PlantingProgress> => room.read(`/plantings/${id}/progress`);
  async function sensorOn(shelfId: string, quantity: 'airTemperature' | 'ppfd'): Promise<string> {
    const { id } = await aSensor(application.tx, { roomId: room.staff.room.id, quantity });
    await aPlacement(application.tx, { sensorId: id, shelfId });
    return id;
  }
  async function measured(value: number, shelfId = room.shelf.id): Promise<void> {
    const sensorId = await sensorOn(shelfId, 'airTemperature');
    await steadyHours(application.tx, sensorId, {
      from: '2026-03-10T00:00:00Z',
      to: '2026-04-15T10:00:00Z',
      value,
    });
  }
  /** Days of light on A3 up to and with yesterday, in Dublin's summer time. */
  async function lit(sums: readonly number[]): Promise<void> {
    await litDays(application.tx, await sensorOn(room.shelf.id, 'ppfd'), {
      until: '2026-04-14T23:00:00Z',
      sums,
    });
  }

  // Leek grows above 5 °C (from memory): at a steady 20 °C it gathers 15 °C·d a day.
  it('counts degree days above its crop’s base, with what they rest on', async () => {
    await measured(20);
    const { id } = await room.sown({ at: '2026-04-01T10:00:00Z' });

    const { degreeDays } = await progress(id);

    expect(degreeDays).toMatchObject({ baseC: 5, upperC: null, source: 'from memory' });
    expect(degreeDays?.sumCD).toBeCloseTo(14 * 15, -1);
    expect(degreeDays?.perDayCD).toBeCloseTo(15, 6);
    expect(degreeDays?.coverage).toBeGreaterThan(0.99);
  });

  it('goes on where the planting was moved to', async () => {
    const warm = await aShelf(application.tx, { roomId: room.staff.room.id, label: 'A2' });
    await measured(15);
    await measured(25, warm.id);
    const { id } = await room.sown({ at: '2026-04-01T10:00:00Z' });
    await room.step(id, { kind: 'moved', shelfId: warm.id, at: '2026-04-08T10:00:00Z' }).expect(201);

    const { degreeDays } = await progress(id);

    // Seven days at 10 and seven at 20 °C·d; the hour of moving is nobody's.
    expect(degreeDays?.sumCD).toBeGreaterThan(205);
    expect(degreeDays?.sumCD).toBeLessThan(210.5);
    expect(degreeDays?.perDayCD).toBeCloseTo(20, 6);
  });

  it('says when it can go out, and the warmth left until then', async () => {
    await measured(20);
    const { id } = await room.sown({ cropId: 'onion-long-day', at: '2026-04-01T10:00:00Z' });

    const { transplant } = await progress(id);

    // Six weeks (Cornell) to twelve (Delaware, Utah, Purdue) from 1 April.
    expect(transplant).toMatchObject({ earliest: '2026-05-13', latest: '2026-06-24' });
    expect(transplant?.degreeDaysToEarliest).toBeCloseTo(28 * 15, 6);
    expect(transplant?.degreeDaysToLatest).toBeCloseTo(70 * 15, 6);
  });

  describe('in light', () => {
    const seedlings = async (): Promise<string> => {
      await aLamp(application.tx, { shelfId: room.shelf.id, kind: 'fluorescent', fittedOn: '2026-02-01' });
      await aLampPlan(application.tx, { shelfId: room.shelf.id });
      const { id } = await room.sown({ at: '2026-04-01T10:00:00Z' });
      await room.counted(id, 20, '2026-04-09T08:00:00Z').expect(201);
      return id;
    };

    // Vegetable transplants want 10–15 mol m⁻² d⁻¹ (Owen 2021).
    it('is short after three days in a row below what its stage wants, with what may be the cause', async () => {
      await lit([12, 8, 7, 6]);

      const { light } = await progress(await seedlings());

      expect(light).toMatchObject({ wanted: { low: 10, high: 15 }, sumMolM2: 33 });
      expect(light?.source).toContain('Owen (2021)');
      expect(light?.days.map(({ day, dliMolM2D }) => [day, dliMolM2D])).toEqual([
        ['2026-04-11', 12],
        ['2026-04-12', 8],
        ['2026-04-13', 7],
        ['2026-04-14', 6],
      ]);
      expect(light?.shortage).toMatchObject({ meanMolM2D: 7, missingMolM2D: 3 });
      // Planned are 16 h, measured 14.
      expect(light?.shortage?.causes.join(' ')).toContain('may not burn as planned');
    });

    it('is not short while one of the last three days had enough', async () => {
      await lit([6, 6, 11, 6]);

      expect((await progress(await seedlings())).light?.shortage).toBeNull();
    });

    // The seed was dark as it should be; lamps came on when it was up.
    it.each([
      ['at its stage', async (id: string) => room.counted(id, 20, '2026-04-13T08:00:00Z')],
      [
        'where it stands',
        async (id: string) => {
          await room.counted(id, 20, '2026-04-09T08:00:00Z');
          const a2 = await aShelf(application.tx, { roomId: room.staff.room.id, label: 'A2' });
          await room.step(id, { kind: 'moved', shelfId: a2.id, at: '2026-04-10T08:00:00Z' });
          return room.step(id, { kind: 'moved', shelfId: room.shelf.id, at: '2026-04-13T08:00:00Z' });
        },
      ],
    ])('is not short by days before it was %s', async (_case, happen) => {
      await lit([0, 0, 0, 6]);
      const { id } = await room.sown({ at: '2026-04-01T10:00:00Z' });
      expect((await happen(id)).status).toBe(201);

      expect((await progress(id)).light?.shortage).toBeNull();
    });

    it('is unknown where nothing was measured, and not none', async () => {
      const { light } = await progress(await seedlings());

      expect(light).toMatchObject({ days: [], sumMolM2: null, shortage: null });
    });
  });

  it('of a crop without figures is null, part by part', async () => {
    const plants = { how: 'broughtIn', cropId: 'pothos', count: 1, shelfId: room.shelf.id };
    const { id } = (await room.start(plants).expect(201)).body as { id: string };

    expect(await progress(id)).toMatchObject({ degreeDays: null, light: null, transplant: null });
  });
});
