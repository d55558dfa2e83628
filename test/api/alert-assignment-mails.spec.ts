import { Caller } from './caller';
import { aMember, aPerson } from '../builders/people';
import { aMailedRoom, startMailHarness, type MailedRoom, type MailHarness } from './mail-harness';

describe('mails to who is to look after an alert', () => {
  let harness: MailHarness;

  beforeAll(async () => {
    harness = await startMailHarness();
  });
  beforeEach(() => {
    harness.application.now = new Date('2026-04-15T10:00:00Z');
  });
  afterAll(() => harness.stop());

  const subjects = async ({ email }: MailedRoom): Promise<string[]> =>
    (await harness.mailsTo(email)).map(({ subject }) => subject);
  /** A keeper of a room who says that a member looks after an alert of it. */
  async function assigning(
    room: MailedRoom,
  ): Promise<(alertId: string, personId: string | null) => Promise<void>> {
    const { tx, express } = harness.application;
    const keeper = await aPerson(tx);
    await aMember(tx, { roomId: room.roomId, personId: keeper.id, role: 'keeper', mailLookToday: 'never' });
    const caller = await Caller.signedIn(express, keeper);
    return async (alertId, personId) => {
      await caller.put(`/rooms/${room.roomId}/alerts/${alertId}/assignee`, { personId }).expect(200);
    };
  }

  it('answer the mail that it opened, once however often they are asked', async () => {
    const room = await aMailedRoom(harness);
    const assign = await assigning(room);
    const alert = await harness.open({ shelfId: room.shelfId });
    await harness.after(1);
    for (const personId of [room.personId, null, room.personId]) {
      await assign(alert.id, personId);
      await harness.after(1);
    }

    const [opened, assigned, ...more] = await harness.mailsTo(room.email);
    expect(assigned?.subject).toBe(`Re: ${opened?.subject}`);
    expect(assigned?.references).toEqual([opened?.messageId]);
    expect(assigned?.text).toContain('You are asked to look after this alert.');
    expect(more).toEqual([]);
  });

  it('go out though the alert is quiet for everybody', async () => {
    const room = await aMailedRoom(harness);
    const assign = await assigning(room);
    const alert = await harness.open({ shelfId: room.shelfId });
    await harness.after(1);
    const { express, tx } = harness.application;
    const helper = await aPerson(tx);
    await aMember(tx, { roomId: room.roomId, personId: helper.id, role: 'helper' });
    await (
      await Caller.signedIn(express, helper)
    )
      .put(`/rooms/${room.roomId}/alerts/${alert.id}/quiet`, { until: '2026-04-15T18:00:00Z' })
      .expect(200);
    await assign(alert.id, room.personId);
    await harness.after(1);

    expect(await subjects(room)).toHaveLength(2);
  });

  it('are not sent when it is over or another one’s by then, nor to oneself', async () => {
    const room = await aMailedRoom(harness);
    const assign = await assigning(room);
    const alert = await harness.open({ shelfId: room.shelfId });
    await harness.after(1);
    await assign(alert.id, room.personId);
    await assign(alert.id, null);
    await harness.after(1);
    const { express } = harness.application;
    await (
      await Caller.signedIn(express, room)
    )
      .put(`/rooms/${room.roomId}/alerts/${alert.id}/assignee`, { personId: room.personId })
      .expect(200);
    await harness.after(1);

    expect(await subjects(room)).toHaveLength(1);
  });

  it('wait through the person’s quiet hours, and are left out where they chose no mails', async () => {
    const night = await aMailedRoom(harness, { quietFrom: '22:00', quietTo: '07:00' });
    const never = await aMailedRoom(harness, { mailLookToday: 'never' });
    for (const room of [night, never]) {
      const alert = await harness.open({ shelfId: room.shelfId }, '2026-04-15T20:00:00Z');
      await harness.after(1);
      harness.application.now = new Date('2026-04-15T22:30:00Z');
      await (
        await assigning(room)
      )(alert.id, room.personId);
    }
    await harness.after(60);
    expect(await subjects(night)).toHaveLength(1);
    await harness.at('2026-04-16T06:00:00Z'); // 07:00 in Dublin.
    expect(await subjects(night)).toHaveLength(2);
    expect(await subjects(never)).toEqual([]);
  });
});
