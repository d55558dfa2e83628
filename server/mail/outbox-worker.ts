import type { SendMailOptions, Transporter } from 'nodemailer';
import type { Logger } from 'pino';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { MailComposer } from './mail-composer';
import type { DueMail, MailContent, MailStore } from './mail-store';
import { judgeSendError, retryAfterMs, type SendVerdict } from './send-verdict';

/** What the worker works with. */
export interface OutboxParts {
  readonly transactions: Transactions;
  readonly mails: MailStore;
  readonly composer: Pick<MailComposer, 'compose'>;
  readonly transport: Transporter;
  readonly from: string;
  /** Where links lead, without a trailing slash. */
  readonly publicUrl: () => string;
  readonly log: Pick<Logger, 'warn'>;
  readonly now: Clock;
  readonly everyMs?: number;
}

const EVERY_MS = 2_000;
/** To knock costs nothing, and an urgent mail should not wait for long once the mail server is back. */
const LONGEST_OUTAGE_WAIT_MS = 300_000;
const BATCH = 20;

type Outcome = 'none' | 'sent' | 'withdrawn' | 'delayed' | 'refused' | 'outage';

/**
 * Sends what is in the outbox. A mail is held by a row lock while it is sent, so several workers never send one twice;
 * a crash between sending and marking sends it once more with the same Message-ID. While the mail server can't be
 * reached no mail is blamed: all wait, and go out afterwards in the order in which they were due.
 */
export class OutboxWorker {
  private timer: NodeJS.Timeout | null = null;
  private running: Promise<void> | null = null;
  private isStopped = false;
  /** How often in a row the mail server was not reached. */
  private outages = 0;

  constructor(private readonly parts: OutboxParts) {}

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
    this.parts.transport.close();
  }

  /**
   * Sends all that is due now.
   *
   * @returns How many the mail server took.
   */
  async sendDue(): Promise<number> {
    let sent = 0;
    for (;;) {
      const outcome = await this.parts.transactions.run((tx) => this.sendNext(tx));
      if (outcome === 'sent') sent += 1;
      if (outcome === 'none' || outcome === 'outage' || sent >= BATCH || this.isStopped) return sent;
    }
  }

  private schedule(): void {
    if (this.isStopped) return;
    const { everyMs = EVERY_MS, log } = this.parts;
    this.timer = setTimeout(
      () => {
        this.running = this.sendDue()
          .then(() => undefined)
          // The database is away: the mails wait in it, and the next round tries again.
          .catch((error: unknown) => log.warn({ err: error }, 'outbox not reached'))
          .finally(() => this.schedule());
      },
      this.outages === 0 ? everyMs : Math.min(LONGEST_OUTAGE_WAIT_MS, retryAfterMs(this.outages - 1)),
    );
  }

  private async sendNext(tx: Tx): Promise<Outcome> {
    const { mails, composer } = this.parts;
    const now = this.parts.now();
    const mail = await mails.takeDue(tx, now);
    if (mail === null) return 'none';
    const content = mail.content ?? (await composer.compose(tx, mail, now.getTime()));
    if (content === null) {
      await mails.withdraw(tx, mail.id);
      return 'withdrawn';
    }
    if (mail.content === null) await mails.setContent(tx, mail.id, content, now);
    return this.note(tx, mail, await this.send(mail, content), now);
  }

  private async note(tx: Tx, mail: DueMail, verdict: SendVerdict | null, now: Date): Promise<Outcome> {
    const { mails, log } = this.parts;
    if (verdict?.kind === 'outage') {
      log.warn({ reason: verdict.reason }, 'mail server not reached; all mails wait');
      this.outages += 1;
      return 'outage';
    }
    this.outages = 0;
    if (verdict === null) {
      await mails.markSent(tx, mail, now);
      return 'sent';
    }
    if (verdict.kind === 'refused') {
      await mails.markRefused(tx, mail, verdict.reason, now);
      return 'refused';
    }
    const retryAt = new Date(now.getTime() + retryAfterMs(mail.attempts));
    await mails.markDelayed(tx, mail.id, verdict.reason, retryAt);
    return 'delayed';
  }

  private async send(mail: DueMail, content: MailContent): Promise<SendVerdict | null> {
    try {
      await this.parts.transport.sendMail(this.message(mail, content));
      return null;
    } catch (error) {
      return judgeSendError(error, mail.attempts);
    }
  }

  private message(mail: DueMail, content: MailContent): SendMailOptions {
    const oneClick = `${this.parts.publicUrl()}/api/v1/unsubscribe/${content.unsubscribeToken}`;
    return {
      from: this.parts.from,
      to: mail.toAddress,
      subject: content.subject,
      text: content.textBody,
      html: content.htmlBody,
      messageId: mail.messageId,
      ...(mail.inReplyTo === null ? {} : { inReplyTo: mail.inReplyTo, references: mail.inReplyTo }),
      headers: {
        'Auto-Submitted': 'auto-generated',
        // RFC 8058: mail programs offer to unsubscribe, and do it with one request.
        ...(content.unsubscribeToken === ''
          ? {}
          : {
              'List-Unsubscribe': { prepared: true, value: `<${oneClick}>` },
              'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
            }),
      },
      attachments: content.pictures.map(({ cid, png }) => ({
        cid,
        filename: 'chart.png',
        contentType: 'image/png',
        content: Buffer.from(png, 'base64'),
        contentDisposition: 'inline',
      })),
    };
  }
}
