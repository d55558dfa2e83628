import { AlertEntity } from '../../server/alerts/alert-entity';
import { AlertStore } from '../../server/alerts/alert-store';
import { MailAlertTeller } from '../../server/mail/alert-teller';
import { TellingStore } from '../../server/mail/telling-store';
import type { MembershipEntity } from '../../server/people/membership-entity';
import type { ReceivedMail } from '../../simulator/mailbox/mail';
import type { FaultRequest } from '../../simulator/mailbox/fault-switch';
import { startMailbox, type Mailbox } from '../../simulator/mailbox/start-mailbox';
import { anAlert } from '../builders/alerts';
import { aMember, aPerson } from '../builders/people';
import { aRoom, aShelf } from '../builders/rooms';
import { startTestApplication, type TestApplication } from './test-application';

/** The application with a mailbox behind it, and ways to let alerts open and clear. */
export interface MailHarness {
  readonly application: TestApplication;
  readonly mailbox: Mailbox;
  readonly teller: MailAlertTeller;
  /** Lets the clock go on, and sends what is due then. */
  after(minutes: number): Promise<void>;
  /** Sends what is due at an instant. */
  at(instant: string): Promise<void>;
  /** What has arrived for an address, oldest first. */
  mailsTo(address: string): Promise<ReceivedMail[]>;
  fault(request: FaultRequest): Promise<void>;
  open(overrides: Partial<AlertEntity>, at?: string): Promise<AlertEntity>;
  clear(alert: AlertEntity): Promise<void>;
  stop(): Promise<void>;
}

/** Starts both. */
export async function startMailHarness(): Promise<MailHarness> {
  const mailbox = await startMailbox({ smtpPort: 0, httpPort: 0 });
  const application = await startTestApplication({
    SMTP_URL: `smtp://127.0.0.1:${mailbox.smtpPort}`,
    PUBLIC_URL: 'http://127.0.0.1:4280',
  });
  const { app, database } = application;
  const teller = new MailAlertTeller({
    alerts: new AlertStore(),
    tellings: new TellingStore(),
    mailDomain: 'example.org',
  });
  const sendDue = async (): Promise<void> => void (await app.outbox?.sendDue());
  const now = (): number => application.now.getTime();
  return {
    application,
    mailbox,
    teller,
    after: async (minutes) => {
      application.now = new Date(now() + minutes * 60_000);
      await sendDue();
    },
    at: async (instant) => {
      application.now = new Date(instant);
      await sendDue();
    },
    mailsTo: async (address) => {
      const answer = await fetch(`${mailbox.address}/api/mails?to=${encodeURIComponent(address)}`);
      return ((await answer.json()) as { mails: ReceivedMail[] }).mails.reverse();
    },
    fault: async (request) => {
      await fetch(`${mailbox.address}/api/faults`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        body: JSON.stringify(request),
      });
    },
    open: async (overrides, at) => {
      if (at !== undefined) application.now = new Date(at);
      const since = (minutes: number): Date => new Date(now() - minutes * 60_000);
      const alert = await anAlert(application.tx, {
        beganAt: since(30),
        openedAt: since(0),
        peakAt: since(5),
        ...overrides,
      });
      await database.transactions.run(async (tx) => {
        await teller.tellOpened(tx, [alert.id], now());
        await new AlertStore().markTold(tx, [alert.id], now());
      });
      return alert;
    },
    clear: async ({ id }) => {
      await application.tx.update(
        AlertEntity,
        { id },
        { endedAt: application.now, clearedAt: application.now },
      );
      await database.transactions.run((tx) => teller.tellCleared(tx, [id], now()));
    },
    stop: async () => {
      await app.outbox?.stop();
      await application.stop();
      await mailbox.stop();
    },
  };
}

/** A room with a shelf and one member, who wants mails as said. */
export interface MailedRoom {
  readonly roomId: string;
  readonly shelfId: string;
  readonly personId: string;
  readonly email: string;
}

/** Makes one. */
export async function aMailedRoom(
  { application: { tx } }: MailHarness,
  membership: Partial<MembershipEntity> = {},
): Promise<MailedRoom> {
  const room = await aRoom(tx, { name: 'Loft' });
  const shelf = await aShelf(tx, { roomId: room.id });
  const person = await aPerson(tx);
  await aMember(tx, {
    roomId: room.id,
    personId: person.id,
    role: 'grower',
    joinedAt: new Date('2026-01-01T00:00:00Z'),
    ...membership,
  });
  return { roomId: room.id, shelfId: shelf.id, personId: person.id, email: person.email };
}
