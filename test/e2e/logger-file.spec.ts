import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

const LINES = 1000;
const EVERY_MS = 300_000;
/** Damaged lines by their number in the file, whose first line is the header. */
const NO_TIME = 400;
const NO_NUMBER = 700;

/** A logger's file of days gone by: air and humidity, two lines damaged. */
function loggerFile(firstAt: number): string {
  const lines = Array.from({ length: LINES }, (_, index) => {
    const line = index + 2;
    const time = new Date(firstAt + index * EVERY_MS).toISOString().slice(0, 19).replace('T', ' ');
    const air = line === NO_NUMBER ? 'damp' : (21 + (index % 40) / 10).toFixed(1);
    const humidity = (60 + (index % 7) / 2).toFixed(1);
    return `${line === NO_TIME ? '2026-13-45 12:00:00' : time},${air},${humidity}`;
  });
  return ['Date and time (UTC),Air temperature (°C),Relative humidity (%)', ...lines, ''].join('\r\n');
}

describe('a logger’s file', () => {
  const journey = prepareJourney();

  async function chooseFile(content: string): Promise<void> {
    const { page, application } = journey;
    await page.goto(`${application.address}/loggers/new`);
    await page.getByLabel('Logger file').setInputFiles({
      name: 'tray logger.csv',
      mimeType: 'text/csv',
      buffer: Buffer.from(content),
    });
    await page.getByRole('heading', { name: 'What we read' }).waitFor();
  }

  async function choose(list: string, option: string | RegExp): Promise<void> {
    const { page } = journey;
    await page.getByRole('combobox', { name: list }).click();
    await page.getByRole('option', { name: option }).click();
    await page.getByRole('combobox', { name: list }).filter({ hasText: option }).waitFor();
  }

  async function checkAllLines(): Promise<void> {
    const { page } = journey;
    await page.getByRole('button', { name: 'Check all lines' }).click();
    await page.getByRole('heading', { name: 'What is in the file' }).waitFor();
  }

  async function waitForRow(name: RegExp): Promise<void> {
    await journey.page.getByRole('row', { name }).waitFor();
  }

  it('goes into a shelf’s history by four steps, and the same file again changes nothing', async () => {
    const { application, page } = journey;
    const content = loggerFile(Date.now() - 6 * 86_400_000);
    await signIn(page, application.address, 'jana');

    await chooseFile(content);
    await choose('“Air temperature (°C)” is', 'A1 air');
    await choose('“Relative humidity (%)” is', 'A1 humidity');
    await checkAllLines();
    // A line without a time loses both of its readings and is told once.
    await waitForRow(/^New readings 1\s997$/);
    await waitForRow(/^Not usable 2$/);
    await waitForRow(/^400 1 2026-13-45 12:00:00 This is not a time/);
    await waitForRow(/^700 2 damp This is not a number/);

    await page.getByRole('button', { name: /^Bring in 1\s997 readings$/ }).click();
    await page.getByRole('heading', { name: /^1\s997 readings brought in$/ }).waitFor();
    await page.getByRole('link', { name: /^Look at shelf A1/ }).click();
    await page.getByRole('heading', { level: 1, name: 'Shelf A1' }).waitFor();
    await page.getByRole('button', { name: /^More for Air/ }).click();
    await page.getByRole('menuitem', { name: 'Numbers as a table' }).click();
    const numbers = page.getByRole('region', { name: /^Numbers of Air/ });
    await numbers
      .getByRole('row', { name: /2[1-4]\.\d/ })
      .first()
      .waitFor();

    await chooseFile(content);
    await choose('“Air temperature (°C)” is', 'A1 air');
    await choose('“Relative humidity (%)” is', 'A1 humidity');
    await checkAllLines();
    await waitForRow(/^New readings 0$/);
    await waitForRow(/^Already held, same value 1\s997$/);
    await page.getByText('Bringing it in would change nothing.').waitFor();
    expect(await page.getByRole('button', { name: /^Bring in/ }).isDisabled()).toBe(true);
  });
});
