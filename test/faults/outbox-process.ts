import { pino } from 'pino';
import { buildApp } from '../../server/app';
import { readConfig } from '../../server/config';
import { createDataSource } from '../../server/database/data-source';

/** A process that sends what is in the outbox until it is killed, or the test that set its clock goes. */
async function main(): Promise<void> {
  process.on('disconnect', () => process.exit());
  const config = readConfig(process.env);
  const dataSource = await createDataSource(config.databaseUrl).initialize();
  const now = new Date(process.env['TEST_NOW'] ?? '');
  const app = await buildApp({
    dataSource,
    config,
    log: pino({ level: 'silent' }),
    now: () => now,
    webFolder: null,
  });
  app.outbox?.start();
}

void main();
