import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import type { Response } from 'playwright-core';
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

  it.each([
    ['sign-in', '/sign-in', false],
    ['the whole room', '/room', true],
  ])('for %s is at most 250 kB as sent, and draws no charts', async (_screen, path, isSignedIn) => {
    const { application, page } = journey;
    if (isSignedIn) await signIn(page, application.address, 'oskar');
    const developer = await page.context().newCDPSession(page);
    await developer.send('Network.setCacheDisabled', { cacheDisabled: true });
    const sent = new Map<string, Promise<number>>();
    const note = (response: Response): void => {
      const { pathname } = new URL(response.url());
      if (!pathname.endsWith('.js')) return;
      sent.set(
        pathname,
        response.finished().then(async () => (await response.request().sizes()).responseBodySize),
      );
    };
    page.on('response', note);
    await page.goto(application.address + path);
    await page.waitForLoadState('networkidle');
    page.off('response', note);

    const sizes = await Promise.all(sent.values());
    expect(sizes.length).toBeGreaterThan(1);
    expect(sizes.reduce((sum, size) => sum + size)).toBeLessThanOrEqual(MOST_BYTES);
    // The charts' packages name themselves in their code.
    expect([...sent.keys()].filter((name) => /echarts|zrender/i.test(scriptText(name)))).toEqual([]);
  });
});
