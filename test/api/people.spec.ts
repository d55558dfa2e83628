import request from 'supertest';
import type { Account } from '@shared/contracts/people';
import type { Problem } from '@shared/contracts/problem';
import { usualMailChoice } from '@shared/mail/mail-choice';
import { AuditEntryEntity } from '../../server/audit/audit-entry-entity';
import { PersonEntity } from '../../server/people/person-entity';
import type { Tx } from '../../server/database/transactions';
import { sessionSecret } from '../../server/people/session-secret';
import { aMember, aPerson, testPassword } from '../builders/people';
import { aRoom } from '../builders/rooms';
import { Caller, cookieOf } from './caller';
import { startTestApplication, type TestApplication } from './test-application';

describe('people', () => {
  let application: TestApplication;
  let tx: Tx;

  beforeAll(async () => {
    application = await startTestApplication();
    tx = application.tx;
  });
  afterAll(() => application.stop());

  const trySignIn = (email: string, password: string, ip = '192.0.2.1') =>
    request(application.express).post('/api/v1/session').set('X-Forwarded-For', ip).send({ email, password });

  describe('signing in', () => {
    it('with the right password, whatever the case of the address, answers with the account', async () => {
      const person = await aPerson(tx, { email: 'mixed.case@example.org' });
      const room = await aRoom(tx, { name: 'Loft' });
      await aMember(tx, { personId: person.id, roomId: room.id, role: 'grower' });

      const reply = await trySignIn(' Mixed.Case@Example.org ', testPassword).expect(200);

      expect(reply.body).toEqual({
        id: person.id,
        email: 'mixed.case@example.org',
        name: person.name,
        temperatureUnit: 'celsius',
        theme: 'system',
        memberships: [
          {
            roomId: room.id,
            roomName: 'Loft',
            timeZone: 'Europe/Dublin',
            role: 'grower',
            mails: usualMailChoice,
          },
        ],
        mailRefused: null,
        csrfToken: expect.stringMatching(/^[\w-]{43}$/) as string,
      } satisfies Account);
    });

    it('sets a cookie that scripts and other sites cannot use, for fourteen days', async () => {
      const reply = await trySignIn((await aPerson(tx)).email, testPassword);

      const cookie = String(reply.headers['set-cookie']);
      expect(cookie).toMatch(/^lampmeadow=s%3A/);
      expect(cookie).toContain('HttpOnly');
      expect(cookie).toContain('SameSite=Lax');
      const expires = Date.parse(/Expires=([^;]+)/.exec(cookie)?.[1] ?? '');
      expect(Math.abs(expires - Date.now() - 14 * 86_400_000)).toBeLessThan(60_000);
    });

    it('for an unknown address and for a wrong password gives the same answer', async () => {
      const wrong = await trySignIn((await aPerson(tx)).email, 'not the password').expect(401);
      const unknown = await trySignIn('nobody@example.org', 'not the password').expect(401);
      const empty = await trySignIn('', '').expect(401);

      expect((wrong.body as Problem).code).toBe('WRONG_CREDENTIALS');
      expect(unknown.body).toEqual(wrong.body);
      expect(empty.body).toEqual(wrong.body);
      expect(wrong.headers['set-cookie']).toBeUndefined();
    });

    it('starts a new session, so that one planted beforehand is worth nothing', async () => {
      const person = await aPerson(tx);
      const planted = await Caller.signedIn(application.express, await aPerson(tx));

      const reply = await request(application.express)
        .post('/api/v1/session')
        .set({ Cookie: planted.cookie, 'X-CSRF-Token': planted.csrfToken })
        .send({ email: person.email, password: testPassword })
        .expect(200);

      expect(cookieOf(reply.headers)).not.toBe(planted.cookie);
      expect((reply.body as Account).csrfToken).not.toBe(planted.csrfToken);
      await planted.get('/account').expect(401);
    });

    it('sent by another site is refused', async () => {
      await request(application.express)
        .post('/api/v1/session')
        .set('Sec-Fetch-Site', 'cross-site')
        .send({ email: (await aPerson(tx)).email, password: testPassword })
        .expect(403);
    });
  });

  describe('guessing', () => {
    it('ten times at one account from one place locks that place out of it, also with the right password', async () => {
      const { email } = await aPerson(tx);
      for (let guess = 0; guess < 10; guess += 1) await trySignIn(email, 'a guess', '192.0.2.10').expect(401);

      const refused = await trySignIn(email, testPassword, '192.0.2.10').expect(429);

      expect((refused.body as Problem).code).toBe('TOO_MANY_ATTEMPTS');
      expect(Number(refused.headers['retry-after'])).toBeGreaterThan(14 * 60);
      expect(Number(refused.headers['retry-after'])).toBeLessThanOrEqual(15 * 60);
      await trySignIn(email, testPassword, '192.0.2.11').expect(200);
    });

    it('does not count those who get in', async () => {
      const { email } = await aPerson(tx);

      for (let time = 0; time < 11; time += 1) await trySignIn(email, testPassword, '192.0.2.20').expect(200);
    });

    it('at many accounts from one place locks the place out after fifty', async () => {
      await trySignIn('first@example.org', 'a guess', '192.0.2.30').expect(401);
      await tx.query(`UPDATE rate_limit SET hits = 49 WHERE key = 'sign-in-ip:192.0.2.30'`);
      await trySignIn('fiftieth@example.org', 'a guess', '192.0.2.30').expect(401);

      await trySignIn((await aPerson(tx)).email, testPassword, '192.0.2.30').expect(429);
    });

    it('leaves no address in the database', async () => {
      await trySignIn('mistyped@example.org', 'a guess');

      const rows: unknown[] = await tx.query(`SELECT key FROM rate_limit WHERE key LIKE '%mistyped%'`);
      expect(rows).toEqual([]);
    });
  });

  describe('a session', () => {
    it('ends for good when its person signs out', async () => {
      const caller = await Caller.signedIn(application.express, await aPerson(tx));

      const reply = await caller.delete('/session').expect(204);

      expect(String(reply.headers['set-cookie'])).toMatch(/^lampmeadow=;.*Expires=Thu, 01 Jan 1970/);
      await caller.get('/account').expect(401);
    });

    it('keeps only the id of its person, and ends with the person', async () => {
      const person = await aPerson(tx);
      const caller = await Caller.signedIn(application.express, person);
      const rows: { sess: { passport: unknown } }[] = await tx.query(
        `SELECT sess FROM http_session WHERE sess->'passport'->>'user' = $1`,
        [person.id],
      );
      expect(rows.map(({ sess }) => sess.passport)).toEqual([{ user: person.id }]);

      await tx.delete(PersonEntity, { id: person.id });

      await caller.get('/account').expect(401);
    });

    it('is prolonged when it is used an hour later, and not before', async () => {
      const person = await aPerson(tx);
      const caller = await Caller.signedIn(application.express, person);
      expect((await caller.get('/account')).headers['set-cookie']).toBeUndefined();
      await tx.query(
        `UPDATE http_session SET expire = now() + interval '1 minute',
           sess = jsonb_set(sess::jsonb, '{renewedAt}', to_jsonb(extract(epoch FROM now()) * 1000 - 3600000))::json
         WHERE sess->'passport'->>'user' = $1`,
        [person.id],
      );

      const reply = await caller.get('/account').expect(200);

      expect(cookieOf(reply.headers)).toBe(caller.cookie);
      const rows: unknown[] = await tx.query(
        `SELECT FROM http_session WHERE sess->'passport'->>'user' = $1 AND expire > now() + interval '13 days'`,
        [person.id],
      );
      expect(rows).toHaveLength(1);
    });

    it('is signed with the configured secret, or with one that all processes share', async () => {
      const { transactions } = application.database;

      const [first, second] = await Promise.all([
        sessionSecret(transactions, null),
        sessionSecret(transactions, null),
      ]);

      expect(first).toMatch(/^[\w-]{43}$/);
      expect(second).toBe(first);
      expect(await sessionSecret(transactions, 'configured')).toBe('configured');
    });

    it('travels only over HTTPS where pages do', async () => {
      const secure = await startTestApplication({ PUBLIC_URL: 'https://room.example.org' });
      const person = await aPerson(secure.tx);

      const reply = await request(secure.express)
        .post('/api/v1/session')
        .set('X-Forwarded-Proto', 'https')
        .send({ email: person.email, password: testPassword })
        .expect(200);

      expect(String(reply.headers['set-cookie'])).toContain('; Secure');
      await secure.stop();
    });

    it('writes nothing without the token that its pages know', async () => {
      const caller = await Caller.signedIn(application.express, await aPerson(tx));

      const reply = await request(application.express)
        .patch('/api/v1/account')
        .set('Cookie', caller.cookie)
        .send({ name: 'Forged' })
        .expect(403);

      expect((reply.body as Problem).code).toBe('CROSS_SITE');
    });
  });

  describe('the account', () => {
    it('changes what is given and keeps the rest', async () => {
      const person = await aPerson(tx);
      const caller = await Caller.signedIn(application.express, person);

      const reply = await caller
        .patch('/account', { temperatureUnit: 'fahrenheit', theme: 'lampsOff' })
        .expect(200);

      expect(reply.body).toMatchObject({
        name: person.name,
        temperatureUnit: 'fahrenheit',
        theme: 'lampsOff',
        csrfToken: caller.csrfToken,
      });
      expect((await caller.get('/account')).body).toEqual(reply.body);
      await caller.patch('/account', {}).expect(200, reply.body as Account);
    });

    it('keeps who changed it, in the audit table', async () => {
      const person = await aPerson(tx);
      const caller = await Caller.signedIn(application.express, person);

      await caller.patch('/account', { name: 'Wren Ashby' }).expect(200);

      expect(await tx.findBy(AuditEntryEntity, { personId: person.id })).toMatchObject([
        { action: 'account.change', roomId: null, subjectId: person.id, detail: { name: 'Wren Ashby' } },
      ]);
    });
  });

  describe('the password', () => {
    const next = 'another long password';

    it('changes for who knows the current one, and signs the person out everywhere else', async () => {
      const person = await aPerson(tx);
      const here = await Caller.signedIn(application.express, person);
      const elsewhere = await Caller.signedIn(application.express, person);
      const somebodyElse = await Caller.signedIn(application.express, await aPerson(tx));

      await here.put('/account/password', { currentPassword: testPassword, newPassword: next }).expect(204);

      await here.get('/account').expect(200);
      await elsewhere.get('/account').expect(401);
      await somebodyElse.get('/account').expect(200);
      await trySignIn(person.email, testPassword).expect(401);
      await trySignIn(person.email, next).expect(200);
    });

    it('stays when the current one is wrong, and cannot be guessed that way', async () => {
      const caller = await Caller.signedIn(application.express, await aPerson(tx));
      const change = { currentPassword: 'not it', newPassword: next };

      const refused = await caller.put('/account/password', change).expect(422);

      expect((refused.body as Problem).errors?.map(({ path }) => path)).toEqual(['body.currentPassword']);
      for (let guess = 1; guess < 10; guess += 1) await caller.put('/account/password', change).expect(422);
      await caller.put('/account/password', change).expect(429);
    });

    it('must have twelve characters', async () => {
      const caller = await Caller.signedIn(application.express, await aPerson(tx));

      const refused = await caller
        .put('/account/password', { currentPassword: testPassword, newPassword: 'elevenchars' })
        .expect(422);

      expect((refused.body as Problem).errors?.map(({ path }) => path)).toEqual(['body.newPassword']);
    });
  });

  describe('a member', () => {
    it('chooses which mails one room sends, and no other', async () => {
      const person = await aPerson(tx);
      const [here, there] = [await aRoom(tx), await aRoom(tx)];
      await aMember(tx, { personId: person.id, roomId: here.id });
      await aMember(tx, { personId: person.id, roomId: there.id });
      const caller = await Caller.signedIn(application.express, person);

      const reply = await caller.patch(`/rooms/${here.id}/membership`, { cleared: true }).expect(200);

      expect(reply.body).toMatchObject({ roomId: here.id, mails: { ...usualMailChoice, cleared: true } });
      const { memberships } = (await caller.get('/account')).body as Account;
      expect(memberships.find(({ roomId }) => roomId === there.id)?.mails).toEqual(usualMailChoice);
    });

    it('sees who else is in the room, those who may most first, and nobody of another room', async () => {
      const room = await aRoom(tx);
      const keeper = await aPerson(tx, { name: 'Zinnia' });
      const [first, second] = [await aPerson(tx, { name: 'Alder' }), await aPerson(tx, { name: 'Briar' })];
      await aMember(tx, { roomId: room.id, personId: second.id });
      await aMember(tx, { roomId: room.id, personId: first.id });
      await aMember(tx, { roomId: room.id, personId: keeper.id, role: 'keeper' });
      await aMember(tx);

      const reply = await (
        await Caller.signedIn(application.express, first)
      ).get(`/rooms/${room.id}/members`);

      expect(reply.body).toEqual([
        { personId: keeper.id, name: 'Zinnia', role: 'keeper' },
        { personId: first.id, name: 'Alder', role: 'viewer' },
        { personId: second.id, name: 'Briar', role: 'viewer' },
      ]);
    });
  });
});
