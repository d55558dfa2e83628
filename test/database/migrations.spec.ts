import { migrate } from '../../server/database/migrate';
import { migrations } from '../../server/database/migrations/all-migrations';
import { createEmptyDatabase, type TestDatabase } from './test-database';

describe('the migrations', () => {
  let database: TestDatabase;

  beforeAll(async () => {
    database = await createEmptyDatabase();
  });
  afterAll(() => database.drop());

  async function undoAll(): Promise<void> {
    for (let left = migrations.length; left > 0; left -= 1) {
      await database.dataSource.undoLastMigration({ transaction: 'each' });
    }
  }

  async function drift(): Promise<string[]> {
    const log = await database.dataSource.driver.createSchemaBuilder().log();
    return log.upQueries.map(({ query }) => query);
  }

  async function leftovers(): Promise<string[]> {
    const rows: { name: string }[] = await database.dataSource.query(`
      SELECT relname AS name FROM pg_class WHERE relnamespace = 'public'::regnamespace AND relkind IN ('r', 'p', 'v', 'S')
        AND relname NOT LIKE 'migration%'
      UNION ALL
      SELECT proname FROM pg_proc WHERE pronamespace = 'public'::regnamespace
        AND NOT EXISTS (SELECT FROM pg_depend WHERE objid = pg_proc.oid AND deptype = 'e')`);
    return rows.map(({ name }) => name);
  }

  it('run up, then down, then up again leave exactly what the entities describe', async () => {
    const first = await migrate(database.dataSource);
    expect(first).toHaveLength(migrations.length);
    expect(await drift()).toEqual([]);

    await undoAll();
    expect(await leftovers()).toEqual([]);

    expect(await migrate(database.dataSource)).toEqual(first);
    expect(await drift()).toEqual([]);
  });

  it('run by two processes at once are run by one of them', async () => {
    await undoAll();

    const runs = await Promise.all([migrate(database.dataSource), migrate(database.dataSource)]);

    expect(runs.map((run) => run.length).sort()).toEqual([0, migrations.length].sort());
  });
});
