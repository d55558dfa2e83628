import type { CareDays, Task } from '@shared/contracts/care';
import type { Absence, CareShare, DutyDay, Rota, SwapOffer } from '@shared/contracts/care-rota';
import { TaskEntity } from '../../server/care/task-entity';
import { aRoutine, aTask } from '../builders/care';
import { aMember, aPerson } from '../builders/people';
import { Caller } from './caller';
import { fieldsOf, problemOf } from './planting-room';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('the rota', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let tx: TestApplication['tx'];
  /** Another helper, signed in. */
  let other: { readonly id: string; readonly name: string; readonly caller: Caller };

  beforeAll(async () => {
    application = await startTestApplication();
    tx = application.tx;
  });
  beforeEach(async () => {
    application.now = new Date('2026-04-15T10:00:00Z'); // a Wednesday
    staff = await aStaffedRoom(application);
    const person = await aPerson(tx);
    await aMember(tx, { roomId: staff.room.id, personId: person.id, role: 'helper' });
    other = { ...person, caller: await Caller.signedIn(application.express, person) };
  });
  afterAll(() => application.stop());

  const setWeek = (week: object[]) => staff.keeper.put(`${staff.path}/rota/week`, { week });
  /** The helper on weekdays, the other one on Saturday, closed on Sunday. */
  const usualWeek = async (): Promise<void> => {
    const weekdays = [1, 2, 3, 4, 5].map((weekday) => ({ weekday, personIds: [staff.people.helper.id] }));
    await setWeek([
      ...weekdays,
      { weekday: 6, personIds: [other.id] },
      { weekday: 7, isClosed: true, personIds: [] },
    ]).expect(200);
  };
  const planned = async (overrides: Parameters<typeof aRoutine>[1] = {}): Promise<string> => {
    const { id } = await aRoutine(tx, {
      roomId: staff.room.id,
      rule: 'FREQ=DAILY',
      startsOn: '2026-04-15',
      ...overrides,
    });
    await application.app.services.planning.planAhead();
    return id;
  };
  const tasks = async (from = '2026-04-15', to = '2026-04-22'): Promise<Task[]> =>
    (await staff.viewer.get(`${staff.path}/tasks?from=${from}&to=${to}`).expect(200)).body as Task[];
  const holders = async (): Promise<(string | null)[]> => (await tasks()).map(({ personName }) => personName);
  const rota = async (): Promise<Rota> =>
    (await staff.viewer.get(`${staff.path}/rota?from=2026-04-15&to=2026-04-22`).expect(200)).body as Rota;

  it('is not kept at first: care is anybody’s', async () => {
    await planned();
    expect((await tasks()).map(({ cover }) => cover)).toEqual(Array.from({ length: 7 }, () => 'anybody'));
    expect(await rota()).toMatchObject({ isKept: false, uncovered: [] });
  });

  it('gives care to whoever is on duty, and tells the keeper what nobody has', async () => {
    await planned();
    await usualWeek();

    const { helper } = staff.people;
    expect(await holders()).toEqual([
      helper.name,
      helper.name,
      helper.name,
      other.name,
      null,
      helper.name,
      helper.name,
    ]);
    const view = await rota();
    expect(view.uncovered.map(({ dueOn, cover }) => [dueOn, cover])).toEqual([['2026-04-19', 'uncovered']]);
    expect(view.days.map(({ isClosed }) => isClosed)).toEqual([
      false,
      false,
      false,
      false,
      true,
      false,
      false,
    ]);
  });

  it('lets an exception and an absence go before the usual week', async () => {
    await planned();
    await usualWeek();
    const day = (
      await staff.keeper
        .put(`${staff.path}/rota/days/2026-04-16`, { personIds: [other.id], note: 'swapped by phone' })
        .expect(200)
    ).body as DutyDay;
    const away = (
      await staff.helper.post(`${staff.path}/absences`, { from: '2026-04-17', to: '2026-04-17' }).expect(201)
    ).body as Absence;

    expect(day).toMatchObject({
      isException: true,
      onDuty: [{ name: other.name }],
      note: 'swapped by phone',
    });
    expect((await holders()).slice(0, 3)).toEqual([staff.people.helper.name, other.name, null]);

    await staff.keeper.delete(`${staff.path}/rota/days/2026-04-16`).expect(204);
    await staff.helper.delete(`${staff.path}/absences/${away.id}`).expect(204);
    expect((await holders()).slice(0, 3)).toEqual([0, 1, 2].map(() => staff.people.helper.name));
  });

  it('leaves care that heeds closed days out on them, and brings it back when they open', async () => {
    const heeding = await planned({ skipsClosedDays: true });
    await usualWeek();
    const days = async () =>
      (await tx.find(TaskEntity, { where: { routineId: heeding }, order: { dueOn: 'ASC' } }))
        .map(({ dueOn }) => dueOn)
        .slice(3, 6);
    expect(await days()).toEqual(['2026-04-18', '2026-04-20', '2026-04-21']);

    await staff.keeper
      .put(`${staff.path}/rota/days/2026-04-19`, { isClosed: false, personIds: [other.id] })
      .expect(200);
    expect(await days()).toEqual(['2026-04-18', '2026-04-19', '2026-04-20']);
  });

  it('puts care that counts from its last doing off to the next open day', async () => {
    await usualWeek();
    await planned({ timing: 'afterDoing', rule: null, everyDays: 3, skipsClosedDays: true });
    const closed = { isClosed: true, note: 'stocktaking' };
    await staff.keeper.put(`${staff.path}/rota/days/2026-04-15`, closed).expect(200);
    expect((await tasks()).map(({ dueOn, movedFrom }) => [dueOn, movedFrom])).toEqual([
      ['2026-04-16', '2026-04-15'],
    ]);
  });

  it('says of others when they are away only as a keeper', async () => {
    const body = { personId: other.id, from: '2026-04-17', to: '2026-04-18' };
    expect(problemOf(await staff.grower.post(`${staff.path}/absences`, body).expect(403)).code).toBe(
      'NOT_YOURS',
    );
    const { id } = (await staff.keeper.post(`${staff.path}/absences`, body).expect(201)).body as Absence;
    await staff.helper.delete(`${staff.path}/absences/${id}`).expect(403);
    await other.caller.delete(`${staff.path}/absences/${id}`).expect(204);
  });

  it('has no viewers on duty', async () => {
    const refused = await setWeek([{ weekday: 1, personIds: [staff.people.viewer.id] }]).expect(422);
    expect(fieldsOf(refused)).toEqual(['body.week.0.personIds']);
    expect((await rota()).isKept).toBe(false);
  });

  it('counts what everybody did and has still to do', async () => {
    const { helper, grower } = staff.people;
    const task = { roomId: staff.room.id, minutes: 20 };
    await aTask(tx, { ...task, doneAt: application.now, doneBy: helper.id, tookMinutes: 35 });
    await aTask(tx, { ...task, personIds: [helper.id, grower.id] });
    await aTask(tx, { ...task, dueOn: '2026-05-01', personIds: [helper.id] });

    const reply = await staff.viewer
      .get(`${staff.path}/rota/share?from=2026-04-13&to=2026-04-20`)
      .expect(200);

    const { shares } = reply.body as { shares: CareShare[] };
    const of = (id: string) => shares.find(({ personId }) => personId === id);
    expect(of(helper.id)).toMatchObject({ doneTasks: 1, doneMinutes: 35, openTasks: 1, openMinutes: 20 });
    expect(of(grower.id)).toMatchObject({ doneTasks: 0, openTasks: 1, openMinutes: 20 });
    expect(shares.map(({ personId }) => personId)).not.toContain(staff.people.viewer.id);
  });

  describe('a task', () => {
    const held = (personIds: readonly string[] = []) => aTask(tx, { roomId: staff.room.id, personIds });
    const put = (by: Caller, id: string, what: string, body: object = {}) =>
      by.put(`${staff.path}/tasks/${id}/${what}`, body);

    it('moves to another day, and its routine keeps its rhythm', async () => {
      await planned({ rule: 'FREQ=DAILY;INTERVAL=4' });
      const [first] = await tasks();
      const moved = (await put(staff.grower, first?.id ?? '', 'day', { dueOn: '2026-04-17' }).expect(200))
        .body as Task;
      expect(moved).toMatchObject({
        dueOn: '2026-04-17',
        movedFrom: '2026-04-15',
        inTimeUntil: '2026-04-17',
      });
      await application.app.services.planning.planAhead();
      expect((await tasks()).map(({ dueOn }) => dueOn)).toEqual(['2026-04-17', '2026-04-19']);
      expect(fieldsOf(await put(staff.grower, moved.id, 'day', { dueOn: '2026-04-14' }).expect(422))).toEqual(
        ['body.dueOn'],
      );
    });

    it('is given to somebody by a grower, and back to the rota', async () => {
      await usualWeek();
      const { id } = await held();
      const given = await put(staff.grower, id, 'holders', { personIds: [other.id] }).expect(200);
      expect((given.body as Task).personName).toBe(other.name);
      const back = await put(staff.grower, id, 'holders', { personIds: [] }).expect(200);
      expect((back.body as Task).personName).toBe(staff.people.helper.name);
    });

    it('is taken over from whoever holds it', async () => {
      const { id } = await held([staff.people.grower.id]);
      expect((await put(staff.helper, id, 'take-over').expect(200)).body).toMatchObject({
        personName: staff.people.helper.name,
        cover: 'held',
      });
    });

    it('that no routine planned is added, for oneself or whoever is on duty, and removed', async () => {
      await usualWeek();
      const body = { kind: 'other', title: 'Mop under rack A', place: { at: 'room' } };
      const add = (by: Caller, more: object = {}) => by.post(`${staff.path}/tasks`, { ...body, ...more });
      const task = (await add(staff.helper).expect(201)).body as Task;
      expect(task).toMatchObject({
        dueOn: '2026-04-15',
        personName: staff.people.helper.name,
        routineId: null,
      });
      expect(problemOf(await add(staff.helper, { personIds: [other.id] }).expect(403)).code).toBe(
        'NOT_YOURS',
      );
      const given = (await add(staff.grower, { personIds: [other.id] }).expect(201)).body as Task;
      await staff.helper.delete(`${staff.path}/tasks/${given.id}`).expect(403);
      await staff.helper.delete(`${staff.path}/tasks/${task.id}`).expect(204);
      expect((await tasks()).map(({ id }) => id)).toEqual([given.id]);
    });

    it('of a routine is not removed, but found not needed', async () => {
      await planned();
      const [first] = await tasks();
      const refused = await staff.keeper.delete(`${staff.path}/tasks/${first?.id ?? ''}`).expect(409);
      expect(problemOf(refused).code).toBe('OF_ROUTINE');
    });

    it('of today and tomorrow comes with all that a phone needs without a signal', async () => {
      await planned({ steps: ['Lift a pot', 'Fill the flat'], amount: 'About 1.2 L' });
      await aTask(tx, { roomId: staff.room.id, dueOn: '2026-04-01', title: 'late' });
      const days = (await staff.viewer.get(`${staff.path}/care/days`).expect(200)).body as CareDays;
      expect(days).toMatchObject({ today: '2026-04-15', tomorrow: '2026-04-16', timeZone: 'Europe/Dublin' });
      expect(days.tasks.map(({ dueOn }) => dueOn)).toEqual(['2026-04-01', '2026-04-15', '2026-04-16']);
      expect(days.tasks[1]).toMatchObject({ steps: ['Lift a pot', 'Fill the flat'], amount: 'About 1.2 L' });
    });
  });

  describe('a swap', () => {
    const offer = async (body: object = {}): Promise<SwapOffer> => {
      const { id } = await aTask(tx, { roomId: staff.room.id, personIds: [staff.people.helper.id] });
      return (await staff.helper.post(`${staff.path}/tasks/${id}/swaps`, body).expect(201)).body as SwapOffer;
    };
    const take = (by: Caller, { id }: SwapOffer) => by.put(`${staff.path}/swaps/${id}/taking`);
    const open = async (): Promise<SwapOffer[]> =>
      (await staff.viewer.get(`${staff.path}/swaps`).expect(200)).body as SwapOffer[];

    it('is offered, seen by all, taken once, and gone', async () => {
      const offered = await offer({ note: 'dentist' });
      expect(await open()).toEqual([offered]);

      const both = await Promise.all([take(other.caller, offered), take(staff.grower, offered)]);

      expect(both.map(({ status }) => status).sort()).toEqual([200, 404]);
      const taken = both.find(({ status }) => status === 200)?.body as Task;
      expect(taken).toMatchObject({ swap: null, cover: 'held' });
      expect(taken.holders).toHaveLength(1);
      expect(await open()).toEqual([]);
    });

    it('is for those to whom it was offered', async () => {
      const offered = await offer({ toPersonId: other.id });
      expect(problemOf(await take(staff.grower, offered).expect(409)).code).toBe('NOT_TO_TAKE');
      expect((await take(other.caller, offered).expect(200)).body).toMatchObject({ personName: other.name });
    });

    it('is withdrawn by who offered it, and the task stays theirs', async () => {
      const offered = await offer();
      await other.caller.delete(`${staff.path}/swaps/${offered.id}`).expect(403);
      await staff.helper.delete(`${staff.path}/swaps/${offered.id}`).expect(204);
      await take(other.caller, offered).expect(404);
      expect((await tasks())[0]).toMatchObject({ personName: staff.people.helper.name, swap: null });
    });

    it('is offered of what one holds, and once', async () => {
      const { task } = await offer();
      const again = await staff.helper.post(`${staff.path}/tasks/${task.id}/swaps`).expect(409);
      expect(problemOf(again).code).toBe('OFFERED_ALREADY');
      const { id } = await aTask(tx, { roomId: staff.room.id, personIds: [other.id] });
      expect(problemOf(await staff.helper.post(`${staff.path}/tasks/${id}/swaps`).expect(403)).code).toBe(
        'NOT_YOURS',
      );
    });

    it('ends when the task is done', async () => {
      const { task } = await offer();
      await staff.helper.put(`${staff.path}/tasks/${task.id}/completion`).expect(200);
      expect(await open()).toEqual([]);
    });
  });
});
