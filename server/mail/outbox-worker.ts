import type { Transporter } from 'nodemailer';
import type { Logger } from 'pino';
import type { Transactions } from '../database/transactions';
import type { DueMail, MailStore } from './mail-store';

/** Waiting times between tries; after the last one the mail waits that long again, for days. */
const RETRY_AFTER_S = [10, 60, 300, 900, 3_600] as const;
/** After this many tries, a week or so of hours, the address is given up. */
const MOST_ATTEMPTS = 180;
const BATCH = 20;

/**
 * Sends what is in the outbox. A mail is held by a row lock while it is sent, so several workers never send one twice;
 * a crash between sending and marking sends it once more with the same Message-ID.
 */
export class OutboxWorker {
  private timer: NodeJS.Timeout | null = null;
  private running: Promise<void> | null = null;
  private isStopped = false;

  constructor(
    private readonly transactions: Transactions,
    private readonly store: MailStore,
    private readonly transport: Transporter,
    private readonly from: string,
    private readonly log: Pick<Logger, 'warn'>,
    private readonly everyMs = 2_000,
  ) {}

  /** Begins to look for due mails every now and then. */
  start(): void {
    this.isStopped = false;
    this.schedule();
  }

  /** Stops after the mail in hand. */
  async stop(): Promise<void> {
    this.isStopped = true;
    if (this.timer !== null) clearTimeout(this.timer);
    await this.running;
    this.transport.close();
  }

  /**
   * Sends all that is due now.
   *
   * @returns How many the mail server took.
   */
  async sendDue(): Promise<number> {
    let sent = 0;
    for (;;) {
      const outcome = await this.transactions.run(async (tx) => {
        const [mail] = await this.store.takeDue(tx, 1);
        if (mail === undefined) return 'none';
        const failure = await this.send(mail);
        if (failure === null) await this.store.markSent(tx, mail.id);
        else await this.store.markFailed(tx, mail.id, failure.message, failure.retryInS);
        return failure === null ? 'sent' : 'failed';
      });
      if (outcome === 'sent') sent += 1;
      if (outcome !== 'sent' || sent >= BATCH || this.isStopped) return sent;
    }
  }

  private schedule(): void {
    if (this.isStopped) return;
    this.timer = setTimeout(() => {
      this.running = this.sendDue()
        .then(() => undefined)
        // The database is away: the mails wait in it, and the next round tries again.
        .catch((error: unknown) => this.log.warn({ err: error }, 'outbox not reached'))
        .finally(() => this.schedule());
    }, this.everyMs);
  }

  private async send(mail: DueMail): Promise<{ message: string; retryInS: number | null } | null> {
    try {
      await this.transport.sendMail({
        from: this.from,
        to: mail.toAddress,
        subject: mail.subject,
        text: mail.textBody,
        html: mail.htmlBody,
        messageId: mail.messageId,
        ...(mail.inReplyTo === null ? {} : { inReplyTo: mail.inReplyTo, references: mail.inReplyTo }),
      });
      return null;
    } catch (error) {
      return failureOf(error, mail.attempts);
    }
  }
}

function failureOf(error: unknown, attempts: number): { message: string; retryInS: number | null } {
  const { message = String(error), responseCode } = error as { message?: string; responseCode?: number };
  // 5xx is the mail server's "never"; anything else may pass.
  const isPermanent = responseCode !== undefined && responseCode >= 500;
  const isGivenUp = isPermanent || attempts + 1 >= MOST_ATTEMPTS;
  const step = RETRY_AFTER_S[Math.min(attempts, RETRY_AFTER_S.length - 1)] ?? 3_600;
  return { message, retryInS: isGivenUp ? null : step };
}
