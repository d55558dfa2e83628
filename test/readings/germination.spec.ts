import { GerminationStore } from '../../server/plantings/germination-store';
import { aPlanting } from '../builders/plantings';
import { aShelf } from '../builders/rooms';
import { createTestDatabase, type TestDatabase } from '../database/test-database';

describe('when something waits to germinate on a shelf', () => {
  let database: TestDatabase;

  beforeAll(async () => {
    database = await createTestDatabase();
  });
  afterAll(() => database.drop());

  // Europe/Dublin is an hour ahead of UTC from 29 March on.
  it.each([
    ['sown', Infinity],
    ['emerging', Infinity],
    ['seedling', Date.UTC(2026, 3, 10, 23)],
    ['growingOn', Date.UTC(2026, 3, 10, 23)],
  ] as const)('is from the day of sowing on, and while it is %s until %d', async (stage, to) => {
    const tx = database.dataSource.manager;
    const shelf = await aShelf(tx);
    const bare = await aShelf(tx);
    const days = { startedOn: '2026-03-28', stageSince: '2026-04-10' };
    await aPlanting(tx, { shelfId: shelf.id, stage, ...days });
    const found = await new GerminationStore().germinatingOn(tx, [shelf.id, bare.id]);
    expect([...found]).toEqual([[shelf.id, [{ from: Date.UTC(2026, 2, 28), to }]]]);
  });
});
