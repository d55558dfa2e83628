import { eventually } from './harness/eventually';
import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

const LINES = 100_000;
const READINGS = '300\\s000';
const EVERY_MS = 60_000;

/** Ten weeks of a logger, a line a minute, three readings a line. */
function largeFile(firstAt: number): Buffer {
  const lines = Array.from({ length: LINES }, (_, index) => {
    const time = new Date(firstAt + index * EVERY_MS).toISOString().slice(0, 19).replace('T', ' ');
    const turn = index / 230;
    const air = (22 + 2 * Math.sin(turn)).toFixed(2);
    const humidity = (60 + 6 * Math.cos(turn)).toFixed(1);
    return `${time},${air},${humidity},${(index / 60) % 24 < 16 ? '212.5' : '0.0'}`;
  });
  const header = 'Date and time (UTC),Air temperature (°C),Relative humidity (%),PPFD (µmol m⁻² s⁻¹)';
  return Buffer.from([header, ...lines, ''].join('\n'));
}

describe('a logger’s file of 100,000 lines', () => {
  const journey = prepareJourney();

  const heading = (name: string | RegExp) => journey.page.getByRole('heading', { name });
  const button = (name: string | RegExp) => journey.page.getByRole('button', { name });
  const progress = (words: string | RegExp) => journey.page.getByRole('status').filter({ hasText: words });

  async function choose(list: string, option: string | RegExp): Promise<void> {
    const { page } = journey;
    await page.getByRole('combobox', { name: list }).click();
    await page.getByRole('option', { name: option }).click();
    await page.getByRole('combobox', { name: list }).filter({ hasText: option }).waitFor();
  }

  /** Runs a statement in a transaction of its own, and keeps its locks until the returned function is called. */
  async function hold(statement: string): Promise<() => Promise<void>> {
    const runner = journey.application.database.dataSource.createQueryRunner();
    await runner.startTransaction();
    await runner.query(statement);
    return async () => {
      await runner.rollbackTransaction();
      await runner.release();
    };
  }

  /** How many statements wait for the lock on the sums. */
  async function waitingForSums(): Promise<number> {
    const rows: unknown[] = await journey.application.database.dataSource.query(
      `SELECT 1 FROM pg_locks WHERE relation = 'hourly_summary'::regclass AND NOT granted`,
    );
    return rows.length;
  }

  async function stored(): Promise<Record<string, number>> {
    const [row]: Record<string, string>[] = await journey.application.database.dataSource.query(
      `SELECT (SELECT count(*) FROM reading) AS readings, (SELECT count(*) FROM hourly_summary) AS hours,
         (SELECT count(*) FROM computed_hourly_summary) AS computed,
         (SELECT count(*) FROM device WHERE name = 'ten weeks') AS devices`,
    );
    return Object.fromEntries(Object.entries(row ?? {}).map(([name, count]) => [name, Number(count)]));
  }
  const nothing = { readings: 0, hours: 0, computed: 0, devices: 0 };

  it('is matched and checked', async () => {
    const { application, page } = journey;
    await signIn(page, application.address, 'jana');
    await page.goto(`${application.address}/loggers/new`);
    const buffer = largeFile(Date.now() - (LINES + 1_440) * EVERY_MS);
    await page
      .getByLabel('Logger file')
      .setInputFiles({ name: 'ten weeks.csv', mimeType: 'text/csv', buffer });
    await heading('What we read').waitFor();
    await choose('“Air temperature (°C)” is', 'A1 air');
    await choose('“Relative humidity (%)” is', 'A1 humidity');
    await choose('“PPFD (µmol m⁻² s⁻¹)” is', 'New sensor on A1');

    await button('Check all lines').click();
    await page.getByRole('row', { name: new RegExp(`^New readings ${READINGS}$`) }).waitFor();
    await page.getByRole('row', { name: /^Not usable 0$/ }).waitFor();
    expect(await stored()).toEqual(nothing);
  });

  it('shows how far it is, after a reload too, and stopped half-way leaves nothing', async () => {
    const { page } = journey;
    // The work waits for the sensors first and, with most of its lines read, for the sums: there is time to look.
    const freeSensors = await hold('SELECT FROM sensor FOR UPDATE');
    const freeSums = await hold('LOCK TABLE hourly_summary IN EXCLUSIVE MODE');
    await button(new RegExp(`^Bring in ${READINGS} readings$`)).click();
    await progress(/^0 % of \d/).waitFor();
    await page.reload();
    await progress(/^0 % of \d/).waitFor();
    await freeSensors();

    const partly = /^[1-9]\d? % of \d/;
    await progress(partly).waitFor();
    await page.reload();
    await progress(partly).waitFor();
    await eventually(async () => expect(await waitingForSums()).toBeGreaterThan(0));
    await button('Stop').click();
    await progress('Stopping. Nothing is stored.').waitFor();
    await freeSums();

    await page.getByText('It was stopped. Nothing was stored').waitFor();
    expect(await stored()).toEqual(nothing);
  });

  it('goes in whole when it is tried again, and comes out again whole', async () => {
    const { application, page } = journey;
    await button('Check all lines').click();
    await button(new RegExp(`^Bring in ${READINGS} readings$`)).click();
    await heading(new RegExp(`^${READINGS} readings brought in$`)).waitFor();
    const held = await stored();
    expect(held).toMatchObject({ readings: 3 * LINES, devices: 1 });
    // Whole hours of ten weeks, and the two that are begun at the ends, of three sensors.
    expect(held['hours']).toBeGreaterThanOrEqual((3 * LINES) / 60);
    await page.goto(`${application.address}/loggers`);
    const row = page.getByRole('listitem').filter({ hasText: 'ten weeks.csv' });
    await row.filter({ hasText: new RegExp(`${READINGS} readings new`) }).waitFor();

    await row.getByRole('link').click();
    await button('Take it out again').click();
    await page.getByRole('button', { name: 'Take it out', exact: true }).click();
    await page.getByText('It was taken out again. None of its readings is stored').waitFor();
    expect(await stored()).toEqual(nothing);
    await page.goto(`${application.address}/loggers`);
    await row.filter({ hasText: 'Taken out again' }).waitFor();
  });
});
