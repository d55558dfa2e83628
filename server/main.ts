import cluster from 'node:cluster';
import { join } from 'node:path';
import { setFlagsFromString } from 'node:v8';
import { pino } from 'pino';
import type { AddressInfo } from 'node:net';
import { buildApp, loggedError, type App } from './app';
import { systemClock } from './clock';
import { readConfig, type Config } from './config';
import { createDataSource } from './database/data-source';
import { migrate } from './database/migrate';
import { Transactions } from './database/transactions';
import { demonstrationNotes, fillDemonstration } from './demonstration/fill-demonstration';
import { startJobs } from './jobs/start-jobs';
import { startMetricsServer } from './metrics/metrics-server';
import { startProcesses } from './processes';

// Left alone, V8 lets garbage pile up to four times what is alive while a large file is brought in; half as much again
// costs no time that could be measured, and keeps memory the same however long the file is.
setFlagsFromString('--heap-growing-percent=50');

const webFolder = join(__dirname, '../web/browser');

/** Starts what the settings name, says so to whoever started it, and stops cleanly. */
async function main(): Promise<void> {
  const config = readConfig(process.env);
  if (config.webProcesses > 1 && cluster.isPrimary) {
    await startProcesses(config);
    return;
  }
  const stop = await serve(config);
  let stopping: Promise<void> | null = null;
  const end = (): void => {
    stopping ??= stop().finally(() => process.exit(0));
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, end);
  process.on('disconnect', end);
}

/** Connects, migrates, fills and listens; the answer stops it all. */
async function serve(config: Config): Promise<() => Promise<void>> {
  const log = pino({ level: config.logLevel, serializers: { err: loggedError } });
  if (config.databaseOwnerUrl !== null) await migrateAsOwner(config.databaseOwnerUrl, config.databaseUrl);
  const dataSource = await createDataSource(config.databaseUrl).initialize();
  if (config.databaseOwnerUrl === null) await migrate(dataSource);
  const app = await buildApp({ dataSource, config, log, now: systemClock, webFolder });
  const room = await fillDemonstration(
    new Transactions(dataSource),
    app.services.planning,
    config,
    systemClock,
  );
  app.services.setDemonstrationRoom(room);
  const address = await listen(app, config);
  app.setPublicUrl(address);
  // Several processes are told of by the first one, in processes.ts.
  const metrics =
    config.metricsPort === null || cluster.isWorker
      ? null
      : await startMetricsServer(config.metricsPort, () => app.metrics.text());
  const stopJobs = startJobs(app, new Transactions(dataSource), log);
  log.info({ address }, 'listening');
  process.send?.({ ready: true, address, metrics: metrics?.address, notes: notesFor(config, room !== null) });
  return async () => {
    await stopJobs();
    await app.close();
    await metrics?.stop();
    await dataSource.destroy();
  };
}

/** The owner's connections end before the application's begin: whoever takes the server over can't change tables. */
async function migrateAsOwner(ownerUrl: string, applicationUrl: string): Promise<void> {
  const owner = await createDataSource(ownerUrl, 2).initialize();
  try {
    const [ownerRole, role] = [ownerUrl, applicationUrl].map((url) =>
      decodeURIComponent(new URL(url).username),
    );
    await migrate(owner, role === undefined || role === ownerRole ? null : role);
  } finally {
    await owner.destroy();
  }
}

function notesFor(config: Config, hasDemonstration: boolean): string[] {
  return [
    ...(hasDemonstration ? demonstrationNotes() : []),
    ...(config.mailboxUrl === null
      ? []
      : ['', `Mails that go out arrive in the local mailbox at ${config.mailboxUrl}`]),
  ];
}

function listen({ http }: App, config: Config): Promise<string> {
  return new Promise((resolve, reject) => {
    http.once('error', reject);
    http.listen(config.port, config.host, () => {
      const { port } = http.address() as AddressInfo;
      const host = config.host.includes(':') ? `[${config.host}]` : config.host;
      resolve(`http://${host}:${port}`);
    });
  });
}

main().catch((error: unknown) => {
  const problem = error instanceof Error ? error.message : String(error);
  process.exitCode = 1;
  console.error(problem);
  if (process.send === undefined) process.exit();
  else process.send({ problem }, () => process.exit());
});
