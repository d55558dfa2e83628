import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { script } from './scripts';
import { TemporaryProject } from './temporary-project';

const { claim } = script('exclusive-claim');
const { isSupportedNode } = script('node-version');
const { matchesLock } = script('packages');
const { needsOf } = script('test-selection');

describe('the Node.js version', () => {
  it.each(['20.19.0', '20.20.2', '22.12.0', '23.0.0', '24.1.0'])('%s is supported', (version) => {
    expect(isSupportedNode(version)).toBe(true);
  });

  it.each(['18.20.4', '20.18.9', '21.7.3', '22.11.0'])('%s is too old', (version) => {
    expect(isSupportedNode(version)).toBe(false);
  });
});

describe('installed packages', () => {
  const locked = {
    '': {},
    'node_modules/a': { version: '1.0.0' },
    'node_modules/b': { version: '2.0.0', optional: true },
  };
  const a = { version: '1.0.0' };
  const b = { version: '2.0.0' };

  it.each([
    ['are all there', { 'node_modules/a': a, 'node_modules/b': b }, true],
    ['lack one for another machine', { 'node_modules/a': a }, true],
    ['lack one', { 'node_modules/b': b }, false],
    ['hold another version', { 'node_modules/a': b, 'node_modules/b': b }, false],
    ['hold one too many', { 'node_modules/a': a, 'node_modules/c': a }, false],
  ])('that %s match the lock file or not', (_condition, installed, matches) => {
    expect(matchesLock(locked, installed)).toBe(matches);
  });
});

describe('what tests need', () => {
  const nothing = { database: false, builds: false, browser: false, proxy: false };
  const journey = { database: true, builds: true, browser: true, proxy: false };

  it.each([
    ['pure code', ['shared/climate/psychrometrics.spec.ts'], nothing],
    ['pages', ['src/app/ui/chart.spec.ts'], nothing],
    ['the server', ['shared/a.spec.ts', 'server/b.spec.ts'], { ...nothing, database: true }],
    ['faults', ['test/faults/power-cut.spec.ts'], { ...journey, browser: false }],
    ['journeys', ['test/e2e/sow.spec.ts'], journey],
    ['what runs for real', ['test/production/behind-nginx.spec.ts'], { ...journey, proxy: true }],
    ['nothing', [], nothing],
  ])('follows from where they lie, for %s', (_what, paths, needs) => {
    expect(needsOf(paths)).toEqual(needs);
  });
});

describe('a claim', () => {
  let project: TemporaryProject;
  let path: string;
  beforeEach(() => {
    project = new TemporaryProject();
    path = join(project.folder, 'claim');
  });
  afterEach(() => project.remove());

  it('is refused while another holds it, with the note that was left', () => {
    const first = claim(path);
    first.claim?.describe('http://127.0.0.1:1');
    expect(claim(path)).toMatchObject({
      claim: null,
      holder: { pid: process.pid, note: 'http://127.0.0.1:1' },
    });
  });

  it('is free again when it is released', () => {
    claim(path).claim?.release();
    expect(claim(path).claim).not.toBeNull();
  });

  it('is free when its holder has ended without releasing it', async () => {
    const holder = spawn(process.execPath, ['-e', '']);
    await once(holder, 'close');
    writeFileSync(path, JSON.stringify({ pid: holder.pid, startedAt: '1' }));
    expect(claim(path).claim).not.toBeNull();
  });

  it("is free when its holder's number belongs to a later process", () => {
    writeFileSync(path, JSON.stringify({ pid: process.pid, startedAt: '1' }));
    expect(claim(path).claim).not.toBeNull();
  });

  it('is free when a crash of the machine has left its file empty', () => {
    writeFileSync(path, '');
    expect(claim(path).claim).not.toBeNull();
  });
});
