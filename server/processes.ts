import cluster from 'node:cluster';
import { AggregatorRegistry } from 'prom-client';
import type { Config } from './config';
import { startMetricsServer } from './metrics/metrics-server';

/**
 * Serves from several processes that share one port. Nothing is kept in any of them that another would need: sessions,
 * rate limits, alert states and live events all go through PostgreSQL.
 *
 * @param config - Says how many.
 */
export async function startProcesses(config: Config): Promise<void> {
  // Live connections of one page must come back to one process; web sockets alone do that by themselves.
  cluster.schedulingPolicy = cluster.SCHED_RR;
  const first = cluster.fork();
  const ready = await new Promise<unknown>((resolve, reject) => {
    first.once('message', resolve);
    first.once('exit', (code) => reject(new Error(`A web process ended at once (${code}).`)));
  });
  const all = new AggregatorRegistry();
  const metrics =
    config.metricsPort === null
      ? null
      : await startMetricsServer(config.metricsPort, () => all.clusterMetrics());
  process.send?.(ready);
  for (let count = 1; count < config.webProcesses; count += 1) cluster.fork();
  let isStopping = false;
  cluster.on('exit', () => {
    if (!isStopping) cluster.fork();
    else if (Object.keys(cluster.workers ?? {}).length === 0) process.exit(0);
  });
  const end = (): void => {
    isStopping = true;
    void metrics?.stop();
    for (const worker of Object.values(cluster.workers ?? {})) worker?.process.kill('SIGTERM');
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, end);
  process.on('disconnect', end);
}
