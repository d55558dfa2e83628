import { simulatedRoom } from '@shared/contracts/simulation';
import { seriousViolations } from './harness/accessibility';
import { eventually } from './harness/eventually';
import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

const MINUTE_MS = 60_000;
/** The simulator begins so long ago, and hurries into the present within some twenty seconds. */
const BEGUN_AGO_MS = 30 * MINUTE_MS;
const SPEED = 90;
/** A mail waits a minute for others to join it. */
const MAIL_WITHIN_MS = 100_000;

describe('a lamp that stays dark', () => {
  const journey = prepareJourney();

  // The test runs at any time of the day, so this lamp is to be lit at every; nothing else is to be judged.
  async function planAlwaysLit(label: string): Promise<void> {
    const { application } = journey;
    await application.database.dataSource.query('DELETE FROM wanted_range');
    await application.database.dataSource.query(
      `UPDATE lamp_plan SET switches_on = '00:00', switches_off = '00:00'
       WHERE shelf_id = (SELECT id FROM shelf WHERE label = $1)`,
      [label],
    );
    const shelves = application.room.shelves.map((shelf) => ({
      ...shelf,
      arrangements: shelf.arrangements.map((arrangement) =>
        shelf.label === label ? { ...arrangement, lampPlan: [{ on: '00:00', off: '00:00' }] } : arrangement,
      ),
    }));
    await application.rewriteRoom(simulatedRoom.parse({ ...application.room, shelves }));
  }

  it('opens an alert on the open page and a mail that leads to it, and is acknowledged', async () => {
    const { application, browser, page } = journey;
    await planAlwaysLit('A1');
    await signIn(page, application.address, 'maren');
    await application.startSimulator(
      {
        SIMULATOR_START: new Date(Date.now() - BEGUN_AGO_MS).toISOString(),
        SIMULATOR_SPEED: String(SPEED),
        SIMULATOR_INTERVAL_SECONDS: '60',
      },
      ['--scenario', 'timer-fails', '--shelf', 'A1', '--minutes', '120', '--lamp', 'dark'],
    );

    await page.getByRole('link', { name: /^A1 is dark/ }).waitFor({ timeout: 60_000 });

    const mailbox = await browser.open();
    const mail = mailbox.getByRole('link', { name: /^A1 is dark .* to maren@example\.org/ });
    await eventually(async () => {
      await mailbox.goto(application.mailboxAddress);
      expect(await mail.count()).toBe(1);
    }, MAIL_WITHIN_MS);
    expect(await seriousViolations(mailbox)).toEqual([]);
    await mail.click();
    await mailbox.getByRole('link', { name: 'Plain text' }).click();
    expect(await seriousViolations(mailbox)).toEqual([]);
    const link = mailbox.getByRole('link', { name: `${application.address}/alerts/` }).first();
    await page.goto(await link.innerText());
    await page.getByRole('button', { name: 'Acknowledge with a note' }).click();
    await page.getByLabel('What you found').fill('Timer had no power');
    await page.getByRole('button', { name: 'I have seen it' }).click();
    await page.getByText(/^Seen by Maren Oduya, .*“Timer had no power”/).waitFor();
    await page.getByRole('link', { name: 'Room', exact: true }).click();
    await page.getByText(/Seen by Maren Oduya/).waitFor();
    expect(await page.getByRole('button', { name: /^Acknowledge/ }).count()).toBe(0);
  });
});
