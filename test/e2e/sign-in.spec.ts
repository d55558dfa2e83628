import { demonstrationPassword } from '../../server/demonstration/demonstration-content';
import { prepareJourney } from './harness/journey';
import { fillIn } from './harness/test-browser';

describe('signing in', () => {
  const journey = prepareJourney();

  it('is asked for first, refuses a wrong password, opens the room with the right one, and ends', async () => {
    const { application, page } = journey;
    await page.goto(application.address);
    await fillIn(page, 'maren', 'not the password');
    await page.getByRole('alert').waitFor();
    expect(new URL(page.url()).pathname).toBe('/sign-in');

    await fillIn(page, 'maren', demonstrationPassword);
    await page.getByRole('heading', { level: 1, name: 'Kestrel Lane growing room' }).waitFor();
    expect(await page.getByRole('link', { name: /^Shelf / }).count()).toBe(8);

    await page.getByRole('button', { name: 'Menu of Maren Oduya' }).click();
    await page.getByRole('menuitem', { name: 'Sign out' }).click();
    await page.waitForURL('**/sign-in');
    await page.goto(`${application.address}/room`);
    await page.getByRole('button', { name: 'Sign in' }).waitFor();
  });
});
