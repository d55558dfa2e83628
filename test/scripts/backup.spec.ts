import { execFile } from 'node:child_process';
import { createHash, randomBytes } from 'node:crypto';
import { mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { Client } from 'pg';
import { aSensor } from '../builders/devices';
import { aMember } from '../builders/people';
import { createTestDatabase, type TestDatabase } from '../database/test-database';

const run = promisify(execFile);
const scripts = join(__dirname, '../../server/scripts');

interface Finished {
  readonly code: number;
  readonly said: string;
}

/** Runs one of the two programs as a person would, with the database that it is to use. */
async function runProgram(name: string, url: string, ...args: string[]): Promise<Finished> {
  const env = { ...process.env, DATABASE_URL: url };
  const program = join(scripts, `${name}.js`);
  try {
    const { stdout, stderr } = await run(process.execPath, [program, ...args], { env });
    return { code: 0, said: stdout + stderr };
  } catch (error) {
    const { code, stdout, stderr } = error as { code: number; stdout: string; stderr: string };
    return { code, said: stdout + stderr };
  }
}

/** Everything that a database holds, each table's rows in order of their text. */
async function contentOf(url: string): Promise<Record<string, { count: number; hash: string }>> {
  const client = new Client(url);
  await client.connect();
  try {
    const tables = await client.query<{ name: string }>(
      `SELECT c.relname AS name FROM pg_class c WHERE c.relnamespace = 'public'::regnamespace AND c.relkind = 'r'`,
    );
    const content: Record<string, { count: number; hash: string }> = {};
    for (const { name } of tables.rows) {
      const { rows } = await client.query<{ row: string }>(
        `SELECT row_to_json(t)::text AS row FROM ${client.escapeIdentifier(name)} AS t ORDER BY 1`,
      );
      const hash = createHash('sha256').update(rows.map(({ row }) => row).join('\n'));
      content[name] = { count: rows.length, hash: hash.digest('hex') };
    }
    return content;
  } finally {
    await client.end();
  }
}

describe('a backup', () => {
  const folder = mkdtempSync(join(tmpdir(), 'lampmeadow-backup-'));
  const file = join(folder, 'room.tar');
  let database: TestDatabase;
  const emptyOnes: string[] = [];

  beforeAll(async () => {
    database = await createTestDatabase();
    const tx = database.dataSource.manager;
    await aMember(tx);
    // Values that a careless way through text would change.
    const values = [0, -0.1, 1 / 3, 21.300000000000001, 5e-324];
    const { id } = await aSensor(tx);
    await tx.query(`SELECT ensure_reading_partitions('2026-03-01', '2026-04-01')`);
    await tx.query(
      `INSERT INTO reading (sensor_id, at, value, flags)
       SELECT $1, timestamptz '2026-03-29 00:00Z' + n * interval '1 minute', value, 0
       FROM unnest($2::float8[]) WITH ORDINALITY AS given (value, n)`,
      [id, values],
    );
    await tx.query(`UPDATE person SET name = E'tab\\there | and ''quote'' \\\\N, übrigens'`);
    expect(await runProgram('backup', database.url, file)).toMatchObject({ code: 0 });
  });
  afterAll(async () => {
    await database.drop();
    await onServer(...emptyOnes.map((name) => `DROP DATABASE ${name}`));
    rmSync(folder, { recursive: true });
  });

  async function onServer(...statements: string[]): Promise<void> {
    const client = new Client(process.env['TEST_DATABASE_URL']);
    await client.connect();
    for (const statement of statements) await client.query(statement);
    await client.end();
  }

  async function emptyDatabase(): Promise<string> {
    const name = `lampmeadow_empty_${randomBytes(6).toString('hex')}`;
    await onServer(`CREATE DATABASE ${name}`);
    emptyOnes.push(name);
    const url = new URL(database.url);
    url.pathname = `/${name}`;
    return url.href;
  }

  it('brings every row of every table back into an empty database', async () => {
    const url = await emptyDatabase();
    expect(await runProgram('restore', url, file)).toMatchObject({ code: 0 });
    const restored = await contentOf(url);
    expect(restored).toEqual(await contentOf(database.url));
    expect(restored['person']?.count).toBe(1);
  });

  it('leaves only itself behind', () => {
    expect(readdirSync(folder)).toEqual(['room.tar']);
  });

  it('is not mixed with what a database holds, but takes its place when forced', async () => {
    const url = await emptyDatabase();
    await runProgram('restore', url, file);
    const change = new Client(url);
    await change.connect();
    await change.query('DELETE FROM person; CREATE TABLE another (id int)');
    await change.end();
    const before = await contentOf(url);

    const refused = await runProgram('restore', url, file);
    expect(refused).toMatchObject({ code: 1, said: expect.stringContaining('not empty') as string });
    expect(await contentOf(url)).toEqual(before);

    expect(await runProgram('restore', url, file, '--force')).toMatchObject({ code: 0 });
    expect(await contentOf(url)).toEqual(await contentOf(database.url));
  });

  it('is not restored under somebody who is connected', async () => {
    const url = await emptyDatabase();
    const somebody = new Client(url);
    await somebody.connect();
    const refused = await runProgram('restore', url, file);
    await somebody.end();
    expect(refused).toMatchObject({ code: 1, said: expect.stringContaining('in use') as string });
  });

  it('that was cut short leaves the database as it was, also when forced', async () => {
    const url = await emptyDatabase();
    await runProgram('restore', url, file);
    const before = await contentOf(url);
    const cut = join(folder, 'cut.tar');
    const whole = readFileSync(file);
    writeFileSync(cut, whole.subarray(0, Math.floor(whole.length * 0.6)));
    const refused = await runProgram('restore', url, cut, '--force');
    rmSync(cut);
    expect(refused).toMatchObject({ code: 1, said: expect.stringContaining('damaged') as string });
    expect(await contentOf(url)).toEqual(before);
  });

  it('whose rows are not what its manifest says is not restored', async () => {
    const url = await emptyDatabase();
    const changed = join(folder, 'changed.tar');
    const manifest = /"person": \{\s*"rows": 1/;
    const text = readFileSync(file, 'latin1');
    expect(text).toMatch(manifest);
    writeFileSync(
      changed,
      text.replace(manifest, (found) => found.replace(/1$/, '2')),
      'latin1',
    );
    const refused = await runProgram('restore', url, changed);
    rmSync(changed);
    expect(refused).toMatchObject({ code: 1, said: expect.stringMatching(/damaged: person/) as string });
    expect(await contentOf(url)).toEqual({});
  });

  it('is told from any other file', async () => {
    const other = join(folder, 'other.csv');
    writeFileSync(other, 'time,temperature\n');
    const refused = await runProgram('restore', await emptyDatabase(), other);
    rmSync(other);
    expect(refused).toMatchObject({ code: 1, said: expect.stringContaining('no backup') as string });
  });
});
