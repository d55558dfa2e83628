import type { Express } from 'express';
import { pino } from 'pino';
import { buildApp, type App } from '../../server/app';
import { readConfig } from '../../server/config';
import { createDataSource } from '../../server/database/data-source';
import type { Tx } from '../../server/database/transactions';
import { createTestDatabase, type TestDatabase } from '../database/test-database';

// Passwords are slow to hash on purpose, and tests share the machine.
jest.setTimeout(60_000);

/**
 * The application over a database of its own, with a clock that the test sets. It works as its own role, builders as the
 * owner of the tables.
 */
export interface TestApplication {
  readonly express: Express;
  readonly app: App;
  readonly database: TestDatabase;
  /** For the builders. */
  readonly tx: Tx;
  /** What the application takes for now; the start of a day in spring unless a test sets it. */
  now: Date;
  stop(): Promise<void>;
}

/**
 * Builds the whole application for one spec file. Callers' addresses are taken from `X-Forwarded-For`, and replies are
 * checked against the contract.
 *
 * @param settings - Environment variables beside the usual ones.
 * @returns The application, listening to nothing.
 */
export async function startTestApplication(
  settings: Readonly<Record<string, string>> = {},
): Promise<TestApplication> {
  const database = await createTestDatabase();
  const config = readConfig({
    DATABASE_URL: database.applicationUrl,
    NODE_ENV: 'test',
    TRUST_PROXY_HOPS: '1',
    SESSION_SECRET: 'no secret at all, only for the tests',
    ...settings,
  });
  const dataSource = await createDataSource(config.databaseUrl, 6).initialize();
  const application = { now: new Date('2026-04-15T10:00:00Z') };
  const app = await buildApp({
    dataSource,
    config,
    log: pino({ level: 'silent' }),
    now: () => application.now,
    webFolder: null,
  });
  return Object.assign(application, {
    express: app.express,
    app,
    database,
    tx: database.dataSource.manager,
    stop: async () => {
      await app.close();
      await dataSource.destroy();
      await database.drop();
    },
  });
}
