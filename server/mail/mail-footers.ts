import type { MailStop } from '@shared/mail/mail-stop';
import type { MailSetting } from './alert-mail';
import type { MailFooter } from './mail-layout';
import type { MailLinkTokens } from './mail-link-tokens';

const stopTexts: Readonly<Record<MailStop, string>> = {
  lookToday: 'Stop mails about alerts that can wait a day',
  alerts: 'Stop mails about alerts',
  cleared: 'Stop mails that something is over',
  letter: 'Stop the morning letter',
  care: 'Stop mails about care',
};

/** The end of mails: why one came, and how to get no more of its kind. */
export class MailFooters {
  constructor(private readonly tokens: MailLinkTokens) {}

  /** The end of a mail. */
  footer(setting: Pick<MailSetting, 'publicUrl' | 'room' | 'recipient'>, stops: MailStop): MailFooter {
    const { publicUrl, room } = setting;
    return {
      reason: `You get this as a member of ${room.name}.`,
      choicesUrl: `${publicUrl}/account`,
      stopText: stopTexts[stops],
      stopUrl: `${publicUrl}/unsubscribe/${this.token(setting, stops)}`,
    };
  }

  /** The token of the link that stops such mails. */
  token({ recipient, room }: Pick<MailSetting, 'room' | 'recipient'>, stops: MailStop): string {
    return this.tokens.write({ personId: recipient.personId, roomId: room.id, stops });
  }
}
