import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { appOfProcess } from './app-process';

/** A process that takes readings until it is killed, and looks at them a second time when it is told to. */
async function main(): Promise<void> {
  const { express, services } = await appOfProcess();
  process.on('message', () => void services.secondLookJob.run());
  const server = createServer(express).listen(0, '127.0.0.1', () => {
    process.send?.({ port: (server.address() as AddressInfo).port });
  });
}

void main();
