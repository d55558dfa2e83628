import type { DataSource } from 'typeorm';
import { grantToApplication } from './application-role';

/** Any fixed number will do; it only has to be the same in every process. */
const MIGRATION_LOCK = 7_431_905;

/**
 * Brings the database to this version. Processes that start together wait for the first one.
 *
 * @param dataSource - Connected, as the owner of the tables.
 * @param applicationRole - The role that the application works as, where that is another one.
 * @returns The names of the migrations that were run.
 */
export async function migrate(
  dataSource: DataSource,
  applicationRole: string | null = null,
): Promise<string[]> {
  const runner = dataSource.createQueryRunner();
  try {
    await runner.query('SELECT pg_advisory_lock($1)', [MIGRATION_LOCK]);
    const run = await dataSource.runMigrations({ transaction: 'each' });
    if (applicationRole !== null) await grantToApplication(dataSource, applicationRole);
    return run.map((migration) => migration.name);
  } finally {
    await runner.query('SELECT pg_advisory_unlock($1)', [MIGRATION_LOCK]);
    await runner.release();
  }
}
