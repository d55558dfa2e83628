import { createHash, randomBytes } from 'node:crypto';
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { Client, type DatabaseError } from 'pg';
import type { DataSource } from 'typeorm';
import { createDataSource } from '../../server/database/data-source';
import { migrate } from '../../server/database/migrate';
import { Transactions } from '../../server/database/transactions';

/** Any fixed number will do; every test process must use the same. */
const TEMPLATE_LOCK = 7_431_906;
/** PostgreSQL manual, appendix A. */
const INSUFFICIENT_PRIVILEGE = '42501';
const migrationFolder = join(__dirname, '../../server/database/migrations');
const templatePrefix = 'lampmeadow_template_';

/** A database of one spec file. */
export interface TestDatabase {
  /** For the role that owns the tables. */
  readonly url: string;
  /** For the role that the application works as; the owner's where the tests were given no other. */
  readonly applicationUrl: string;
  readonly dataSource: DataSource;
  readonly transactions: Transactions;
  /** Disconnects and removes the database. */
  drop(): Promise<void>;
}

/**
 * Makes a migrated database by cloning a template, which is far quicker than migrating one.
 *
 * @returns The database, connected.
 * @throws Error without `TEST_DATABASE_URL`, the database to make others from; `npm test` sets it.
 */
export async function createTestDatabase(): Promise<TestDatabase> {
  const template = templatePrefix + migrationHash();
  const name = `lampmeadow_test_${randomBytes(6).toString('hex')}`;
  await withTemplateLock(async (maintenance) => {
    await ensureTemplate(maintenance, template);
    await maintenance.query(`CREATE DATABASE ${name} TEMPLATE ${template}`);
  });
  return connected(name);
}

/**
 * Makes a database without tables.
 *
 * @returns The database, connected.
 * @throws Error without `TEST_DATABASE_URL`.
 */
export async function createEmptyDatabase(): Promise<TestDatabase> {
  const name = `lampmeadow_test_${randomBytes(6).toString('hex')}`;
  await withMaintenance((maintenance) => maintenance.query(`CREATE DATABASE ${name} TEMPLATE template0`));
  return connected(name);
}

async function connected(name: string): Promise<TestDatabase> {
  const url = urlOf(name);
  const dataSource = await createDataSource(url, 6).initialize();
  return {
    url,
    applicationUrl: urlOf(name, applicationMaintenanceUrl()),
    dataSource,
    transactions: new Transactions(dataSource),
    drop: async () => {
      await dataSource.destroy();
      await withMaintenance((maintenance) => dropDatabase(maintenance, name));
    },
  };
}

async function dropDatabase(maintenance: Client, name: string): Promise<void> {
  try {
    await maintenance.query(`DROP DATABASE ${name} WITH (FORCE)`);
  } catch (error) {
    if ((error as DatabaseError).code !== INSUFFICIENT_PRIVILEGE) throw error;
    // A vacuum of PostgreSQL's own can't be forced out by our role, but makes way by itself.
    await maintenance.query(`DROP DATABASE ${name}`);
  }
}

async function ensureTemplate(maintenance: Client, template: string): Promise<void> {
  const { rows } = await maintenance.query<{ datname: string }>(
    `SELECT datname FROM pg_database WHERE starts_with(datname, $1)`,
    [templatePrefix],
  );
  if (rows.some(({ datname }) => datname === template)) return;
  for (const { datname } of rows) await dropDatabase(maintenance, datname);
  // Renamed only once it is whole, so that a run cut off half-way leaves no template behind.
  const unfinished = `${templatePrefix}unfinished`;
  await maintenance.query(`CREATE DATABASE ${unfinished} TEMPLATE template0`);
  const dataSource = await createDataSource(urlOf(unfinished), 2).initialize();
  try {
    await migrate(dataSource, applicationRole());
  } finally {
    await dataSource.destroy();
  }
  await maintenance.query(`ALTER DATABASE ${unfinished} RENAME TO ${template}`);
}

function migrationHash(): string {
  const hash = createHash('sha256').update(applicationRole() ?? '');
  for (const file of readdirSync(migrationFolder).sort())
    hash.update(readFileSync(join(migrationFolder, file)));
  return hash.digest('hex').slice(0, 16);
}

/** One process at a time: a template can't be cloned while another one is connected to it. */
function withTemplateLock(work: (maintenance: Client) => Promise<void>): Promise<void> {
  return withMaintenance(async (maintenance) => {
    await maintenance.query('SELECT pg_advisory_lock($1)', [TEMPLATE_LOCK]);
    await work(maintenance); // The lock goes with the connection.
  });
}

async function withMaintenance<T>(work: (maintenance: Client) => Promise<T>): Promise<T> {
  const maintenance = new Client({ connectionString: maintenanceUrl() });
  await maintenance.connect();
  try {
    return await work(maintenance);
  } finally {
    await maintenance.end();
  }
}

function maintenanceUrl(): string {
  const url = process.env['TEST_DATABASE_URL'];
  if (url === undefined)
    throw new Error('Set TEST_DATABASE_URL to a database to make others from, or use npm test');
  return url;
}

function applicationMaintenanceUrl(): string {
  return process.env['TEST_APPLICATION_DATABASE_URL'] ?? maintenanceUrl();
}

/** Null where the application works as the owner. */
function applicationRole(): string | null {
  const application = new URL(applicationMaintenanceUrl()).username;
  return application === new URL(maintenanceUrl()).username ? null : application;
}

function urlOf(database: string, maintenance = maintenanceUrl()): string {
  const url = new URL(maintenance);
  url.pathname = `/${database}`;
  return url.toString();
}
