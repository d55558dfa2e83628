import { randomUUID } from 'node:crypto';
import type { Task } from '@shared/contracts/care';
import type { SwapOffer } from '@shared/contracts/care-rota';
import { formatShortDay } from '@shared/format/room-time';
import { pastQuietHours } from '@shared/mail/mail-choice';
import type { Clock } from '../clock';
import type { Tx } from '../database/transactions';
import type { CareReminderTeller } from '../care/care-reminder-job';
import type { SwapTeller } from '../rota/swaps-service';
import type { MailSetting } from './alert-mail';
import type { MailFooters } from './mail-footers';
import { htmlPage, plainText, type MailPlan, type MailSection } from './mail-layout';
import type { MailStore } from './mail-store';
import type { Recipient, TellingStore } from './telling-store';

/** What telling of care needs. */
export interface CareTellerParts {
  readonly tellings: Pick<TellingStore, 'room' | 'recipients'>;
  readonly mails: Pick<MailStore, 'addWhole'>;
  readonly footers: MailFooters;
  readonly publicUrl: () => string;
  /** Right side of Message-IDs. */
  readonly mailDomain: string;
  readonly now: Clock;
}

/** What a mail about care says. */
export interface CareMail {
  readonly subject: string;
  readonly opening: string;
  readonly sections: readonly MailSection[];
}

/** Writes mails about care into the outbox, to those who want them; quiet hours hold them back. */
export class CareTeller implements SwapTeller, CareReminderTeller {
  constructor(private readonly parts: CareTellerParts) {}

  async tellOffered(tx: Tx, roomId: string, { task, ...offer }: SwapOffer): Promise<void> {
    const isFor = ({ personId, role }: Recipient): boolean =>
      offer.toPersonId === null
        ? role !== 'viewer' && !task.holders.some((holder) => holder.personId === personId)
        : personId === offer.toPersonId;
    await this.tell(tx, roomId, isFor, () => ({
      subject: `${offer.offeredByName} would like to hand over: ${task.title}`,
      opening: `${offer.offeredByName} asks whether ${offer.toPersonId === null ? 'somebody' : 'you'} could do this.`,
      sections: [section(task, offer.note, [{ text: 'See the offer and take it', url: this.careUrl() }])],
    }));
  }

  async tellTaken(tx: Tx, roomId: string, { task, ...offer }: SwapOffer, takenBy: string): Promise<void> {
    const taker = task.holders.find(({ personId }) => personId === takenBy)?.name ?? 'Somebody';
    const links = [{ text: 'See your care', url: this.careUrl() }];
    await this.tell(
      tx,
      roomId,
      ({ personId }) => personId === offer.offeredById,
      () => ({
        subject: `${taker} takes over: ${task.title}`,
        opening: `${taker} has taken what you offered. It is no longer yours.`,
        sections: [section(task, '', links)],
      }),
    );
    await this.tell(
      tx,
      roomId,
      ({ personId }) => personId === takenBy,
      () => ({
        subject: `Yours now: ${task.title}`,
        opening: `You have taken this from ${offer.offeredByName}. Thank you.`,
        sections: [section(task, offer.note, links)],
      }),
    );
  }

  /** Tells those who held a task that somebody took it over unasked. */
  async tellTakenOver(
    tx: Tx,
    task: Task,
    { roomId, by, from }: { readonly roomId: string; readonly by: string; readonly from: readonly string[] },
  ): Promise<void> {
    const taker = task.holders.find(({ personId }) => personId === by)?.name ?? 'Somebody';
    await this.tell(
      tx,
      roomId,
      ({ personId }) => from.includes(personId),
      () => ({
        subject: `${taker} takes over: ${task.title}`,
        opening: `${taker} has taken this over from you. You need not do it.`,
        sections: [section(task, '', [{ text: 'See your care', url: this.careUrl() }])],
      }),
    );
  }

