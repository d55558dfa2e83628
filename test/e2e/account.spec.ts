import { demonstrationPassword } from '../../server/demonstration/demonstration-content';
import { eventually } from './harness/eventually';
import { prepareJourney } from './harness/journey';
import { fillIn, signIn } from './harness/test-browser';

describe('the account', () => {
  const journey = prepareJourney();

  function pageColours(): Promise<string> {
    return journey.page.evaluate(() => getComputedStyle(document.documentElement).colorScheme);
  }

  it('changes how the room is shown, and the password that opens it', async () => {
    const { application, page } = journey;
    const { address } = application;
    const newPassword = 'four quiet garden words';
    await application.measure({ 'a1-air': 25, 'a1-humidity': 58 });
    await signIn(page, address, 'tomas');
    await page.getByText(/^air 25\.0\s°C/).waitFor();

    await page.getByRole('button', { name: 'Menu of Tomas Kell' }).click();
    await page.getByRole('menuitem', { name: 'Your account' }).click();
    await page.getByRole('radio', { name: '°F' }).check();
    await page.getByRole('radio', { name: 'Lamps off' }).check();
    await eventually(async () => expect(await pageColours()).toBe('dark'));
    await page.getByRole('link', { name: 'Room', exact: true }).click();
    await page.getByText(/^air 77\.0\s°F/).waitFor();

    await page.goto(`${address}/account`);
    await page.getByLabel('Current password').fill(demonstrationPassword);
    await page.getByLabel('New password').fill(newPassword);
    await page.getByRole('button', { name: 'Change the password' }).click();
    await page.getByText('Password changed').waitFor();
    await page.getByRole('button', { name: 'Sign out' }).click();
    await page.waitForURL('**/sign-in');

    await fillIn(page, 'tomas', demonstrationPassword);
    await page.getByRole('alert').waitFor();
    await fillIn(page, 'tomas', newPassword);
    await page.getByText(/^air 77\.0\s°F/).waitFor();
    expect(await pageColours()).toBe('dark');
  });
});
