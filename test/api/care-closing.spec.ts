import sharp from 'sharp';
import type { Task } from '@shared/contracts/care';
import type { PlantingDetail } from '@shared/contracts/plantings';
import { TaskEntity } from '../../server/care/task-entity';
import { aRoutine, aTask } from '../builders/care';
import { aPlanting } from '../builders/plantings';
import { aShelf } from '../builders/rooms';
import { fieldsOf, problemOf } from './planting-room';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('closing a task', () => {
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

  const pathOf = ({ id }: { id: string }): string => `${staff.path}/tasks/${id}/completion`;
  const close = (task: { id: string }, body: object = {}) => staff.helper.put(pathOf(task), body);
  const task = (overrides: Parameters<typeof aTask>[1] = {}) =>
    aTask(tx, { roomId: staff.room.id, ...overrides });
  const routine = (overrides: Parameters<typeof aRoutine>[1] = {}) =>
    aRoutine(tx, { roomId: staff.room.id, ...overrides });
  const tasksOf = (routineId: string): Promise<TaskEntity[]> =>
    tx.find(TaskEntity, { where: { routineId }, order: { dueOn: 'ASC' } });
  const planned = async (overrides: Parameters<typeof aRoutine>[1]): Promise<TaskEntity> => {
    const { id } = await routine(overrides);
    await application.app.services.planning.planAhead();
    const [first] = await tasksOf(id);
    if (first === undefined) throw new Error('nothing was planned');
    return first;
  };

  it('says what became of it, how much, how long it took, and when', async () => {
    const reply = await close(await task(), {
      note: 'dry at the edges',
      millilitres: 800,
      tookMinutes: 12,
      doneAt: '2026-04-15T07:30:00Z',
    }).expect(200);

    expect(reply.body).toMatchObject({
      outcome: 'done',
      note: 'dry at the edges',
      millilitres: 800,
      tookMinutes: 12,
      doneAt: '2026-04-15T07:30:00.000Z',
      doneByName: staff.people.helper.name,
    });
  });

  it.each(['notNeeded', 'couldNot'])('as %s needs a reason', async (outcome) => {
    const due = await task();
    expect(fieldsOf(await close(due, { outcome }).expect(422))).toEqual(['body.note']);
    expect((await close(due, { outcome, note: 'still wet' }).expect(200)).body).toMatchObject({ outcome });
  });

  it.each([
    ['of a time to come', '2026-04-15T10:05:00Z'],
    ['of more than a week ago', '2026-04-08T09:59:00Z'],
  ])('%s is refused', async (_, doneAt) => {
    const due = await task();
    expect(fieldsOf(await close(due, { doneAt }).expect(422))).toEqual(['body.doneAt']);
    expect(await tx.findOneBy(TaskEntity, { id: due.id })).toMatchObject({ doneAt: null });
  });

  it('that somebody else closed is told kindly: who, when and how', async () => {
    const due = await task();
    await staff.grower.put(pathOf(due), { outcome: 'notNeeded', note: 'wet' }).expect(200);

    const refused = await close(due).expect(409);

    expect(problemOf(refused)).toMatchObject({
      code: 'TASK_CLOSED',
      facts: { byName: staff.people.grower.name, at: '2026-04-15T10:00:00.000Z', outcome: 'notNeeded' },
    });
  });

  it('takes back only one’s own, unless a grower does', async () => {
    const due = await task();
    await staff.grower.put(pathOf(due)).expect(200);
    expect(problemOf(await staff.helper.delete(pathOf(due)).expect(403)).code).toBe('NOT_YOURS');
    await staff.keeper.delete(pathOf(due)).expect(200);
  });

  describe('lets its routine go on', () => {
    it('from the day it was done, for care that counts from there', async () => {
      const first = await planned({ timing: 'afterDoing', everyDays: 3 });
      expect(first.dueOn).toBe('2026-04-15');
      application.now = new Date('2026-04-17T10:00:00Z');

      await close(first).expect(200);

      const tasks = await tasksOf(first.routineId ?? '');
      expect(tasks.map(({ dueOn, outcome }) => [dueOn, outcome])).toEqual([
        ['2026-04-15', 'done'],
        ['2026-04-20', null],
      ]);
    });

    it('tomorrow again when it could not be done', async () => {
      const first = await planned({ timing: 'afterDoing', everyDays: 3 });
      await close(first, { outcome: 'couldNot', note: 'no water' }).expect(200);
      expect((await tasksOf(first.routineId ?? '')).map(({ dueOn }) => dueOn)).toEqual([
        '2026-04-15',
        '2026-04-16',
      ]);
    });

    it('and taking it back takes the next turn back too', async () => {
      const first = await planned({ timing: 'afterDoing', everyDays: 3 });
      await close(first).expect(200);
      await staff.helper.delete(pathOf(first)).expect(200);
      expect((await tasksOf(first.routineId ?? '')).map(({ dueOn, doneAt }) => [dueOn, doneAt])).toEqual([
        ['2026-04-15', null],
      ]);
    });

    it('closes what it makes up for as missed, which opens again with it', async () => {
      const { id: routineId } = await routine({ plannedTo: '2026-05-01' });
      const of = (dueOn: string) => task({ routineId, dueOn, routineDay: dueOn });
      const [late, today, tomorrow] = [
        await of('2026-04-13'),
        await of('2026-04-15'),
        await of('2026-04-17'),
      ];

      await close(today).expect(200);
      const outcomes = async () => (await tasksOf(routineId)).map(({ outcome }) => outcome);
      expect((await outcomes()).slice(0, 3)).toEqual(['missed', 'done', null]);
      expect(problemOf(await staff.keeper.delete(pathOf(late)).expect(409)).code).toBe('MADE_UP');

      await staff.helper.delete(pathOf(today)).expect(200);
      expect((await outcomes()).slice(0, 3)).toEqual([null, null, null]);
      await close(tomorrow, { outcome: 'couldNot', note: 'no water' }).expect(200);
      expect((await outcomes()).slice(0, 3)).toEqual([null, null, 'couldNot']);
    });
  });

  describe('at plantings', () => {
    const storyOf = async (plantingId: string): Promise<PlantingDetail> =>
      (await staff.viewer.get(`${staff.path}/plantings/${plantingId}`).expect(200)).body as PlantingDetail;
    const eventsOf = async (plantingId: string) =>
      (await storyOf(plantingId)).events
        .slice(1)
        .map(({ kind, millilitres, grams }) => ({ kind, millilitres, grams }));

    it('notes the water at its planting, and takes it back with the tick', async () => {
      const shelf = await aShelf(tx, { roomId: staff.room.id, label: 'A3' });
      const planting = await aPlanting(tx, { shelfId: shelf.id });
      const due = await task({ plantingId: planting.id });

      const done = (await close(due, { millilitres: 400 }).expect(200)).body as Task;
      expect(done).toMatchObject({ plantingLabel: 'Lettuce', shelfLabel: 'A3' });
      expect(await eventsOf(planting.id)).toEqual([{ kind: 'watered', millilitres: 400, grams: null }]);

      await staff.helper.delete(pathOf(due)).expect(200);
      expect(await eventsOf(planting.id)).toEqual([]);
    });

    it('notes the water of a shelf at all that stands there, without telling shares apart', async () => {
      const shelf = await aShelf(tx, { roomId: staff.room.id });
      const [one, other] = [
        await aPlanting(tx, { shelfId: shelf.id }),
        await aPlanting(tx, { shelfId: shelf.id }),
      ];
      await close(await task({ shelfId: shelf.id }), { millilitres: 900 }).expect(200);
      for (const { id } of [one, other]) {
        expect(await eventsOf(id)).toEqual([{ kind: 'watered', millilitres: null, grams: null }]);
      }
    });

    it('notes a harvest at the planting that is named, and asks where several could be meant', async () => {
      const shelf = await aShelf(tx, { roomId: staff.room.id });
      const [one] = [await aPlanting(tx, { shelfId: shelf.id }), await aPlanting(tx, { shelfId: shelf.id })];
      const due = await task({ shelfId: shelf.id, kind: 'pick' });

      expect(fieldsOf(await close(due, { grams: 212 }).expect(422))).toEqual(['body.plantingId']);
      await close(due, { grams: 212, plantingId: one.id }).expect(200);

      expect(await storyOf(one.id)).toMatchObject({ harvestedGrams: 212 });
    });

    it('refuses a planting of another room', async () => {
      const due = await task({ kind: 'pick' });
      await close(due, { grams: 5, plantingId: (await aPlanting(tx)).id }).expect(404);
      expect(await tx.findOneBy(TaskEntity, { id: due.id })).toMatchObject({ doneAt: null });
    });

    it('keeps a photo at the task and at its planting', async () => {
      const shelf = await aShelf(tx, { roomId: staff.room.id });
      const planting = await aPlanting(tx, { shelfId: shelf.id });
      const due = await task({ plantingId: planting.id });

      const reply = await staff.helper
        .call('post', `${staff.path}/tasks/${due.id}/photos?caption=roots`)
        .attach(
          'file',
          await sharp({ create: { width: 8, height: 6, channels: 3, background: '#3a7d44' } })
            .jpeg()
            .toBuffer(),
          'roots.jpg',
        )
        .expect(201);

      const { photos } = await storyOf(planting.id);
      expect(photos).toMatchObject([{ caption: 'roots' }]);
      expect((reply.body as Task).photoIds).toEqual(photos.map(({ id }) => id));
    });
  });
});
