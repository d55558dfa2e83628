import { html, type Html, type HtmlPart } from './html';
import type { ReceivedMail } from './mail';
import type { MailQuery } from './mail-archive';

/** The ways of looking at a mail. */
export const mailViews = ['html', 'text', 'source'] as const;
export type MailView = (typeof mailViews)[number];

const viewNames: Readonly<Record<MailView, string>> = {
  html: 'As sent',
  text: 'Plain text',
  source: 'Source',
};
const time = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'medium' });

/** A mail of the list, with how many belong to its conversation. */
export interface ListedMail {
  readonly mail: ReceivedMail;
  readonly conversation: number;
}

/** The list of mails, newest first. */
export function listPage(mails: readonly ListedMail[], query: MailQuery): string {
  const isFiltered = [query.to, query.subject].some((part) => part !== undefined && part !== '');
  const count = mails.length === 1 ? '1 mail' : `${mails.length} mails`;
  return page(
    'Mailbox',
    html`<header>
        <h1>Mailbox</h1>
        <p>What would have gone out by e-mail, newest first. Nothing here has left this machine.</p>
      </header>
      <form action="/" method="get" role="search" aria-label="Mails">
        <label>To <input name="to" value="${query.to ?? ''}" /></label>
        <label>Subject <input name="subject" value="${query.subject ?? ''}" /></label>
        <button>Show</button>
        ${isFiltered ? html`<a href="/">Show all</a>` : html`<a href="/">Look again</a>`}
      </form>
      <main>
        <p class="count">${isFiltered ? `${count} fit` : count}</p>
        ${
          mails.length === 0
            ? emptyList(isFiltered)
            : html`<ol class="mails">
                ${mails.map(listItem)}
              </ol>`
        }
      </main>`,
  );
}

/** One mail in one of its views, and the conversation that it belongs to. */
export function mailPage(mail: ReceivedMail, view: MailView, conversation: readonly ReceivedMail[]): string {
  const attachments = mail.attachments.map(({ name, bytes }) => `${name} (${Math.ceil(bytes / 1000)} kB)`);
  return page(
    subjectOf(mail),
    html`<header>
        <p><a href="/">All mails</a></p>
        <h1>${subjectOf(mail)}</h1>
        <dl>
          <dt>From</dt>
          <dd>${mail.from}</dd>
          <dt>To</dt>
          <dd>${mail.to.join(', ')}</dd>
          <dt>Arrived</dt>
          <dd>${timeOf(mail)}</dd>
          ${
            attachments.length === 0
              ? null
              : html`<dt>With</dt>
                  <dd>${attachments.join(', ')}</dd>`
          }
        </dl>
      </header>
      <nav aria-label="Views of this mail">${mailViews.map((other) => viewLink(mail, other, view))}</nav>
      <main>${body(mail, view)}</main>
      ${
        conversation.length < 2
          ? null
          : html`<section aria-labelledby="conversation">
              <h2 id="conversation">Conversation</h2>
              <ol class="mails">
                ${conversation.map((other) =>
                  other === mail
                    ? html`<li><p class="here" aria-current="true">${mailLine(other)}</p></li>`
                    : listItem({ mail: other, conversation: 1 }),
                )}
              </ol>
            </section>`
      }`,
  );
}

/** A page that says that something isn't here. */
export function missingPage(): string {
  return page(
    'Not here',
    html`<main>
      <h1>Not here</h1>
      <p>There is no such page or mail; the mailbox keeps the last thousand. <a href="/">All mails</a></p>
    </main>`,
  );
}

function page(title: string, content: Html): string {
  return html`<!doctype html>
    <html lang="en">
      <head>
        <meta charset="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <title>${title} · Lampmeadow mailbox</title>
        <link rel="stylesheet" href="/mailbox.css" />
        <link rel="icon" href="data:," />
      </head>
      <body>
        ${content}
      </body>
    </html>`.text;
}

function emptyList(isFiltered: boolean): Html {
  return isFiltered
    ? html`<p>No mail fits. Shorten what you look for.</p>`
    : html`<p>No mail yet. When Lampmeadow sends an alert or a reminder, it arrives here.</p>`;
}

function listItem({ mail, conversation }: ListedMail): Html {
  const others = conversation > 1 ? html` <span class="thread">${conversation} in conversation</span>` : null;
  return html`<li><a href="/mails/${mail.id}">${mailLine(mail, others)}</a></li>`;
}

function mailLine(mail: ReceivedMail, more: HtmlPart = null): Html {
  return html`<b>${subjectOf(mail)}</b>${more} <span>${mail.from} to ${mail.to.join(', ')}</span>
    <time datetime="${mail.receivedAt}">${timeOf(mail)}</time>`;
}

function viewLink(mail: ReceivedMail, view: MailView, current: MailView): Html {
  const target = `/mails/${mail.id}?show=${view}`;
  return view === current
    ? html`<a href="${target}" aria-current="page">${viewNames[view]}</a>`
    : html`<a href="${target}">${viewNames[view]}</a>`;
}

function body(mail: ReceivedMail, view: MailView): Html {
  if (view === 'source') return html`<pre tabindex="0">${mail.source}</pre>`;
  if (view === 'text') {
    return mail.text === null
      ? html`<p>This mail has no plain text.</p>`
      : html`<pre>${linked(mail.text)}</pre>`;
  }
  // Scripts, forms and the page around it stay out of the mail's reach; its links open beside it.
  return mail.html === null
    ? html`<p>This mail has no HTML.</p>`
    : html`<iframe
        sandbox="allow-popups allow-popups-to-escape-sandbox"
        src="/mails/${mail.id}/body"
        title="The mail as sent"
      ></iframe>`;
}

function linked(text: string): Html[] {
  return text
    .split(/(https?:\/\/[^\s<>"]+)/)
    .map((part, index) =>
      index % 2 === 1 ? html`<a href="${part}" rel="noreferrer">${part}</a>` : html`${part}`,
    );
}

function subjectOf({ subject }: ReceivedMail): string {
  return subject === '' ? '(no subject)' : subject;
}

function timeOf({ receivedAt }: ReceivedMail): string {
  return time.format(new Date(receivedAt));
}
