import type { Alert } from '@shared/contracts/alerts';
import type { Task } from '@shared/contracts/care';
import type { Rack } from '@shared/contracts/rooms';
import type { ShelfReport } from '@shared/contracts/series';
import { formatDay } from '@shared/format/room-time';
import { letterDue, type LetterMorning } from '@shared/mail/letter-time';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { MailSetting } from './alert-mail';
import type { MailFooters } from './mail-footers';
import { htmlPage, plainText, type MailPlan } from './mail-layout';
import type { MailStore } from './mail-store';
import { hasNews, letterSections, type MorningNews, type ShelfNight } from './morning-letter';
import type { AlertOfRoom, LetterReader, TellingStore } from './telling-store';

/** What the job needs. */
export interface LetterParts {
  readonly transactions: Transactions;
  readonly tellings: TellingStore;
  readonly mails: MailStore;
  readonly footers: MailFooters;
  readonly publicUrl: () => string;
  readonly mailDomain: string;
  readonly now: Clock;
  readonly racksOf: (roomId: string) => Promise<Rack[]>;
  readonly reportOf: (
    shelfId: string,
    timeZone: string,
    span: { readonly from: number; readonly to: number },
  ) => Promise<Pick<ShelfReport, 'statistics'>>;
  readonly openAlertsOf: (roomId: string) => Promise<Alert[]>;
  readonly newestAlertsOf: (roomId: string) => Promise<Alert[]>;
  readonly tasksOf: (roomId: string, from: string, to: string) => Promise<Task[]>;
}

const DAY_MS = 86_400_000;
/** What comes up is told for so many days. */
const AHEAD_DAYS = 3;

/** Writes each person's morning letter at the time that they chose, once a day. */
export class MorningLetterJob {
  constructor(private readonly parts: LetterParts) {}

  /** Looks once. Readers of one room and hour share the look at the night. */
  async run(): Promise<void> {
    const { transactions, tellings } = this.parts;
    const now = this.parts.now().getTime();
    const known = new Map<string, Promise<MorningNews>>();
    for (const reader of await tellings.letterReaders(transactions.plain)) {
      const { letterAt } = reader.recipient.mails;
      const morning = letterAt === null ? null : letterDue(letterAt, now, reader.room.timeZone);
      if (morning === null) continue;
      await transactions.run(async (tx) => {
        if (!(await tellings.beginLetter(tx, reader, morning.day))) return;
        const key = `${reader.room.id} ${morning.nightTo}`;
        const news = known.get(key) ?? this.newsOf(reader, morning);
        known.set(key, news);
        await this.write(tx, reader, await news, now);
      });
    }
  }

  private async write(
    tx: Tx,
    { recipient, room }: LetterReader,
    news: MorningNews,
    now: number,
  ): Promise<void> {
    const { footers, mails, mailDomain } = this.parts;
    const setting: MailSetting = { recipient, room, publicUrl: this.parts.publicUrl(), now };
    const isNews = hasNews(news, setting);
    if (!isNews && recipient.mails.letterOnlyWithNews) return;
    const day = formatDay(`${news.day}T12:00:00Z`, 'UTC');
    const plan: MailPlan = {
      preview: isNews ? 'What needs you today, and how the night was.' : 'A quiet night; nothing needs you.',
      opening: `Good morning, ${recipient.name}.${isNews ? '' : ' The night was quiet, and nothing needs you today.'}`,
      sections: letterSections(news, setting),
      footer: footers.footer(setting, 'letter'),
    };
    await mails.addWhole(tx, {
      personId: recipient.personId,
      roomId: room.id,
      kind: 'letter',
      messageId: `<letter-${news.day}-${room.id}-${recipient.personId}@${mailDomain}>`,
      toAddress: recipient.email,
      at: new Date(now),
      subject: `${day} · ${room.name}`,
      textBody: plainText(plan),
      htmlBody: htmlPage(plan),
      pictures: [],
      unsubscribeToken: footers.token(setting, 'letter'),
    });
  }

  private async newsOf(
    { room }: LetterReader,
    { day, nightFrom, nightTo }: LetterMorning,
  ): Promise<MorningNews> {
    const { racksOf, tasksOf } = this.parts;
    const shelves: ShelfNight[] = [];
    for (const { id, label } of (await racksOf(room.id)).flatMap((rack) => rack.shelves)) {
      const { statistics } = await this.parts.reportOf(id, room.timeZone, { from: nightFrom, to: nightTo });
      const measured = statistics.filter(({ min }) => min !== null);
      if (measured.length > 0) shelves.push({ label, statistics: measured });
    }
    const tasks = await tasksOf(room.id, day, daysAfter(day, AHEAD_DAYS + 1));
    return {
      day,
      nightMs: nightTo - nightFrom,
      shelves,
      alerts: await this.alertsOf(room.id, nightTo - DAY_MS),
      tasks: tasks.filter(({ doneAt }) => doneAt === null),
    };
  }

  /** Open alerts, and those that are over since an instant [ms]; what was found by looking back is no news. */
  private async alertsOf(roomId: string, since: number): Promise<AlertOfRoom[]> {
    const open = await this.parts.openAlertsOf(roomId);
    const over = (await this.parts.newestAlertsOf(roomId)).filter(
      ({ clearedAt, foundLater }) => clearedAt !== null && !foundLater && Date.parse(clearedAt) >= since,
    );
    return [...open, ...over].map((alert) => ({ ...alert, roomId }));
  }
}

function daysAfter(day: string, days: number): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + days * DAY_MS).toISOString().slice(0, 10);
}
