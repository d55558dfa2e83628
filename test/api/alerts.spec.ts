import type { Alert, AlertCounts } from '@shared/contracts/alerts';
import type { Problem } from '@shared/contracts/problem';
import { anAlert } from '../builders/alerts';
import { aShelf } from '../builders/rooms';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('alerts of a room', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let tx: TestApplication['tx'];

  beforeAll(async () => {
    application = await startTestApplication();
    tx = application.tx;
  });
  beforeEach(async () => {
    staff = await aStaffedRoom(application, { timeZone: 'Pacific/Auckland' });
  });
  afterAll(() => application.stop());

  /** Alerts that opened at instants, each on a shelf of its own unless said. */
  async function opened(at: string, overrides: Parameters<typeof anAlert>[1] = {}): Promise<string> {
    const shelfId = overrides.shelfId ?? (await aShelf(tx, { roomId: staff.room.id })).id;
    const openedAt = new Date(at);
    const alert = await anAlert(tx, { beganAt: openedAt, openedAt, peakAt: openedAt, ...overrides, shelfId });
    return alert.id;
  }
  const list = async (query: string): Promise<{ ids: string[]; nextCursor: string | null }> => {
    const { body } = await staff.viewer.get(`${staff.path}/alerts?${query}`).expect(200);
    const { alerts, nextCursor } = body as { alerts: Alert[]; nextCursor: string | null };
    return { ids: alerts.map(({ id }) => id), nextCursor };
  };
  const counts = async (query = ''): Promise<AlertCounts> =>
    (await staff.viewer.get(`${staff.path}/alert-counts?${query}`).expect(200)).body as AlertCounts;

  it('are filtered by shelf, kind and whether they are open', async () => {
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    const damp = await opened('2026-04-10T00:00:00Z', { shelfId: shelf.id, quantity: 'relativeHumidity' });
    const dry = await opened('2026-04-11T00:00:00Z', { shelfId: shelf.id, kind: 'belowRange' });
    const over = new Date('2026-04-12T01:00:00Z');
    const past = await opened('2026-04-12T00:00:00Z', { endedAt: over, clearedAt: over });

    expect((await list('')).ids).toEqual([past, dry, damp]);
    expect((await list(`shelfId=${shelf.id}`)).ids).toEqual([dry, damp]);
    expect((await list('kind=aboveRange')).ids).toEqual([past, damp]);
    expect((await list('open=true')).ids).toEqual([dry, damp]);
    expect((await list(`kind=aboveRange&open=true&shelfId=${shelf.id}`)).ids).toEqual([damp]);
  });

  it('of a month are those that opened in it by the room’s calendar', async () => {
    // Auckland is thirteen hours ahead of UTC on 1 April 2026, and on 31 March too.
    const march = await opened('2026-03-31T10:59:59Z');
    const april = await opened('2026-03-31T11:00:00Z');

    expect((await list('month=2026-03')).ids).toEqual([march]);
    expect((await list('month=2026-04')).ids).toEqual([april]);
    expect((await counts()).byMonth).toEqual([
      { month: '2026-04', count: 1 },
      { month: '2026-03', count: 1 },
    ]);
  });

  it('come page by page under a filter, each once', async () => {
    const wanted: string[] = [];
    for (const day of ['03', '04', '05']) {
      wanted.unshift(await opened(`2026-04-${day}T00:00:00Z`));
      await opened(`2026-04-${day}T01:00:00Z`, { kind: 'belowRange' });
    }
    const first = await list('kind=aboveRange&limit=2');
    const second = await list(`kind=aboveRange&limit=2&cursor=${first.nextCursor}`);

    expect([...first.ids, ...second.ids]).toEqual(wanted);
    expect(second.nextCursor).toBeNull();
  });

  it.each([
    ['a month that is none', 'month=2026-13', 'query.month'],
    ['a month that no calendar has', 'month=0000-01', 'query.month'],
    ['a kind that is none', 'kind=tooPurple', 'query.kind'],
    ['a shelf without a proper id', 'shelfId=A3', 'query.shelfId'],
  ])('with %s are refused, saying where', async (_, query, path) => {
    for (const what of ['alerts', 'alert-counts']) {
      const refused = await staff.viewer.get(`${staff.path}/${what}?${query}`).expect(422);
      expect((refused.body as Problem).errors?.map((problem) => problem.path)).toEqual([path]);
    }
  });

  it('are counted by shelf, kind and month, each list without its own filter', async () => {
    const roomId = staff.room.id;
    const [a1, b2] = [await aShelf(tx, { roomId, label: 'A1' }), await aShelf(tx, { roomId, label: 'B2' })];
    await opened('2026-02-10T00:00:00Z', { shelfId: a1.id });
    await opened('2026-04-10T00:00:00Z', { shelfId: a1.id, kind: 'belowRange' });
    await opened('2026-04-11T00:00:00Z', { shelfId: b2.id });
    await opened('2026-04-12T00:00:00Z', { shelfId: b2.id, kind: 'belowRange' });
    await opened('2026-04-13T00:00:00Z', { shelfId: b2.id, quantity: 'relativeHumidity' });
    await anAlert(tx); // Of another room.

    expect(await counts(`shelfId=${b2.id}&month=2026-04`)).toEqual({
      total: 3,
      byShelf: [
        { shelfId: a1.id, shelfLabel: 'A1', count: 1 },
        { shelfId: b2.id, shelfLabel: 'B2', count: 3 },
      ],
      byKind: [
        { kind: 'aboveRange', count: 2 },
        { kind: 'belowRange', count: 1 },
      ],
      byMonth: [{ month: '2026-04', count: 3 }],
    });
    expect((await counts()).total).toBe(5);
  });
});
