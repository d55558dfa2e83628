import ICAL from 'ical.js';
import { aRoutine, aTask } from '../builders/care';
import { aShelf } from '../builders/rooms';
import { Caller } from './caller';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

/** An event as another program reads it. */
interface ReadEvent {
  readonly uid: string;
  readonly summary: string;
  readonly description: string;
  readonly start: string;
  readonly end: string;
  readonly isDate: boolean;
}

/** Reads a calendar with a library that is not the one that wrote it. */
function eventsOf(text: string): ReadEvent[] {
  const calendar = new ICAL.Component(ICAL.parse(text) as unknown[]);
  expect(calendar.getFirstPropertyValue('version')).toBe('2.0');
  return calendar.getAllSubcomponents('vevent').map((component) => {
    const { uid, summary, description, startDate, endDate } = new ICAL.Event(component);
    return {
      uid,
      summary,
      description,
      start: startDate.toString(),
      end: endDate.toString(),
      isDate: startDate.isDate && endDate.isDate,
    };
  });
}

describe('the calendar feed', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let tx: TestApplication['tx'];

  beforeAll(async () => {
    application = await startTestApplication({ PUBLIC_URL: 'http://127.0.0.1:4280' });
    tx = application.tx;
  });
  beforeEach(async () => {
    application.now = new Date('2026-03-27T10:00:00Z');
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  const make = async (): Promise<string> => {
    const { url } = (await staff.helper.post('/account/calendar-feed').expect(201)).body as { url: string };
    return url.replace('http://127.0.0.1:4280/api/v1', '');
  };
  const anybody = (): Caller => Caller.nobody(application.express);
  const own = (dueOn: string, more: Parameters<typeof aTask>[1] = {}) =>
    aTask(tx, { roomId: staff.room.id, dueOn, personIds: [staff.people.helper.id], ...more });

  it('is read without signing in, and has the person’s own open tasks only', async () => {
    const shelf = await aShelf(tx, { roomId: staff.room.id, label: 'A3' });
    const task = await own('2026-03-28', { title: 'Water; then wait, a "while"', shelfId: shelf.id });
    await own('2026-03-20', { doneAt: application.now });
    await aTask(tx, { roomId: staff.room.id, personIds: [staff.people.grower.id] });
    await aTask(tx, { personIds: [staff.people.helper.id] }); // Of a room that they have left.

    const reply = await anybody()
      .get(await make())
      .expect(200);

    expect(reply.headers['content-type']).toBe('text/calendar; charset=utf-8');
    const events = eventsOf(reply.text);
    expect(events).toHaveLength(1);
    expect(events[0]?.uid).toMatch(new RegExp(`^${task.id}@`));
    expect(events[0]?.summary).toBe('Water; then wait, a "while" · A3');
    expect(events[0]?.description).toContain('residual-current device');
    // RFC 5545 §3.1: lines end with CRLF and hold at most 75 octets.
    expect(reply.text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
    expect(reply.text.split('\r\n').every((line) => Buffer.byteLength(line) <= 75)).toBe(true);
  });

  // Clocks change in Dublin on 29 March and 25 October 2026.
  it.each([
    ['as clocks go forward', '2026-03-29', 0, '2026-03-30'],
    ['over the change', '2026-03-28', 2, '2026-03-31'],
    ['as clocks go back', '2026-10-25', 0, '2026-10-26'],
    ['over the end of a leap February', '2028-02-28', 1, '2028-03-01'],
  ])('has whole days %s: from %s, %d more, to %s exclusive', async (_, dueOn, windowDays, end) => {
    await own(dueOn, { windowDays });
    const [event] = eventsOf(
      (
        await anybody()
          .get(await make())
          .expect(200)
      ).text,
    );
    expect(event).toMatchObject({ start: dueOn, end, isDate: true });
  });

  it('says the steps and the amount', async () => {
    const { helper } = staff.people;
    const steps = ['Lift a pot', 'Fill the flat'];
    await aRoutine(tx, { roomId: staff.room.id, personIds: [helper.id], steps, amount: 'About 1.2 L' });
    await application.app.services.planning.planAhead();
    const [event] = eventsOf(
      (
        await anybody()
          .get(await make())
          .expect(200)
      ).text,
    );
    expect(event?.description).toMatch(/^About 1\.2 L\n1\. Lift a pot\n2\. Fill the flat/);
  });

  it('has another link once it is renewed, and none once it is ended', async () => {
    expect((await staff.helper.get('/account/calendar-feed').expect(200)).body).toEqual({ madeAt: null });
    const first = await make();
    const second = await make();
    expect((await staff.helper.get('/account/calendar-feed')).body).toEqual({
      madeAt: '2026-03-27T10:00:00.000Z',
    });
    await anybody().get(first).expect(404);
    await anybody().get(second).expect(200);
    await staff.helper.delete('/account/calendar-feed').expect(204);
    await anybody().get(second).expect(404);
  });

  it('keeps no secret that could be read from the database', async () => {
    const secret = (await make()).split('/')[2] ?? '';
    expect(secret.length).toBeGreaterThanOrEqual(43);
    const rows: object[] = await tx.query('SELECT * FROM calendar_feed');
    expect(JSON.stringify(rows)).not.toContain(secret);
  });
});
