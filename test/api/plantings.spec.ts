import type { Board } from '@shared/contracts/board';
import type { Planting, PlantingDetail } from '@shared/contracts/plantings';
import type { SeedLotDetail } from '@shared/contracts/seed';
import { aPlanting } from '../builders/plantings';
import { aShelf } from '../builders/rooms';
import { aSeedLot } from '../builders/seed';
import { fieldsOf, PlantingRoom, problemOf } from './planting-room';
import { startTestApplication, type TestApplication } from './test-application';

describe('plantings', () => {
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

  it('are shown on their shelf until they end, oldest first', async () => {
    const { tx } = application;
    const bare = await aShelf(tx, { roomId: room.staff.room.id });
    const shelfId = room.shelf.id;
    const younger = await aPlanting(tx, { shelfId, startedOn: '2026-04-01', stageSince: '2026-04-02' });
    const older = await aPlanting(tx, { shelfId, variety: 'Invented Red', count: 0 });
    await aPlanting(tx, { shelfId, endedOn: '2026-04-10', stage: 'ended' });

    const board = (await room.staff.viewer.get(`${room.staff.path}/board`).expect(200)).body as Board;

    const shelves = board.racks.flatMap((rack) => rack.shelves);
    expect(shelves.find(({ id }) => id === bare.id)?.plantings).toEqual([]);
    expect(shelves.find(({ id }) => id === shelfId)?.plantings).toEqual([
      {
        id: older.id,
        crop: 'Lettuce',
        variety: 'Invented Red',
        habit: 'rosette',
        count: 0,
        stage: 'growingOn',
        startedOn: '2026-03-01',
        stageSince: '2026-03-20',
      },
      expect.objectContaining({ id: younger.id, startedOn: '2026-04-01', stageSince: '2026-04-02' }),
    ]);
  });

  describe('sown', () => {
    it('keep what, where, how deep and when, by the calendar of the room', async () => {
      const planting = await room.sown({
        depthMm: 6,
        container: 'half tray',
        variety: 'Grey Heron',
        note: 'loose mix',
      });

      expect(planting).toMatchObject({
        crop: 'Leek',
        cropId: 'leek',
        habit: 'blades',
        variety: 'Grey Heron',
        origin: 'sown',
        stage: 'sown',
        sown: 20,
        up: 0,
        count: 20,
        container: 'half tray',
        depthMm: 6,
        shelfLabel: 'A3',
        startedOn: '2026-04-01',
        startedAt: '2026-04-01T09:00:00.000Z',
        lotId: null,
        undoableEventId: null,
        places: [{ shelfLabel: 'A3', from: '2026-04-01T09:00:00.000Z', to: null }],
        events: [{ kind: 'sown', count: 20, note: 'loose mix', personName: room.staff.people.grower.name }],
      });
    });

    it('from a lot take its crop, its variety and its seed', async () => {
      const lot = await aSeedLot(application.tx, {
        roomId: room.staff.room.id,
        variety: 'Grey Heron',
        lotNumber: '17/4',
      });

      const planting = await room.sown({ cropId: undefined, lotId: lot.id, count: 60 });

      expect(planting).toMatchObject({
        crop: 'Leek',
        variety: 'Grey Heron',
        lotId: lot.id,
        lotName: 'packed 2025, lot 17/4',
      });
      const after = await room.read<SeedLotDetail>(`/seed-lots/${lot.id}`);
      expect(after).toMatchObject({
        left: 140,
        uses: [{ reason: 'sown', amount: 60, plantingId: planting.id, at: '2026-04-01T09:00:00.000Z' }],
      });
    });

    it('from a lot in grams take what was weighed, or what seeds a gram say', async () => {
      const { tx } = application;
      const lot = await aSeedLot(tx, {
        roomId: room.staff.room.id,
        unit: 'grams',
        amount: 2,
        seedsPerGram: 400,
      });
      const unknown = await aSeedLot(tx, { roomId: room.staff.room.id, unit: 'grams', amount: 2 });
      const left = async (id: string): Promise<number> =>
        (await room.read<SeedLotDetail>(`/seed-lots/${id}`)).left;

      await room.sown({ lotId: lot.id, count: 100 });
      await room.sown({ lotId: lot.id, count: 100, grams: 0.35 });
      const refused = await room.start(room.sowing({ lotId: unknown.id })).expect(422);

      expect(await left(lot.id)).toBe(1.4);
      expect(fieldsOf(refused)).toEqual(['body.grams']);
    });

    it('once under one Idempotency-Key, however often the phone sends it', async () => {
      const lot = await aSeedLot(application.tx, { roomId: room.staff.room.id });
      const send = () =>
        room.staff.grower
          .call('post', `${room.staff.path}/plantings`)
          .set('Idempotency-Key', 'a-phone-in-the-cellar')
          .send(room.sowing({ lotId: lot.id }))
          .expect(201);

      const first = await send();
      const second = await send();

      expect((second.body as PlantingDetail).id).toBe((first.body as PlantingDetail).id);
      expect(await room.listed()).toHaveLength(1);
    });

    it('say what came of their lot once they are done coming up', async () => {
      const lot = await aSeedLot(application.tx, { roomId: room.staff.room.id });
      const planting = await room.sown({ lotId: lot.id, count: 20 });
      await room.counted(planting.id, 15, '2026-04-12T08:00:00Z', { isLast: true }).expect(201);

      const { expectation } = (await room.staff.viewer.get(`${room.staff.path}/seed-lots/${lot.id}`))
        .body as SeedLotDetail;
      expect(expectation).toMatchObject({ percent: 75, basis: 'sowings' });
    });

    it.each([
      ['tomorrow', { at: '2026-04-16T10:00:00Z' }, 'body.at'],
      ['of no crop and no lot', { cropId: undefined }, 'body.cropId'],
      ['of a crop that nobody has', { cropId: 'moon-leek' }, 'body.cropId'],
      ['of no seed', { count: 0 }, 'body.count'],
    ])('%s are refused', async (_, more, path) => {
      expect(fieldsOf(await room.start(room.sowing(more)).expect(422))).toEqual([path]);
      expect(await room.listed()).toEqual([]);
    });

    it('of more seed than is left are refused, and nothing is stored', async () => {
      const lot = await aSeedLot(application.tx, { roomId: room.staff.room.id, amount: 30 });

      const refused = await room.start(room.sowing({ lotId: lot.id, count: 31 })).expect(422);

      expect(fieldsOf(refused)).toEqual(['body.count']);
      expect(await room.listed()).toEqual([]);
      const after = await room.read<SeedLotDetail>(`/seed-lots/${lot.id}`);
      expect(after).toMatchObject({ left: 30, uses: [] });
    });

    it('on a shelf or from a lot of another room are refused', async () => {
      const { tx } = application;
      await room.start(room.sowing({ shelfId: (await aShelf(tx)).id })).expect(404);
      await room.start(room.sowing({ lotId: (await aSeedLot(tx)).id })).expect(404);
      expect(await room.listed()).toEqual([]);
    });

    it('by mistake can be removed, and their seed is back, until something happens to them', async () => {
      const lot = await aSeedLot(application.tx, { roomId: room.staff.room.id });
      const mistake = await room.sown({ lotId: lot.id });
      const used = await room.sown();
      await room.counted(used.id, 2).expect(201);

      await room.staff.grower.delete(`${room.staff.path}/plantings/${mistake.id}`).expect(204);
      const refused = await room.staff.grower.delete(`${room.staff.path}/plantings/${used.id}`).expect(409);

      expect(problemOf(refused).code).toBe('HAS_HISTORY');
      expect((await room.listed()).map(({ id }) => id)).toEqual([used.id]);
      const after = await room.read<SeedLotDetail>(`/seed-lots/${lot.id}`);
      expect(after.left).toBe(200);
    });
  });

  it('brought in begin at their stage, without a sowing, and keep for years', async () => {
    const planting = (
      await room
        .start({
          how: 'broughtIn',
          cropId: 'bay',
          count: 2,
          shelfId: room.shelf.id,
          stage: 'growingOn',
          source: 'cutting of our own',
          at: '2021-04-01T09:00:00Z',
        })
        .expect(201)
    ).body as PlantingDetail;

    expect(planting).toMatchObject({
      origin: 'broughtIn',
      sown: null,
      up: null,
      source: 'cutting of our own',
    });
    expect(fieldsOf(await room.counted(planting.id, 2).expect(422))).toEqual(['body.kind']);
  });

  it('are listed page by page, newest first, and by crop, lot and shelf', async () => {
    const lot = await aSeedLot(application.tx, { roomId: room.staff.room.id });
    const ids: string[] = [];
    for (const day of ['01', '02', '03']) {
      ids.unshift((await room.sown({ at: `2026-04-${day}T09:00:00Z` })).id);
    }
    const other = await room.sown({
      cropId: 'leek',
      lotId: lot.id,
      shelfId: null,
      at: '2026-03-01T09:00:00Z',
    });

    const page = await room.staff.viewer.get(`${room.staff.path}/plantings?limit=2`).expect(200);
    const { nextCursor, plantings } = page.body as { nextCursor: string; plantings: Planting[] };
    const rest = await room.listed(`?limit=5&cursor=${nextCursor}`);

    expect([...plantings, ...rest].map(({ id }) => id)).toEqual([...ids, other.id]);
    expect((await room.listed(`?lotId=${lot.id}`)).map(({ id }) => id)).toEqual([other.id]);
    expect((await room.listed(`?shelfId=${room.shelf.id}&cropId=leek`)).map(({ id }) => id)).toEqual(ids);
    expect(await room.listed('?cropId=basil')).toEqual([]);
  });

  it('are corrected in what was written of them, and their variety is kept', async () => {
    const { id } = await room.sown();

    const changed = await room.staff.grower
      .patch(`${room.staff.path}/plantings/${id}`, { variety: 'Blue Heron', depthMm: 8 })
      .expect(200);

    expect(changed.body).toMatchObject({ variety: 'Blue Heron', depthMm: 8 });
    const varieties = (await room.staff.viewer.get(`${room.staff.path}/varieties`)).body as {
      id: string;
      name: string;
    }[];
    expect(varieties).toMatchObject([{ name: 'Blue Heron' }]);
    const path = `${room.staff.path}/varieties/${varieties[0]?.id ?? ''}`;
    expect(problemOf(await room.staff.grower.delete(path).expect(409)).code).toBe('VARIETY_USED');
    await room.staff.grower.patch(path, { name: 'Grey Heron' }).expect(200);
    expect((await room.detail(id)).variety).toBe('Grey Heron');
  });
});
