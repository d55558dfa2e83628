import type { AlertTeller } from '../alerts/alert-evaluation-service';
import type { Tx } from '../database/transactions';
import { clearedMail, openedMail, type AlertMailSetting } from './alert-mail';
import type { AlertOfRoom, MailStore } from './mail-store';

/** Finds the alerts by id, for whoever tells of them. */
export interface AlertFinder {
  byIds(tx: Tx, alertIds: readonly string[]): Promise<AlertOfRoom[]>;
}

/** Writes mails about alerts into the outbox, in the transaction that changes the alerts. */
export class MailAlertTeller implements AlertTeller {
  constructor(
    private readonly alerts: AlertFinder,
    private readonly mails: MailStore,
    private readonly publicUrl: () => string,
    private readonly mailDomain: string,
  ) {}

  async tellOpened(tx: Tx, alertIds: readonly string[], now: number): Promise<void> {
    await this.eachRoom(tx, alertIds, now, async (alerts, roomId, setting) => {
      const recipients = await this.mails.recipients(tx, roomId, 'opened');
      await this.mails.add(
        tx,
        recipients.map((recipient) => openedMail(alerts, recipient, setting)),
      );
    });
  }

  async tellCleared(tx: Tx, alertIds: readonly string[], now: number): Promise<void> {
    await this.eachRoom(tx, alertIds, now, async (alerts, roomId, setting) => {
      const told = alerts.filter(({ clearedAt, toldAt }) => clearedAt !== null && toldAt !== null);
      if (told.length === 0) return;
      const recipients = await this.mails.recipients(tx, roomId, 'cleared');
      await this.mails.add(
        tx,
        told.flatMap((alert) => recipients.map((recipient) => clearedMail(alert, recipient, setting))),
      );
    });
  }

  private async eachRoom(
    tx: Tx,
    alertIds: readonly string[],
    now: number,
    tell: (alerts: AlertOfRoom[], roomId: string, setting: AlertMailSetting) => Promise<void>,
  ): Promise<void> {
    const alerts = await this.alerts.byIds(tx, alertIds);
    for (const roomId of new Set(alerts.map((alert) => alert.roomId))) {
      const room = await this.mails.room(tx, roomId);
      if (room === null) continue;
      const setting = {
        roomName: room.name,
        timeZone: room.timeZone,
        publicUrl: this.publicUrl(),
        mailDomain: this.mailDomain,
        now,
      };
      await tell(
        alerts.filter((alert) => alert.roomId === roomId),
        roomId,
        setting,
      );
    }
  }
}
