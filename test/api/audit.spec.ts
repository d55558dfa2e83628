import type { AuditEntry } from '@shared/contracts/audit';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

interface Page {
  readonly entries: AuditEntry[];
  readonly nextCursor: string | null;
}

describe('the audit of a room', () => {
  let application: TestApplication;
  let staff: StaffedRoom;

  beforeAll(async () => {
    application = await startTestApplication();
    staff = await aStaffedRoom(application);
  });
  afterAll(() => application.stop());

  async function page(query = ''): Promise<Page> {
    return (await staff.keeper.get(`${staff.path}/audit${query}`).expect(200)).body as Page;
  }

  /** Notes changes at instants, past the service. */
  async function noted(entries: readonly (Partial<AuditEntryEntity> & { at: Date })[]): Promise<void> {
    await application.tx.insert(
      AuditEntryEntity,
      entries.map((entry) => ({
        ...{ roomId: staff.room.id, personId: staff.people.keeper.id, action: 'rack.add', origin: null },
        ...entry,
        detail: {},
      })),
    );
  }

  it('tells who changed what, when and from where', async () => {
    await staff.keeper
      .call('patch', staff.path)
      .set('X-Forwarded-For', '203.0.113.7')
      .send({ name: 'Loft' })
      .expect(200);

    expect((await page('?limit=1')).entries).toEqual([
      {
        id: expect.any(String) as string,
        at: expect.stringMatching(/Z$/) as string,
        personId: staff.people.keeper.id,
        personName: staff.people.keeper.name,
        action: 'room.change',
        subjectId: staff.room.id,
        origin: '203.0.113.7',
        detail: { name: 'Loft' },
      },
    ]);
  });

  it('pages without losing or doubling what happened within one millisecond', async () => {
    const day = '?from=2025-02-01&to=2025-02-02';
    await noted(Array.from({ length: 5 }, () => ({ at: new Date('2025-02-01T10:00:00.001Z') })));
    await application.tx.query(
      `UPDATE audit_entry SET at = at + random() * interval '900 microseconds' WHERE at < '2025-02-02'`,
    );

    const ids: string[] = [];
    for (let cursor: string | null = ''; cursor !== null;) {
      const next: Page = await page(`${day}&limit=2${cursor === '' ? '' : `&cursor=${cursor}`}`);
      ids.push(...next.entries.map(({ id }) => id));
      cursor = next.nextCursor;
    }
    expect(ids).toHaveLength(5);
    expect(new Set(ids).size).toBe(5);
  });

  it('is narrowed by person, by what was changed, and by days of the room', async () => {
    // In Dublin's summer the day begins at 23:00 UTC.
    await noted([
      { at: new Date('2025-06-30T22:59:59Z'), action: 'shelf.add' },
      { at: new Date('2025-06-30T23:00:00Z'), action: 'shelf.retire' },
      { at: new Date('2025-07-01T10:00:00Z'), action: 'shelf-lamp.fit' },
      { at: new Date('2025-07-01T11:00:00Z'), action: 'shelf.add', personId: staff.people.grower.id },
      { at: new Date('2025-07-01T23:00:00Z'), action: 'shelf.add' },
    ]);
    const actions = async (query: string): Promise<string[]> =>
      (await page(`?from=2025-07-01&to=2025-07-02${query}`)).entries.map(({ action }) => action);

    expect(await actions('')).toEqual(['shelf.add', 'shelf-lamp.fit', 'shelf.retire']);
    expect(await actions('&object=shelf')).toEqual(['shelf.add', 'shelf.retire']);
    expect(await actions(`&personId=${staff.people.grower.id}`)).toEqual(['shelf.add']);
  });

  it('leaves out other rooms', async () => {
    const other = await aStaffedRoom(application);
    await other.keeper.patch(other.path, { name: 'Cellar' }).expect(200);

    const { entries } = await page('?limit=200');
    expect(entries.filter(({ subjectId }) => subjectId === other.room.id)).toEqual([]);
  });

  it('refuses a cursor that is none and an object that is no word', async () => {
    await staff.keeper.get(`${staff.path}/audit?cursor=first`).expect(422);
    await staff.keeper.get(`${staff.path}/audit?object=${encodeURIComponent("shelf' OR 1=1")}`).expect(422);
  });
});
