import type { Quantity } from '@shared/climate/quantity';
import type { Series } from '@shared/contracts/series';
import type { MailStop } from '@shared/mail/mail-stop';
import type { Tx } from '../database/transactions';
import {
  alertOpening,
  alertSection,
  alertSubject,
  chartSpan,
  othersSection,
  wordsFor,
  type AlertSection,
  type MailSetting,
} from './alert-mail';
import type { AlertFinder } from './alert-teller';
import type { MailFooters } from './mail-footers';
import { htmlPage, plainText, type MailPlan } from './mail-layout';
import type { DueMail, MailContent, MailStore } from './mail-store';
import type { AlertOfRoom, TellingStore } from './telling-store';

/** What composing needs of other areas. */
export interface ComposerParts {
  readonly alerts: AlertFinder;
  readonly tellings: TellingStore;
  readonly mails: MailStore;
  readonly footers: MailFooters;
  /** Where links lead, without a trailing slash. */
  readonly publicUrl: () => string;
  /** A quantity of a shelf over a span [ms], as charts show it. */
  readonly seriesOf: (
    shelfId: string,
    quantity: Quantity,
    span: { readonly from: number; readonly to: number },
  ) => Promise<Series>;
}

/** More alerts told at length would make a mail too long to read; the others get a line each. */
const MOST_AT_LENGTH = 4;

/** Decides once a mail about alerts is due whether there is still something to say, and says it. */
export class MailComposer {
  constructor(private readonly parts: ComposerParts) {}

  /**
   * Composes a mail.
   *
   * @param tx - Holding the mail.
   * @param mail - Due, not composed before.
   * @param now - The present [ms].
   * @returns What it says; null when there is nothing left to say.
   */
  async compose(tx: Tx, mail: DueMail, now: number): Promise<MailContent | null> {
    const { tellings, alerts } = this.parts;
    const room = await tellings.room(tx, mail.roomId);
    const recipient = await tellings.recipient(tx, mail.roomId, mail.personId);
    if (room === null || recipient === null) return null;
    const found = await alerts.byIds(tx, await tellings.alertsOf(tx, mail.messageId));
    const quiet = await alerts.quietAmong(
      tx,
      found.map(({ id }) => id),
      now,
    );
    const wanted = found.filter(
      ({ id, urgency }) =>
        recipient.mails[urgency] !== 'never' && (mail.kind === 'assigned' || !quiet.has(id)),
    );
    const told = (await this.worthTelling(tx, mail, wanted)).sort(byUrgency);
    if (told.length === 0) return null;
    await tellings.keepOnly(
      tx,
      mail.messageId,
      told.map(({ id }) => id),
    );
    const setting: MailSetting = { recipient, room, publicUrl: this.parts.publicUrl(), now };
    const sections: AlertSection[] = [];
    for (const alert of told.slice(0, MOST_AT_LENGTH)) {
      sections.push(alertSection(alert, setting, await this.seriesOf(alert, now)));
    }
    const others = told.slice(MOST_AT_LENGTH);
    const stops = stopsOf(mail, told);
    const plan: MailPlan = {
      preview: told.map((alert) => wordsFor(alert, setting).sentence).join(' '),
      opening: alertOpening(mail.kind, told.length),
      sections: [
        ...sections.map(({ section }) => section),
        ...(others.length === 0 ? [] : [othersSection(others, setting)]),
      ],
      footer: this.parts.footers.footer(setting, stops),
    };
    return {
      subject: await this.subject(tx, mail, told, setting),
      textBody: plainText(plan),
      htmlBody: htmlPage(plan),
      pictures: sections.flatMap(({ picture }) => (picture === null ? [] : [picture])),
      unsubscribeToken: this.parts.footers.token(setting, stops),
    };
  }

  private async worthTelling(tx: Tx, mail: DueMail, alerts: readonly AlertOfRoom[]): Promise<AlertOfRoom[]> {
    if (mail.kind === 'cleared') {
      const told = await this.parts.tellings.told(
        tx,
        alerts.map(({ id }) => id),
      );
      const heardOf = new Set(
        told.filter(({ personId, isSent }) => isSent && personId === mail.personId).map((one) => one.alertId),
      );
      return alerts.filter(({ id, clearedAt }) => clearedAt !== null && heardOf.has(id));
    }
    if (mail.kind === 'assigned') {
      return alerts.filter(
        ({ clearedAt, assignee }) => clearedAt === null && assignee?.personId === mail.personId,
      );
    }
    const isStale = mail.isHeldBack || mail.kind === 'escalated';
    return alerts.filter(
      ({ clearedAt, acknowledgedAt }) =>
        !(isStale && clearedAt !== null) && !(mail.kind === 'escalated' && acknowledgedAt !== null),
    );
  }

  private async seriesOf(alert: AlertOfRoom, now: number): Promise<Series | null> {
    const span = chartSpan(alert, now);
    return span.from < span.to ? this.parts.seriesOf(alert.shelfId, alert.quantity, span) : null;
  }

  /** An answer keeps the subject of its conversation: some mail programs go by that too. */
  private async subject(
    tx: Tx,
    mail: DueMail,
    alerts: readonly AlertOfRoom[],
    setting: MailSetting,
  ): Promise<string> {
    const first = mail.inReplyTo === null ? null : await this.parts.mails.subjectOf(tx, mail.inReplyTo);
    return first === null ? alertSubject(alerts, setting) : `Re: ${first}`;
  }
}

/** One click on a mail that nags must not silence what is urgent, unless the mail is urgent itself. */
function stopsOf(mail: DueMail, alerts: readonly AlertOfRoom[]): MailStop {
  if (mail.kind === 'cleared') return 'cleared';
  return alerts.some(({ urgency }) => urgency === 'goNow') ? 'alerts' : 'lookToday';
}

/** Urgent ones first, then as they opened. */
function byUrgency(a: AlertOfRoom, b: AlertOfRoom): number {
  return Number(b.urgency === 'goNow') - Number(a.urgency === 'goNow');
}
