import type { Urgency } from '@shared/alerts/alert-rule';
import type { Alert } from '@shared/contracts/alerts';
import type { Escalation } from '@shared/contracts/mail';
import type { Role, TemperatureUnit } from '@shared/contracts/people';
import type { MailChoice } from '@shared/mail/mail-choice';
import type { Tx } from '../database/transactions';
import { mailChoiceColumns } from '../people/people-store';
import type { MailKind } from './mail-entity';
import { RoomEscalationEntity } from './room-escalation-entity';

/** An alert with its room, as the alert store gives it. */
export type AlertOfRoom = Alert & { readonly roomId: string };

/** A member of a room, as someone to write to. */
export interface Recipient {
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly temperatureUnit: TemperatureUnit;
  readonly role: Role;
  readonly mails: MailChoice;
}

/** A room, as mails name it. */
export interface RoomOfMail {
  readonly id: string;
  readonly name: string;
  readonly timeZone: string;
}

/** A mail that tells a person of alerts, once it is due. */
export interface Telling {
  readonly recipient: Recipient;
  readonly roomId: string;
  readonly kind: Exclude<MailKind, 'letter' | 'care'>;
  readonly alerts: readonly Pick<AlertOfRoom, 'id' | 'urgency'>[];
  readonly dueAt: number;
  readonly isHeldBack: boolean;
  readonly inReplyTo: string | null;
  /** For the mail, where it joins none. */
  readonly messageId: string;
  readonly at: number;
}

/** Which mail told a person of an alert, and how far that mail is. */
export interface Told {
  readonly alertId: string;
  readonly personId: string;
  readonly reason: MailKind;
  readonly urgency: Urgency;
  readonly messageId: string;
  readonly isComposed: boolean;
  readonly isSent: boolean;
}

/** Someone who wants a room's morning letter. */
export interface LetterReader {
  readonly recipient: Recipient;
  readonly room: RoomOfMail;
}

const recipientColumns = `membership.person_id AS "personId", person.name, person.email,
  person.temperature_unit AS "temperatureUnit", membership.role, ${mailChoiceColumns} AS mails
  FROM membership JOIN person ON person.id = membership.person_id`;

/** When the last quiet about an `alert` ends, or was ended; null when there was none. */
const quietAboutAlert = `
  SELECT max(coalesce(ended_at, until)) AS ends_at FROM alert_quiet
  WHERE alert_quiet.shelf_id = alert.shelf_id AND alert_quiet.quantity = alert.quantity
    AND alert_quiet.kind = alert.kind`;

/** Queries over who is to be told, and who was told of what. */
export class TellingStore {
  /** Lets one transaction at a time write mails about a room, so that what belongs together finds together. */
  async holdRoom(tx: Tx, roomId: string): Promise<void> {
    await tx.query('SELECT pg_advisory_xact_lock(hashtext($1))', [`mails of ${roomId}`]);
  }

  /** What a mail says of the room it is about. */
  async room(tx: Tx, roomId: string): Promise<RoomOfMail | null> {
    const rows: RoomOfMail[] = await tx.query(
      'SELECT id, name, time_zone AS "timeZone" FROM room WHERE id = $1',
      [roomId],
    );
    return rows[0] ?? null;
  }

  /** Every member of a room. */
  recipients(tx: Tx, roomId: string): Promise<Recipient[]> {
    return tx.query(`SELECT ${recipientColumns} WHERE membership.room_id = $1 ORDER BY person.id`, [roomId]);
  }

  /** One member; null for who is none any more. */
  async recipient(tx: Tx, roomId: string, personId: string): Promise<Recipient | null> {
    const rows: Recipient[] = await tx.query(
      `SELECT ${recipientColumns} WHERE membership.room_id = $1 AND membership.person_id = $2`,
      [roomId, personId],
    );
    return rows[0] ?? null;
  }

