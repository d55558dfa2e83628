import type { Alert, AlertTimeLine } from '@shared/contracts/alerts';
import type { Problem } from '@shared/contracts/problem';
import type { AlertEntity } from '../../server/alerts/alert-entity';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { LiveRelay } from '../../server/live/live-relay';
import { anAlert } from '../builders/alerts';
import { aPerson } from '../builders/people';
import { aShelf } from '../builders/rooms';
import { aStaffedRoom, type StaffedRoom } from './room-callers';
import { startTestApplication, type TestApplication } from './test-application';

describe('what people do about an alert', () => {
  let application: TestApplication;
  let staff: StaffedRoom;
  let tx: TestApplication['tx'];
  let stored: AlertEntity;
  let path: string;

  beforeAll(async () => {
    application = await startTestApplication();
    tx = application.tx;
  });
  beforeEach(async () => {
    application.now = new Date('2026-04-15T10:00:00Z');
    staff = await aStaffedRoom(application);
    const shelf = await aShelf(tx, { roomId: staff.room.id });
    stored = await anAlert(tx, { shelfId: shelf.id });
    path = `${staff.path}/alerts/${stored.id}`;
  });
  afterAll(() => application.stop());

  const shown = async (at = path): Promise<Alert> => (await staff.viewer.get(at).expect(200)).body as Alert;
  const timeLine = async (): Promise<AlertTimeLine> =>
    (await staff.viewer.get(`${path}/time-line`).expect(200)).body as AlertTimeLine;
  const actions = async (): Promise<string[]> =>
    (await tx.find(AuditEntryEntity, { where: { subjectId: stored.id }, order: { at: 'ASC' } })).map(
      ({ action }) => action,
    );

  describe('an acknowledgement', () => {
    it('says who has seen it when, with a note, and the first one stays', async () => {
      await staff.helper.post(`${path}/acknowledgement`, { note: ' Vent opened ' }).expect(200);
      application.now = new Date('2026-04-15T11:00:00Z');
      await staff.grower.post(`${path}/acknowledgement`, { note: 'me too' }).expect(200);

      expect(await shown()).toMatchObject({
        acknowledgedAt: '2026-04-15T10:00:00.000Z',
        acknowledgedById: staff.people.helper.id,
        acknowledgedByName: staff.people.helper.name,
        acknowledgeNote: 'Vent opened',
      });
      expect(await actions()).toEqual(['alert.acknowledge']);
    });

    it('can be taken back by who gave it and by keepers, and by nobody else', async () => {
      await staff.helper.post(`${path}/acknowledgement`).expect(200);
      const refused = await staff.grower.delete(`${path}/acknowledgement`).expect(403);
      expect((refused.body as Problem).code).toBe('NOT_YOURS');

      const taken = await staff.helper.delete(`${path}/acknowledgement`).expect(200);
      expect(taken.body).toMatchObject({ acknowledgedAt: null, acknowledgedByName: null });
      expect((await staff.helper.delete(`${path}/acknowledgement`).expect(200)).body).toEqual(taken.body);

      await staff.helper.post(`${path}/acknowledgement`).expect(200);
      await staff.keeper.delete(`${path}/acknowledgement`).expect(200);
      expect((await shown()).acknowledgedAt).toBeNull();
    });
  });

  describe('a quiet', () => {
    it('holds for its kind on its shelf: for all open alerts of it, and for the next one', async () => {
      const sameKind = { shelfId: stored.shelfId, watchId: stored.watchId };
      const other = await anAlert(tx, { shelfId: stored.shelfId, kind: 'belowRange' });
      await staff.helper.put(`${path}/quiet`, { until: '2026-04-15T20:00:00+01:00' }).expect(200);
      const next = await anAlert(tx, {
        ...sameKind,
        beganAt: new Date('2026-04-15T12:00:00Z'),
        openedAt: new Date('2026-04-15T12:30:00Z'),
      });
      const later = await anAlert(tx, {
        ...sameKind,
        beganAt: new Date('2026-04-15T20:00:00Z'),
        openedAt: new Date('2026-04-15T20:30:00Z'),
      });

      const quiet = {
        until: '2026-04-15T19:00:00.000Z',
        setAt: '2026-04-15T10:00:00.000Z',
        setByName: staff.people.helper.name,
      };
      expect((await shown()).quiet).toEqual(quiet);
      expect((await shown(`${staff.path}/alerts/${next.id}`)).quiet).toEqual(quiet);
      expect((await shown(`${staff.path}/alerts/${other.id}`)).quiet).toBeNull();
      expect((await shown(`${staff.path}/alerts/${later.id}`)).quiet).toBeNull();
    });

    it('set anew takes the place of the one before', async () => {
      await staff.helper.put(`${path}/quiet`, { until: '2026-04-15T20:00:00Z' }).expect(200);
      application.now = new Date('2026-04-15T10:05:00Z');
      await staff.grower.put(`${path}/quiet`, { until: '2026-04-15T12:00:00Z' }).expect(200);

      expect((await shown()).quiet).toMatchObject({ until: '2026-04-15T12:00:00.000Z' });
      expect((await timeLine()).quiets).toMatchObject([
        { until: '2026-04-15T20:00:00.000Z', endedAt: '2026-04-15T10:05:00.000Z' },
        { until: '2026-04-15T12:00:00.000Z', endedAt: null, setByName: staff.people.grower.name },
      ]);
    });

    it('can be ended by anybody who may set one, and stays in the time line', async () => {
      await staff.grower.put(`${path}/quiet`, { until: '2026-04-15T20:00:00Z' }).expect(200);
      application.now = new Date('2026-04-15T11:00:00Z');
      const ended = await staff.helper.delete(`${path}/quiet`).expect(200);
      expect((ended.body as Alert).quiet).toBeNull();
      await staff.helper.delete(`${path}/quiet`).expect(200);

      expect((await timeLine()).quiets).toEqual([
        {
          setAt: '2026-04-15T10:00:00.000Z',
          until: '2026-04-15T20:00:00.000Z',
          setByName: staff.people.grower.name,
          endedAt: '2026-04-15T11:00:00.000Z',
          endedByName: staff.people.helper.name,
        },
      ]);
      expect(await actions()).toEqual(['alert.quiet', 'alert.end-quiet']);
    });

    it.each([
      ['in the past', '2026-04-15T10:00:00Z'],
      ['more than a week away', '2026-04-22T10:00:01Z'],
      ['that is no instant', 'tomorrow'],
    ])('%s is refused', async (_, until) => {
      const refused = await staff.helper.put(`${path}/quiet`, { until }).expect(422);
      expect((refused.body as Problem).errors?.map((problem) => problem.path)).toEqual(['body.until']);
      expect((await timeLine()).quiets).toEqual([]);
    });
  });

  describe('a note of what was done', () => {
    it('stands with who and when beside the others, in order', async () => {
      await staff.helper.post(`${path}/deeds`, { text: ' Lamp raised ' }).expect(201);
      application.now = new Date('2026-04-15T10:30:00Z');
      const second = await staff.grower.post(`${path}/deeds`, { text: 'Vent opened' }).expect(201);

      expect((second.body as Alert).deeds).toMatchObject([
        { text: 'Lamp raised', at: '2026-04-15T10:00:00.000Z', personName: staff.people.helper.name },
        { text: 'Vent opened', at: '2026-04-15T10:30:00.000Z', personName: staff.people.grower.name },
      ]);
    });

    it('is noted once however often a phone sends it', async () => {
      for (let time = 0; time < 2; time += 1) {
        await staff.helper
          .post(`${path}/deeds`, { text: 'Lamp raised' })
          .set('Idempotency-Key', 'the-same-key-every-time')
          .expect(201);
      }
      expect((await shown()).deeds).toHaveLength(1);
    });

    it('without words is refused', async () => {
      await staff.helper.post(`${path}/deeds`, { text: '  ' }).expect(422);
    });

    it('can be removed by who wrote it and by keepers, and by nobody else', async () => {
      const noted = await staff.helper.post(`${path}/deeds`, { text: 'Lamp raised' }).expect(201);
      const deed = `${path}/deeds/${(noted.body as Alert).deeds[0]?.id ?? ''}`;
      await staff.grower.delete(deed).expect(403);
      expect(((await staff.helper.delete(deed).expect(200)).body as Alert).deeds).toEqual([]);
      await staff.keeper.delete(deed).expect(404);
      expect(await actions()).toEqual(['alert.note-deed', 'alert.remove-deed']);
    });
  });

  describe('an assignment', () => {
    const assign = (personId: string | null) => staff.helper.put(`${path}/assignee`, { personId });

    it('says who looks after it; the newest holds, and all are kept', async () => {
      const { grower, keeper } = staff.people;
      await assign(grower.id).expect(200);
      await assign(grower.id).expect(200);
      application.now = new Date('2026-04-15T10:30:00Z');
      const second = await assign(keeper.id).expect(200);
      expect((second.body as Alert).assignee).toEqual({ personId: keeper.id, name: keeper.name });
      application.now = new Date('2026-04-15T10:40:00Z');
      expect(((await assign(null).expect(200)).body as Alert).assignee).toBeNull();

      expect((await timeLine()).assignments).toEqual(
        [
          { at: '2026-04-15T10:00:00.000Z', personName: grower.name },
          { at: '2026-04-15T10:30:00.000Z', personName: keeper.name },
          { at: '2026-04-15T10:40:00.000Z', personName: null },
        ].map((one) => ({ ...one, assignedByName: staff.people.helper.name })),
      );
    });

    it('to somebody who is no member, or may only look, is refused', async () => {
      for (const personId of [(await aPerson(tx)).id, staff.people.viewer.id]) {
        const refused = await assign(personId).expect(422);
        expect((refused.body as Problem).errors?.map((problem) => problem.path)).toEqual(['body.personId']);
      }
      expect((await timeLine()).assignments).toEqual([]);
    });
  });

  it('is told to dashboards once it changes something, for every alert that looks different now', async () => {
    const published = jest.spyOn(LiveRelay.prototype, 'publish');
    const quieted = await staff.helper.put(`${path}/quiet`, { until: '2026-04-15T20:00:00Z' }).expect(200);
    await staff.helper.delete(`${path}/acknowledgement`).expect(200);

    expect(published.mock.calls).toEqual([[staff.room.id, 'alert:changed', quieted.body]]);
    published.mockRestore();
  });
});
