import request from 'supertest';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import type { Account } from '@shared/contracts/people';
import { usualMailChoice } from '@shared/mail/mail-choice';
import { AlertEntity } from '../../server/alerts/alert-entity';
import { aMember, aPerson } from '../builders/people';
import { aShelf } from '../builders/rooms';
import { Caller } from './caller';
import { aMailedRoom, startMailHarness, type MailHarness } from './mail-harness';

describe('mails about alerts', () => {
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

  it('say what, where, since when, how far off, what was wanted, what to try, and where to look', async () => {
    const { shelfId, email } = await aMailedRoom(harness);
    const { tx } = harness.application;
    await tx.update(ShelfEntity, { id: shelfId }, { label: 'A1' });
    const alert = await harness.open({
      shelfId,
      quantity: 'airTemperature',
      peakValue: 28.3,
      peakExcess: 2.3,
      peakLimit: 26,
    });
    await harness.after(1);

    const [mail] = await harness.mailsTo(email);
    expect(mail?.subject).toBe('A1 air is 2.3\u00a0°C too warm · Loft');
    for (const body of [mail?.text, mail?.html]) {
      expect(body).toContain('Too warm since 10:30: 28.3\u00a0°C, wanted up to 26.');
      expect(body).toContain('raise it');
      expect(body).toContain('Usual caution');
      expect(body).toContain(`http://127.0.0.1:4280/alerts/${alert.id}`);
      expect(body).toContain(`http://127.0.0.1:4280/shelf/${shelfId}`);
    }
  });

  it('of several alerts within a minute are one mail, and of a later one another', async () => {
    const { roomId, shelfId, email } = await aMailedRoom(harness);
    const other = await aShelf(harness.application.tx, { roomId });
    await harness.open({ shelfId });
    await harness.open({ shelfId: other.id }, '2026-04-15T10:00:40Z');
    await harness.at('2026-04-15T10:01:00Z');
    await harness.open({ shelfId, quantity: 'relativeHumidity' }, '2026-04-15T10:01:10Z');
    await harness.at('2026-04-15T10:02:10Z');

    expect(await subjects(email)).toEqual([
      expect.stringMatching(/^2 alerts on /),
      expect.stringContaining('air'),
    ]);
  });

  it('that alerts are over answer the mail that they had opened, for each alert of it', async () => {
    const { roomId, shelfId, email } = await aMailedRoom(harness, { mailAlertCleared: true });
    const other = await aShelf(harness.application.tx, { roomId });
    const first = await harness.open({ shelfId });
    const second = await harness.open({ shelfId: other.id });
    await harness.after(1);
    await harness.clear(first);
    await harness.after(30);
    await harness.clear(second);
    await harness.after(1);

    const [opened, ...over] = await harness.mailsTo(email);
    expect(over.map(({ subject }) => subject)).toEqual([`Re: ${opened?.subject}`, `Re: ${opened?.subject}`]);
    expect(over.map(({ references }) => references)).toEqual([[opened?.messageId], [opened?.messageId]]);
    expect(new Set([opened, ...over].map((mail) => mail?.messageId)).size).toBe(3);
  });

  it('that an alert is over are not sent to who did not choose them, or was not told of it', async () => {
    const quiet = await aMailedRoom(harness);
    const untold = await aMailedRoom(harness, { mailLookToday: 'never', mailAlertCleared: true });
    for (const { shelfId } of [quiet, untold]) await harness.clear(await harness.open({ shelfId }));
    await harness.after(2);

    expect(await subjects(quiet.email)).toHaveLength(1);
    expect(await subjects(untold.email)).toEqual([]);
  });

  describe('in quiet hours', () => {
    const night = { quietFrom: '22:00', quietTo: '07:00', mailAlertCleared: true };

    it('wait until these end, and say nothing of what is over by then', async () => {
      const { roomId, shelfId, email } = await aMailedRoom(harness, night);
      const other = await aShelf(harness.application.tx, { roomId });
      const passing = await harness.open({ shelfId }, '2026-04-15T22:30:00Z');
      await harness.open({ shelfId: other.id }, '2026-04-16T01:00:00Z');
      await harness.at('2026-04-16T03:00:00Z');
      await harness.clear(passing);
      await harness.at('2026-04-16T05:59:59Z');
      expect(await subjects(email)).toEqual([]);

      await harness.at('2026-04-16T06:00:00Z'); // 07:00 in Dublin.
      await harness.after(60);
      expect(await subjects(email)).toEqual([expect.stringContaining(other.label)]);
    });

    it('are not sent at all when everything is over by then', async () => {
      const { shelfId, email } = await aMailedRoom(harness, night);
      await harness.clear(await harness.open({ shelfId }, '2026-04-15T22:30:00Z'));
      await harness.at('2026-04-16T08:00:00Z');
      expect(await subjects(email)).toEqual([]);
    });

    it('pass when they are urgent, and when they become so', async () => {
      const { shelfId, email } = await aMailedRoom(harness, night);
      await harness.open({ shelfId, urgency: 'goNow' }, '2026-04-15T23:00:00Z');
      await harness.after(1);
      const growing = await harness.open({ shelfId, quantity: 'relativeHumidity' }, '2026-04-16T00:00:00Z');
      await harness.after(1);
      expect(await subjects(email)).toEqual([expect.stringMatching(/^Go now: /)]);

      await harness.application.tx.update(AlertEntity, { id: growing.id }, { urgency: 'goNow' });
      await harness.application.app.services.escalationJob.run();
      await harness.after(1);
      expect(await subjects(email)).toHaveLength(2);
    });
  });

  it('that were sent before an alert became urgent are answered by one that says so, once', async () => {
    const { shelfId, email } = await aMailedRoom(harness);
    const alert = await harness.open({ shelfId });
    await harness.after(1);
    await harness.application.tx.update(AlertEntity, { id: alert.id }, { urgency: 'goNow' });
    for (let minute = 0; minute < 3; minute += 1) {
      await harness.application.app.services.escalationJob.run();
      await harness.after(1);
    }

    const [opened, urgent, ...more] = await harness.mailsTo(email);
    expect(urgent?.references).toEqual([opened?.messageId]);
    expect(urgent?.text).toContain('became urgent');
    expect(more).toEqual([]);
  });

  describe('that nobody acknowledged', () => {
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
    const escalate = async (minutes: number): Promise<void> => {
      await harness.after(minutes);
      await harness.application.app.services.escalationJob.run();
      await harness.after(1);
    };

    it('go to keepers who had no mail, after the usual four hours, once', async () => {
      const { roomId, shelfId, email } = await aMailedRoom(harness);
      const keeper = await aKeeper(roomId);
      await harness.open({ shelfId });
      await harness.after(1);
      await escalate(238);
      expect(await subjects(keeper)).toEqual([]);

      await escalate(2);
      await escalate(300);
      expect(await subjects(keeper)).toHaveLength(1);
      expect(await subjects(email)).toHaveLength(1);
    });

    it('go once more to keepers who were written to, when there are no others', async () => {
      const { shelfId, email } = await aMailedRoom(harness, { role: 'keeper' });
      await harness.open({ shelfId, urgency: 'goNow' });
      await harness.after(1);
      await escalate(60);

      const [opened, again] = await harness.mailsTo(email);
      expect(again?.references).toEqual([opened?.messageId]);
      expect(again?.text).toContain('Nobody has acknowledged it');
    });

    it('go nowhere once somebody acknowledges, or when the room turned it off', async () => {
      const seen = await aMailedRoom(harness);
      const off = await aMailedRoom(harness);
      const keepers = [await aKeeper(seen.roomId), await aKeeper(off.roomId)];
      const alert = await harness.open({ shelfId: seen.shelfId });
      await harness.application.tx.update(
        AlertEntity,
        { id: alert.id },
        { acknowledgedAt: harness.application.now },
      );
      await harness.open({ shelfId: off.shelfId });
      const caller = await Caller.signedIn(harness.application.express, { email: keepers[1] ?? '' });
      await caller
        .put(`/rooms/${off.roomId}/escalation`, { goNowMinutes: 60, lookTodayMinutes: null })
        .expect(200);
      await harness.after(1);
      await escalate(600);

      for (const keeper of keepers) expect(await subjects(keeper)).toEqual([]);
    });
  });

  describe('can be stopped without signing in', () => {
    const linkOf = (source = ''): string =>
      /^List-Unsubscribe: <http:\/\/127\.0\.0\.1:4280(\/api\/v1\/unsubscribe\/[\w-]+)>/m.exec(
        source.replaceAll(/\r\n[ \t]+/g, ' '),
      )?.[1] ?? '';

    it('by one request of the mail program, for that kind in that room', async () => {
      const { shelfId, roomId, email } = await aMailedRoom(harness);
      await harness.open({ shelfId });
      await harness.after(1);
      const [mail] = await harness.mailsTo(email);
      expect(mail?.source).toMatch(/^List-Unsubscribe-Post: List-Unsubscribe=One-Click\r?$/m);

      const { express } = harness.application;
      const post = (): request.Test =>
        request(express).post(linkOf(mail?.source)).type('form').send('List-Unsubscribe=One-Click');
      await post().expect(200, { roomName: 'Loft', stops: 'lookToday', isStopped: true });
      await post().expect(200);

      const { memberships } = (await (await Caller.signedIn(express, { email })).get('/account'))
        .body as Account;
      expect(memberships.find((one) => one.roomId === roomId)?.mails).toEqual({
        ...usualMailChoice,
        lookToday: 'never',
      });
    });

    it('but not by looking: a browser is sent on to the page that asks', async () => {
      const { shelfId, email } = await aMailedRoom(harness);
      await harness.open({ shelfId });
      await harness.after(1);
      const link = linkOf((await harness.mailsTo(email))[0]?.source);
      const { express } = harness.application;

      const reply = await request(express).get(link).set('Accept', 'text/html,*/*').expect(303);
      expect(reply.headers['location']).toBe(link.replace('/api/v1', ''));
      await request(express)
        .get(link)
        .expect(200, { roomName: 'Loft', stops: 'lookToday', isStopped: false });
    });

    it('only with a link of ours', async () => {
      const { shelfId, email } = await aMailedRoom(harness);
      await harness.open({ shelfId });
      await harness.after(1);
      const link = linkOf((await harness.mailsTo(email))[0]?.source);
      const last = link.at(-10) === 'A' ? 'B' : 'A';
      const forged = `${link.slice(0, -10)}${last}${link.slice(-9)}`;
      for (const path of [forged, '/api/v1/unsubscribe/x', `${link}AA`]) {
        await request(harness.application.express).post(path).expect(404);
      }
    });
  });

  it('may not be left to a letter that is not sent', async () => {
    const { roomId, email } = await aMailedRoom(harness);
    const caller = await Caller.signedIn(harness.application.express, { email });
    await caller.patch(`/rooms/${roomId}/membership`, { lookToday: 'morningLetter' }).expect(422);
    await caller
      .patch(`/rooms/${roomId}/membership`, { lookToday: 'morningLetter', letterAt: '06:30' })
      .expect(200);
  });
});
