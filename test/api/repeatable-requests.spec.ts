import { randomUUID } from 'node:crypto';
import { ShelfEventEntity } from '../../server/care/shelf-event-entity';
import { aShelf } from '../builders/rooms';
import { problemOf } from './planting-room';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('a request that is sent twice', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let shelfId: string;

  beforeAll(async () => {
    application = await startTestApplication();
    staff = await aStaffedRoom(application);
    shelfId = (await aShelf(application.tx, { roomId: staff.room.id })).id;
  });
  afterAll(() => application.stop());

  const note = (key: string, text = 'first leaves') =>
    staff.helper
      .post(`${staff.path}/shelves/${shelfId}/events`, { kind: 'observed', text })
      .set('Idempotency-Key', key);
  const noted = (text: string): Promise<number> =>
    application.tx.countBy(ShelfEventEntity, { shelfId, text });
  /** Lets it look as if the process had died while it worked on a request, so long ago. */
  const dieWith = (key: string, seconds: number, isCommitted: boolean): Promise<unknown> =>
    application.tx.query(
      `UPDATE repeatable_request SET status = NULL, reply = NULL, claim_id = gen_random_uuid(),
         claimed_at = now() - make_interval(secs => $2), committed_at = CASE WHEN $3 THEN now() END WHERE key = $1`,
      [key, seconds, isCommitted],
    );

  it('is done once and answered alike', async () => {
    const key = randomUUID();
    const [first, second] = [await note(key).expect(201), await note(key).expect(201)];
    expect(second.body).toEqual(first.body);
    expect(await noted('first leaves')).toBe(1);
  });

  it('is refused when it is another request', async () => {
    const key = randomUUID();
    await note(key, 'one thing').expect(201);
    expect(problemOf(await note(key, 'another thing').expect(409)).code).toBe('KEY_USED');
    expect(await noted('another thing')).toBe(0);
  });

  it('is done by the second when the first died before its commit', async () => {
    const key = randomUUID();
    await note(key, 'cut off').expect(201);
    await application.tx.delete(ShelfEventEntity, { text: 'cut off' });
    await dieWith(key, 5, false);
    expect(problemOf(await note(key, 'cut off').expect(409)).code).toBe('STILL_RUNNING');
    await dieWith(key, 15, false);
    await note(key, 'cut off').expect(201);
    expect(await noted('cut off')).toBe(1);
  });

  it('is not done again when the first died after its commit', async () => {
    const key = randomUUID();
    await note(key, 'done').expect(201);
    await dieWith(key, 15, true);
    expect(problemOf(await note(key, 'done').expect(409)).code).toBe('DONE_BEFORE');
    expect(await noted('done')).toBe(1);
  });

  it('is free for another try after it failed', async () => {
    const key = randomUUID();
    const path = `${staff.path}/shelves/${randomUUID()}/events`;
    const wrong = () =>
      staff.helper.post(path, { kind: 'observed', text: 'nowhere' }).set('Idempotency-Key', key).expect(404);
    expect(problemOf(await wrong()).code).toBe('NOT_FOUND');
    expect(problemOf(await wrong()).code).toBe('NOT_FOUND');
  });

  it('commits once, should two work on it at a time', async () => {
    const key = randomUUID();
    const both = await Promise.all([note(key, 'race'), note(key, 'race'), note(key, 'race')]);
    expect(both.filter(({ status }) => status === 201).length).toBeGreaterThanOrEqual(1);
    expect(await noted('race')).toBe(1);
  });
});
