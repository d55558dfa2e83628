import type { QueryRunner } from 'typeorm';
import type { TestApplication } from '../api/test-application';

/** Any number; whoever holds it keeps the writes waiting. */
const LOCK = 88_214;

/** Writes that stand still in the middle of their transaction, so that a test can end it there. */
export class HeldWrites {
  private constructor(
    private readonly application: Pick<TestApplication, 'tx'>,
    private readonly holder: QueryRunner,
    private readonly table: string,
  ) {}

  /**
   * Has writes wait from now on.
   *
   * @param application - Whose database.
   * @param table - The table that is written to.
   * @param when - Which of its writes: as a trigger says it, such as `BEFORE INSERT`.
   * @param condition - Of the trigger; all of them unless given.
   */
  static async on(
    application: Pick<TestApplication, 'tx' | 'database'>,
    table: string,
    when: string,
    condition = 'true',
  ): Promise<HeldWrites> {
    const { tx, database } = application;
    await tx.query(`
      CREATE OR REPLACE FUNCTION wait_before_writing() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN PERFORM pg_advisory_xact_lock_shared(${LOCK}); RETURN NEW; END $$`);
    await tx.query(`
      CREATE TRIGGER wait_before_writing ${when} ON ${table} FOR EACH ROW
      WHEN (${condition}) EXECUTE FUNCTION wait_before_writing()`);
    const holder = database.dataSource.createQueryRunner();
    await holder.query('SELECT pg_advisory_lock($1)', [LOCK]);
    return new HeldWrites(application, holder, table);
  }

  /** The database's processes that wait to write, once there is one. */
  async waiting(): Promise<number[]> {
    for (;;) {
      const rows: { pid: number }[] = await this.application.tx.query(
        `SELECT pid FROM pg_stat_activity
         WHERE datname = current_database() AND wait_event_type = 'Lock' AND wait_event = 'advisory'`,
      );
      if (rows.length > 0) return rows.map(({ pid }) => pid);
    }
  }

  /** Lets them go on; what was broken off meanwhile is over when this is done. */
  async release(): Promise<void> {
    await this.holder.query('SELECT pg_advisory_unlock($1)', [LOCK]);
    await this.holder.release();
    await this.application.tx.query(`DROP TRIGGER wait_before_writing ON ${this.table}`);
  }
}
