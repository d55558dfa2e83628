import type { MailLink } from '@shared/contracts/mail';
import { isStopped, withoutMails } from '@shared/mail/mail-stop';
import type { Transactions } from '../database/transactions';
import { notFound } from '../http/request-problem';
import type { PeopleService } from '../people/people-service';
import type { MailLinkMeaning, MailLinkTokens } from './mail-link-tokens';
import type { Recipient, TellingStore } from './telling-store';

/** What the links in mails do, for whoever holds them: the mail itself is the proof. */
export class MailLinksService {
  constructor(
    private readonly transactions: Transactions,
    private readonly tellings: TellingStore,
    private readonly people: Pick<PeopleService, 'changeMailChoice'>,
    private readonly tokens: MailLinkTokens,
  ) {}

  /**
   * What a link would stop.
   *
   * @param token - From the mail.
   * @returns The room, the kind of mail, and whether it is stopped already.
   * @throws RequestProblem 404 for a link that is not ours, or whose person has left the room.
   */
  async link(token: string): Promise<MailLink> {
    return (await this.find(token)).link;
  }

  /**
   * Stops the kind of mail that a link came with; once more changes nothing.
   *
   * @param token - From the mail.
   * @returns The link, followed.
   * @throws RequestProblem 404 as for {@link link}.
   */
  async follow(token: string): Promise<MailLink> {
    const { meaning, recipient, link } = await this.find(token);
    if (link.isStopped) return link;
    const { lookToday, goNow, cleared, care, letterAt } = withoutMails(recipient.mails, meaning.stops);
    await this.people.changeMailChoice(meaning.personId, meaning.roomId, {
      lookToday,
      goNow,
      cleared,
      care,
      letterAt,
    });
    return { ...link, isStopped: true };
  }

  private async find(
    token: string,
  ): Promise<{ meaning: MailLinkMeaning; recipient: Recipient; link: MailLink }> {
    const tx = this.transactions.plain;
    const meaning = this.tokens.read(token);
    if (meaning === null) throw notFound('link');
    const room = await this.tellings.room(tx, meaning.roomId);
    const recipient = await this.tellings.recipient(tx, meaning.roomId, meaning.personId);
    if (room === null || recipient === null) throw notFound('link');
    const { stops } = meaning;
    const link = { roomName: room.name, stops, isStopped: isStopped(recipient.mails, stops) };
    return { meaning, recipient, link };
  }
}
