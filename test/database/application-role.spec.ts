import { Client } from 'pg';
import { createTestDatabase, type TestDatabase } from './test-database';

/** PostgreSQL's insufficient_privilege. */
const denied = expect.objectContaining({ code: '42501' }) as Error;

describe('the application’s role', () => {
  let database: TestDatabase;
  let application: Client;

  beforeAll(async () => {
    database = await createTestDatabase();
    application = new Client({ connectionString: database.applicationUrl });
    await application.connect();
  });
  afterAll(async () => {
    await application.end();
    await database.drop();
  });

  it('is not the owner of the tables', () => {
    expect(new URL(database.applicationUrl).username).not.toBe(new URL(database.url).username);
  });

  it.each([
    ['make a table', 'CREATE TABLE other (id integer)'],
    ['change one', 'ALTER TABLE person ADD COLUMN is_keeper_everywhere boolean'],
    ['empty one', 'TRUNCATE reading'],
    ['drop one', 'DROP TABLE reading'],
    ['replace a function', 'DROP FUNCTION ensure_reading_partitions'],
    ['change what was noted in the audit', "UPDATE audit_entry SET action = 'nothing'"],
    ['remove it', 'DELETE FROM audit_entry'],
    ['claim that a migration has run', "INSERT INTO migration (timestamp, name) VALUES (1, 'none')"],
    ['become the owner', 'SET ROLE postgres'],
  ])('may not %s', async (_what, sql) => {
    await expect(application.query(sql)).rejects.toEqual(denied);
  });

  it('may note in the audit, and have months of readings made', async () => {
    await application.query("INSERT INTO audit_entry (action, detail) VALUES ('shelf.retire', '{}')");
    await application.query("SELECT ensure_reading_partitions('1999-05-01Z', '1999-06-01Z')");
    const rows: unknown = await database.dataSource.query(
      `SELECT to_regclass('reading_1999_05') IS NOT NULL AS "isThere"`,
    );
    expect(rows).toEqual([{ isThere: true }]);
  });
});
