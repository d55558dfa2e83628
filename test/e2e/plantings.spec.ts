import { mkdtemp, rm, truncate, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Locator, Page } from 'playwright-core';
import { PNG } from 'pngjs';
import { seriousViolations } from './harness/accessibility';
import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

const leek = 'Leek Slate Harbour';

/** A picture of one colour, as a phone would send it. */
function picture(): Buffer {
  const png = new PNG({ width: 64, height: 48 });
  png.data.fill(0x80);
  return PNG.sync.write(png);
}

describe('a sowing from its packet to the harvest', () => {
  const journey = prepareJourney();
  let phone: Page;
  let folder: string;

  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'lampmeadow-photos-'));
    phone = await journey.browser.open({ width: 390 });
    await signIn(phone, journey.application.address, 'maren');
    await signIn(journey.page, journey.application.address, 'maren');
  });

  afterAll(() => rm(folder, { recursive: true }));

  const care = (page: Page): Locator => page.locator('app-todays-care');
  const inspect = async (page: Page): Promise<void> => expect(await seriousViolations(page)).toEqual([]);

  async function openPlanting(name: string): Promise<void> {
    await phone.goto(`${journey.application.address}/plantings`);
    await phone.getByRole('link', { name }).first().click();
    await phone.getByRole('heading', { level: 1, name }).waitFor();
  }

  /** Counts with the thumb: so many more than before. */
  async function countMore(more: number, isLast = false): Promise<void> {
    for (let step = 0; step < more; step += 1) await phone.getByRole('button', { name: 'One more' }).click();
    if (isLast) await phone.getByRole('checkbox', { name: 'No more will come' }).check();
    await phone.getByRole('button', { name: /^Note \d+ up$/ }).click();
    await phone.getByText(/\d up, noted/).waitFor();
  }

  it('begins with a packet that joins the seed stock', async () => {
    const { application, page } = journey;
    await page.goto(`${application.address}/seed`);
    await page.getByRole('link', { name: 'Add a packet' }).click();
    await page.getByRole('combobox', { name: 'Crop' }).fill('leek');
    await page.getByRole('option', { name: /^Leek/ }).click();
    await page.getByLabel('Variety').fill('Slate Harbour');
    await page.getByLabel('Amount').fill('60');
    await page.getByLabel('Packed in the year').fill('1949');
    await page.getByRole('button', { name: 'Add the packet' }).click();
    await page.getByText(/^A year from 1950/).waitFor();
    await inspect(page);
    await page.getByLabel('Packed in the year').fill(String(new Date().getUTCFullYear()));
    await page.getByRole('button', { name: 'Add the packet' }).click();
    await page.getByRole('heading', { level: 1, name: leek }).waitFor();
    await page.getByText('60 seeds left').waitFor();
    await inspect(page);
  });

  it('is sown on a dark shelf beside others, never more than the packet holds', async () => {
    const { page } = journey;
    await page.getByRole('link', { name: 'Sow of it' }).click();
    await page.getByLabel('Seeds', { exact: true }).fill('61');
    await page.getByRole('combobox', { name: 'Shelf' }).click();
    await page.getByRole('option', { name: 'A4' }).click();
    await page.getByRole('button', { name: 'Sow it' }).click();
    await page.getByText(/^Is more than is left of the lot: 60 seeds/).waitFor();
    await inspect(page);
    await page.getByLabel('Seeds', { exact: true }).fill('12');
    await page.getByRole('button', { name: 'Sow it' }).click();
    await page.getByRole('heading', { level: 1, name: leek }).waitFor();
    await page.getByText('12 seeds sown on A4').waitFor();
    await inspect(page);
  });

  it('wants lamps with the first seedling, counted on a phone, while its neighbours wait', async () => {
    const { application, page } = journey;
    await page.goto(application.address);
    await care(page).getByRole('heading', { name: 'Today’s care' }).waitFor();
    expect(await care(page).getByText('Switch A4 lamps on').count()).toBe(0);

    await openPlanting(leek);
    await inspect(phone);
    await countMore(1);
    await phone.getByText('1 of 12 up', { exact: false }).first().waitFor();

    await care(page).getByText('Switch A4 lamps on: Leek is up').waitFor();
    await phone.goto(`${application.address}/plantings`);
    const pepper = phone.getByRole('listitem').filter({ hasText: 'Hot pepper' });
    await pepper.getByText('6 seeds').waitFor();
    await inspect(phone);
  });

  it('moves to another shelf, and the mat is no longer needed once the peppers are up', async () => {
    const { page } = journey;
    await openPlanting(leek);
    await phone.getByRole('button', { name: 'Move', exact: true }).click();
    await phone.getByRole('combobox', { name: 'Shelf' }).click();
    await phone.getByRole('option', { name: 'A2' }).click();
    await inspect(phone);
    await phone.getByRole('button', { name: 'Move it' }).click();
    await phone.getByRole('link', { name: 'shelf A2' }).waitFor();

    for (const pepper of ['Sweet pepper Lantern Yellow', 'Hot pepper Little Ember']) {
      expect(await care(page).getByText('Switch A4 heat mat off').count()).toBe(0);
      await openPlanting(pepper);
      await countMore(5, true);
    }
    await care(page).getByText('Switch A4 heat mat off').waitFor();
  });

  it('takes a picture, and nothing that only calls itself one', async () => {
    await openPlanting(leek);
    const chooser = phone.getByLabel('Photo', { exact: true });
    const send = (name: string, buffer: Buffer): Promise<void> =>
      chooser.setInputFiles({ name, mimeType: 'image/jpeg', buffer });
    const large = join(folder, 'large.jpg');
    await writeFile(large, '');
    await truncate(large, 40_000_000);
    await chooser.setInputFiles(large);
    await phone.getByText(/large\.jpg has 40\.0 MB; a photo may have 20 MB/).waitFor();
    await send('page.jpg', Buffer.from('<!doctype html><script>alert(1)</script>'));
    await phone.getByText(/page\.jpg: /).waitFor();
    expect(await phone.getByText('No photo yet.').count()).toBe(1);

    await phone.getByLabel('What it shows').fill('First hook');
    await send('hook.jpg', picture());
    await phone.getByRole('button', { name: 'Show larger: First hook' }).click();
    await phone.getByRole('dialog').getByRole('img', { name: 'First hook' }).waitFor();
    await inspect(phone);
    await phone.getByRole('button', { name: 'Close' }).click();
  });

  it('is harvested; what was noted by mistake is taken back', async () => {
    await countMore(8, true);
    const harvest = async (grams: string): Promise<Locator> => {
      await phone.getByRole('button', { name: 'Harvest', exact: true }).click();
      await phone.getByLabel('Weight').fill(grams);
      await phone.getByRole('button', { name: 'Note the harvest' }).click();
      const line = phone.getByRole('listitem').filter({ hasText: `Harvested ${grams}\u00a0g` });
      await line.waitFor();
      return line;
    };
    const mistake = await harvest('400');
    await phone.getByRole('button', { name: 'Undo', exact: true }).click();
    await phone.getByText('Taken back').waitFor();
    await mistake.waitFor({ state: 'detached' });
    await harvest('40');
    await inspect(phone);
  });
});
