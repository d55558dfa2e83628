import { appOfProcess } from './app-process';

/** A process that sends what is in the outbox until it is killed. */
async function main(): Promise<void> {
  (await appOfProcess()).outbox?.start();
}

void main();
