import { AlertEntity } from '../../server/alerts/alert-entity';
import { AlertQuietEntity } from '../../server/alerts/alert-quiet-entity';
import { aMember, aPerson } from '../builders/people';
import { stored } from '../builders/stored';
import { aMailedRoom, startMailHarness, type MailHarness } from './mail-harness';

const MINUTE_MS = 60_000;

describe('mails about an alert that is quiet', () => {
  let harness: MailHarness;

  beforeAll(async () => {
    harness = await startMailHarness();
  });
  beforeEach(() => {
    harness.application.now = new Date('2026-04-15T10:00:00Z');
  });
  afterAll(() => harness.stop());

  const subjects = async (email: string): Promise<string[]> =>
    (await harness.mailsTo(email)).map(({ subject }) => subject);
  const inMinutes = (minutes: number): Date =>
    new Date(harness.application.now.getTime() + minutes * MINUTE_MS);
  /** Lets the clock go on, and everything happen that happens by it. */
  async function later(minutes: number): Promise<void> {
    await harness.after(minutes);
    await harness.application.app.services.escalationJob.run();
    await harness.after(1);
  }
  const quiet = (
    { shelfId, quantity, kind }: Pick<AlertEntity, 'shelfId' | 'quantity' | 'kind'>,
    minutes: number,
  ): Promise<AlertQuietEntity> =>
    stored(harness.application.tx, AlertQuietEntity, {
      shelfId,
      quantity,
      kind,
      setAt: harness.application.now,
      until: inMinutes(minutes),
    });
  async function aKeeper(roomId: string): Promise<string> {
    const keeper = await aPerson(harness.application.tx);
    await aMember(harness.application.tx, {
      roomId,
      personId: keeper.id,
      role: 'keeper',
      mailLookToday: 'morningLetter',
      letterAt: '23:59',
    });
    return keeper.email;
  }

  it('are not written: not that it became urgent, nor that it is over', async () => {
    const { shelfId, email } = await aMailedRoom(harness, { mailAlertCleared: true });
    const alert = await harness.open({ shelfId });
    await harness.after(1);
    await quiet(alert, 120);
    await harness.application.tx.update(AlertEntity, { id: alert.id }, { urgency: 'goNow' });
    await later(10);
    await harness.clear(alert);
    await later(10);

    expect(await subjects(email)).toHaveLength(1);
  });

  it('are not written about the next one of its kind on the shelf either, but about another kind', async () => {
    const { shelfId, email } = await aMailedRoom(harness);
    const first = await harness.open({ shelfId });
    await harness.after(1);
    await quiet(first, 120);
    await harness.clear(first);
    await harness.after(5);
    await harness.open({ shelfId, watchId: first.watchId });
    await harness.open({ shelfId, kind: 'dangerHigh', quantity: 'airTemperature' });
    await later(5);

    expect(await subjects(email)).toEqual([
      expect.stringContaining('VPD'),
      expect.stringContaining('dangerously'),
    ]);
  });

  it('that wait to be sent when it is made quiet are held back, and written afterwards if it is still open', async () => {
    const { shelfId, email } = await aMailedRoom(harness);
    await quiet(await harness.open({ shelfId }), 60);
    await later(30);
    expect(await subjects(email)).toEqual([]);

    await later(30);
    await later(30);
    expect(await subjects(email)).toHaveLength(1);
  });

  it('are written as soon as somebody ends the quiet', async () => {
    const { shelfId, email } = await aMailedRoom(harness);
    const { id } = await quiet(await harness.open({ shelfId }), 600);
    await later(30);
    await harness.application.tx.update(AlertQuietEntity, { id }, { endedAt: harness.application.now });
    await later(1);

    expect(await subjects(email)).toHaveLength(1);
  });

  it('are not written afterwards when somebody has seen it meanwhile, or it is over', async () => {
    const seen = await aMailedRoom(harness);
    const over = await aMailedRoom(harness);
    const alerts = [
      await harness.open({ shelfId: seen.shelfId }),
      await harness.open({ shelfId: over.shelfId }),
    ] as const;
    for (const alert of alerts) await quiet(alert, 60);
    await later(30);
    const acknowledgedAt = harness.application.now;
    await harness.application.tx.update(AlertEntity, { id: alerts[0].id }, { acknowledgedAt });
    await harness.clear(alerts[1]);
    await later(60);

    expect(await subjects(seen.email)).toEqual([]);
    expect(await subjects(over.email)).toEqual([]);
  });

  it('do not go to keepers while it is; their time counts from its end', async () => {
    const { roomId, shelfId } = await aMailedRoom(harness);
    const keeper = await aKeeper(roomId);
    const alert = await harness.open({ shelfId });
    await harness.after(1);
    await quiet(alert, 300);
    await later(298); // The usual four hours are over.
    expect(await subjects(keeper)).toEqual([]);
    await later(238);
    expect(await subjects(keeper)).toEqual([]);

    await later(3);
    expect(await subjects(keeper)).toHaveLength(1);
  });
});
