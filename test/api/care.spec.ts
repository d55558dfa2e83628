import type { ShelfEvent, Task } from '@shared/contracts/care';
import type { Routine } from '@shared/contracts/care-routines';
import type { Problem } from '@shared/contracts/problem';
import { LiveRelay } from '../../server/live/live-relay';
import { RoutineEntity } from '../../server/care/routine-entity';
import { TaskEntity } from '../../server/care/task-entity';
import { aRoutine, aTask } from '../builders/care';
import { aPerson } from '../builders/people';
import { aShelf } from '../builders/rooms';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('care', () => {
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

  const dueDaysOf = async (routineId: string): Promise<string[]> => {
    const tasks = await tx.find(TaskEntity, { where: { routineId }, order: { dueOn: 'ASC' } });
    return tasks.map(({ dueOn }) => dueOn);
  };
  const byRule = (rule: string, startsOn = '2026-04-15') => ({ timing: { how: 'calendar', rule, startsOn } });
  const addRoutine = (body: object) =>
    staff.grower.post(`${staff.path}/routines`, {
      kind: 'water',
      title: 'Water the peppers',
      place: { at: 'room' },
      who: { how: 'onDuty' },
      ...byRule('FREQ=DAILY;INTERVAL=4'),
      ...body,
    });

  describe('tasks', () => {
    it('are those due in the span and those late before it, of this room only', async () => {
      const roomId = staff.room.id;
      const shelf = await aShelf(tx, { roomId, label: 'A3' });
      const late = await aTask(tx, { roomId, dueOn: '2026-04-01', personIds: [staff.people.helper.id] });
      const due = await aTask(tx, { roomId, shelfId: shelf.id });
      await aTask(tx, { roomId, dueOn: '2026-04-14', doneAt: application.now });
      const done = await aTask(tx, { roomId, dueOn: '2026-04-16', doneAt: application.now });
      await aTask(tx, { roomId, dueOn: '2026-04-17' });
      await aTask(tx);

      const reply = await staff.viewer.get(`${staff.path}/tasks?from=2026-04-15&to=2026-04-17`).expect(200);

      const tasks = reply.body as Task[];
      expect(tasks.map(({ id }) => id)).toEqual([late.id, due.id, done.id]);
      expect(tasks[0]).toMatchObject({ dueOn: '2026-04-01', personName: staff.people.helper.name });
      expect(tasks[1]).toMatchObject({ dueOn: '2026-04-15', shelfLabel: 'A3', doneAt: null });
    });

    it('are ticked once: the first tick stays', async () => {
      const task = await aTask(tx, { roomId: staff.room.id });
      const path = `${staff.path}/tasks/${task.id}/completion`;

      const first = await staff.helper.put(path, { note: 'dry at the edges' }).expect(200);
      application.now = new Date('2026-04-15T12:00:00Z');
      const second = await staff.helper.put(path, { note: 'once more' }).expect(200);

      expect(first.body).toMatchObject({
        doneAt: '2026-04-15T10:00:00.000Z',
        doneByName: staff.people.helper.name,
        note: 'dry at the edges',
      });
      expect(second.body).toEqual(first.body);
    });

    it('that change are told to the dashboards of their room, and only then', async () => {
      const task = await aTask(tx, { roomId: staff.room.id });
      const path = `${staff.path}/tasks/${task.id}/completion`;
      const published = jest.spyOn(LiveRelay.prototype, 'publish');

      const ticked = await staff.helper.put(path).expect(200);
      await staff.helper.put(path).expect(200);
      const reopened = await staff.helper.delete(path).expect(200);

      expect(published.mock.calls).toEqual([
        [staff.room.id, 'task:changed', ticked.body],
        [staff.room.id, 'task:changed', reopened.body],
      ]);
      published.mockRestore();
    });

    it('are open again once the tick is taken back', async () => {
      const task = await aTask(tx, { roomId: staff.room.id });
      const path = `${staff.path}/tasks/${task.id}/completion`;
      await staff.helper.put(path, { note: 'wrong shelf' }).expect(200);

      const reply = await staff.helper.delete(path).expect(200);

      expect(reply.body).toMatchObject({ doneAt: null, doneByName: null, note: '' });
      expect((await staff.helper.delete(path).expect(200)).body).toEqual(reply.body);
    });
  });

  describe('a routine', () => {
    it('has its tasks of the next fourteen days as soon as it is added', async () => {
      const shelf = await aShelf(tx, { roomId: staff.room.id, label: 'B2' });

      const reply = await addRoutine({
        place: { at: 'shelf', shelfId: shelf.id },
        who: { how: 'person', personId: staff.people.helper.id },
        detail: 'from below',
      });

      expect(reply.status).toBe(201);
      const routine = reply.body as Routine;
      expect(routine).toMatchObject({ placeLabel: 'B2', nextDueOn: '2026-04-15' });
      expect((await staff.viewer.get(`${staff.path}/routines`)).body).toEqual([routine]);
      expect(await dueDaysOf(routine.id)).toEqual(['2026-04-15', '2026-04-19', '2026-04-23', '2026-04-27']);
      const tasks = await staff.viewer.get(`${staff.path}/tasks?from=2026-04-15&to=2026-04-16`);
      expect(tasks.body).toMatchObject([
        {
          kind: 'water',
          title: 'Water the peppers',
          detail: 'from below',
          shelfLabel: 'B2',
          personName: staff.people.helper.name,
        },
      ]);
    });

    it('that began in the past keeps its rhythm and makes no late tasks', async () => {
      const reply = await addRoutine(byRule('FREQ=DAILY;INTERVAL=4', '2026-04-02')).expect(201);

      expect(await dueDaysOf((reply.body as Routine).id)).toEqual(['2026-04-18', '2026-04-22', '2026-04-26']);
    });

    it('counts days by the calendar of its room', async () => {
      staff = await aStaffedRoom(application, { timeZone: 'Pacific/Auckland' });
      application.now = new Date('2026-04-15T13:00:00Z'); // already the 16th in Auckland

      const reply = await addRoutine(byRule('FREQ=DAILY', '2026-04-01')).expect(201);

      expect((await dueDaysOf((reply.body as Routine).id))[0]).toBe('2026-04-16');
    });

    it.each([
      ['a rule that is none', byRule('FREQ=SOMETIMES'), 'body.timing.rule'],
      ['a rule by the hour', byRule('FREQ=HOURLY'), 'body.timing.rule'],
      ['a start long ago', byRule('FREQ=DAILY', '1990-01-01'), 'body.timing.startsOn'],
      [
        'drying of no planting',
        { timing: { how: 'byDrying', fallbackDays: 3, startsOn: '2026-04-15' } },
        'body.timing.how',
      ],
    ])('with %s is refused', async (_, body, path) => {
      const refused = await addRoutine(body).expect(422);

      expect((refused.body as Problem).errors?.map((problem) => problem.path)).toEqual([path]);
      expect(await tx.countBy(RoutineEntity, { roomId: staff.room.id })).toBe(0);
    });

    it('for somebody who is no member, or on a shelf of another room, is refused', async () => {
      await addRoutine({ who: { how: 'person', personId: (await aPerson(tx)).id } }).expect(422);
      await addRoutine({ place: { at: 'shelf', shelfId: (await aShelf(tx)).id } }).expect(404);
      expect(await tx.countBy(RoutineEntity, { roomId: staff.room.id })).toBe(0);
    });
  });

  describe('planning ahead', () => {
    it('makes each task once, however often and by however many processes it is done', async () => {
      const routine = await aRoutine(tx, { roomId: staff.room.id, startsOn: '2026-04-14' });
      const { planning } = application.app.services;

      await Promise.all([planning.planAhead(), planning.planAhead()]);
      await planning.planAhead();

      expect(await dueDaysOf(routine.id)).toEqual([
        '2026-04-14',
        '2026-04-16',
        '2026-04-18',
        '2026-04-20',
        '2026-04-22',
        '2026-04-24',
        '2026-04-26',
        '2026-04-28',
      ]);
    });

    it('catches up after days without, and brings no deleted task back', async () => {
      const routine = await aRoutine(tx, { roomId: staff.room.id, startsOn: '2026-04-28' });
      const { planning } = application.app.services;
      await planning.planAhead();
      await tx.delete(TaskEntity, { routineId: routine.id });
      application.now = new Date('2026-04-20T10:00:00Z');

      await planning.planAhead();

      expect(await dueDaysOf(routine.id)).toEqual(['2026-04-30', '2026-05-02']);
    });

    it('leaves out routines that have ended or whose shelf is retired', async () => {
      const roomId = staff.room.id;
      const retired = await aShelf(tx, { roomId, retiredAt: application.now });
      await aRoutine(tx, { roomId, endedAt: application.now });
      await aRoutine(tx, { roomId, shelfId: retired.id });

      await application.app.services.planning.planAhead();

      expect(await tx.countBy(TaskEntity, { roomId })).toBe(0);
    });
  });

  describe('a note on a shelf', () => {
    const events = (shelfId: string, from: string, to: string): Promise<ShelfEvent[]> =>
      application.app.services.shelfEvents.of(shelfId, new Date(from), new Date(to));

    it('is of now unless it says when, and is found in spans that hold its instant', async () => {
      const shelf = await aShelf(tx, { roomId: staff.room.id });
      const path = `${staff.path}/shelves/${shelf.id}/events`;

      const now = await staff.helper.post(path, { kind: 'watered', text: '2 l' }).expect(201);
      const earlier = await staff.helper
        .post(path, { kind: 'observed', text: 'first leaves', at: '2026-04-14T08:00:00+01:00' })
        .expect(201);

      expect(now.body).toMatchObject({
        shelfId: shelf.id,
        at: '2026-04-15T10:00:00.000Z',
        personName: staff.people.helper.name,
      });
      expect(await events(shelf.id, '2026-04-14T07:00:00Z', '2026-04-15T10:00:00Z')).toEqual([earlier.body]);
      expect(await events(shelf.id, '2026-04-15T10:00:00Z', '2026-04-16T00:00:00Z')).toEqual([now.body]);
    });

    it('stands beside the care that was done there', async () => {
      const shelf = await aShelf(tx, { roomId: staff.room.id });
      const task = await aTask(tx, { roomId: staff.room.id, shelfId: shelf.id, title: 'Water from below' });
      const path = `${staff.path}/tasks/${task.id}/completion`;
      await staff.helper.put(path, { millilitres: 800, note: 'very dry' }).expect(200);
      expect(await events(shelf.id, '2026-04-15T00:00:00Z', '2026-04-16T00:00:00Z')).toMatchObject([
        { kind: 'watered', text: 'Water from below, 800 ml, very dry', personName: staff.people.helper.name },
      ]);
    });

    it('of a time to come, or on a shelf of another room, is refused', async () => {
      const shelf = await aShelf(tx, { roomId: staff.room.id });
      const foreign = await aShelf(tx);
      const body = { kind: 'observed', text: 'up' };

      await staff.helper
        .post(`${staff.path}/shelves/${shelf.id}/events`, { ...body, at: '2026-04-15T10:03:00Z' })
        .expect(422);
      await staff.helper.post(`${staff.path}/shelves/${foreign.id}/events`, body).expect(404);
    });
  });
});
