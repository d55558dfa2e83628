import { pino } from 'pino';
import { buildApp, type App } from '../../server/app';
import { readConfig } from '../../server/config';
import { createDataSource } from '../../server/database/data-source';

/**
 * Builds the application in a process of its own, by the environment that the test gave it. It ends with the test.
 *
 * @returns The application, at the instant that `TEST_NOW` names.
 */
export async function appOfProcess(): Promise<App> {
  process.on('disconnect', () => process.exit());
  const config = readConfig(process.env);
  const now = new Date(process.env['TEST_NOW'] ?? '');
  return buildApp({
    dataSource: await createDataSource(config.databaseUrl).initialize(),
    config,
    log: pino({ level: 'silent' }),
    now: () => now,
    webFolder: null,
  });
}
