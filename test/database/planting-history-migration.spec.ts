import { migrate } from '../../server/database/migrate';
import { KeepPlantingHistory1764552600000 } from '../../server/database/migrations/1764552600000-keep-planting-history';
import { migrations } from '../../server/database/migrations/all-migrations';
import { PlantingEntity } from '../../server/plantings/planting-entity';
import { PlantingEventsStore } from '../../server/plantings/planting-events-store';
import { PlantingRecords } from '../../server/plantings/planting-records';
import { PlantingsStore } from '../../server/plantings/plantings-store';
import { createEmptyDatabase, type TestDatabase } from './test-database';

describe('plantings written down before they had a history', () => {
  let database: TestDatabase;

  beforeAll(async () => {
    database = await createEmptyDatabase();
  });
  afterAll(() => database.drop());

  it.each([
    ['sown', 9, { stage: 'sown', sown: 9, up: 0, count: 9 }],
    ['emerging', 7, { stage: 'seedling', sown: null, up: null, count: 7 }],
    ['sown', 0, { stage: 'seedling', sown: null, up: null, count: 0 }],
    ['growingOn', 5, { stage: 'growingOn', sown: null, up: null, count: 5 }],
    ['ended', 3, { stage: 'ended', sown: null, up: null, count: 3 }],
  ])('at stage %s with %d get events that leave them so: %j', async (stage, count, expected) => {
    const { dataSource } = database;
    await migrate(dataSource);
    const later = migrations.length - migrations.indexOf(KeepPlantingHistory1764552600000);
    for (let left = later; left > 0; left -= 1) await dataSource.undoLastMigration({ transaction: 'each' });
    const ended = stage === 'ended' ? '2026-03-30' : null;
    const rows: { id: string }[] = await dataSource.query(
      `WITH room AS (INSERT INTO room (name, time_zone) VALUES ('Old', 'Europe/Dublin') RETURNING id)
       INSERT INTO planting (room_id, crop, habit, count, stage, started_on, stage_since, ended_on)
       SELECT id, 'Leek', 'blades', $1, $2, '2026-03-01', '2026-03-20', $3 FROM room RETURNING id`,
      [count, stage, ended],
    );
    const id = rows[0]?.id ?? '';

    await migrate(dataSource);

    const records = new PlantingRecords(new PlantingsStore(), new PlantingEventsStore());
    expect(await records.state(dataSource.manager, id)).toMatchObject(expected);
    expect(await dataSource.manager.findOneByOrFail(PlantingEntity, { id })).toMatchObject({
      ...expected,
      startedOn: '2026-03-01',
      endedOn: ended,
    });
  });
});
