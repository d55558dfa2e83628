import type { Page } from 'playwright-core';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { WantedRangeEntity } from '../../server/rooms/wanted-range-entity';
import { seriousViolations } from './harness/accessibility';
import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

const PHONE_WIDTH = 390;

describe('an alert on a phone', () => {
  const journey = prepareJourney();
  let page: Page;

  /** Only the air of one shelf is judged, at once, whether its lamps are lit or not. */
  async function judgeOnly(label: string): Promise<void> {
    const tx = journey.application.database.dataSource.manager;
    const { id: shelfId } = await tx.findOneByOrFail(ShelfEntity, { label });
    await tx.query('DELETE FROM wanted_range');
    await tx.insert(WantedRangeEntity, {
      shelfId,
      quantity: 'airTemperature',
      lampsOnLow: 15,
      lampsOnHigh: 26,
      lampsOffLow: 15,
      lampsOffHigh: 26,
      holdMinutes: 0,
      clearingMargin: 0.5,
      since: new Date(Date.now() - 3_600_000),
    });
    // A plan would let the limit follow its lamps slowly; without one it stands.
    await tx.query('UPDATE lamp_plan SET switches_on = NULL, switches_off = NULL');
  }
  const measure = (values: Readonly<Record<string, number>>, minutesAgo: number): Promise<void> =>
    journey.application.measure(values, new Date(Date.now() - minutesAgo * 60_000));
  const inWhatHappened = (words: RegExp): Promise<void> =>
    page.getByRole('listitem').filter({ hasText: words }).first().waitFor();

  afterAll(() => journey.browser.close(page));

  it('is seen with a note, made quiet, done something about, and tells all of it once it is over', async () => {
    const { application, browser } = journey;
    await judgeOnly('A1');
    page = await browser.open({ width: PHONE_WIDTH });
    await signIn(page, application.address, 'maren');
    await measure({ 'a1-air': 26.8 }, 20);

    // The badge says it wherever one is.
    await page.getByRole('link', { name: /^Alerts\s*, 1 waiting/ }).click();
    await page.getByRole('heading', { name: /^A1 air is 0\.8.°C too warm/ }).waitFor();
    await page.getByRole('button', { name: 'Acknowledge with a note' }).click();
    await page.getByLabel('What you found').fill('Vent was shut');
    await page.getByRole('button', { name: 'I have seen it' }).click();
    await page.getByText(/^Seen by Maren Oduya, .*“Vent was shut”/).waitFor();

    await page.getByRole('button', { name: 'Quiet until' }).click();
    expect(await seriousViolations(page)).toEqual([]);
    await page.getByRole('button', { name: /^For an hour/ }).click();
    await page.getByText(/^Quiet until .*, set by Maren Oduya\./).waitFor();

    await page.getByRole('button', { name: 'What was done' }).click();
    await page.getByLabel('What was done').fill('Vent opened');
    await page.getByRole('button', { name: 'Note it' }).click();
    await page.getByRole('button', { name: 'Remove “Vent opened”' }).waitFor();
    expect(await seriousViolations(page)).toEqual([]);

    await page.getByRole('link', { name: /^A1 air is/ }).click();
    await page.getByRole('heading', { name: 'What happened' }).waitFor();
    // Slowly, or it would be an alert of its own.
    for (const [minutesAgo, airC] of [
      [15, 26.1],
      [10, 25.4],
      [5, 25.2],
      [0, 25.2],
    ] as const) {
      await measure({ 'a1-air': airC }, minutesAgo);
    }

    for (const words of [
      /Began/,
      /Alert opened/,
      /Seen by Maren Oduya: “Vent was shut”/,
      /Quiet until .*, set by Maren Oduya/,
      /Done by Maren Oduya: “Vent opened”/,
      /Back where it should be/,
      /Over/,
    ]) {
      await inWhatHappened(words);
    }
    expect(await seriousViolations(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(PHONE_WIDTH);

    await page.goto(`${application.address}/alerts?show=all`);
    await page.getByRole('status').filter({ hasText: '1 alert' }).waitFor();
    await page.getByText('By month, shelf and kind').click();
    await page.getByRole('button', { name: /^A1\s1 alert$/ }).click();
    await page.waitForURL(/shelf=/);
    await page.getByRole('heading', { name: /^A1 air was 0\.8.°C too warm/ }).waitFor();
    expect(await seriousViolations(page)).toEqual([]);
  });
});
