import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { script } from './scripts';
import { TemporaryProject } from './temporary-project';

jest.setTimeout(60_000);

const { processesIn } = script('processes');

describe('npm start', () => {
  const project = new TemporaryProject();
  const cluster = join(project.folder, '.data/postgres/main/cluster');

  const running: ChildProcess[] = [];

  beforeAll(() => {
    project.copyScripts();
    project.writePrograms('made');
  });
  afterEach(() => running.forEach((npm) => npm.kill('SIGTERM')));
  afterAll(() => project.remove());

  function npmStart(env: NodeJS.ProcessEnv = {}): { npm: ChildProcess; said: () => string } {
    const unset = { DATABASE_URL: '', DATABASE_OWNER_URL: '', SMTP_URL: '', PORT: '', LAMPMEADOW_DEMO: '' };
    const npm = spawn('npm', ['start'], { cwd: project.folder, env: { ...process.env, ...unset, ...env } });
    running.push(npm);
    let output = '';
    npm.stdout.on('data', (chunk: Buffer) => (output += chunk.toString()));
    npm.stderr.on('data', (chunk: Buffer) => (output += chunk.toString()));
    return { npm, said: () => output };
  }

  async function until(isSo: () => boolean): Promise<void> {
    for (const deadline = Date.now() + 50_000; Date.now() < deadline; await sleep(20)) {
      if (isSo()) return;
    }
    throw new Error(`waited in vain for ${isSo.toString()}`);
  }

  it('builds, starts everything, refuses a second one beside it, and ends with a killed npm', async () => {
    const first = npmStart();
    await until(() => first.said().includes('Ctrl-C'));
    expect(first.said()).toMatch(
      /Building the server[^]*Building the pages[^]*Starting the server[^]*Lampmeadow is at http:/,
    );
    // The server was given our database, for the application and for its owner.
    expect(first.said()).toMatch(/postgres:\/\/lampmeadow_application:\w+@127\.0\.0\.1:\d+\/lampmeadow\n/);
    expect(first.said()).toMatch(/postgres:\/\/lampmeadow:\w+@127\.0\.0\.1:\d+\/lampmeadow\n/);

    const second = npmStart();
    const [code] = (await once(second.npm, 'close')) as [number];
    expect(code).toBe(1);
    expect(second.said()).toMatch(/runs already at http:\/\/127\.0\.0\.1:\d+ from this folder/);

    first.npm.kill('SIGKILL');
    await until(() => processesIn('postgres', cluster).length === 0);
    expect(project.noted().slice(-3)).toEqual(['simulator ends', 'server ends', 'simulator/mailbox ends']);
  });

  it('skips what has been built before, and ends on SIGTERM', async () => {
    const { npm, said } = npmStart();
    await until(() => said().includes('Ctrl-C'));
    expect(said()).not.toContain('Building');
    npm.kill('SIGTERM');
    await until(() => processesIn('postgres', cluster).length === 0);
    expect(project.noted().slice(-3)).toEqual(['simulator ends', 'server ends', 'simulator/mailbox ends']);
  });

  it('uses the database that DATABASE_URL names', async () => {
    const { npm, said } = npmStart({ DATABASE_URL: 'postgres://elsewhere.example/rooms' });
    await until(() => said().includes('Ctrl-C'));
    expect(said()).toContain('postgres://elsewhere.example/rooms');
    expect(processesIn('postgres', cluster)).toEqual([]);
    npm.kill('SIGTERM');
    await once(npm, 'close');
  });
});
