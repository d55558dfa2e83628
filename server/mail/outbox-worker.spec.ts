import type { Transporter } from 'nodemailer';
import type { Transactions } from '../database/transactions';
import type { DueMail, MailStore } from './mail-store';
import { OutboxWorker } from './outbox-worker';

const minute = 60_000;
const startAt = Date.UTC(2026, 0, 20, 22);

describe('an outbox whose mail server is away', () => {
  let isAway: boolean;
  let knocks: number[];
  let sentAt: number | null;
  let worker: OutboxWorker;

  beforeEach(() => {
    jest.useFakeTimers({ now: startAt });
    [isAway, knocks, sentAt] = [true, [], null];
    const mail = { attempts: 0, content: { pictures: [], unsubscribeToken: '' }, inReplyTo: null };
    const mails: Partial<MailStore> = {
      takeDue: async () => (sentAt === null ? (mail as unknown as DueMail) : null),
      markSent: async () => void (sentAt = minutesIn()),
    };
    const transport = {
      sendMail: async () => {
        knocks.push(minutesIn());
        if (isAway) throw Object.assign(new Error('nobody listens'), { code: 'ECONNREFUSED' });
      },
      close: () => undefined,
    };
    worker = new OutboxWorker({
      transactions: { run: (work: (tx: never) => unknown) => work(null as never) } as unknown as Transactions,
      mails: mails as MailStore,
      composer: { compose: async () => null },
      transport: transport as unknown as Transporter,
      from: 'Lampmeadow <alerts@example.org>',
      publicUrl: () => 'http://127.0.0.1:4280',
      log: { warn: () => undefined },
      now: () => new Date(),
    });
  });
  afterEach(async () => {
    await worker.stop();
    jest.useRealTimers();
  });

  function minutesIn(): number {
    return (Date.now() - startAt) / minute;
  }

  it('knocks ever less often, every five minutes in the end, and sends within those once it is back', async () => {
    worker.start();
    await jest.advanceTimersByTimeAsync(9 * 60 * minute);
    // After 2 s, then 10 s, 1 min and every 5 min: three in the first two minutes, twelve an hour from then on.
    const waits = knocks.slice(1).map((at, index) => Math.round((at - (knocks[index] ?? 0)) * 60));
    expect(waits.slice(0, 3)).toEqual([10, 60, 300]);
    expect(new Set(waits.slice(2))).toEqual(new Set([300]));
    expect(sentAt).toBeNull();

    isAway = false;
    const backAt = minutesIn();
    await jest.advanceTimersByTimeAsync(5 * minute);
    expect(sentAt).toBeGreaterThanOrEqual(backAt);
    expect(knocks.filter((at) => at >= backAt)).toHaveLength(1);
  });
});
