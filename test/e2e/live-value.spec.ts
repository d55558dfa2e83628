import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

describe('a value that changes while somebody looks', () => {
  const journey = prepareJourney();

  it('appears on its shelf without a reload, and nothing on the page moves', async () => {
    const { application, page } = journey;
    await application.measure({ 'a1-air': 22.4, 'a1-humidity': 58, 'a1-light': 210 });
    await signIn(page, application.address, 'maren');
    const bay = page
      .locator('app-shelf-bay')
      .filter({ has: page.getByRole('link', { name: 'Shelf A1', exact: true }) });
    await bay.getByText(/^air 22\.4\s°C/).waitFor();
    await page.evaluate(() => {
      document.title = 'the same page';
    });
    const before = await bay.boundingBox();

    await application.measure({ 'a1-air': 23.6 });

    await bay.getByText(/^air 23\.6\s°C/).waitFor();
    expect(await bay.boundingBox()).toEqual(before);
    expect(await page.title()).toBe('the same page');
  });
});
