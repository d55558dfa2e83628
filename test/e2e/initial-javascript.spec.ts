import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { builtFolder } from './harness/built-program';
import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

const web = join(builtFolder, 'web/browser');
const MOST_BYTES = 250_000;

function scriptText(name: string): string {
  return readFileSync(join(web, name), 'utf8');
}

/** All together, compressed as the server compresses them [bytes]. */
function compressedSize(names: readonly string[]): number {
  return names.reduce((sum, name) => sum + gzipSync(scriptText(name)).length, 0);
}

describe('JavaScript that is loaded', () => {
  const journey = prepareJourney();

  it('before anything is drawn is at most 250 kB compressed', () => {
    const page = readFileSync(join(web, 'index.html'), 'utf8');
    const named = [...page.matchAll(/(?:src|href)="([^"]+\.js)"/g)].map(([, name]) => name ?? '');
    expect(named).toEqual(expect.arrayContaining([expect.stringMatching(/^main-/)]));
    expect(compressedSize(named)).toBeLessThanOrEqual(MOST_BYTES);
  });

  it('for signing in and the whole room draws no charts', async () => {
    const { application, page } = journey;
    const loaded = new Set<string>();
    page.on('response', (response) => {
      const path = new URL(response.url()).pathname;
      if (path.endsWith('.js')) loaded.add(path);
    });
    await signIn(page, application.address, 'oskar');
    await page.waitForLoadState('networkidle');

    expect(loaded.size).toBeGreaterThan(1);
    // The charts' packages name themselves in their code.
    expect([...loaded].filter((name) => /echarts|zrender/i.test(scriptText(name)))).toEqual([]);
  });
});
