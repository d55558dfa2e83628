import { describeEpisode, type EpisodeDescription } from '@shared/alerts/describe-episode';
import { episodeOf } from '@shared/contracts/alerts';
import { episodeFormatters } from '@shared/format/episode-formatters';
import { escapeHtml } from './escape-html';
import type { AlertOfRoom, NewMail, Recipient } from './mail-store';

/** What alert mails need beside alerts and people. */
export interface AlertMailSetting {
  readonly roomName: string;
  readonly timeZone: string;
  /** Where links lead, without a trailing slash. */
  readonly publicUrl: string;
  /** Right side of Message-IDs. */
  readonly mailDomain: string;
  readonly now: number;
}

/**
 * One mail about alerts that opened together. A single alert begins a conversation of its own, which the mail about its
 * clearing carries on.
 *
 * @param alerts - At least one, of one room.
 * @param recipient - To whom.
 * @param setting - Room, links and clock.
 * @returns The mail for the outbox.
 */
export function openedMail(
  alerts: readonly AlertOfRoom[],
  recipient: Recipient,
  setting: AlertMailSetting,
): NewMail {
  const told = alerts.map((alert) => ({ alert, words: wordsFor(alert, recipient, setting) }));
  const [first] = told;
  const isOne = told.length === 1;
  const subject =
    isOne && first !== undefined
      ? `${first.words.title} · ${setting.roomName}`
      : `${told.length} shelves or sensors need a look · ${setting.roomName}`;
  return letter(recipient, setting, {
    messageId: messageId(alerts, 'opened', recipient, setting),
    inReplyTo: null,
    subject,
    parts: told.map(({ alert, words }) => ({
      heading: words.title,
      lines: [words.sentence, words.tryThis, ...(words.caution === null ? [] : [words.caution])],
      link: linkTo(alert, setting),
    })),
  });
}

/**
 * The mail that an alert is over, in the conversation of its opening.
 *
 * @param alert - Cleared.
 * @param recipient - To whom.
 * @param setting - Room, links and clock.
 * @returns The mail for the outbox.
 */
export function clearedMail(alert: AlertOfRoom, recipient: Recipient, setting: AlertMailSetting): NewMail {
  const words = wordsFor(alert, recipient, setting);
  return letter(recipient, setting, {
    messageId: messageId([alert], 'cleared', recipient, setting),
    inReplyTo: messageId([alert], 'opened', recipient, setting),
    subject: `Over: ${words.title} · ${setting.roomName}`,
    parts: [{ heading: words.title, lines: [words.sentence, 'It is over.'], link: linkTo(alert, setting) }],
  });
}

interface Letter {
  readonly messageId: string;
  readonly inReplyTo: string | null;
  readonly subject: string;
  readonly parts: readonly { heading: string; lines: readonly string[]; link: string }[];
}

function letter(recipient: Recipient, setting: AlertMailSetting, { parts, ...head }: Letter): NewMail {
  const reason = `You get this as a member of ${setting.roomName}. Choose your mails: ${setting.publicUrl}/account`;
  const text = parts.map((part) => [part.heading, '', ...part.lines, '', part.link].join('\n')).join('\n\n');
  return {
    personId: recipient.personId,
    toAddress: recipient.email,
    ...head,
    textBody: `${text}\n\n--\n${reason}\n`,
    htmlBody: page(parts.map(sectionOf).join(''), reason),
  };
}

function sectionOf(part: Letter['parts'][number]): string {
  const [sentence, ...rest] = part.lines.map(escapeHtml);
  return `<section style="margin:0 0 24px">
<h1 style="font:600 20px Georgia,serif;margin:0 0 8px">${escapeHtml(part.heading)}</h1>
<p style="margin:0 0 8px">${sentence ?? ''}</p>
${rest.map((line) => `<p style="margin:0 0 8px;opacity:.8">${line}</p>`).join('\n')}
<p style="margin:12px 0 0"><a href="${escapeHtml(part.link)}" style="color:#2b5d49;font-weight:600">Look at the shelf</a></p>
</section>`;
}

function page(sections: string, reason: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<meta name="color-scheme" content="light dark"><style>@media (prefers-color-scheme: dark){.page{background:#15120f!important;color:#f2e8d8!important}.page a{color:#93c9ac!important}}</style></head>
<body class="page" style="margin:0;padding:24px;background:#f6f0e4;color:#231c15;font:16px/1.5 system-ui,sans-serif">
<div style="max-width:560px;margin:0 auto">${sections}<p style="font-size:13px;opacity:.75;margin:0">${escapeHtml(reason)}</p></div></body></html>`;
}

function wordsFor(alert: AlertOfRoom, recipient: Recipient, setting: AlertMailSetting): EpisodeDescription {
  const unit = recipient.temperatureUnit === 'fahrenheit' ? '°F' : '°C';
  return describeEpisode({
    episode: episodeOf(alert),
    kind: alert.kind,
    quantity: alert.quantity,
    shelfLabel: alert.shelfLabel,
    formatters: episodeFormatters(unit, setting.timeZone, setting.now),
    now: setting.now,
  });
}

function linkTo(alert: AlertOfRoom, setting: AlertMailSetting): string {
  return `${setting.publicUrl}/shelf/${alert.shelfId}`;
}

function messageId(
  alerts: readonly AlertOfRoom[],
  what: string,
  recipient: Recipient,
  { mailDomain }: AlertMailSetting,
): string {
  return `<alert-${alerts[0]?.id ?? ''}-${what}-${recipient.personId}@${mailDomain}>`;
}
