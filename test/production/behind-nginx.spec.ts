import { execFileSync } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request as plainRequest, type IncomingHttpHeaders, type IncomingMessage } from 'node:http';
import { request } from 'node:https';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { startBuiltProgram } from '../e2e/harness/built-program';
import { TestBrowser, signIn } from '../e2e/harness/test-browser';
import { createTestDatabase, type TestDatabase } from '../database/test-database';
import type { ChildProgram } from '../scripts/scripts';
import { freePort, readmeBlock, startProxy, type Proxy } from './proxy';

jest.setTimeout(180_000);

interface Answer {
  readonly status: number | undefined;
  readonly headers: IncomingHttpHeaders;
}

describe('the application behind nginx, as the README sets it up', () => {
  const folder = mkdtempSync(join(tmpdir(), 'lampmeadow-production-'));
  let database: TestDatabase;
  let server: ChildProgram;
  let proxy: Proxy;
  let address: string;

  beforeAll(async () => {
    database = await createTestDatabase();
    const [httpPort, httpsPort] = [await freePort(), await freePort()];
    address = `https://127.0.0.1:${httpsPort}`;
    server = await startBuiltProgram('server', folder, {
      NODE_ENV: 'production',
      DATABASE_URL: database.applicationUrl,
      DATABASE_OWNER_URL: database.url,
      PORT: '0',
      PUBLIC_URL: address,
      TRUST_PROXY_HOPS: '1',
      METRICS_PORT: '0',
      LAMPMEADOW_DEVICES_FILE: join(folder, 'devices.json'), // with it, the demonstration’s people can sign in
    });
    const application = Number(new URL(String(server.ready['address'])).port);
    proxy = await startProxy(folder, { httpPort, httpsPort, application });
  });

  afterAll(async () => {
    await proxy.stop();
    await server.stop();
    await database.drop();
    rmSync(folder, { recursive: true });
  });

  /** Calls the application through nginx; the certificate is nobody's. */
  async function call(
    method: string,
    path: string,
    { body, headers = {} }: { body?: object; headers?: Record<string, string> } = {},
  ): Promise<Answer> {
    const req = request(`${address}${path}`, {
      method,
      rejectUnauthorized: false,
      headers: { 'Content-Type': 'application/json', ...headers },
    });
    req.end(body === undefined ? undefined : JSON.stringify(body));
    const [res] = (await once(req, 'response')) as [IncomingMessage];
    res.resume();
    await once(res, 'end');
    return { status: res.statusCode, headers: res.headers };
  }

  const wrong = { email: 'maren@example.org', password: 'not the password' };

  it('leads from HTTP to HTTPS', async () => {
    const answer = await fetch(`http://127.0.0.1:${proxy.httpPort}/room`, { redirect: 'manual' });
    expect(answer.status).toBe(301);
    expect(answer.headers.get('location')).toBe(`${address}/room`);
  });

  it('keeps browsers with HTTPS, and its cookie out of scripts, plain HTTP and other sites', async () => {
    const page = await call('GET', '/sign-in');
    expect(page.headers['strict-transport-security']).toBe('max-age=31536000; includeSubDomains');

    const { status, headers } = await call('POST', '/api/v1/session', {
      body: { email: 'maren@example.org', password: 'lamps on at six' },
    });
    expect(status).toBe(200);
    expect(headers['set-cookie']?.[0]).toMatch(/; Path=\/; .*HttpOnly; Secure; SameSite=Lax$/);
  });

  it('counts failures to sign in by the address that nginx saw, whatever the client claims', async () => {
    const statuses: (number | undefined)[] = [];
    for (let attempt = 1; attempt <= 11; attempt += 1) {
      const headers = { 'X-Forwarded-For': `198.51.100.${attempt}` };
      statuses.push((await call('POST', '/api/v1/session', { body: wrong, headers })).status);
    }
    expect(statuses).toEqual([...Array<number>(10).fill(401), 429]);
  });

  it('is live in Chromium: pages, sign-in and the web socket all pass', async () => {
    const browser = await TestBrowser.start();
    try {
      const page = await browser.open({ trustsAnyCertificate: true });
      const answered = new Promise<string>((resolve) => {
        page.on('websocket', (socket) => {
          socket.once('framereceived', () => resolve(socket.url()));
        });
      });
      await signIn(page, address, 'tomas');
      expect(await answered).toMatch(/^wss:/);
      expect(browser.takeComplaints()).toEqual([]);
    } finally {
      await browser.stop();
    }
  });

  it('tells that it is ready, and its figures on loopback only', async () => {
    expect((await call('GET', '/api/v1/health/ready')).status).toBe(200);
    const figures = await (await fetch(String(server.ready['metrics']))).text();
    expect(figures).toMatch(/^lampmeadow_request_seconds_count\{endpoint="signIn",status="429"\} 1$/m);
    expect(figures).toMatch(/^lampmeadow_alerts_open 0$/m);
    expect((await call('GET', '/metrics')).headers['content-type']).toMatch(/^text\/html/); // the application’s own page
  });

  it('finishes the request in hand when it is told to stop', async () => {
    const other = await startBuiltProgram('server', join(folder, 'stopping'), {
      NODE_ENV: 'production',
      DATABASE_URL: database.applicationUrl,
      DATABASE_OWNER_URL: database.url,
      PORT: '0',
    });
    const body = JSON.stringify({ email: 'pia@example.org', password: 'lamps on at six' });
    const req = plainRequest(`${String(other.ready['address'])}/api/v1/session`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json', 'Content-Length': body.length, Expect: '100-continue' },
    });
    const answered = once(req, 'response') as Promise<[IncomingMessage]>;
    req.flushHeaders();
    await once(req, 'continue'); // the server has it in hand

    const stopped = other.stop();
    await refused(String(other.ready['address']));
    req.end(body);
    const [res] = await answered;
    res.resume();
    expect(res.statusCode).toBe(200);
    await stopped;
  });

  /** Waits until nothing listens at an address any more. */
  async function refused(url: string): Promise<void> {
    for (;;) {
      try {
        await fetch(`${url}/api/v1/health/live`);
      } catch {
        return;
      }
    }
  }
});

describe('the README’s systemd unit', () => {
  const analyse = process.env['SYSTEMD_ANALYZE_PATH'] ?? '/usr/bin/systemd-analyze';
  const unit = readmeBlock('ini');

  it('starts what the build makes', () => {
    expect(unit).toContain('ExecStart=/usr/bin/node dist/server/main.js\n');
  });

  it('is one that systemd takes', () => {
    const folder = mkdtempSync(join(tmpdir(), 'lampmeadow-unit-'));
    const file = join(folder, 'lampmeadow.service');
    writeFileSync(file, unit.replace('/usr/bin/node', process.execPath));
    try {
      expect(execFileSync(analyse, ['verify', file], { stdio: 'pipe' }).toString()).toBe('');
    } finally {
      rmSync(folder, { recursive: true });
    }
  });
});
