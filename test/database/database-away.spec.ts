import { isDatabaseAway } from '../../server/http/error-answer';
import { createTestDatabase, type TestDatabase } from './test-database';

describe('a connection that is cut in the middle of a transaction', () => {
  let database: TestDatabase;

  beforeAll(async () => {
    database = await createTestDatabase();
  });
  afterAll(() => database.drop());

  it('is the database being away, whichever statement finds it out', async () => {
    const errors: unknown[] = [];
    const note = (error: unknown): void => void errors.push(error);
    const cut = database.transactions.run(async (tx) => {
      const rows: { pid: number }[] = await tx.query('SELECT pg_backend_pid() AS pid');
      await database.dataSource.query('SELECT pg_terminate_backend($1)', [rows[0]?.pid]);
      for (let tried = 0; tried < 3; tried += 1) {
        await tx.query('SELECT 1').catch(note); // through the manager
        await tx.queryRunner?.query('SELECT 1').catch(note); // as a store's COPY does
      }
    });
    await cut.catch(note);
    expect(errors.map((error) => (error as Error).name)).toEqual(
      expect.arrayContaining(['QueryRunnerAlreadyReleasedError', 'QueryRunnerProviderAlreadyReleasedError']),
    );
    expect(errors.filter((error) => !isDatabaseAway(error))).toEqual([]);
  });
});
