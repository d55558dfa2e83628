import { GerminationStore } from '../../server/plantings/germination-store';
import { PlantingPlaceEntity } from '../../server/plantings/planting-place-entity';
import { aPlanting } from '../builders/plantings';
import { aShelf } from '../builders/rooms';
import { stored } from '../builders/stored';
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
    await aPlanting(tx, { shelfId: shelf.id, stage, sown: 20, ...days });
    // Plants that were brought in never germinated here.
    await aPlanting(tx, { shelfId: bare.id, stage: 'seedling', ...days });
    const found = await new GerminationStore().germinatingOn(tx, [shelf.id, bare.id]);
    expect([...found]).toEqual([[shelf.id, [{ from: Date.UTC(2026, 2, 28), to }]]]);
  });

  it('follows a sowing that is moved to another shelf', async () => {
    const tx = database.dataSource.manager;
    const warm = await aShelf(tx);
    const bright = await aShelf(tx, { roomId: warm.roomId });
    const { id: plantingId } = await aPlanting(tx, {
      shelfId: warm.id,
      stage: 'sown',
      startedOn: '2026-03-28',
    });
    const movedAt = new Date('2026-04-02T10:00:00Z');
    await tx.update(PlantingPlaceEntity, { plantingId }, { toAt: movedAt });
    await stored(tx, PlantingPlaceEntity, { plantingId, shelfId: bright.id, fromAt: movedAt });
    const found = await new GerminationStore().germinatingOn(tx, [warm.id, bright.id]);
    expect(found).toEqual(
      new Map([
        [warm.id, [{ from: Date.UTC(2026, 2, 28), to: movedAt.getTime() }]],
        [bright.id, [{ from: movedAt.getTime(), to: Infinity }]],
      ]),
    );
  });
});
