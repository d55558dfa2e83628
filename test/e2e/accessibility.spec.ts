import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { RoomFrostEntity } from '../../server/sowing/room-frost-entity';
import { SowingChoiceEntity } from '../../server/sowing/sowing-choice-entity';
import { anAlert } from '../builders/alerts';
import { seriousViolations } from './harness/accessibility';
import { prepareJourney } from './harness/journey';
import { signIn, type View } from './harness/test-browser';

const views: readonly View[] = [1440, 390].flatMap((width) => [
  { width, colours: 'light' as const },
  { width, colours: 'dark' as const },
]);

/** Where pictures of every screen are kept, for people to look at; without it none are taken. */
const pictureFolder = process.env['SCREENSHOT_FOLDER'];

const HOUR_MS = 3_600_000;

const file = ['time,air °C', '2026-11-20T10:00:00Z,21.4', '2026-11-20T10:05:00Z,mist', ''].join('\n');

describe('every screen', () => {
  const journey = prepareJourney();
  let page: Page;
  let view: View;
  let shelfId: string;

  beforeAll(async () => {
    const { application } = journey;
    const tx = application.database.dataSource.manager;
    const { id, roomId } = await tx.findOneByOrFail(ShelfEntity, { label: 'A1' });
    shelfId = id;
    // Sown now, in weeks, and with an onion that does not suit the place.
    const lastSpring = { on: '05-12', wording: { kind: 'probability' as const, percent: 50 } };
    await tx.save(RoomFrostEntity, { roomId, lastSpring, firstAutumn: null, note: '' });
    const crops = ['celery', 'leek', 'lettuce-head', 'onion-short-day', 'tomato'];
    await tx.save(
      SowingChoiceEntity,
      crops.map((cropId) => ({ roomId, cropId, everyDays: cropId === 'lettuce-head' ? 14 : null })),
    );
    const ago = (hours: number): Date => new Date(Date.now() - hours * HOUR_MS);
    await anAlert(tx, { shelfId, beganAt: ago(3), openedAt: ago(2.5), peakAt: ago(2) });
    await application.startSimulator();
  });
  afterEach(() => journey.browser.close(page));

  async function inspect(screen: string): Promise<void> {
    if (pictureFolder !== undefined) {
      mkdirSync(pictureFolder, { recursive: true });
      const name = `${screen}-${view.width}-${view.colours}.png`;
      await page.screenshot({ path: join(pictureFolder, name), fullPage: true });
    }
    expect({ screen, violations: await seriousViolations(page) }).toEqual({ screen, violations: [] });
  }

  async function bringInFile(): Promise<void> {
    await page.goto(`${journey.application.address}/loggers/new`);
    await page.getByRole('button', { name: 'Choose a file' }).waitFor();
    await inspect('import-1-choose');
    const content = { name: `shelf ${view.width}.csv`, mimeType: 'text/csv', buffer: Buffer.from(file) };
    await page.getByLabel('Logger file').setInputFiles(content);
    await page.getByRole('combobox', { name: /^“air °C” is/ }).click();
    await page.getByRole('option', { name: 'New sensor on B4' }).click();
    await inspect('import-2-match');
    await page.getByRole('button', { name: 'Check all lines' }).click();
    await page.getByRole('heading', { name: 'What is in the file' }).waitFor();
    await page.getByRole('row', { name: /mist/ }).waitFor();
    await inspect('import-3-check');
    await page.getByRole('button', { name: /^Bring in 1 reading/ }).click();
    await page.getByRole('heading', { name: /brought in$/ }).waitFor();
    await inspect('import-4-done');
  }

  it.each(views)('has no serious barrier at $width px by $colours', async (given) => {
    const { application, browser } = journey;
    const { address } = application;
    view = given;
    page = await browser.open(view);

    await page.goto(`${address}/sign-in`);
    await page.getByRole('button', { name: 'Sign in' }).waitFor();
    await inspect('sign-in');

    await signIn(page, address, 'maren');
    await page.getByRole('link', { name: 'Shelf B4', exact: true }).waitFor();
    await inspect('room');

    await page.goto(`${address}/shelf/${shelfId}`);
    await page.getByRole('img', { name: /^Air/ }).first().waitFor();
    await inspect('shelf');

    await page.goto(`${address}/care`);
    await page.getByRole('heading', { level: 1, name: 'Today’s care' }).waitFor();
    await page.locator('app-task-row').getByRole('button', { expanded: false }).first().click();
    await page.getByRole('button', { name: 'Done', exact: true }).waitFor();
    await inspect('care');
    await page.goto(`${address}/alerts`);
    await page
      .getByRole('button', { name: /^Acknowledge/ })
      .first()
      .waitFor();
    await inspect('alerts');
    await page.getByRole('main').getByRole('link', { name: /^A1 / }).first().click();
    await page.getByRole('img', { name: /VPD/ }).waitFor();
    await inspect('alert');

    await bringInFile();
    await page.goto(`${address}/loggers`);
    await page
      .getByRole('link', { name: /^shelf / })
      .first()
      .waitFor();
    await inspect('loggers');

    await page.goto(`${address}/sowing`);
    await page.getByRole('img', { name: /^Length of the day/ }).waitFor();
    await page.locator('summary', { hasText: 'Leek' }).click();
    await inspect('sowing');
    await page.getByRole('button', { name: 'Change the frost dates' }).click();
    await page.getByRole('heading', { name: 'Frost dates of this place' }).waitFor();
    await inspect('sowing-frost');

    await page.goto(`${address}/crops`);
    await page.getByRole('link', { name: /^Leek/ }).waitFor();
    await inspect('crops');
    await page.goto(`${address}/crops/onion-long-day`);
    await page
      .getByRole('button', { name: /^Who says/ })
      .first()
      .click();
    await inspect('crop');

    await page.goto(`${address}/care/rota`);
    await page.getByRole('heading', { name: 'How it is shared' }).waitFor();
    await inspect('care-rota');
    await page.goto(`${address}/care/routines`);
    await page.getByRole('listitem').first().waitFor();
    await inspect('care-routines');
    await page.goto(`${address}/care/routines/new`);
    await page.getByRole('heading', { name: 'When', exact: true }).waitFor();
    await inspect('care-routine');
    await page.goto(`${address}/care/record`);
    await page.getByText(/were done, or found not needed, in time/).waitFor();
    await inspect('care-record');

    await page.goto(`${address}/account`);
    await page.getByRole('heading', { level: 1, name: 'Your account' }).waitFor();
    await inspect('account');

    await page.goto(application.mailboxAddress);
    await page.getByRole('heading', { level: 1, name: 'Mailbox' }).waitFor();
    await inspect('mailbox');
  });
});
