import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { script } from './scripts';
import { TemporaryProject } from './temporary-project';

const { unlessUnchanged } = script('builds');

describe('a build', () => {
  let project: TemporaryProject;
  const work = jest.fn(() => Promise.resolve());
  const build = { name: 'web', title: 'Building', sources: ['src', 'settings.json'], outputs: ['dist/web'] };
  const run = () => unlessUnchanged(build, project.folder, work);

  beforeEach(async () => {
    project = new TemporaryProject();
    project.write('src/app/page.ts', 'one');
    await run();
    work.mockClear();
  });
  afterEach(() => project.remove());

  it('is skipped when its sources are as they were', async () => {
    expect(await run()).toBe(false);
    expect(work).not.toHaveBeenCalled();
  });

  it('is skipped when only a spec has changed', async () => {
    project.write('src/app/page.spec.ts', 'a new test');
    expect(await run()).toBe(false);
  });

  it.each([
    ['a source has changed', () => project.write('src/app/page.ts', 'two')],
    ['a source was added', () => project.write('src/app/other.ts', '')],
    ['a setting that was missing has come', () => project.write('settings.json', '{}')],
    [
      'a source was renamed',
      () => {
        rmSync(join(project.folder, 'src/app/page.ts'));
        project.write('src/app/pages.ts', 'one');
      },
    ],
    ['what was built is gone', () => rmSync(join(project.folder, 'dist'), { recursive: true })],
  ])('is done again when %s', async (_condition, change) => {
    change();
    expect(await run()).toBe(true);
    expect(await run()).toBe(false);
  });

  it('is done again after it failed', async () => {
    project.write('src/app/page.ts', 'two');
    work.mockRejectedValueOnce(new Error('does not compile'));
    await expect(run()).rejects.toThrow('does not compile');
    expect(await run()).toBe(true);
  });
});
