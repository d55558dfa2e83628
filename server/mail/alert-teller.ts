import { randomUUID } from 'node:crypto';
import { mailDueAt, pastQuietHours } from '@shared/mail/mail-choice';
import type { AlertTeller } from '../alerts/episode-keeper';
import type { Tx } from '../database/transactions';
import type { AlertOfRoom, Recipient, RoomOfMail, Telling, TellingStore, Told } from './telling-store';

/** Finds the alerts by id, for whoever tells of them. */
export interface AlertFinder {
  byIds(tx: Tx, alertIds: readonly string[]): Promise<AlertOfRoom[]>;
  /** Which of some nobody is to be written to about, because somebody said so. */
  quietAmong(tx: Tx, alertIds: readonly string[], now: number): Promise<ReadonlySet<string>>;
}

/** What telling of alerts needs. */
export interface TellerParts {
  readonly alerts: AlertFinder;
  readonly tellings: TellingStore;
  /** Right side of Message-IDs. */
  readonly mailDomain: string;
  /** How long a mail waits for more alerts of the same room to join it [ms]: a power cut is one mail. */
  readonly collectMs?: number;
}

const COLLECT_MS = 60_000;

/**
 * Writes mails about alerts into the outbox, in the transaction that changes the alerts. About those that are quiet it
 * writes nothing; who follows them up finds what is still open afterwards.
 */
export class MailAlertTeller implements AlertTeller {
  private readonly collectMs: number;

  constructor(private readonly parts: TellerParts) {
    this.collectMs = parts.collectMs ?? COLLECT_MS;
  }

  /**
   * Who a room's alerts go to: every member, on duty or not, for what goes wrong at night goes wrong between duties; who
   * wants which mail is for each to choose.
   *
   * @param tx - Any.
   * @param roomId - The room.
   * @param _at - When the alert is told [ms].
   */
  onDuty(tx: Tx, roomId: string, _at: number): Promise<Recipient[]> {
    return this.parts.tellings.recipients(tx, roomId);
  }

  async tellOpened(tx: Tx, alertIds: readonly string[], now: number): Promise<void> {
    await this.eachRoom(tx, alertIds, now, async (alerts, room) => {
      for (const recipient of await this.onDuty(tx, room.id, now)) {
        const due = alerts.flatMap((alert) => {
          const at = mailDueAt(recipient.mails, alert.urgency, now, room.timeZone);
          return at === null ? [] : [{ alert, at }];
        });
        // Soonest first, so that what quiet hours would hold back joins an urgent mail of the same moment.
        for (const dueAt of [...new Set(due.map(({ at }) => at))].sort((a, b) => a - b)) {
          const together = due.filter(({ at }) => at === dueAt).map(({ alert }) => alert);
          await this.write(
            tx,
            room,
            { recipient, kind: 'opened', alerts: together, dueAt, inReplyTo: null },
            now,
          );
        }
      }
    });
  }

  async tellCleared(tx: Tx, alertIds: readonly string[], now: number): Promise<void> {
    await this.eachRoom(tx, alertIds, now, async (alerts, room) => {
      const cleared = alerts.filter(({ clearedAt, toldAt }) => clearedAt !== null && toldAt !== null);
      if (cleared.length === 0) return;
      const told = await this.parts.tellings.told(
        tx,
        cleared.map(({ id }) => id),
      );
      for (const recipient of await this.parts.tellings.recipients(tx, room.id)) {
        if (!recipient.mails.cleared) continue;
        const dueAt = pastQuietHours(recipient.mails, 'lookToday', now, room.timeZone);
        for (const alert of cleared) {
          const before = toldTo(told, alert, recipient);
          if (before.length === 0 || before.some(({ reason }) => reason === 'cleared')) continue;
          const inReplyTo = before[0]?.messageId ?? null;
          await this.write(tx, room, { recipient, kind: 'cleared', alerts: [alert], dueAt, inReplyTo }, now);
        }
      }
    });
  }

