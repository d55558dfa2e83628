import type { ReadyMadeRoutineView, Routine } from '@shared/contracts/care-routines';
import { PlantingEntity } from '../../server/plantings/planting-entity';
import { RoutineEntity } from '../../server/care/routine-entity';
import { TaskEntity } from '../../server/care/task-entity';
import { aTask } from '../builders/care';
import { aPlanting } from '../builders/plantings';
import { aShelf } from '../builders/rooms';
import { fieldsOf } from './planting-room';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('routines', () => {
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

  const draft = {
    kind: 'water',
    title: 'Water the peppers',
    place: { at: 'room' },
    timing: { how: 'calendar', rule: 'FREQ=DAILY;INTERVAL=4', startsOn: '2026-04-15' },
    who: { how: 'onDuty' },
  };
  const added = async (more: object = {}): Promise<Routine> =>
    (await staff.grower.post(`${staff.path}/routines`, { ...draft, ...more }).expect(201)).body as Routine;
  const change = (id: string, more: object) =>
    staff.grower.put(`${staff.path}/routines/${id}`, { ...draft, ...more });
  const tasksOf = async (routineId: string): Promise<[string, string][]> => {
    const tasks = await tx.find(TaskEntity, { where: { routineId }, order: { dueOn: 'ASC' } });
    return tasks.map(({ dueOn, title }) => [dueOn, title]);
  };
  const plantingHere = async () =>
    aPlanting(tx, {
      shelfId: (await aShelf(tx, { roomId: staff.room.id })).id,
      cropId: 'tomato',
      crop: 'Tomato',
    });

  it('that change take their open tasks from today on along, and leave what is done and late', async () => {
    const { id } = await added();
    await aTask(tx, {
      roomId: staff.room.id,
      routineId: id,
      dueOn: '2026-04-11',
      routineDay: '2026-04-11',
      title: 'late',
    });
    await tx.update(
      TaskEntity,
      { routineId: id, dueOn: '2026-04-15' },
      { doneAt: application.now, outcome: 'done' },
    );

    const timing = { ...draft.timing, rule: 'FREQ=WEEKLY' };
    const changed = (await change(id, { title: 'Water well', timing }).expect(200)).body as Routine;

    expect(changed).toMatchObject({ title: 'Water well', timing });
    expect(await tasksOf(id)).toEqual([
      ['2026-04-11', 'late'],
      ['2026-04-15', 'Water the peppers'],
      ['2026-04-22', 'Water well'],
    ]);
  });

  it('that change from days of the calendar to days after doing keep one open turn', async () => {
    const { id } = await added();
    await change(id, { timing: { how: 'afterDoing', everyDays: 3, startsOn: '2026-04-17' } }).expect(200);
    expect(await tasksOf(id)).toEqual([['2026-04-17', 'Water the peppers']]);
  });

  it('that end leave their history and nothing open', async () => {
    const { id } = await added();
    await tx.update(
      TaskEntity,
      { routineId: id, dueOn: '2026-04-15' },
      { doneAt: application.now, outcome: 'done' },
    );
    await staff.grower.delete(`${staff.path}/routines/${id}`).expect(204);
    expect((await tasksOf(id)).map(([day]) => day)).toEqual(['2026-04-15']);
    expect((await staff.viewer.get(`${staff.path}/routines`)).body).toEqual([]);
    await staff.grower.delete(`${staff.path}/routines/${id}`).expect(404);
  });

  it('are told with all that they were given', async () => {
    const planting = await plantingHere();
    const given = {
      detail: 'never over the leaves',
      place: { at: 'planting', plantingId: planting.id },
      timing: { how: 'byDrying', fallbackDays: 3, startsOn: '2026-04-15' },
      season: { fromMonth: 10, toMonth: 5 },
      windowDays: 1,
      steps: ['Lift a pot', 'Fill the flat'],
      amount: 'About 1.2 L',
      who: { how: 'pair', personIds: [staff.people.helper.id, staff.people.grower.id] },
      skipsClosedDays: true,
      minutes: 12,
    };
    expect(await added(given)).toMatchObject({ ...given, placeLabel: 'Tomato' });
  });

  it.each([
    [
      'a pair of one person twice',
      (id: string) => ({ who: { how: 'pair', personIds: [id, id] } }),
      'body.who.personIds',
    ],
    ['a turn of one', (id: string) => ({ who: { how: 'inTurn', personIds: [id] } }), 'body.who.personIds'],
    ['a thirteenth month', () => ({ season: { fromMonth: 13, toMonth: 2 } }), 'body.season.fromMonth'],
    [
      'no days',
      () => ({ timing: { how: 'afterDoing', everyDays: 0, startsOn: '2026-04-15' } }),
      'body.timing.everyDays',
    ],
  ])('with %s are refused', async (_, more, field) => {
    const body = { ...draft, ...more(staff.people.helper.id) };
    expect(fieldsOf(await staff.grower.post(`${staff.path}/routines`, body).expect(422))).toEqual([field]);
  });

  describe('ready made', () => {
    const offered = async (cropId: string): Promise<ReadyMadeRoutineView[]> =>
      (await staff.viewer.get(`${staff.path}/ready-made-routines?cropId=${cropId}`).expect(200))
        .body as ReadyMadeRoutineView[];

    it('are offered by crop, and given to a planting', async () => {
      const planting = await plantingHere();
      expect((await offered('tomato')).map(({ id }) => id)).toEqual(
        expect.arrayContaining(['water-by-weight', 'trim-side-shoots']),
      );

      const body = { readyMadeIds: ['trim-side-shoots', 'water-by-weight'], who: { how: 'onDuty' } };
      const path = `${staff.path}/plantings/${planting.id}/routines`;
      const adopted = (await staff.grower.post(path, body).expect(201)).body as Routine[];

      expect(adopted.map(({ kind, nextDueOn }) => [kind, nextDueOn])).toEqual([
        ['trim', '2026-04-15'],
        ['water', '2026-04-15'],
      ]);
      expect((await staff.viewer.get(`${staff.path}/routines?plantingId=${planting.id}`)).body).toEqual(
        adopted,
      );
    });

    it('of another crop are refused', async () => {
      const { id } = await plantingHere();
      const body = { readyMadeIds: ['look-for-pests', 'trim-alliums'], who: { how: 'onDuty' } };
      const refused = await staff.grower.post(`${staff.path}/plantings/${id}/routines`, body).expect(422);
      expect(fieldsOf(refused)).toEqual(['body.readyMadeIds.1']);
      expect(await tx.countBy(RoutineEntity, { plantingId: id })).toBe(0);
    });
  });

  describe('of a planting', () => {
    const adopted = async (plantingId: string): Promise<string> => {
      const body = { readyMadeIds: ['water-by-weight'], who: { how: 'onDuty' } };
      const reply = await staff.grower
        .post(`${staff.path}/plantings/${plantingId}/routines`, body)
        .expect(201);
      return (reply.body as Routine[])[0]?.id ?? '';
    };

    it('end when it ends', async () => {
      const { id } = await plantingHere();
      const routineId = await adopted(id);
      await staff.grower.post(`${staff.path}/plantings/${id}/steps`, { kind: 'ended' }).expect(201);
      await application.app.services.planning.planAhead();
      expect(await tasksOf(routineId)).toEqual([]);
      expect(await tx.findOneByOrFail(RoutineEntity, { id: routineId })).toMatchObject({
        endedAt: application.now,
      });
    });

    it('go when it was a mistake', async () => {
      const { id } = await plantingHere();
      await adopted(id);
      await staff.grower.delete(`${staff.path}/plantings/${id}`).expect(204);
      expect(await tx.countBy(TaskEntity, { roomId: staff.room.id, kind: 'water' })).toBe(0);
      expect(await tx.countBy(PlantingEntity, { id })).toBe(0);
    });
  });
});