  /**
   * Puts a mail into the outbox that is composed once it is due. Where one of the same kind waits for the same person
   * and conversation and is due no later, the alerts join that one.
   */
  async tell(tx: Tx, telling: Telling): Promise<void> {
    const { recipient, roomId, kind, alerts, inReplyTo } = telling;
    const waiting: { message_id: string }[] = await tx.query(
      `SELECT message_id FROM mail
       WHERE person_id = $1 AND room_id = $2 AND kind = $3 AND in_reply_to IS NOT DISTINCT FROM $4
         AND composed_at IS NULL AND failed_at IS NULL AND not_before <= $5
       ORDER BY not_before LIMIT 1 FOR UPDATE SKIP LOCKED`,
      [recipient.personId, roomId, kind, inReplyTo, new Date(telling.dueAt)],
    );
    const messageId = waiting[0]?.message_id ?? telling.messageId;
    if (waiting.length === 0) {
      await tx.query(
        `INSERT INTO mail (person_id, room_id, kind, is_held_back, message_id, in_reply_to, to_address, not_before, created_at)
         VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9)`,
        [
          recipient.personId,
          roomId,
          kind,
          telling.isHeldBack,
          messageId,
          inReplyTo,
          recipient.email,
          new Date(telling.dueAt),
          new Date(telling.at),
        ],
      );
    }
    await tx.query(
      `INSERT INTO told_alert (alert_id, person_id, reason, urgency, message_id)
       SELECT alert_id, $3, $4, urgency, $5 FROM unnest($1::uuid[], $2::text[]) AS told (alert_id, urgency)
       ON CONFLICT DO NOTHING`,
      [alerts.map(({ id }) => id), alerts.map(({ urgency }) => urgency), recipient.personId, kind, messageId],
    );
  }

  /** Who was told of alerts. */
  told(tx: Tx, alertIds: readonly string[]): Promise<Told[]> {
    return tx.query(
      `SELECT told.alert_id AS "alertId", told.person_id AS "personId", told.reason, told.urgency,
              told.message_id AS "messageId", mail.composed_at IS NOT NULL AS "isComposed",
              mail.sent_at IS NOT NULL AS "isSent"
       FROM told_alert AS told JOIN mail ON mail.message_id = told.message_id
       WHERE told.alert_id = ANY($1) ORDER BY mail.created_at, told.alert_id`,
      [alertIds],
    );
  }

  /** The alerts that a mail tells of. */
  async alertsOf(tx: Tx, messageId: string): Promise<string[]> {
    const rows: { alert_id: string }[] = await tx.query(
      'SELECT alert_id FROM told_alert WHERE message_id = $1',
      [messageId],
    );
    return rows.map((row) => row.alert_id);
  }

  /** Leaves out of a mail all alerts but some. */
  async keepOnly(tx: Tx, messageId: string, alertIds: readonly string[]): Promise<void> {
    await tx.query('DELETE FROM told_alert WHERE message_id = $1 AND NOT (alert_id = ANY($2))', [
      messageId,
      alertIds,
    ]);
  }

  /** Lets a mail that quiet hours hold back go out, because an alert in it has become urgent. */
  async hasten(tx: Tx, messageId: string, alertId: string, dueAt: Date): Promise<void> {
    await tx.query(
      `UPDATE mail SET not_before = least(not_before, $2), is_held_back = false
       WHERE message_id = $1 AND composed_at IS NULL`,
      [messageId, dueAt],
    );
    await tx.query(`UPDATE told_alert SET urgency = 'goNow' WHERE message_id = $1 AND alert_id = $2`, [
      messageId,
      alertId,
    ]);
  }

  /** Everybody who wants a morning letter, room by room. */
  async letterReaders(tx: Tx): Promise<LetterReader[]> {
    const rooms: RoomOfMail[] = await tx.query(
      `SELECT id, name, time_zone AS "timeZone" FROM room
       WHERE EXISTS (SELECT 1 FROM membership WHERE room_id = room.id AND letter_at IS NOT NULL) ORDER BY id`,
    );
    const readers: LetterReader[] = [];
    for (const room of rooms) {
      for (const recipient of await this.recipients(tx, room.id)) {
        if (recipient.mails.letterAt !== null) readers.push({ recipient, room });
      }
    }
    return readers;
  }

  /**
   * Takes a person's letter of a day in hand.
   *
   * @returns False when it was seen to before, whatever time it was wanted for then.
   */
  async beginLetter(tx: Tx, { recipient, room }: LetterReader, day: string): Promise<boolean> {
    const rows: unknown[] = await tx.query(
      `INSERT INTO morning_letter (person_id, room_id, day) VALUES ($1, $2, $3) ON CONFLICT DO NOTHING RETURNING day`,
      [recipient.personId, room.id, day],
    );
    return rows.length > 0;
  }

