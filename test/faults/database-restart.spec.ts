import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Client } from 'pg';
import { io, type Socket } from 'socket.io-client';
import type { SentReading } from '@shared/contracts/devices';
import type { LiveEvents, LiveRequests } from '@shared/contracts/live-events';
import { signIn } from '@shared/contracts/people';
import { problem } from '@shared/contracts/problem';
import { simulatedRoom, type SimulatedRoom } from '@shared/contracts/simulation';
import { demonstrationPassword, demonstrationPeople } from '../../server/demonstration/demonstration-content';
import { DeviceLink } from '../../simulator/devices/device-link';
import { startBuiltProgram } from '../e2e/harness/built-program';
import { eventually } from '../e2e/harness/eventually';
import { script, type ChildProgram, type Postgres } from '../scripts/scripts';
import { TemporaryProject } from '../scripts/temporary-project';

jest.setTimeout(180_000);

const { startPostgres } = script('postgres');

const EVERY_MS = 20;
const EACH_MS = 10_000;
const LEAD_MS = 24 * 3_600_000;

/** Reading number n of the test: ten seconds and a hundredth of a degree after the one before, from zero on. */
function numbered(sensor: string, n: number, firstAt: number): SentReading {
  return { sensor, at: new Date(firstAt + n * EACH_MS).toISOString(), value: n / 100 };
}

