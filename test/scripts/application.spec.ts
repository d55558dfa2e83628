import { createServer } from 'node:net';
import type { AddressInfo } from 'node:net';
import { script, type Application } from './scripts';
import { TemporaryProject } from './temporary-project';

jest.setTimeout(30_000);

const { startApplication } = script('application');

describe('the application', () => {
  let project: TemporaryProject;
  let stops: (() => Promise<void>)[];
  let stopping: AbortController;

  beforeEach(() => {
    project = new TemporaryProject();
    project.writePrograms('dist');
    stops = [];
    stopping = new AbortController();
  });
  afterEach(async () => {
    await stop();
    project.remove();
  });

  const start = (env: NodeJS.ProcessEnv = {}): Promise<Application> =>
    startApplication({
      folder: project.folder,
      env: { ...env },
      log: () => {},
      signal: stopping.signal,
      defer: (each) => stops.unshift(each),
    });
  const stop = async (): Promise<void> => {
    for (const each of stops.splice(0)) await each();
  };

  it('starts the mailbox, the server, the simulator, and stops them in reverse', async () => {
    await start();
    await stop();
    expect(project.noted()).toEqual([
      'simulator/mailbox starts',
      'server starts',
      'simulator starts',
      'simulator ends',
      'server ends',
      'simulator/mailbox ends',
    ]);
  });

  it('tells the server where the mailbox takes mail and shows it', async () => {
    const { notes } = await start();
    expect(notes[0]).toMatch(/^smtp:\/\/127\.0\.0\.1:\d+$/);
    expect(notes[1]).toMatch(/^http:\/\/127\.0\.0\.1:\d+$/);
  });

  it('leaves the mailbox out when SMTP_URL names a mail server', async () => {
    const { notes } = await start({ SMTP_URL: 'smtp://mail.example' });
    expect(notes[0]).toBe('smtp://mail.example');
    expect(project.noted()).toEqual(['server starts', 'simulator starts']);
  });

  it('leaves the simulator out when the demonstration is off', async () => {
    await start({ LAMPMEADOW_DEMO: 'off' });
    expect(project.noted()).toEqual(['simulator/mailbox starts', 'server starts']);
  });

  it('passes on why the server does not start', async () => {
    project.write(
      'dist/server/main.js',
      `process.send({ problem: 'PORT is no port.' }, () => process.exit(1));`,
    );
    await expect(start()).rejects.toThrow(/^PORT is no port\.$/);
  });

  it('shows the last words of a server that fails without a reason', async () => {
    project.write('dist/server/main.js', `throw new Error('broken');`);
    await expect(start()).rejects.toThrow('broken');
  });

  it('reports a program that ends later', async () => {
    project.write('dist/simulator/main.js', `process.send({ ready: true }, () => process.exit(1));`);
    const { failed } = await start();
    await expect(failed).rejects.toThrow('The simulator has stopped unexpectedly');
  });

  it('gives up a program that is not ready when it is stopped', async () => {
    project.write('dist/server/main.js', `setInterval(() => {}, 1000);`);
    const starting = start();
    stopping.abort();
    await expect(starting).rejects.toMatchObject({ name: 'AbortError' });
  });

  it('refuses a port that PORT names and another program holds', async () => {
    const squatter = createServer().listen(0, '127.0.0.1');
    await new Promise((resolve) => squatter.once('listening', resolve));
    const { port } = squatter.address() as AddressInfo;
    await expect(start({ PORT: String(port) })).rejects.toThrow(`Port ${port}, which PORT names, is taken`);
    squatter.close();
  });

  it.each(['0', '65536', 'http', '80.5'])('refuses the port %s', async (port) => {
    await expect(start({ PORT: port })).rejects.toThrow('PORT must be a port from 1 to 65535');
  });
});
