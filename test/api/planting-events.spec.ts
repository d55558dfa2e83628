import type { Planting, PlantingDetail } from '@shared/contracts/plantings';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { PlantingEntity } from '../../server/plantings/planting-entity';
import { aShelf } from '../builders/rooms';
import { eventOf, fieldsOf, PlantingRoom, problemOf } from './planting-room';
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

  describe('through their life', () => {
    it('come up, are pricked out, moved, harvested and ended, each on the time line', async () => {
      const a2 = await aShelf(application.tx, { roomId: room.staff.room.id, label: 'A2' });
      const { id } = await room.sown();

      const first = await room.counted(id, 3, '2026-04-08T08:00:00Z').expect(201);
      expect(first.body).toMatchObject({ stage: 'emerging', up: 3, count: 3, sown: 20 });
      await room.counted(id, 16, '2026-04-10T08:00:00Z', { isLast: true }).expect(201);
      await room
        .step(id, {
          kind: 'prickedOut',
          count: 14,
          container: 'cells',
          at: '2026-04-12T08:00:00Z',
        })
        .expect(201);
      const moved = await room
        .step(id, { kind: 'moved', shelfId: a2.id, at: '2026-04-13T08:00:00Z' })
        .expect(201);
      expect(moved.body).toMatchObject({ shelfId: a2.id, event: { kind: 'moved', shelfLabel: 'A2' } });
      await room.observe(id, { kind: 'harvested', grams: 82.5, at: '2026-04-14T08:00:00Z' }).expect(201);
      await room.step(id, { kind: 'ended', note: 'eaten' }).expect(201);

      expect(await room.detail(id)).toMatchObject({
        stage: 'ended',
        endedOn: '2026-04-15',
        count: 14,
        container: 'cells',
        shelfId: null,
        harvestedGrams: 82.5,
        harvestedCount: 0,
        places: [
          { shelfLabel: 'A3', to: '2026-04-13T08:00:00.000Z' },
          { shelfLabel: 'A2', to: '2026-04-15T10:00:00.000Z' },
        ],
      });
      const story = (await room.detail(id)).events.map(({ kind }) => kind);
      expect(story).toEqual(['sown', 'counted', 'counted', 'prickedOut', 'moved', 'harvested', 'ended']);
      expect(await room.listed()).toEqual([]);
      expect((await room.listed('?state=ended')).map((planting) => planting.id)).toEqual([id]);
      const actions = await application.tx.findBy(AuditEntryEntity, { subjectId: id });
      expect(actions.map(({ action }) => action)).toContain('planting.prickedOut');
    });

    it.each([
      ['more up than were sown', 'observations', { kind: 'counted', up: 21 }, 'body.up'],
      [
        'a count before the sowing',
        'observations',
        { kind: 'counted', up: 2, at: '2026-03-31T09:00:00Z' },
        'body.at',
      ],
      [
        'a count of tomorrow',
        'observations',
        { kind: 'counted', up: 2, at: '2026-04-16T10:00:00Z' },
        'body.at',
      ],
      ['a harvest of nothing', 'observations', { kind: 'harvested' }, 'body.grams'],
      ['more lost than stand', 'steps', { kind: 'lost', count: 6, lossReason: 'dampingOff' }, 'body.count'],
      ['a stage that is set', 'steps', { kind: 'staged', stage: 'seedling' }, 'body.stage'],
    ])('refuse %s with the field, and store nothing', async (_, road, body, path) => {
      const { id } = await room.sown();
      await room.counted(id, 5, '2026-04-08T08:00:00Z', { isLast: true }).expect(201);
      const before = await room.detail(id);

      const refused = await room.staff.grower
        .post(`${room.staff.path}/plantings/${id}/${road}`, body)
        .expect(422);

      expect(fieldsOf(refused)).toEqual([path]);
      expect(await room.detail(id)).toEqual(before);
    });

    it('refuse what would not go with what was noted of later days', async () => {
      const { id } = await room.sown();
      await room.counted(id, 5, '2026-04-08T08:00:00Z', { isLast: true }).expect(201);
      await room
        .step(id, { kind: 'lost', count: 5, lossReason: 'driedOut', at: '2026-04-12T08:00:00Z' })
        .expect(201);

      const late = { kind: 'lost', count: 1, lossReason: 'pests', at: '2026-04-10T08:00:00Z' };

      expect(fieldsOf(await room.step(id, late).expect(422))).toEqual(['body.at']);
    });

    it('are not moved to a shelf of another room', async () => {
      const foreign = await aShelf(application.tx);
      const { id } = await room.sown();

      await room.step(id, { kind: 'moved', shelfId: foreign.id }).expect(404);

      expect((await room.detail(id)).shelfId).toBe(room.shelf.id);
    });

    it('keep a shelf from being retired while they stand on it', async () => {
      const { id } = await room.sown();
      const path = `${room.staff.path}/shelves/${room.shelf.id}`;

      expect(problemOf(await room.staff.keeper.delete(path).expect(409)).code).toBe('SHELF_IN_USE');
      await room.step(id, { kind: 'ended' }).expect(201);
      await room.staff.keeper.delete(path).expect(204);

      expect((await room.detail(id)).places[0]?.shelfLabel).toBe('A3');
    });
  });

  describe('parted and put together', () => {
    it('become two, with the same identity, and are one again when undone', async () => {
      const { id } = await room.sown({ variety: 'Grey Heron' });
      await room.counted(id, 16, '2026-04-10T08:00:00Z', { isLast: true }).expect(201);
      const a2 = await aShelf(application.tx, { roomId: room.staff.room.id, label: 'A2' });

      const part = (
        await room.staff.grower
          .post(`${room.staff.path}/plantings/${id}/split`, { count: 6, shelfId: a2.id, container: 'pots' })
          .expect(201)
      ).body as PlantingDetail;

      expect(part).toMatchObject({
        crop: 'Leek',
        variety: 'Grey Heron',
        origin: 'split',
        stage: 'seedling',
        count: 6,
        shelfLabel: 'A2',
        container: 'pots',
        events: [{ kind: 'split', otherPlantingId: id }],
      });
      const whole = await room.detail(id);
      expect(whole).toMatchObject({ count: 10, undoableEventId: whole.events.at(-1)?.id });
      expect(
        problemOf(await room.staff.grower.delete(`${room.staff.path}/plantings/${part.id}`).expect(409)).code,
      ).toBe('SPLIT_OFF');

      await room.undo(id, whole.undoableEventId).expect(204);

      expect((await room.detail(id)).count).toBe(16);
      await room.staff.viewer.get(`${room.staff.path}/plantings/${part.id}`).expect(404);
    });

    it('can’t be undone once something happened to the part', async () => {
      const { id } = await room.sown();
      await room.counted(id, 16, '2026-04-10T08:00:00Z').expect(201);
      const part = (await room.staff.grower.post(`${room.staff.path}/plantings/${id}/split`, { count: 6 }))
        .body as Planting;
      await room.observe(part.id, { kind: 'noted', note: 'curled' }).expect(201);

      const refused = await room.undo(id, (await room.detail(id)).undoableEventId).expect(409);

      expect(problemOf(refused).code).toBe('HAS_HISTORY');
      expect((await room.detail(id)).count).toBe(10);
    });

    it('take each other in, and the other ends; undone, both stand again', async () => {
      const one = await room.sown();
      const other = await room.sown();
      await room.counted(one.id, 9).expect(201);
      await room.counted(other.id, 4).expect(201);

      const merge = room.staff.grower.post(`${room.staff.path}/plantings/${one.id}/merge`, {
        otherId: other.id,
      });
      expect((await merge.expect(200)).body).toMatchObject({ count: 13 });
      expect(await room.detail(other.id)).toMatchObject({
        stage: 'ended',
        shelfId: null,
        undoableEventId: null,
      });

      await room.undo(one.id, (await room.detail(one.id)).undoableEventId).expect(204);

      expect(await room.detail(one.id)).toMatchObject({ count: 9 });
      expect(await room.detail(other.id)).toMatchObject({
        count: 4,
        stage: 'emerging',
        shelfId: room.shelf.id,
        endedOn: null,
      });
    });

    it('of two crops, or with oneself, or below ground, are refused', async () => {
      const leek = await room.sown();
      await room.counted(leek.id, 9).expect(201);
      const basil = await room.sown({ cropId: 'basil' });
      const seeds = await room.sown();
      const merge = async (otherId: string) =>
        fieldsOf(
          await room.staff.grower
            .post(`${room.staff.path}/plantings/${leek.id}/merge`, { otherId })
            .expect(422),
        );

      for (const { id } of [leek, basil, seeds]) expect(await merge(id)).toEqual(['body.otherId']);
    });
  });

  describe('undone', () => {
    it('go back one event at a time, newest first', async () => {
      const { id } = await room.sown();
      const first = eventOf(await room.counted(id, 3, '2026-04-08T08:00:00Z'));
      const second = eventOf(await room.counted(id, 20, '2026-04-10T08:00:00Z'));

      expect(problemOf(await room.undo(id, first).expect(409)).code).toBe('NOT_LAST');
      await room.undo(id, second).expect(204);
      expect(await room.detail(id)).toMatchObject({ stage: 'emerging', up: 3, undoableEventId: first });
      await room.undo(id, first).expect(204);

      expect(await room.detail(id)).toMatchObject({ stage: 'sown', up: 0, count: 20, undoableEventId: null });
      const { firstUpAt } = await application.tx.findOneByOrFail(PlantingEntity, { id });
      expect(firstUpAt).toBeNull();
    });

    it('don’t go back beyond how they began', async () => {
      const { id, events } = await room.sown();

      expect(problemOf(await room.undo(id, events[0]?.id ?? '').expect(409)).code).toBe('FIRST_EVENT');
    });

    it('by helpers only as far as they noted it themselves', async () => {
      const { id } = await room.sown();
      const own = eventOf(await room.counted(id, 3, '2026-04-08T08:00:00Z'));
      await room.undo(id, own, room.staff.helper).expect(204);
      const others = eventOf(
        await room.staff.grower.post(`${room.staff.path}/plantings/${id}/observations`, {
          kind: 'counted',
          up: 3,
        }),
      );

      expect(problemOf(await room.undo(id, others, room.staff.helper).expect(403)).code).toBe('NOT_YOURS');
      expect((await room.detail(id)).up).toBe(3);
    });
  });
});