describe('a database that goes away under the running server and comes back', () => {
  const project = new TemporaryProject();
  let postgres: Postgres;
  let server: ChildProgram;
  let room: SimulatedRoom;
  let address: string;
  let cookie: string;

  beforeAll(async () => {
    postgres = await startDatabase();
    const devicesFile = join(project.folder, 'devices.json');
    server = await startBuiltProgram('server', project.folder, {
      DATABASE_URL: postgres.url('lampmeadow'),
      PORT: '0',
      LAMPMEADOW_DEVICES_FILE: devicesFile,
      LOG_LEVEL: 'fatal', // what it would log here is what the test does to it
    });
    address = String(server.ready['address']);
    room = simulatedRoom.parse(JSON.parse(readFileSync(devicesFile, 'utf8')));
    cookie = await signedInCookie();
  });
  afterAll(async () => {
    await server.stop();
    await postgres.stop();
    project.remove();
  });

  // The benchmarks' port, which no other test takes while the database is away.
  function startDatabase(): Promise<Postgres> {
    return startPostgres({ name: 'bench', log: () => {}, projectFolder: project.folder });
  }

  async function signedInCookie(): Promise<string> {
    const answer = await fetch(`${address}/api/v1${signIn.path}`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify({ email: demonstrationPeople[0]?.email, password: demonstrationPassword }),
    });
    expect(answer.status).toBe(200);
    return answer.headers.getSetCookie()[0]?.split(';')[0] ?? '';
  }

  function fetchBoard(): Promise<Response> {
    return fetch(`${address}/api/v1/rooms/${room.roomId}/board`, { headers: { Cookie: cookie } });
  }

  /** Of the device on the upper shelves of the first rack. */
  function token(): string {
    return room.devices[0]?.token ?? '';
  }

  async function kill(): Promise<void> {
    const pidFile = join(project.folder, '.data/postgres/bench/cluster/postmaster.pid');
    process.kill(Number(readFileSync(pidFile, 'utf8').split('\n')[0]), 'SIGKILL');
    await postgres.stop(); // No longer ours.
  }

  function postReading(): Promise<Response> {
    return fetch(`${address}/api/v1/devices/readings`, {
      method: 'POST',
      headers: { Authorization: `Bearer ${token()}`, 'Content-Type': 'application/senml+json' },
      body: JSON.stringify([{ n: 'a1-humidity', v: 50 }]),
    });
  }

  async function watchRoom(): Promise<Socket<LiveEvents, LiveRequests>> {
    const socket: Socket<LiveEvents, LiveRequests> = io(`${address}/live`, {
      extraHeaders: { Cookie: cookie },
      transports: ['websocket'],
      forceNew: true,
    });
    const watch = () => socket.timeout(10_000).emitWithAck('room:watch', { roomId: room.roomId });
    expect(await watch()).toEqual({ ok: true });
    socket.io.on('reconnect', () => void watch());
    return socket;
  }

  async function rowsOf<Row extends object>(sql: string, sensor: string): Promise<Row[]> {
    const client = new Client(postgres.url('lampmeadow'));
    await client.connect();
    try {
      return (await client.query<Row>(sql, [sensor])).rows;
    } finally {
      await client.end();
    }
  }

  async function storedValues(sensor: string): Promise<number[]> {
    const rows = await rowsOf<{ value: number }>(
      `SELECT value FROM reading JOIN sensor ON sensor.id = reading.sensor_id
       WHERE sensor.key = $1 ORDER BY at`,
      sensor,
    );
    return rows.map(({ value }) => value);
  }

  /** What the cold of the readings comes to, and when that began: after which reading. */
  async function alertsOf(sensor: string, firstAt: number): Promise<(readonly [string, number])[]> {
    const rows = await rowsOf<{ kind: string; began_at: Date }>(
      `SELECT kind, began_at FROM alert JOIN sensor ON sensor.id = alert.sensor_id
       WHERE sensor.key = $1 AND kind IN ('belowRange', 'dangerLow') ORDER BY kind`,
      sensor,
    );
    return rows.map((row) => [row.kind, (row.began_at.getTime() - firstAt) / EACH_MS] as const);
  }

  it.each([
    ['stopped', 'a1-air', () => postgres.stop()],
    ['killed', 'a2-air', kill],
  ])(
    '%s, is said to be away; no reading or alert is lost or doubled, no session ends',
    async (_how, sensor, end) => {
      const firstAt = Date.now() - LEAD_MS;
      const device = new DeviceLink({
        url: address,
        token: token(),
        name: 'Test device',
        log: () => {},
        acknowledgeWithinMs: 5_000,
        retryAfterMs: 200,
      });
      let measured = 0;
      const measuring = setInterval(() => device.send([numbered(sensor, measured++, firstAt)]), EVERY_MS);
      const live = await watchRoom();
      let told = 0;
      live.on('shelf:measured', () => (told += 1));
      try {
        await eventually(() => expect(told).toBeGreaterThan(0));

        await end();
        for (const ask of [fetchBoard, postReading]) {
          const answer = await eventually(async () => {
            const tried = await ask();
            expect(tried.status).toBe(503);
            return tried;
          });
          expect(answer.headers.get('Content-Type')).toContain('application/problem+json');
          expect(answer.headers.get('Retry-After')).not.toBeNull();
          expect(problem.parse(await answer.json())).toMatchObject({ code: 'DATABASE_AWAY' });
        }
        const measuredBefore = measured;
        await eventually(() => expect(device.tally.waiting).toBeGreaterThan(50));
        const toldBefore = told;
        const port = postgres.port;
        postgres = await startDatabase();
        expect(postgres.port).toBe(port);

        await eventually(async () => expect((await fetchBoard()).status).toBe(200));
        await eventually(() => expect(told).toBeGreaterThan(toldBefore));
        expect(measured).toBeGreaterThan(measuredBefore);
        clearInterval(measuring);
        await eventually(() => expect(device.tally.waiting).toBe(0));
      } finally {
        clearInterval(measuring);
        live.disconnect();
        device.stop();
      }

      expect(device.tally).toMatchObject({ refused: 0, dropped: 0 });
      expect(await storedValues(sensor)).toEqual(Array.from({ length: measured }, (_, n) => n / 100));
      expect(await alertsOf(sensor, firstAt)).toEqual([
        ['belowRange', 0],
        ['dangerLow', 0],
      ]);
    },
  );
});
