import { once } from 'node:events';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { readJsonBody } from '../process/read-json-body';
import { faultRequest, type FaultSwitch } from './fault-switch';
import type { MailArchive, MailQuery } from './mail-archive';
import { listPage, mailPage, mailViews, missingPage, type MailView } from './mailbox-pages';
import { fontFiles, mailboxStyle, readFont } from './mailbox-style';

const PAGE_POLICY =
  "default-src 'none'; style-src 'self'; font-src 'self'; frame-src 'self'; img-src data:; " +
  "form-action 'self'; base-uri 'none'; frame-ancestors 'none'";
// A mail brings its own styles and embedded pictures; it may run nothing, load nothing and send nothing.
const MAIL_POLICY =
  "default-src 'none'; style-src 'unsafe-inline'; img-src data:; form-action 'none'; frame-ancestors 'self'; " +
  'sandbox allow-popups allow-popups-to-escape-sandbox';

/** The mailbox's pages, listening on loopback. */
export interface MailboxWeb {
  readonly address: string;
  stop(): Promise<void>;
}

interface Answer {
  readonly status: number;
  readonly type: string;
  readonly body: string | Buffer;
  readonly policy?: string;
}

/**
 * Serves the mailbox's pages and its interface for tests: `GET` and `DELETE /api/mails`, `POST /api/faults`.
 *
 * @param archive - The mails to show.
 * @param faults - What is to go wrong with the next ones.
 * @param port - 0 for any that is free.
 * @throws The network's error when the port is taken.
 */
export async function startMailboxWeb(
  archive: MailArchive,
  faults: FaultSwitch,
  port: number,
): Promise<MailboxWeb> {
  const server = createServer((request, response) => {
    answer(archive, faults, request).then(
      (found) => send(response, found),
      (error: unknown) => {
        console.error(error);
        send(response, json(500, { error: 'The mailbox could not answer.' }));
      },
    );
  });
  server.listen(port, '127.0.0.1');
  await once(server, 'listening');
  return {
    address: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    stop: async () => {
      server.close();
      server.closeAllConnections();
      await once(server, 'close');
    },
  };
}

async function answer(archive: MailArchive, faults: FaultSwitch, request: IncomingMessage): Promise<Answer> {
  // Another name for this address would let a page from elsewhere read the mails (DNS rebinding).
  if (!/^(127\.0\.0\.1|localhost)(:\d+)?$/.test(request.headers.host ?? '')) return page(missingPage(), 421);
  const url = new URL(request.url ?? '/', 'http://127.0.0.1');
  const [area = '', name = '', part = ''] = url.pathname.split('/').slice(1);
  if (area === 'api') return answerApi(archive, faults, request, name, queryOf(url));
  if (request.method !== 'GET' && request.method !== 'HEAD') return page(missingPage(), 405);
  if (url.pathname === '/') return page(listOf(archive, queryOf(url)));
  if (url.pathname === '/mailbox.css') return { status: 200, type: 'text/css', body: mailboxStyle };
  if (area === 'fonts') return font(name);
  if (area === 'mails') return mailAnswer(archive, name, part, url.searchParams.get('show'));
  return page(missingPage(), 404);
}

function mailAnswer(archive: MailArchive, id: string, part: string, show: string | null): Answer {
  const mail = archive.get(id);
  if (mail === undefined) return page(missingPage(), 404);
  if (part === 'body' && mail.html !== null) {
    const body = `<base target="_blank">${mail.html}`;
    return { status: 200, type: 'text/html', body, policy: MAIL_POLICY };
  }
  if (part !== '') return page(missingPage(), 404);
  const usual: MailView = mail.html === null ? 'text' : 'html';
  const view = mailViews.find((known) => known === show) ?? usual;
  return page(mailPage(mail, view, archive.conversations().get(mail) ?? [mail]));
}

async function answerApi(
  archive: MailArchive,
  faults: FaultSwitch,
  request: IncomingMessage,
  name: string,
  query: MailQuery,
): Promise<Answer> {
  if (name === 'mails' && request.method === 'GET') return json(200, { mails: archive.find(query) });
  if (name === 'mails' && request.method === 'DELETE') {
    archive.clear();
    return json(200, { mails: [] });
  }
  if (name === 'faults' && request.method === 'POST') {
    // Pages from elsewhere can send forms without asking, but not this type.
    if (request.headers['content-type'] !== 'application/json') return json(415, { error: 'Send JSON.' });
    const parsed = faultRequest.safeParse(await readJsonBody(request));
    if (!parsed.success)
      return json(400, { error: parsed.error.issues.map(({ message }) => message).join('; ') });
    faults.set(parsed.data);
    return json(200, parsed.data);
  }
  return json(404, { error: 'There is nothing here.' });
}

function listOf(archive: MailArchive, query: MailQuery): string {
  const mails = archive.find(query);
  const conversations = archive.conversations();
  return listPage(
    mails.map((mail) => ({ mail, conversation: conversations.get(mail)?.length ?? 1 })),
    query,
  );
}

async function font(name: string): Promise<Answer> {
  const file = Object.hasOwn(fontFiles, name) ? fontFiles[name] : undefined;
  return file === undefined
    ? page(missingPage(), 404)
    : { status: 200, type: 'font/woff2', body: await readFont(file) };
}

function queryOf({ searchParams }: URL): MailQuery {
  return { to: searchParams.get('to') ?? undefined, subject: searchParams.get('subject') ?? undefined };
}

function page(body: string, status = 200): Answer {
  return { status, type: 'text/html', body };
}

function json(status: number, value: unknown): Answer {
  return { status, type: 'application/json', body: JSON.stringify(value) };
}

function send(response: ServerResponse, { status, type, body, policy = PAGE_POLICY }: Answer): void {
  response.statusCode = status;
  response.setHeader('Content-Type', type.startsWith('font/') ? type : `${type}; charset=utf-8`);
  response.setHeader('Content-Security-Policy', policy);
  response.setHeader('X-Content-Type-Options', 'nosniff');
  response.setHeader('Referrer-Policy', 'no-referrer');
  response.setHeader('Cache-Control', 'no-store');
  response.end(body);
}