  async tellEnding(tx: Tx, roomId: string, tasks: readonly Task[]): Promise<void> {
    const heldBy = ({ personId }: Recipient): readonly Task[] =>
      tasks.filter(({ holders }) => holders.some((holder) => holder.personId === personId));
    const isFor = (recipient: Recipient): boolean => heldBy(recipient).length > 0;
    await this.tell(tx, roomId, isFor, (recipient) => {
      const own = heldBy(recipient);
      return {
        subject:
          own.length === 1 ? `Today still: ${own[0]?.title ?? ''}` : `Today still: ${own.length} care tasks`,
        opening: 'This is yours and in time until tonight. If you can’t do it, hand it over.',
        sections: [
          listSection('Not done yet', own, { text: 'Tick it, or hand it over', url: this.careUrl() }),
        ],
      };
    });
  }

  async tellLate(tx: Tx, roomId: string, tasks: readonly Task[]): Promise<void> {
    await this.tell(
      tx,
      roomId,
      ({ role }) => role === 'keeper',
      () => ({
        subject: tasks.length === 1 ? `Late: ${tasks[0]?.title ?? ''}` : `Late: ${tasks.length} care tasks`,
        opening: 'The time for this is over and nobody has done it.',
        sections: [
          listSection('Not done in time', tasks, { text: 'See the care rota', url: this.careUrl() }),
        ],
      }),
    );
  }

  /**
   * Writes a mail to each member that it is for and who wants mails about care.
   *
   * @param tx - Of what gives the reason.
   * @param roomId - About which room.
   * @param isFor - Whom.
   * @param mailFor - What it says to each; null for nothing.
   * @returns Ids of those who are written to.
   */
  async tell(
    tx: Tx,
    roomId: string,
    isFor: (recipient: Recipient) => boolean,
    mailFor: (recipient: Recipient) => CareMail | null,
  ): Promise<string[]> {
    const { tellings, mails, footers, publicUrl, mailDomain } = this.parts;
    const room = await tellings.room(tx, roomId);
    if (room === null) return [];
    const told: string[] = [];
    for (const recipient of (await tellings.recipients(tx, roomId)).filter(isFor)) {
      const mail = recipient.mails.care ? mailFor(recipient) : null;
      if (mail === null) continue;
      const now = this.parts.now().getTime();
      const setting: MailSetting = { recipient, room, publicUrl: publicUrl(), now };
      const plan: MailPlan = {
        preview: mail.opening,
        opening: mail.opening,
        sections: mail.sections,
        footer: footers.footer(setting, 'care'),
      };
      await mails.addWhole(tx, {
        personId: recipient.personId,
        roomId,
        kind: 'care',
        messageId: `<care-${randomUUID()}@${mailDomain}>`,
        toAddress: recipient.email,
        at: new Date(pastQuietHours(recipient.mails, 'lookToday', now, room.timeZone)),
        subject: mail.subject,
        textBody: plainText(plan),
        htmlBody: htmlPage(plan),
        pictures: [],
        unsubscribeToken: footers.token(setting, 'care'),
      });
      told.push(recipient.personId);
    }
    return told;
  }

  private careUrl(): string {
    return `${this.parts.publicUrl()}/care`;
  }
}

function listSection(
  heading: string,
  tasks: readonly Task[],
  link: { readonly text: string; readonly url: string },
): MailSection {
  return {
    heading,
    lines: [],
    items: tasks.map((task) => {
      const who = task.personName ?? (task.cover === 'anybody' ? 'anybody' : 'nobody has it');
      return [task.title, ...placeOf(task), `due ${dayOf(task)}`, who].join(' · ');
    }),
    links: [link],
  };
}

function placeOf({ plantingLabel, rackName, shelfLabel }: Task): string[] {
  return [plantingLabel, rackName, shelfLabel].filter((part) => part !== null);
}

/** A day of the calendar has no time zone, so it is written as UTC counts it. */
function dayOf({ dueOn }: Task): string {
  return formatShortDay(`${dueOn}T12:00:00Z`, 'UTC');
}

function section(task: Task, note: string, links: MailSection['links']): MailSection {
  return {
    heading: task.title,
    lines: [
      [`Due ${dayOf(task)}`, ...placeOf(task)].join(' · '),
      ...(task.detail === '' ? [] : [task.detail]),
      ...(note === '' ? [] : [`“${note}”`]),
    ],
    links: links ?? [],
  };
}
