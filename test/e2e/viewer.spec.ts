import { anAlert } from '../builders/alerts';
import { ShelfEntity } from '../../server/rooms/shelf-entity';
import { prepareJourney } from './harness/journey';
import { signIn } from './harness/test-browser';

describe('a viewer', () => {
  const journey = prepareJourney();

  it('sees the room and what needs a look, and no way to change anything', async () => {
    const { application, page } = journey;
    const tx = application.database.dataSource.manager;
    const { id: shelfId } = await tx.findOneByOrFail(ShelfEntity, { label: 'A1' });
    await anAlert(tx, { shelfId });

    await signIn(page, application.address, 'oskar');
    const alert = page.getByRole('link', { name: /^A1 / });
    await alert.waitFor();
    for (const deed of [/^Acknowledge/, /^Note an observation/]) {
      expect(await page.getByRole('button', { name: deed }).count()).toBe(0);
    }
    const ticks = await page.getByRole('checkbox').all();
    expect(ticks).not.toEqual([]);
    for (const tick of ticks) expect(await tick.isDisabled()).toBe(true);

    await page.getByRole('link', { name: 'Shelf A1', exact: true }).click();
    await page.getByRole('heading', { level: 1, name: 'Shelf A1' }).waitFor();
    await page
      .getByText(/fruiting dwarf tomato/)
      .first()
      .waitFor();
    expect(await page.getByRole('button', { name: /^(Change|Set|Note)/ }).count()).toBe(0);

    await page.getByRole('link', { name: 'Loggers', exact: true }).click();
    await page.getByText('No file was brought in yet').waitFor();
    expect(await page.getByRole('link', { name: /^Bring in/ }).count()).toBe(0);
    await page.goto(`${application.address}/loggers/new`);
    await page.getByText('Growers bring in files').waitFor();
    expect(await page.getByLabel('Logger file').count()).toBe(0);
  });
});
