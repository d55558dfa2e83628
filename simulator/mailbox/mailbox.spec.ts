import { createTransport, type SendMailOptions } from 'nodemailer';
import type { ReceivedMail } from './mail';
import { startMailbox, type Mailbox } from './start-mailbox';

describe('the mailbox', () => {
  let mailbox: Mailbox;

  beforeEach(async () => {
    mailbox = await startMailbox({ smtpPort: 0, httpPort: 0 });
  });
  afterEach(() => mailbox.stop());

  async function send(mail: SendMailOptions): Promise<void> {
    const transport = createTransport({ host: '127.0.0.1', port: mailbox.smtpPort, secure: false });
    try {
      await transport.sendMail({
        from: 'Lampmeadow <lampmeadow@example.org>',
        to: 'grower@example.org',
        subject: 'A1 is too warm',
        text: 'Too warm since 13:54.',
        ...mail,
      });
    } finally {
      transport.close();
    }
  }

  async function mails(query = ''): Promise<ReceivedMail[]> {
    const answer = await fetch(`${mailbox.address}/api/mails${query}`);
    return ((await answer.json()) as { mails: ReceivedMail[] }).mails;
  }

  async function page(path: string): Promise<string> {
    return (await fetch(`${mailbox.address}${path}`)).text();
  }

  function setFault(body: unknown, type = 'application/json'): Promise<Response> {
    const headers = { 'content-type': type };
    return fetch(`${mailbox.address}/api/faults`, { method: 'POST', headers, body: JSON.stringify(body) });
  }

  it('takes a mail by SMTP and shows all of it, accents included', async () => {
    await send({
      subject: 'Zu trocken: 34 % – Regal B2',
      text: 'Luft zu trocken',
      html: '<p>Luft zu trocken</p>',
    });
    const [mail] = await mails();
    expect(mail).toMatchObject({
      from: 'Lampmeadow <lampmeadow@example.org>',
      to: ['grower@example.org'],
      subject: 'Zu trocken: 34 % – Regal B2',
      html: '<p>Luft zu trocken</p>',
    });
    expect(mail?.text).toContain('Luft zu trocken');
    expect(await page('/')).toContain('Zu trocken: 34 % – Regal B2');
  });

  it('lists the newest first, and finds by part of recipient and subject', async () => {
    await send({ to: 'keeper@example.org', subject: 'First' });
    await send({ to: 'helper@example.org', subject: 'Second' });
    expect((await mails()).map(({ subject }) => subject)).toEqual(['Second', 'First']);
    expect((await mails('?to=KEEPER')).map(({ subject }) => subject)).toEqual(['First']);
    expect((await mails('?subject=sec')).map(({ subject }) => subject)).toEqual(['Second']);
    expect(await page('/?to=nobody')).toContain('No mail fits');
  });

  it('lists who a blind copy was for', async () => {
    await send({ bcc: 'keeper@example.org' });
    expect((await mails())[0]?.to).toEqual(['grower@example.org', 'keeper@example.org']);
  });

  it('puts mails that answer one another into one conversation, and others not', async () => {
    await send({ subject: 'Opened', messageId: '<alert-1@example.org>' });
    await send({ subject: 'Other', messageId: '<alert-2@example.org>' });
    await send({ subject: 'Peak', messageId: '<peak-1@example.org>', inReplyTo: '<alert-1@example.org>' });
    await send({ subject: 'Cleared', references: ['<alert-1@example.org>', '<peak-1@example.org>'] });
    const [cleared] = await mails('?subject=Cleared');
    const shown = await page(`/mails/${cleared?.id}`);
    expect(shown.indexOf('Opened')).toBeGreaterThan(-1);
    expect(shown.indexOf('Opened')).toBeLessThan(shown.indexOf('Peak'));
    expect(shown).not.toContain('Other');
    expect(await page('/')).toContain('3 in conversation');
  });

  it('escapes everything that a sender chose', async () => {
    const evil = '<script>alert("x")</script>';
    await send({
      subject: evil,
      text: `${evil} https://example.org/?a=1&b=2`,
      from: `"${evil}" <a@example.org>`,
    });
    for (const path of ['/', '/mails/1', '/mails/1?show=source', `/?to=${encodeURIComponent(`">${evil}`)}`]) {
      expect(await page(path)).not.toContain('<script');
    }
    expect(await page('/mails/1')).toContain('href="https://example.org/?a=1&amp;b=2"');
  });

  it('shows an HTML mail only in a frame that may run and load nothing', async () => {
    await send({ html: '<p onclick="x()">Hello</p><script>x()</script>' });
    expect(await page('/mails/1')).toMatch(/<iframe\s+sandbox="allow-popups allow-popups-to-escape-sandbox"/);
    const body = await fetch(`${mailbox.address}/mails/1/body`);
    const policy = body.headers.get('content-security-policy') ?? '';
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain('sandbox allow-popups');
    expect(policy).not.toContain('allow-scripts');
    expect((await fetch(`${mailbox.address}/`)).headers.get('content-security-policy')).not.toContain(
      'unsafe',
    );
  });

  it('serves its style sheet and both fonts', async () => {
    for (const path of ['/mailbox.css', '/fonts/text.woff2', '/fonts/headings.woff2']) {
      expect((await fetch(`${mailbox.address}${path}`)).status).toBe(200);
    }
  });

  it('answers 404 for a mail that is not there', async () => {
    expect((await fetch(`${mailbox.address}/mails/7`)).status).toBe(404);
    expect((await fetch(`${mailbox.address}/mails/7/body`)).status).toBe(404);
  });

  it('keeps the last thousand mails', async () => {
    const transport = createTransport({
      host: '127.0.0.1',
      port: mailbox.smtpPort,
      pool: true,
      maxMessages: 2000,
    });
    const to = 'grower@example.org';
    await Promise.all(
      Array.from({ length: 1003 }, () => transport.sendMail({ from: to, to, subject: 'n', text: 'n' })),
    );
    transport.close();
    const kept = await mails();
    expect(kept).toHaveLength(1000);
    expect(kept.at(-1)?.id).toBe('4');
  });

  it('forgets all mails when told to', async () => {
    await send({});
    await fetch(`${mailbox.address}/api/mails`, { method: 'DELETE' });
    expect(await mails()).toEqual([]);
    expect(await page('/')).toContain('No mail yet');
  });

  it.each([
    ['refuse-temporarily', 451],
    ['refuse-permanently', 550],
  ])('told to %s answers %d as often as it was told', async (mode, code) => {
    expect((await setFault({ mode, count: 1 })).status).toBe(200);
    await expect(send({})).rejects.toMatchObject({ responseCode: code });
    await send({});
    expect(await mails()).toHaveLength(1);
  });

  it('told to drop the connection takes nothing and breaks off, until told otherwise', async () => {
    await setFault({ mode: 'drop-connection' });
    await expect(send({})).rejects.toThrow();
    await expect(send({})).rejects.toThrow();
    await setFault({ mode: 'none' });
    await send({});
    expect(await mails()).toHaveLength(1);
  });

  it('refuses faults that it does not know and those that a foreign page could send', async () => {
    expect((await setFault({ mode: 'explode' })).status).toBe(400);
    expect((await setFault({ mode: 'none' }, 'text/plain')).status).toBe(415);
  });
});
