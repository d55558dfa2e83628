import type { SwapOffer } from '@shared/contracts/care-rota';
import type { MembershipEntity } from '../../server/people/membership-entity';
import { aTask } from '../builders/care';
import { aMember, aPerson, testPassword } from '../builders/people';
import { aRoom } from '../builders/rooms';
import { Caller } from './caller';
import { startMailHarness, type MailHarness } from './mail-harness';

/** A member with a mailbox, signed in. */
interface Mailed {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly caller: Caller;
}

describe('mails about care', () => {
  let harness: MailHarness;
  let tx: MailHarness['application']['tx'];
  let roomId: string;
  let helper: Mailed;
  let other: Mailed;
  let keeper: Mailed;

  beforeAll(async () => {
    harness = await startMailHarness();
    tx = harness.application.tx;
  });
  beforeEach(async () => {
    harness.application.now = new Date('2026-04-15T08:00:00Z');
    roomId = (await aRoom(tx, { name: 'Loft' })).id;
    helper = await mailed('helper');
    other = await mailed('helper');
    keeper = await mailed('keeper');
  });
  afterAll(() => harness.stop());

  async function mailed(
    role: MembershipEntity['role'],
    choice: Partial<MembershipEntity> = {},
  ): Promise<Mailed> {
    const person = await aPerson(tx);
    await aMember(tx, { roomId, personId: person.id, role, ...choice });
    return { ...person, caller: await Caller.signedIn(harness.application.express, person, testPassword) };
  }
  const subjectsTo = async ({ email }: Mailed): Promise<string[]> =>
    (await harness.mailsTo(email)).map(({ subject }) => subject);
  const held = (overrides: Parameters<typeof aTask>[1] = {}) =>
    aTask(tx, { roomId, title: 'Water A3', personIds: [helper.id], ...overrides });
  const offer = async (body: object = {}): Promise<SwapOffer> => {
    const { id } = await held();
    return (await helper.caller.post(`/rooms/${roomId}/tasks/${id}/swaps`, body).expect(201))
      .body as SwapOffer;
  };
  const jobAt = async (instant: string): Promise<void> => {
    harness.application.now = new Date(instant);
    await harness.application.app.services.careReminderJob.run();
    await harness.at(instant);
  };

  it('tell those who could take an offer, and both when it is taken', async () => {
    const { id } = await offer({ note: 'dentist' });
    await harness.after(1);
    expect(await subjectsTo(other)).toEqual([`${helper.name} would like to hand over: Water A3`]);
    expect(await subjectsTo(helper)).toEqual([]);

    await other.caller.put(`/rooms/${roomId}/swaps/${id}/taking`).expect(200);
    await harness.after(1);

    expect(await subjectsTo(helper)).toEqual([`${other.name} takes over: Water A3`]);
    expect((await subjectsTo(other)).slice(1)).toEqual(['Yours now: Water A3']);
  });

  it('of an offer to one person go to them alone', async () => {
    await offer({ toPersonId: other.id });
    await harness.after(1);
    expect(await subjectsTo(other)).toHaveLength(1);
    expect(await subjectsTo(keeper)).toEqual([]);
  });

  it('tell whoever held a task that somebody took it over', async () => {
    const { id } = await held();
    await other.caller.put(`/rooms/${roomId}/tasks/${id}/take-over`).expect(200);
    await harness.after(1);
    expect(await subjectsTo(helper)).toEqual([`${other.name} takes over: Water A3`]);
  });

  it('remind the holder once on the last afternoon, and tell keepers once it is late', async () => {
    await held({ windowDays: 1 });

    await jobAt('2026-04-15T15:00:00Z'); // Another day is left.
    expect(await subjectsTo(helper)).toEqual([]);
    await jobAt('2026-04-16T13:59:00Z'); // Before three in Dublin.
    expect(await subjectsTo(helper)).toEqual([]);
    await jobAt('2026-04-16T14:00:00Z');
    await jobAt('2026-04-16T18:00:00Z');
    expect(await subjectsTo(helper)).toEqual(['Today still: Water A3']);
    expect(await subjectsTo(keeper)).toEqual([]);

    await jobAt('2026-04-17T06:59:00Z');
    expect(await subjectsTo(keeper)).toEqual([]);
    await jobAt('2026-04-17T07:00:00Z');
    await jobAt('2026-04-18T12:00:00Z');
    expect(await subjectsTo(keeper)).toEqual(['Late: Water A3']);
    expect(await subjectsTo(helper)).toHaveLength(1);
  });

  it('are not sent of what is done', async () => {
    const { id } = await held();
    await helper.caller.put(`/rooms/${roomId}/tasks/${id}/completion`).expect(200);
    await jobAt('2026-04-15T16:00:00Z');
    await jobAt('2026-04-16T09:00:00Z');
    expect([await subjectsTo(helper), await subjectsTo(keeper)]).toEqual([[], []]);
  });

  it('are not sent to who wants none, and stop by their own link', async () => {
    const quiet = await mailed('helper', { mailCare: false });
    await offer();
    await harness.after(1);
    expect(await subjectsTo(quiet)).toEqual([]);

    const [mail] = await harness.mailsTo(other.email);
    const link = /http:\/\/127\.0\.0\.1:4280(\/unsubscribe\/[\w-]+)/.exec(mail?.text ?? '')?.[1] ?? '';
    const stopped = await Caller.nobody(harness.application.express).post(link).expect(200);
    expect(stopped.body).toMatchObject({ stops: 'care', isStopped: true });
  });

  it('wait until quiet hours end', async () => {
    const sleeper = await mailed('helper', { quietFrom: '21:00', quietTo: '07:00' });
    harness.application.now = new Date('2026-04-15T21:00:00Z'); // Ten in the evening in Dublin.
    await offer();
    await harness.after(1);
    expect(await subjectsTo(sleeper)).toEqual([]);
    await harness.at('2026-04-16T06:00:00Z');
    expect(await subjectsTo(sleeper)).toHaveLength(1);
  });
});
