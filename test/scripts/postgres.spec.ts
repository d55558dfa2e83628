import { readFileSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { Client } from 'pg';
import { script, type Postgres } from './scripts';
import { TemporaryProject } from './temporary-project';

jest.setTimeout(60_000);

const { startPostgres } = script('postgres');
const { processesIn } = script('processes');

describe('the local PostgreSQL', () => {
  const project = new TemporaryProject();
  const home = join(project.folder, '.data/postgres/main');
  const cluster = join(home, 'cluster');
  const pidFile = join(cluster, 'postmaster.pid');
  const started: Postgres[] = [];
  const postmasterPid = () => Number(readFileSync(pidFile, 'utf8').split('\n')[0]);

  // One cluster for all, since making one takes most of the time.
  beforeAll(async () => (await start()).stop());
  afterEach(async () => {
    for (const postgres of started.splice(0)) await postgres.stop();
  });
  afterAll(() => project.remove());

  async function start(): Promise<Postgres> {
    const postgres = await startPostgres({ name: 'main', log: () => {}, projectFolder: project.folder });
    started.push(postgres);
    return postgres;
  }

  async function query(
    postgres: Postgres,
    sql: string,
    url = postgres.url('lampmeadow'),
  ): Promise<unknown[]> {
    const client = new Client(url);
    client.on('error', () => {}); // one test kills the server under it
    await client.connect();
    try {
      return (await client.query<Record<string, unknown>>(sql)).rows;
    } finally {
      await client.end();
    }
  }

  it('keeps its data for its owner alone', () => {
    expect(statSync(join(home, 'password')).mode & 0o777).toBe(0o600);
    expect(statSync(cluster).mode & 0o777).toBe(0o700);
  });

  it('writes safely unless told otherwise', async () => {
    const postgres = await start();
    expect(await query(postgres, 'SHOW fsync')).toEqual([{ fsync: 'on' }]);
  });

  it('lets its owner create databases, and is no superuser', async () => {
    const postgres = await start();
    await query(postgres, 'CREATE DATABASE another');
    expect(await query(postgres, 'SELECT 1 AS one', postgres.url('another'))).toEqual([{ one: 1 }]);
    const roles = await query(postgres, 'SELECT rolsuper FROM pg_roles WHERE rolname = current_user');
    expect(roles).toEqual([{ rolsuper: false }]);
  });

  it('gives the application a role that owns nothing', async () => {
    const postgres = await start();
    const url = postgres.applicationUrl('lampmeadow');
    expect(statSync(join(home, 'application-password')).mode & 0o777).toBe(0o600);
    expect(await query(postgres, 'SELECT current_user AS role', url)).toEqual([
      { role: 'lampmeadow_application' },
    ]);
    for (const sql of ['CREATE DATABASE theirs', 'CREATE ROLE theirs', 'CREATE TABLE theirs (id integer)']) {
      await expect(query(postgres, sql, url)).rejects.toMatchObject({ code: '42501' });
    }
  });

  it('lets its owner ask for a checkpoint, as benchmarks do', async () => {
    const postgres = await start();
    await expect(query(postgres, 'CHECKPOINT')).resolves.toEqual([]);
  });

  it('refuses a wrong password', async () => {
    const postgres = await start();
    const wrong = new URL(postgres.url('lampmeadow'));
    wrong.password = 'guess';
    await expect(query(postgres, 'SELECT 1', wrong.href)).rejects.toMatchObject({ code: '28P01' });
  });

  it('leaves no process when it is stopped', async () => {
    const postgres = await start();
    expect(processesIn('postgres', cluster)).not.toEqual([]);
    await postgres.stop();
    expect(processesIn('postgres', cluster)).toEqual([]);
  });

  it('is joined by a second user, and stops with the last of them', async () => {
    const first = await start();
    const second = await start();
    expect([first.owned, second.owned]).toEqual([true, false]);
    expect(second.port).toBe(first.port);

    await first.stop();
    expect(await query(second, 'SELECT 1 AS one')).toEqual([{ one: 1 }]);

    await second.stop();
    expect(processesIn('postgres', cluster)).toEqual([]);
  });

  it('takes another port when its usual one is taken', async () => {
    const usual = await start();
    await usual.stop();
    const squatter = createServer().listen(usual.port, '127.0.0.1');
    await new Promise((resolve) => squatter.once('listening', resolve));

    const postgres = await start();

    expect(postgres.port).toBeGreaterThan(usual.port);
    expect(await query(postgres, 'SELECT 1 AS one')).toEqual([{ one: 1 }]);
    squatter.close();
  });

  it('starts again with all that was committed after its first process was killed', async () => {
    const killed = await start();
    await query(killed, 'CREATE TABLE kept (value double precision)');
    await query(killed, 'INSERT INTO kept VALUES (0)');
    const session = new Client(killed.url('lampmeadow'));
    session.on('error', () => {});
    await session.connect();
    process.kill(postmasterPid(), 'SIGKILL');

    const postgres = await start();

    expect(postgres.owned).toBe(true);
    expect(await query(postgres, 'SELECT value FROM kept')).toEqual([{ value: 0 }]);
    await session.end();
  });

  it('starts although a file left behind names a process that is another program now', async () => {
    const before = await start();
    const lines = readFileSync(pidFile, 'utf8').split('\n');
    await before.stop();
    writeFileSync(pidFile, [String(process.pid), ...lines.slice(1)].join('\n'));

    const postgres = await start();

    expect(postgres.owned).toBe(true);
    expect(await query(postgres, 'SELECT 1 AS one')).toEqual([{ one: 1 }]);
  });
});
