import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import type { LoggerFile, LoggerFileDetail } from '@shared/contracts/logger-files';
import type { Account } from '@shared/contracts/people';
import { aPlacement, aSensor } from '../builders/devices';
import { aMember, aPerson, testPassword } from '../builders/people';
import { aRoom, aShelf, aWantedRange } from '../builders/rooms';
import { createTestDatabase, type TestDatabase } from '../database/test-database';
import { builtFolder } from '../e2e/harness/built-program';
import { eventually } from '../e2e/harness/eventually';

jest.setTimeout(300_000);

const ROWS = 60_000;
const START = Date.UTC(2026, 0, 1);
/** Where in a bring-in the server is killed: shares of the time that a whole one takes. */
const killPoints = [0.04, 0.21, 0.43, 0.66, 0.88];

// Invented: four months of a thermometer and a hygrometer, three minutes apart.
const file = [
  'time,temperature (°C),humidity (%)',
  ...Array.from({ length: ROWS }, (_, row) => {
    const at = new Date(START + row * 180_000).toISOString();
    return `${at},${(21 + 4 * Math.sin(row / 60)).toFixed(2)},${(60 + 9 * Math.cos(row / 80)).toFixed(1)}`;
  }),
  '',
].join('\n');

/** A server process with a grower signed in. */
interface Running {
  readonly child: ChildProcess;
  call<T>(method: string, path: string, body?: object | FormData): Promise<T>;
}

describe('a server killed while it brings a file in', () => {
  let database: TestDatabase;
  let email: string;
  let room: string;
  let sensors: string[];
  let server: Running;

  beforeAll(async () => {
    database = await createTestDatabase();
    const tx = database.dataSource.manager;
    const { id: roomId } = await aRoom(tx);
    const person = await aPerson(tx);
    await aMember(tx, { roomId, personId: person.id, role: 'grower' });
    const shelf = await aShelf(tx, { roomId });
    await aWantedRange(tx, { shelfId: shelf.id });
    const made = [
      await aSensor(tx, { roomId, quantity: 'airTemperature', expectedIntervalS: 180 }),
      await aSensor(tx, { roomId, quantity: 'relativeHumidity', expectedIntervalS: 180 }),
    ];
    for (const { id: sensorId } of made) await aPlacement(tx, { sensorId, shelfId: shelf.id });
    email = person.email;
    room = `/rooms/${roomId}`;
    sensors = made.map(({ id }) => id);
    server = await start();
  });
  afterAll(async () => {
    await kill(server);
    await database.drop();
  });

  async function start(): Promise<Running> {
    const child = fork(join(builtFolder, 'server/main.js'), {
      env: {
        ...process.env,
        DATABASE_URL: database.applicationUrl,
        DATABASE_OWNER_URL: database.url,
        PORT: '0',
        LAMPMEADOW_DEMO: 'off',
        LOG_LEVEL: 'fatal',
      },
    });
    const [{ address }] = (await once(child, 'message')) as [{ address: string }];
    const headers: Record<string, string> = {};
    const call = async <T>(method: string, path: string, body?: object | FormData): Promise<T> => {
      const isForm = body instanceof FormData;
      const answer = await fetch(`${address}/api/v1${path}`, {
        method,
        headers: { ...headers, ...(isForm ? {} : { 'Content-Type': 'application/json' }) },
        ...(body === undefined ? {} : { body: isForm ? body : JSON.stringify(body) }),
      });
      if (!answer.ok) throw new Error(`${method} ${path}: ${await answer.text()}`);
      headers['Cookie'] ??= answer.headers.getSetCookie()[0]?.split(';')[0] ?? '';
      return (await answer.json()) as T;
    };
    const account = await call<Account>('POST', '/session', { email, password: testPassword });
    headers['X-CSRF-Token'] = account.csrfToken;
    return { child, call };
  }

  async function kill({ child }: Running): Promise<void> {
    if (child.exitCode !== null || child.signalCode !== null) return;
    const ended = once(child, 'exit');
    child.kill('SIGKILL');
    await ended;
  }

  async function statusOf(fileId: string): Promise<string> {
    const rows: { status: string }[] = await database.dataSource.query(
      'SELECT status FROM logger_file WHERE id = $1',
      [fileId],
    );
    return rows[0]?.status ?? '';
  }

  async function stored(): Promise<Record<string, number>> {
    const [row]: Record<string, string>[] = await database.dataSource.query(
      `SELECT (SELECT count(*) FROM reading) AS readings, (SELECT count(*) FROM hourly_summary) AS hours,
         (SELECT count(*) FROM daily_summary) AS days, (SELECT count(*) FROM computed_hourly_summary) AS computed,
         (SELECT count(*) FROM alert) AS alerts, (SELECT count(*) FROM sensor_state) AS states`,
    );
    return Object.fromEntries(Object.entries(row ?? {}).map(([name, count]) => [name, Number(count)]));
  }

  async function uploaded(): Promise<string> {
    const form = new FormData();
    form.set('file', new Blob([file]), 'tower.csv');
    const detail = await server.call<LoggerFileDetail>('POST', `${room}/logger-files`, form);
    const series = detail.series.map(({ key }, index) => ({ key, sensorId: sensors[index] }));
    await server.call('PUT', `${room}/logger-files/${detail.id}/matches`, { series });
    return detail.id;
  }

  function begin(fileId: string, deed: string): Promise<LoggerFile> {
    return server.call('POST', `${room}/logger-files/${fileId}/${deed}`, {});
  }

  async function awaited(fileId: string, status: string): Promise<LoggerFile> {
    return eventually(async () => {
      const found = await server.call<LoggerFile>('GET', `${room}/logger-files/${fileId}`);
      expect(found.status).toBe(status);
      return found;
    }, 120_000);
  }

  it('has stored nothing, says so, and brings the same file in afterwards', async () => {
    const fileId = await uploaded();
    const begunAt = performance.now();
    await begin(fileId, 'bring-in');
    await awaited(fileId, 'broughtIn');
    const wholeMs = performance.now() - begunAt;
    const whole = await stored();
    expect(whole['readings']).toBe(2 * ROWS);
    await begin(fileId, 'take-out');
    await awaited(fileId, 'takenOut');
    const nothing = await stored();
    expect(nothing).toEqual({ readings: 0, hours: 0, days: 0, computed: 0, alerts: 0, states: 0 });

    for (const point of killPoints) {
      // A machine that has become quicker meanwhile may be done already; then it is tried a little earlier.
      for (let delayMs = point * wholeMs; ; delayMs /= 2) {
        await begin(fileId, 'bring-in');
        await sleep(delayMs);
        await kill(server);
        if ((await statusOf(fileId)) === 'bringingIn') break;
        server = await start();
        await begin(fileId, 'take-out');
        await awaited(fileId, 'takenOut');
      }
      server = await start();
      const failed = await awaited(fileId, 'failed');
      expect(failed.failure?.code).toBe('SERVER_STOPPED');
      expect(await stored()).toEqual(nothing);
    }

    await begin(fileId, 'bring-in');
    const file = await awaited(fileId, 'broughtIn');
    expect(file.result).toMatchObject({ read: 2 * ROWS, fresh: 2 * ROWS, rejected: 0 });
    expect(await stored()).toEqual(whole);
  });
});