  /** Tells of alerts that have become urgent since they were told, through quiet hours that held them back. */
  async tellUrgent(tx: Tx, alertIds: readonly string[], now: number): Promise<void> {
    await this.eachRoom(tx, alertIds, now, async (alerts, room) => {
      const told = await this.parts.tellings.told(tx, alertIds);
      for (const recipient of await this.onDuty(tx, room.id, now)) {
        if (recipient.mails.goNow !== 'atOnce') continue;
        for (const alert of alerts) {
          const before = toldTo(told, alert, recipient);
          if (before.some(({ urgency }) => urgency === 'goNow')) continue;
          const waiting = before.find(({ isComposed }) => !isComposed);
          if (waiting !== undefined) {
            await this.parts.tellings.hasten(tx, waiting.messageId, alert.id, new Date(now + this.collectMs));
            continue;
          }
          const inReplyTo = before[0]?.messageId ?? null;
          await this.write(
            tx,
            room,
            { recipient, kind: 'urgent', alerts: [alert], dueAt: now, inReplyTo },
            now,
          );
        }
      }
    });
  }

  /** Tells keepers of alerts that nobody has acknowledged: those who have had no mail about it, else all again. */
  async tellUnseen(tx: Tx, alertIds: readonly string[], now: number): Promise<void> {
    await this.eachRoom(tx, alertIds, now, async (alerts, room) => {
      const told = await this.parts.tellings.told(tx, alertIds);
      const recipients = await this.parts.tellings.recipients(tx, room.id);
      const keepers = recipients.filter(({ role }) => role === 'keeper');
      for (const alert of alerts) {
        const willing = keepers.filter(({ mails }) => mails[alert.urgency] !== 'never');
        const unwritten = willing.filter((keeper) => toldTo(told, alert, keeper).length === 0);
        for (const recipient of unwritten.length > 0 ? unwritten : willing) {
          const dueAt = pastQuietHours(recipient.mails, alert.urgency, now, room.timeZone);
          const inReplyTo = toldTo(told, alert, recipient)[0]?.messageId ?? null;
          await this.write(
            tx,
            room,
            { recipient, kind: 'escalated', alerts: [alert], dueAt, inReplyTo },
            now,
          );
        }
      }
    });
  }

  /**
   * Tells a member that an alert is theirs to look after. Somebody asks this person, so a quiet does not hold it back;
   * their own choice and quiet hours do.
   */
  async tellAssigned(tx: Tx, alertId: string, personId: string, now: number): Promise<void> {
    const { alerts, tellings } = this.parts;
    const [alert] = await alerts.byIds(tx, [alertId]);
    if (alert === undefined) return;
    await tellings.holdRoom(tx, alert.roomId);
    const room = await tellings.room(tx, alert.roomId);
    const recipient = await tellings.recipient(tx, alert.roomId, personId);
    if (room === null || recipient === null) return;
    const before = toldTo(await tellings.told(tx, [alertId]), alert, recipient);
    if (before.some(({ reason }) => reason === 'assigned')) return;
    const dueAt = pastQuietHours(recipient.mails, alert.urgency, now, room.timeZone);
    const inReplyTo = before[0]?.messageId ?? null;
    await this.write(tx, room, { recipient, kind: 'assigned', alerts: [alert], dueAt, inReplyTo }, now);
  }

  private write(
    tx: Tx,
    room: RoomOfMail,
    telling: Pick<Telling, 'recipient' | 'kind' | 'alerts' | 'dueAt' | 'inReplyTo'>,
    now: number,
  ): Promise<void> {
    const isHeldBack = telling.dueAt > now;
    return this.parts.tellings.tell(tx, {
      ...telling,
      roomId: room.id,
      isHeldBack,
      dueAt: isHeldBack ? telling.dueAt : now + this.collectMs,
      messageId: `<${randomUUID()}@${this.parts.mailDomain}>`,
      at: now,
    });
  }

  private async eachRoom(
    tx: Tx,
    alertIds: readonly string[],
    now: number,
    tell: (alerts: AlertOfRoom[], room: RoomOfMail) => Promise<void>,
  ): Promise<void> {
    const quiet = await this.parts.alerts.quietAmong(tx, alertIds, now);
    const alerts = await this.parts.alerts.byIds(
      tx,
      alertIds.filter((id) => !quiet.has(id)),
    );
    // Always in the same order, so that two transactions never wait for each other's rooms.
    for (const roomId of [...new Set(alerts.map((alert) => alert.roomId))].sort()) {
      await this.parts.tellings.holdRoom(tx, roomId);
      const room = await this.parts.tellings.room(tx, roomId);
      if (room === null) continue;
      await tell(
        alerts.filter((alert) => alert.roomId === roomId),
        room,
      );
    }
  }
}

function toldTo(told: readonly Told[], alert: AlertOfRoom, recipient: Recipient): Told[] {
  return told.filter(({ alertId, personId }) => alertId === alert.id && personId === recipient.personId);
}