  /** A room's own times of escalation; null where it has set none. */
  async escalation(tx: Tx, roomId: string): Promise<Escalation | null> {
    const found = await tx.findOneBy(RoomEscalationEntity, { roomId });
    if (found === null) return null;
    return { goNowMinutes: found.goNowMinutes, lookTodayMinutes: found.lookTodayMinutes };
  }

  /** Keeps a room's times of escalation. */
  async setEscalation(tx: Tx, roomId: string, escalation: Escalation): Promise<void> {
    await tx.upsert(RoomEscalationEntity, { roomId, ...escalation }, ['roomId']);
  }

  /** Open urgent alerts that people have been told of, but not all of how urgent they are. */
  async becameUrgent(tx: Tx): Promise<string[]> {
    const rows: { id: string }[] = await tx.query(
      `SELECT alert.id FROM alert
       WHERE alert.cleared_at IS NULL AND alert.told_at IS NOT NULL AND alert.urgency = 'goNow'
         AND EXISTS (
           SELECT 1 FROM membership
           WHERE membership.room_id = alert.room_id AND membership.mail_go_now = 'atOnce'
             AND membership.joined_at <= alert.told_at
             AND NOT EXISTS (
               SELECT 1 FROM told_alert AS told
               WHERE told.alert_id = alert.id AND told.person_id = membership.person_id AND told.urgency = 'goNow'
             )
         )
       ORDER BY alert.opened_at`,
    );
    return rows.map(({ id }) => id);
  }

  /** Open alerts that a quiet kept everybody from being told of, and that are quiet no more. */
  async unheardAfterQuiet(tx: Tx, now: Date): Promise<string[]> {
    const rows: { id: string }[] = await tx.query(
      `SELECT alert.id
       FROM alert
       CROSS JOIN LATERAL (${quietAboutAlert}) AS quiet
       WHERE alert.cleared_at IS NULL AND alert.told_at IS NOT NULL AND alert.acknowledged_at IS NULL
         AND quiet.ends_at > alert.told_at AND quiet.ends_at <= $1
         AND NOT EXISTS (SELECT 1 FROM told_alert AS told WHERE told.alert_id = alert.id)
       ORDER BY alert.opened_at`,
      [now],
    );
    return rows.map(({ id }) => id);
  }

  /**
   * Open alerts that nobody has acknowledged in the time that their room sets, counted from the first mail about them
   * that was sent or refused, or from when the letter took them, but not while they are quiet; and not escalated yet.
   *
   * @param usual - Minutes by urgency for rooms that set none.
   */
  async unseen(tx: Tx, now: Date, usual: Readonly<Record<Urgency, number>>): Promise<string[]> {
    const rows: { id: string }[] = await tx.query(
      `SELECT alert.id
       FROM alert
       LEFT JOIN room_escalation AS setting ON setting.room_id = alert.room_id
       CROSS JOIN LATERAL (
         SELECT CASE
           WHEN setting.room_id IS NULL THEN CASE alert.urgency WHEN 'goNow' THEN $2::int ELSE $3::int END
           WHEN alert.urgency = 'goNow' THEN setting.go_now_minutes
           ELSE setting.look_today_minutes
         END AS minutes
       ) AS waiting
       CROSS JOIN LATERAL (
         SELECT CASE WHEN count(*) = 0 THEN alert.told_at ELSE min(coalesce(mail.sent_at, mail.failed_at)) END AS since,
                coalesce(bool_or(told.reason = 'escalated'), false) AS is_escalated
         FROM told_alert AS told JOIN mail ON mail.message_id = told.message_id WHERE told.alert_id = alert.id
       ) AS telling
       CROSS JOIN LATERAL (${quietAboutAlert}) AS quiet
       WHERE alert.cleared_at IS NULL AND alert.told_at IS NOT NULL AND alert.acknowledged_at IS NULL
         AND NOT telling.is_escalated AND telling.since IS NOT NULL
         AND greatest(telling.since, quiet.ends_at) + make_interval(mins => waiting.minutes) <= $1
       ORDER BY alert.opened_at`,
      [now, usual.goNow, usual.lookToday],
    );
    return rows.map(({ id }) => id);
  }
}
