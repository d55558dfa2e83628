import { join, resolve } from 'node:path';
import { script, type ChildProgram } from '../../scripts/scripts';

const { startProgram } = script('child-program');

/** Where `npm run build` puts everything. */
export const builtFolder = resolve(__dirname, '../../../dist');

const START_MS = 60_000;

/**
 * Starts one of the built programs as a process of its own.
 *
 * @param name - `server` or `simulator`.
 * @param folder - For its log.
 * @param settings - Environment variables beside this process's own.
 * @param args - Its command line.
 * @returns The program, ready.
 * @throws Error when it ends, or is not ready after a minute.
 */
export function startBuiltProgram(
  name: 'server' | 'simulator',
  folder: string,
  settings: Readonly<Record<string, string>>,
  args: string[] = [],
): Promise<ChildProgram> {
  return startProgram({
    title: `The ${name}`,
    script: join(builtFolder, name, 'main.js'),
    args,
    // As test, replies are checked against the contract.
    env: { ...process.env, NODE_ENV: 'test', LOG_LEVEL: 'warn', ...settings },
    logFile: join(folder, `${name}.log`),
    signal: AbortSignal.timeout(START_MS),
  });
}
