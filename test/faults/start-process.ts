import { spawn, type ChildProcess } from 'node:child_process';
import { join } from 'node:path';
import type { TestApplication } from '../api/test-application';

/**
 * Starts one of the processes beside this file on a test's database, with the test's clock standing still.
 *
 * @param name - `outbox-process` or `server-process`.
 * @param application - Whose database and clock.
 * @param settings - Environment variables beside those.
 * @returns The process, with a channel for messages.
 */
export function startProcess(
  name: 'outbox-process' | 'server-process',
  { database, now }: Pick<TestApplication, 'database' | 'now'>,
  settings: Readonly<Record<string, string>>,
): ChildProcess {
  return spawn(process.execPath, [join(__dirname, 'run-typescript.js'), join(__dirname, `${name}.ts`)], {
    env: {
      ...process.env,
      DATABASE_URL: database.url,
      NODE_ENV: 'test',
      PUBLIC_URL: 'http://127.0.0.1:4280',
      SESSION_SECRET: 'no secret at all, only for the tests',
      TEST_NOW: now.toISOString(),
      ...settings,
    },
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
  });
}
