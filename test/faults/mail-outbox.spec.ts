import { once } from 'node:events';
import type { Account } from '@shared/contracts/people';
import { MailEntity } from '../../server/mail/mail-entity';
import { startMailbox } from '../../simulator/mailbox/start-mailbox';
import { Caller } from '../api/caller';
import { aMailedRoom, startMailHarness, type MailHarness } from '../api/mail-harness';
import { HeldWrites } from './held-writes';
import { startProcess } from './start-process';

describe('the outbox', () => {
  let harness: MailHarness;

  beforeEach(async () => {
    harness = await startMailHarness();
  });
  afterEach(() => harness.stop());

  const attemptsOf = async (email: string): Promise<number[]> =>
    (await harness.application.tx.findBy(MailEntity, { toAddress: email })).map(({ attempts }) => attempts);

  async function until(isSo: () => Promise<boolean>): Promise<void> {
    for (let round = 0; round < 600; round += 1) {
      if (await isSo()) return;
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
    throw new Error('What was waited for did not come');
  }

  it('whose worker is killed after the mail server took a mail sends that mail once more, the same', async () => {
    const { application, mailbox } = harness;
    const { shelfId, email } = await aMailedRoom(harness);
    await harness.open({ shelfId });
    const marking = await HeldWrites.on(
      application,
      'mail',
      'BEFORE UPDATE',
      'OLD.sent_at IS NULL AND NEW.sent_at IS NOT NULL',
    );
    const worker = startProcess(
      'outbox-process',
      { database: application.database, now: new Date(application.now.getTime() + 60_000) },
      { SMTP_URL: `smtp://127.0.0.1:${mailbox.smtpPort}` },
    );
    const ended = once(worker, 'exit');
    await until(async () => (await harness.mailsTo(email)).length === 1);
    worker.kill('SIGKILL');
    expect(await ended).toEqual([null, 'SIGKILL']);
    await marking.release();

    // The database notices the dead worker in its own time, and lets go of the mail.
    await until(async () => {
      await harness.after(1);
      return (await harness.mailsTo(email)).length > 1;
    });
    await harness.after(60);
    const [first, second, ...more] = await harness.mailsTo(email);
    expect(second?.messageId).toBe(first?.messageId);
    expect(more).toEqual([]);
    expect(await application.tx.countBy(MailEntity, { toAddress: email })).toBe(1);
  });

  it('keeps every mail through a night without a mail server, and sends them in order afterwards', async () => {
    await harness.mailbox.stop();
    const emails: string[] = [];
    for (let hour = 0; hour < 10; hour += 1) {
      const { shelfId, email } = await aMailedRoom(harness);
      emails.push(email);
      await harness.open({ shelfId });
      await harness.after(60);
    }
    for (const email of emails) expect(await attemptsOf(email)).toEqual([0]);

    const again = await startMailbox({ smtpPort: harness.mailbox.smtpPort, httpPort: 0 });
    Object.assign(harness, { mailbox: again });
    await harness.after(1);
    const answer = await fetch(`${again.address}/api/mails`);
    const { mails } = (await answer.json()) as { mails: { to: string[] }[] };
    expect(mails.flatMap(({ to }) => to).reverse()).toEqual(emails);
  });

  it.each(['refuse-temporarily', 'drop-connection'] as const)(
    'told to wait by the mail server (%s) tries again with the same Message-ID',
    async (mode) => {
      const { shelfId, email } = await aMailedRoom(harness);
      await harness.open({ shelfId });
      await harness.fault({ mode, count: 2 });
      await harness.after(1);
      await harness.after(0.1);
      expect(await attemptsOf(email)).toEqual([1]);
      await harness.after(1);
      await harness.after(2);

      const [mail] = await harness.application.tx.findBy(MailEntity, { toAddress: email });
      expect((await harness.mailsTo(email)).map(({ messageId }) => messageId)).toEqual([mail?.messageId]);
    },
  );

  it('stops at a refusal for good, shows it at the person, and forgets it with the next mail that is taken', async () => {
    const { shelfId, email } = await aMailedRoom(harness);
    await harness.open({ shelfId });
    await harness.fault({ mode: 'refuse-permanently', count: 1 });
    await harness.after(1);
    await harness.after(600);
    expect(await attemptsOf(email)).toEqual([1]);
    expect(await harness.mailsTo(email)).toEqual([]);

    const caller = await Caller.signedIn(harness.application.express, { email });
    const refused = ((await caller.get('/account')).body as Account).mailRefused;
    expect(refused?.since).toBe('2026-04-15T10:01:00.000Z');
    expect(refused?.reason).toContain('No such mailbox here');

    await harness.open({ shelfId, quantity: 'relativeHumidity' });
    await harness.after(1);
    expect(((await caller.get('/account')).body as Account).mailRefused).toBeNull();
  });

  it('with two workers at once sends every mail once', async () => {
    for (let person = 0; person < 6; person += 1) {
      const { shelfId } = await aMailedRoom(harness);
      await harness.open({ shelfId });
    }
    await Promise.all([harness.after(1), harness.after(1), harness.after(1)]);

    const ids = (await harness.mailsTo('@example.org')).map(({ messageId }) => messageId);
    expect(ids).toHaveLength(6);
    expect(new Set(ids).size).toBe(6);
  });
});
