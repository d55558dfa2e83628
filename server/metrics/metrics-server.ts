import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Registry } from 'prom-client';

/** Where figures are served. */
export interface MetricsServer {
  readonly address: string;
  stop(): Promise<void>;
}

/**
 * Serves figures at `/metrics`, on loopback only: they are for a collector on this machine, and not for the web.
 *
 * @param port - 0 takes a free one.
 * @param text - Tells them.
 * @returns The server, listening.
 * @throws Error when the port is taken.
 */
export async function startMetricsServer(port: number, text: () => Promise<string>): Promise<MetricsServer> {
  const server = createServer((req, res) => {
    if (req.method !== 'GET' || req.url !== '/metrics') {
      res.writeHead(404).end();
      return;
    }
    text().then(
      (figures) => res.writeHead(200, { 'Content-Type': Registry.PROMETHEUS_CONTENT_TYPE }).end(figures),
      // The database is away; the collector sees a gap, which is the truth.
      () => res.writeHead(503).end(),
    );
  });
  await listening(server, port);
  const { port: taken } = server.address() as AddressInfo;
  return {
    address: `http://127.0.0.1:${taken}/metrics`,
    stop: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

function listening(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });
}
