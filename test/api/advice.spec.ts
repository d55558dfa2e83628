import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { Board, BoardShelf } from '@shared/contracts/board';
import type { Task } from '@shared/contracts/care';
import type { WantedLight, WantedRange } from '@shared/contracts/rooms';
import type { ShelfDetail } from '@shared/contracts/series';
import { LiveRelay } from '../../server/live/live-relay';
import { aPlacement, aSensor } from '../builders/devices';
import { aHeatMat, aLamp, aLampPlan, aShelf, aWantedRange } from '../builders/rooms';
import { litDays, steadyHours } from '../builders/summaries';
import { eventOf, PlantingRoom } from './planting-room';
import { startTestApplication, type TestApplication } from './test-application';

describe('advice on a shelf', () => {
  let application: TestApplication;
  let room: PlantingRoom;

  beforeAll(async () => {
    application = await startTestApplication();
  });
  beforeEach(async () => {
    application.now = new Date('2026-04-15T10:00:00Z');
    room = await PlantingRoom.in(application);
    await aLamp(application.tx, { shelfId: room.shelf.id });
    await aHeatMat(application.tx, { shelfId: room.shelf.id });
  });
  afterAll(() => application.stop());

  const onBoard = async (shelfId = room.shelf.id): Promise<BoardShelf> => {
    const { racks } = await room.read<Board>('/board');
    const shelf = racks.flatMap(({ shelves }) => shelves).find(({ id }) => id === shelfId);
    if (shelf === undefined) throw new Error('no such shelf on the board');
    return shelf;
  };
  const advice = (shelfId = room.shelf.id): Promise<ShelfAdviceView> =>
    room.read(`/shelves/${shelfId}/advice`);
  const tasks = (): Promise<Task[]> => room.read('/tasks?from=2026-04-15&to=2026-04-16');
  const ranges = (): Promise<WantedRange[]> => room.read(`/shelves/${room.shelf.id}/wanted-ranges`);
  const rangeOf = async (quantity: string): Promise<WantedRange | undefined> =>
    (await ranges()).find((range) => range.quantity === quantity);
  const rangePath = (): string => `${room.staff.path}/shelves/${room.shelf.id}/wanted-ranges/airTemperature`;
  const light = (switchesOn: string | null, switchesOff: string | null) =>
    room.staff.grower
      .put(`${room.staff.path}/shelves/${room.shelf.id}/lamp-hours`, { switchesOn, switchesOff })
      .expect(200);

  it('asks for lamps with the first seedling on a dark shelf, though its neighbour still waits', async () => {
    const leek = await room.sown();
    await room.sown({ cropId: 'onion-long-day' });
    expect((await advice()).lamps).toMatchObject({ state: 'off', change: null });
    expect(await tasks()).toEqual([]);

    await room.counted(leek.id, 1).expect(201);

    expect((await onBoard()).advice?.lamps).toMatchObject({ state: 'on', hours: 12, change: 'switchOn' });
    expect(await tasks()).toMatchObject([
      {
        kind: 'switchLamps',
        title: 'Switch A3 lamps on: Leek is up',
        shelfLabel: 'A3',
        dueOn: '2026-04-15',
        doneAt: null,
      },
    ]);
    expect((await tasks())[0]?.detail).toContain('though Onion, long-day still waits');
  });

  it('asks once, however often it is worked out and whether its task was done or not', async () => {
    const leek = await room.sown();
    await room.counted(leek.id, 1, '2026-04-10T08:00:00Z').expect(201);
    await room.counted(leek.id, 5, '2026-04-11T08:00:00Z').expect(201);
    const [task] = await tasks();
    await room.staff.helper.put(`${room.staff.path}/tasks/${task?.id ?? ''}/completion`).expect(200);

    await room.counted(leek.id, 9, '2026-04-12T08:00:00Z').expect(201);
    await application.app.services.advice.refreshAll();

    expect((await tasks()).map(({ id }) => id)).toEqual([task?.id]);
  });

  it('takes its task back when the lamps are on, and when the count is undone', async () => {
    const leek = await room.sown();
    const event = eventOf(await room.counted(leek.id, 1));
    await light('06:00', '20:00');
    expect(await tasks()).toEqual([]);
    expect((await advice()).lamps.change).toBeNull();
    await light(null, null);
    expect(await tasks()).toHaveLength(1);

    await room.undo(leek.id, event).expect(204);

    expect(await tasks()).toEqual([]);
    expect((await advice()).lamps).toMatchObject({ state: 'off', change: null });
  });

  it('asks for the heat mat while seed wants it, and for its end with the last germination', async () => {
    const pepper = await room.sown({ cropId: 'sweet-pepper', count: 6 });
    expect(await tasks()).toMatchObject([
      { kind: 'switchHeatMat', title: 'Switch A3 heat mat on: Sweet pepper waits' },
    ]);
    await room.staff.grower
      .put(`${room.staff.path}/shelves/${room.shelf.id}/heat-mat`, { isOn: true })
      .expect(200);
    expect(await tasks()).toEqual([]);

    await room.counted(pepper.id, 6).expect(201);

    expect((await tasks()).map(({ title }) => title).sort()).toEqual([
      'Switch A3 heat mat off',
      'Switch A3 lamps on: Sweet pepper is up',
    ]);
  });

  it('leaves the mat off where the shelf is warm enough by its own readings', async () => {
    const { tx } = application;
    const sensor = await aSensor(tx, { roomId: room.staff.room.id, quantity: 'rootZoneTemperature' });
    await aPlacement(tx, { sensorId: sensor.id, shelfId: room.shelf.id });
    await steadyHours(tx, sensor.id, { from: '2026-04-12T00:00:00Z', to: '2026-04-15T10:00:00Z', value: 27 });

    await room.sown({ cropId: 'sweet-pepper' });

    expect((await advice()).heatMat).toMatchObject({ state: 'off', change: null });
    expect((await advice()).heatMat.reason).toContain('27 °C');
  });

  // Vegetable transplants want 10–15 mol m⁻² d⁻¹ (Owen 2021).
  it('asks for a look at the lamp after three days of too little light, with what may be the cause', async () => {
    const { tx } = application;
    const { id: sensorId } = await aSensor(tx, { roomId: room.staff.room.id, quantity: 'ppfd' });
    await aPlacement(tx, { sensorId, shelfId: room.shelf.id });
    await litDays(tx, sensorId, { until: '2026-04-13T23:00:00Z', sums: [8, 7] });
    await aLampPlan(tx, { shelfId: room.shelf.id });
    const leek = await room.sown();
    await room.counted(leek.id, 20, '2026-04-09T08:00:00Z').expect(201);
    expect(await tasks()).toEqual([]);

    await litDays(tx, sensorId, { until: '2026-04-14T23:00:00Z', sums: [6] });
    await application.app.services.advice.refreshAll();

    const [task, ...others] = await tasks();
    expect(others).toEqual([]);
    expect(task).toMatchObject({
      kind: 'inspect',
      title: 'Look at the lamp of A3: Leek gets too little light',
      shelfLabel: 'A3',
    });
    expect(task?.detail).toContain('7.0 mol/m² a day for three days, 10.0 wanted. ');
    // Planned are 16 h, measured 14.
    expect(task?.detail).toContain('The lamp may not burn as planned');

    await room.step(leek.id, { kind: 'ended' }).expect(201);
    expect((await tasks()).map(({ kind }) => kind)).not.toContain('inspect');
  });

  it('names what does not go together, and a shelf that fits', async () => {
    const a2 = await aShelf(application.tx, { roomId: room.staff.room.id, label: 'A2' });
    await aLamp(application.tx, { shelfId: a2.id });
    await aHeatMat(application.tx, { shelfId: a2.id });
    const leek = await room.sown();
    const pepper = await room.sown({ cropId: 'sweet-pepper' });
    await room.counted(leek.id, 20).expect(201);

    const { heatMat, conflicts, moves } = await advice();

    expect(heatMat.state).toBe('conflict');
    expect(conflicts.find(({ kind }) => kind === 'heatMat')?.plantingIds.sort()).toEqual(
      [leek.id, pepper.id].sort(),
    );
    expect(moves).toContainEqual(expect.objectContaining({ shelf: 'A2', shelfId: a2.id }));
  });

  describe('on its ranges', () => {
    it('sets what its plantings want at their stage, with whose ends these are', async () => {
      const leek = await room.sown();
      expect(await rangeOf('rootZoneTemperature')).toMatchObject({
        source: 'plantings',
        reason: 'Leek germinating',
      });
      expect(await rangeOf('airTemperature')).toBeUndefined();

      await room.counted(leek.id, 20).expect(201);

      // Onion transplants, to which leek is held: 65–70 °F by day, 55–60 °F by night (Delaware, Utah, Cornell).
      expect(await rangeOf('airTemperature')).toMatchObject({
        lampsOn: { low: 18.3, high: 21.1 },
        lampsOff: { low: 12.8, high: 15.6 },
        source: 'plantings',
        reason: 'Leek seedlings',
        since: '2026-04-15T10:00:00.000Z',
      });
      expect((await advice()).wanted.find(({ quantity }) => quantity === 'airTemperature')).toMatchObject({
        isSet: true,
        source: expect.stringContaining('Extension') as string,
      });
    });

    it('leaves alone what a person set, and takes over again when that is cleared', async () => {
      await aWantedRange(application.tx, { shelfId: room.shelf.id, reason: 'by hand' });
      const leek = await room.sown();
      await room.counted(leek.id, 20).expect(201);
      expect(await rangeOf('airTemperature')).toMatchObject({ reason: 'by hand' });
      const air = (await advice()).wanted.filter(({ quantity }) => quantity === 'airTemperature');
      expect(air.map(({ isSet }) => isSet)).toEqual([false, false]);

      await room.staff.grower.delete(rangePath()).expect(204);

      expect(await rangeOf('airTemperature')).toMatchObject({ source: 'plantings' });
    });

    it('keeps the instant of a range that stays the same, for it judges from then on', async () => {
      const leek = await room.sown();
      const { since } = (await rangeOf('rootZoneTemperature')) ?? {};
      application.now = new Date('2026-04-15T12:00:00Z');

      await room.observe(leek.id, { kind: 'noted', note: 'covered' }).expect(201);

      expect((await rangeOf('rootZoneTemperature'))?.since).toBe(since);
    });

    it('clears what nobody wants any more', async () => {
      const leek = await room.sown();
      expect(await ranges()).not.toEqual([]);

      await room.step(leek.id, { kind: 'ended' }).expect(201);

      expect(await ranges()).toEqual([]);
    });
  });

  describe('on the light of a day', () => {
    const light = async (): Promise<WantedLight | null> =>
      (await room.read<ShelfDetail>(`/shelves/${room.shelf.id}`)).wantedLight;
    const lightPath = (): string => `${room.staff.path}/shelves/${room.shelf.id}/wanted-light`;
    const isSet = async (): Promise<boolean | undefined> =>
      (await advice()).wanted.find(({ quantity }) => quantity === 'dailyLightIntegral')?.isSet;

    it('sets the least that its plantings want, since when that is the same, and clears it with them', async () => {
      const leek = await room.sown();
      expect(await light()).toBeNull();

      await room.counted(leek.id, 20).expect(201);
      application.now = new Date('2026-04-15T12:00:00Z');
      await room.observe(leek.id, { kind: 'noted', note: 'covered' }).expect(201);

      // Seedlings: 10 to 15 mol m⁻² d⁻¹ (Owen 2021).
      expect(await light()).toEqual({
        leastMolM2D: 10,
        source: 'plantings',
        reason: 'Leek seedlings',
        since: '2026-04-15T10:00:00.000Z',
      });
      expect(await isSet()).toBe(true);

      await room.step(leek.id, { kind: 'ended' }).expect(201);
      expect(await light()).toBeNull();
    });

    it('leaves alone what a person set, and takes over again when that is taken back', async () => {
      await room.staff.grower.put(lightPath(), { leastMolM2D: 6 }).expect(200);
      const leek = await room.sown();
      await room.counted(leek.id, 20).expect(201);
      expect(await light()).toMatchObject({ leastMolM2D: 6, source: 'shelf' });
      expect(await isSet()).toBe(false);

      await room.staff.grower.delete(lightPath()).expect(204);

      expect(await light()).toMatchObject({ leastMolM2D: 10, source: 'plantings' });
    });
  });

  it('is told to dashboards when it changes, and only then', async () => {
    const leek = await room.sown();
    const published = jest.spyOn(LiveRelay.prototype, 'publish');
    const advised = (): ShelfAdviceView[] =>
      published.mock.calls.flatMap(([, event, payload]) =>
        event === 'shelf:advised' ? [payload as ShelfAdviceView] : [],
      );

    await room.observe(leek.id, { kind: 'noted', note: 'covered' }).expect(201);
    expect(advised()).toEqual([]);
    await room.counted(leek.id, 1).expect(201);

    expect(advised()).toMatchObject([{ shelfId: room.shelf.id, lamps: { change: 'switchOn' } }]);
    published.mockRestore();
  });

  it('of a shelf of another room is nobody’s here', async () => {
    const foreign = await aShelf(application.tx);

    await room.staff.viewer.get(`${room.staff.path}/shelves/${foreign.id}/advice`).expect(404);
  });

  it('lets a range of the room hold where neither a person nor plantings say otherwise', async () => {
    const roomPath = `${room.staff.path}/wanted-ranges`;
    const rule = {
      lampsOn: { low: null, high: 28 },
      lampsOff: { low: 5, high: null },
      holdMinutes: 30,
      clearingMargin: 1,
    };
    await room.staff.grower
      .put(`${roomPath}/airTemperature`, { ...rule, reason: 'frost and heat' })
      .expect(200);
    expect(await rangeOf('airTemperature')).toMatchObject({
      ...rule,
      source: 'room',
      reason: 'frost and heat',
      since: '2026-04-15T10:00:00.000Z',
    });

    const leek = await room.sown();
    await room.counted(leek.id, 1).expect(201);
    expect(await rangeOf('airTemperature')).toMatchObject({ source: 'plantings' });

    await room.staff.grower.put(rangePath(), { ...rule, holdMinutes: 45 }).expect(200);
    expect(await rangeOf('airTemperature')).toMatchObject({ source: 'shelf', holdMinutes: 45 });

    const empty = await aShelf(application.tx, { roomId: room.staff.room.id });
    await application.app.services.advice.refreshAll();
    const onEmpty = await room.read<WantedRange[]>(`/shelves/${empty.id}/wanted-ranges`);
    expect(onEmpty).toMatchObject([{ quantity: 'airTemperature', source: 'room' }]);

    await room.staff.grower.delete(`${roomPath}/airTemperature`).expect(204);
    expect(await room.read(`/shelves/${empty.id}/wanted-ranges`)).toEqual([]);
    await room.staff.grower.delete(`${roomPath}/airTemperature`).expect(404);
    expect(await rangeOf('airTemperature')).toMatchObject({ source: 'shelf' });
  });
});
