import type { Tx } from '../database/transactions';
import type { MailKind, MailPicture } from './mail-entity';

/** What a mail says. */
export interface MailContent {
  readonly subject: string;
  readonly textBody: string;
  readonly htmlBody: string;
  readonly pictures: readonly MailPicture[];
  /** Of the link that stops mails of this kind. */
  readonly unsubscribeToken: string;
}

/** A mail that is due. */
export interface DueMail {
  readonly id: string;
  readonly personId: string;
  readonly roomId: string;
  readonly kind: MailKind;
  readonly messageId: string;
  readonly inReplyTo: string | null;
  readonly toAddress: string;
  readonly isHeldBack: boolean;
  readonly attempts: number;
  /** Null until it is composed. */
  readonly content: MailContent | null;
}

/** A mail that is written whole, such as a letter. */
export interface WholeMail extends MailContent {
  readonly personId: string;
  readonly roomId: string;
  readonly kind: MailKind;
  readonly messageId: string;
  readonly toAddress: string;
  readonly at: Date;
}

interface MailRow {
  id: string;
  person_id: string;
  room_id: string;
  kind: MailKind;
  message_id: string;
  in_reply_to: string | null;
  to_address: string;
  is_held_back: boolean;
  attempts: number;
  composed_at: Date | null;
  subject: string;
  text_body: string;
  html_body: string;
  pictures: MailPicture[];
  unsubscribe_token: string | null;
}

/** Queries over the outbox. */
export class MailStore {
  /** Puts a mail into the outbox whose content is known. */
  async addWhole(tx: Tx, mail: WholeMail): Promise<void> {
    await tx.query(
      `INSERT INTO mail (person_id, room_id, kind, message_id, to_address, not_before, composed_at, created_at,
         subject, text_body, html_body, pictures, unsubscribe_token)
       VALUES ($1, $2, $3, $4, $5, $6, $6, $6, $7, $8, $9, $10::jsonb, $11)`,
      [
        mail.personId,
        mail.roomId,
        mail.kind,
        mail.messageId,
        mail.toAddress,
        mail.at,
        mail.subject,
        mail.textBody,
        mail.htmlBody,
        JSON.stringify(mail.pictures),
        mail.unsubscribeToken,
      ],
    );
  }

  /**
   * The mail that has been due the longest, held by this transaction; other workers pass it over. A mail that answers
   * another one waits until that one has gone.
   */
  async takeDue(tx: Tx, now: Date): Promise<DueMail | null> {
    const rows: MailRow[] = await tx.query(
      `SELECT * FROM mail
       WHERE sent_at IS NULL AND failed_at IS NULL AND not_before <= $1
         AND NOT EXISTS (
           SELECT 1 FROM mail AS first
           WHERE first.message_id = mail.in_reply_to AND first.sent_at IS NULL AND first.failed_at IS NULL
         )
       ORDER BY not_before, created_at LIMIT 1 FOR UPDATE SKIP LOCKED`,
      [now],
    );
    const [row] = rows;
    return row === undefined ? null : dueMailOf(row);
  }

  /** Keeps what a mail says; from then on it stays the same, and nothing joins it. */
  async setContent(tx: Tx, id: string, content: MailContent, at: Date): Promise<void> {
    await tx.query(
      `UPDATE mail SET composed_at = $2, subject = $3, text_body = $4, html_body = $5, pictures = $6::jsonb,
         unsubscribe_token = $7 WHERE id = $1`,
      [
        id,
        at,
        content.subject,
        content.textBody,
        content.htmlBody,
        JSON.stringify(content.pictures),
        content.unsubscribeToken,
      ],
    );
  }

  /** Takes a mail back that has nothing left to say. */
  async withdraw(tx: Tx, id: string): Promise<void> {
    await tx.query('DELETE FROM mail WHERE id = $1', [id]);
  }

  /** Notes that the mail server has taken a mail, and so that it takes mail to the person. */
  async markSent(tx: Tx, mail: Pick<DueMail, 'id' | 'personId'>, at: Date): Promise<void> {
    await tx.query('UPDATE mail SET sent_at = $2, attempts = attempts + 1, last_error = NULL WHERE id = $1', [
      mail.id,
      at,
    ]);
    await tx.query(
      `UPDATE person SET mail_refused_at = NULL, mail_refused_reason = NULL
       WHERE id = $1 AND mail_refused_at IS NOT NULL`,
      [mail.personId],
    );
  }

  /** Notes a try that failed, and when to try again. */
  async markDelayed(tx: Tx, id: string, error: string, retryAt: Date): Promise<void> {
    await tx.query(
      'UPDATE mail SET attempts = attempts + 1, last_error = $2, not_before = $3 WHERE id = $1',
      [id, shortened(error), retryAt],
    );
  }

  /** Notes that a mail is given up, and at the person since when theirs are refused and why. */
  async markRefused(tx: Tx, mail: Pick<DueMail, 'id' | 'personId'>, error: string, at: Date): Promise<void> {
    await tx.query('UPDATE mail SET attempts = attempts + 1, last_error = $2, failed_at = $3 WHERE id = $1', [
      mail.id,
      shortened(error),
      at,
    ]);
    await tx.query(
      `UPDATE person SET mail_refused_at = coalesce(mail_refused_at, $3), mail_refused_reason = $2 WHERE id = $1`,
      [mail.personId, shortened(error), at],
    );
  }

  /** Subject of a mail that has been composed; null when it is gone. */
  async subjectOf(tx: Tx, messageId: string): Promise<string | null> {
    const rows: { subject: string }[] = await tx.query(
      'SELECT subject FROM mail WHERE message_id = $1 AND composed_at IS NOT NULL',
      [messageId],
    );
    return rows[0]?.subject ?? null;
  }
}

function shortened(error: string): string {
  return error.slice(0, 500);
}

function dueMailOf(row: MailRow): DueMail {
  return {
    id: row.id,
    personId: row.person_id,
    roomId: row.room_id,
    kind: row.kind,
    messageId: row.message_id,
    inReplyTo: row.in_reply_to,
    toAddress: row.to_address,
    isHeldBack: row.is_held_back,
    attempts: row.attempts,
    content:
      row.composed_at === null
        ? null
        : {
            subject: row.subject,
            textBody: row.text_body,
            htmlBody: row.html_body,
            pictures: row.pictures,
            unsubscribeToken: row.unsubscribe_token ?? '',
          },
  };
}
