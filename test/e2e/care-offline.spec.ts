import { DateTime } from 'luxon';
import type { Page } from 'playwright-core';
import { PNG } from 'pngjs';
import { PersonEntity } from '../../server/people/person-entity';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { aTask } from '../builders/care';
import { seriousViolations } from './harness/accessibility';
import { eventually } from './harness/eventually';
import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

/** Latin text, headings and icons: the last that the service worker fetches. */
const FONT_FILES = 3;

/** What Chromium says of a line that is cut, which is what these journeys do to it. */
const cutLine = /net::ERR_|WebSocket connection to|status of 504/;

function picture(): Buffer {
  const png = new PNG({ width: 64, height: 48 });
  png.data.fill(0x80);
  return PNG.sync.write(png);
}

describe('care without a signal', () => {
  const journey = prepareJourney();
  const titles = ['Water the first', 'Water the second', 'Look at the third'] as const;
  let phone: Page;

  const database = () => journey.application.database.dataSource;
  const row = (page: Page, title: string) => page.locator('app-task-row', { hasText: title });
  const tick = (page: Page, title: string) => page.getByRole('checkbox', { name: title });
  const stateOf = async (title: string): Promise<{ done: number; photos: number }> => {
    const [found] = await database().query<{ done: number; photos: number }[]>(
      `SELECT count(*) FILTER (WHERE task.done_at IS NOT NULL)::int AS done,
         (SELECT count(*)::int FROM photo JOIN task AS own ON own.id = photo.task_id WHERE own.title = $1) AS photos
       FROM task WHERE task.title = $1`,
      [title],
    );
    if (found === undefined) throw new Error(`No task ${title}`);
    return found;
  };

  /** New tasks due today, held by one person of the demonstration. */
  async function giveTasks(who: string, given: readonly string[]): Promise<void> {
    const tx = database().manager;
    const { roomId, id: shelfId } = await tx.findOneByOrFail(ShelfEntity, { label: 'A1' });
    const { id } = await tx.findOneByOrFail(PersonEntity, { email: `${who}@example.org` });
    const dueOn = DateTime.now().setZone('Europe/Dublin').toFormat('yyyy-MM-dd');
    for (const title of given) {
      await aTask(tx, { roomId, shelfId, title, dueOn, kind: 'inspect', personIds: [id] });
    }
  }

  /** Somebody's phone on Today, with everything on it that it needs without a signal. */
  async function phoneOf(who: string, lastTitle: string): Promise<Page> {
    const { application, browser } = journey;
    const page = await browser.open({ width: 390, keepsApplication: true });
    await signIn(page, application.address, who);
    await page.goto(`${application.address}/care`);
    await tick(page, lastTitle).waitFor();
    await eventually(async () => {
      const fonts = await page.evaluate(async () => {
        const names = (await caches.keys()).filter((name) => name.includes(':fonts:cache'));
        const held = await Promise.all(names.map(async (name) => (await caches.open(name)).keys()));
        return held.flat().length;
      });
      expect(fonts).toBeGreaterThanOrEqual(FONT_FILES);
    });
    return page;
  }

  async function addPhoto(page: Page, title: string): Promise<void> {
    await row(page, title).getByRole('button', { expanded: false }).click();
    const chooser = page.waitForEvent('filechooser');
    await row(page, title).getByRole('button', { name: 'Add a photo' }).click();
    await (await chooser).setFiles({ name: 'leaf.png', mimeType: 'image/png', buffer: picture() });
    await page.getByText('Photo kept').waitFor();
  }

  const forgiveCutLine = (): void =>
    expect(journey.browser.takeComplaints().filter((words) => !cutLine.test(words))).toEqual([]);

  afterEach(async () => {
    await journey.browser.close(phone);
  });

  it('is served so that a browser asks for a new version each time, and keeps what has a hash', async () => {
    const { address } = journey.application;
    phone = await journey.browser.open();
    const headers = async (path: string): Promise<Headers> => (await fetch(address + path)).headers;
    expect((await headers('/ngsw.json')).get('Cache-Control')).toBe('no-cache');
    const worker = await headers('/ngsw-worker.js');
    expect(worker.get('Cache-Control')).toBe('no-cache');
    expect(worker.get('Content-Type')).toContain('javascript');
    const manifest = (await (await fetch(`${address}/ngsw.json`)).json()) as { hashTable: object };
    const script = Object.keys(manifest.hashTable).find((path) => /^\/main-.*\.js$/.test(path));
    expect((await headers(script ?? '')).get('Cache-Control')).toContain('immutable');
  });

  it('keeps ticks, a note and a photo over a closed page, and sends each once when the signal is back', async () => {
    const { application, browser } = journey;
    await giveTasks('maren', titles);
    phone = await phoneOf('maren', titles[2]);
    await phone.context().setOffline(true);

    await addPhoto(phone, titles[0]);
    for (const title of titles) await tick(phone, title).check();
    await phone.getByText('Waits for signal').nth(2).waitFor();
    expect(await seriousViolations(phone)).toEqual([]);

    phone = await browser.reopen(phone);
    await phone.goto(`${application.address}/care`);
    await phone.getByText(/This is care as of \d\d:\d\d/).waitFor();
    for (const title of titles) expect(await tick(phone, title).isChecked()).toBe(true);
    expect(await stateOf(titles[0])).toEqual({ done: 0, photos: 0 });

    await phone.context().setOffline(false);
    await eventually(async () => {
      expect(await stateOf(titles[0])).toEqual({ done: 1, photos: 1 });
      expect(await stateOf(titles[1])).toEqual({ done: 1, photos: 0 });
      expect(await stateOf(titles[2])).toEqual({ done: 1, photos: 0 });
    });
    await phone.getByText('Waits for signal').first().waitFor({ state: 'detached' });
    expect(await tick(phone, titles[0]).isChecked()).toBe(true);
    forgiveCutLine();
  });

  it('sends each once although the server dies with the answer still on its way', async () => {
    const { application } = journey;
    const [first, second] = ['Turn the fourth', 'Turn the fifth'] as const;
    await giveTasks('maren', [first, second]);
    phone = await phoneOf('maren', second);
    // The server keeps the photo; the phone never hears of it. Later tries may find the server dead.
    await phone.route('**/photos', async (route) => {
      await route.fetch().catch(() => null);
      await route.abort();
    });
    await addPhoto(phone, first);
    await eventually(async () => expect((await stateOf(first)).photos).toBe(1));
    await application.withoutServer(async () => {
      await phone.unroute('**/photos');
      await tick(phone, first).check();
      await tick(phone, second).check();
      await phone.getByText('Waits for signal').nth(1).waitFor();
    });
    await eventually(async () => {
      expect(await stateOf(first)).toEqual({ done: 1, photos: 1 });
      expect(await stateOf(second)).toEqual({ done: 1, photos: 0 });
    }, 90_000);
    forgiveCutLine();
  });

  it('says kindly that somebody else was first, and keeps what was entered', async () => {
    const title = 'Clean the sixth';
    await giveTasks('maren', [title]);
    phone = await phoneOf('maren', title);
    await phone.context().setOffline(true);
    await row(phone, title).getByRole('button', { expanded: false }).click();
    await row(phone, title).getByLabel('Note').fill('aphids under two leaves');
    await row(phone, title).getByRole('button', { name: 'Done', exact: true }).click();
    await row(phone, title).getByText('Waits for signal').waitFor();

    const other = await journey.browser.open({ width: 390 });
    await signIn(other, journey.application.address, 'pia');
    await other.goto(`${journey.application.address}/care`);
    await tick(other, title).check();
    await eventually(async () => expect((await stateOf(title)).done).toBe(1));
    await journey.browser.close(other);

    await phone.context().setOffline(false);
    await phone.getByText(/had done this already, \d\d:\d\d/).waitFor();
    await phone.getByText(/You entered.*aphids under two leaves/).waitFor();
    expect(await seriousViolations(phone)).toEqual([]);
    await phone.getByRole('button', { name: 'All right' }).click();
    await phone.getByText(/had done this already/).waitFor({ state: 'detached' });
    forgiveCutLine();
  });
});
