import type { Alert } from '@shared/contracts/alerts';
import type { TemperatureUnit } from '@shared/contracts/people';
import type { Tx } from '../database/transactions';

/** A mail to be put into the outbox. */
export interface NewMail {
  readonly personId: string;
  readonly messageId: string;
  readonly inReplyTo: string | null;
  readonly toAddress: string;
  readonly subject: string;
  readonly textBody: string;
  readonly htmlBody: string;
}

/** A mail that is due. */
export interface DueMail extends Omit<NewMail, 'personId'> {
  readonly id: string;
  readonly attempts: number;
}

/** Someone who wants a room's alert mails. */
export interface Recipient {
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly temperatureUnit: TemperatureUnit;
}

interface MailRow {
  id: string;
  message_id: string;
  in_reply_to: string | null;
  to_address: string;
  subject: string;
  text_body: string;
  html_body: string;
  attempts: number;
}

/** Queries over the outbox. */
export class MailStore {
  /** Puts mails into the outbox; one with the same Message-ID is there already. */
  async add(tx: Tx, mails: readonly NewMail[]): Promise<void> {
    if (mails.length === 0) return;
    await tx.query(
      `INSERT INTO mail (person_id, message_id, in_reply_to, to_address, subject, text_body, html_body)
       SELECT * FROM unnest($1::uuid[], $2::text[], $3::text[], $4::text[], $5::text[], $6::text[], $7::text[])
       ON CONFLICT (message_id) DO NOTHING`,
      [
        mails.map((mail) => mail.personId),
        mails.map((mail) => mail.messageId),
        mails.map((mail) => mail.inReplyTo),
        mails.map((mail) => mail.toAddress),
        mails.map((mail) => mail.subject),
        mails.map((mail) => mail.textBody),
        mails.map((mail) => mail.htmlBody),
      ],
    );
  }

  /** The next due mails, held by this transaction; other workers pass them over. */
  async takeDue(tx: Tx, limit: number): Promise<DueMail[]> {
    const rows: MailRow[] = await tx.query(
      `SELECT * FROM mail WHERE sent_at IS NULL AND failed_at IS NULL AND not_before <= now()
       ORDER BY not_before LIMIT $1 FOR UPDATE SKIP LOCKED`,
      [limit],
    );
    return rows.map((row) => ({
      id: row.id,
      messageId: row.message_id,
      inReplyTo: row.in_reply_to,
      toAddress: row.to_address,
      subject: row.subject,
      textBody: row.text_body,
      htmlBody: row.html_body,
      attempts: row.attempts,
    }));
  }

  /** Notes that the mail server has taken a mail. */
  async markSent(tx: Tx, id: string): Promise<void> {
    await tx.query(
      'UPDATE mail SET sent_at = now(), attempts = attempts + 1, last_error = NULL WHERE id = $1',
      [id],
    );
  }

  /** Notes a failure; without another try the mail has failed for good. */
  async markFailed(tx: Tx, id: string, error: string, retryInS: number | null): Promise<void> {
    await tx.query(
      `UPDATE mail SET attempts = attempts + 1, last_error = $2,
         not_before = now() + make_interval(secs => coalesce($3, 0)),
         failed_at = CASE WHEN $3::float8 IS NULL THEN now() END
       WHERE id = $1`,
      [id, error.slice(0, 500), retryInS],
    );
  }

  /** Members of a room who want to be told when alerts open, or when they clear. */
  async recipients(tx: Tx, roomId: string, when: 'opened' | 'cleared'): Promise<Recipient[]> {
    const column = when === 'opened' ? 'mail_alert_opened' : 'mail_alert_cleared';
    const rows: { person_id: string; name: string; email: string; temperature_unit: TemperatureUnit }[] =
      await tx.query(
        `SELECT m.person_id, p.name, p.email, p.temperature_unit
         FROM membership m JOIN person p ON p.id = m.person_id
         WHERE m.room_id = $1 AND m.${column} ORDER BY p.id`,
        [roomId],
      );
    return rows.map((row) => ({
      personId: row.person_id,
      name: row.name,
      email: row.email,
      temperatureUnit: row.temperature_unit,
    }));
  }

  /** What a mail says of the room it is about. */
  async room(tx: Tx, roomId: string): Promise<{ name: string; timeZone: string } | null> {
    const rows: { name: string; time_zone: string }[] = await tx.query(
      'SELECT name, time_zone FROM room WHERE id = $1',
      [roomId],
    );
    const [row] = rows;
    return row === undefined ? null : { name: row.name, timeZone: row.time_zone };
  }
}

/** An alert with its room, as the alert store gives it. */
export type AlertOfRoom = Alert & { readonly roomId: string };
