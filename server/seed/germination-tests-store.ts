import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { GerminationCountEntity } from './germination-count-entity';
import { GerminationTestEntity } from './germination-test-entity';

/** A test with its counts in order of days. */
export interface StoredTest {
  readonly id: string;
  readonly lotId: string;
  readonly startedOn: string;
  readonly seeds: number;
  readonly note: string;
  readonly counts: readonly { readonly day: number; readonly up: number }[];
}

const tests = `
  SELECT test.id, test.lot_id AS "lotId", test.started_on::text AS "startedOn", test.seeds, test.note,
    coalesce((SELECT json_agg(json_build_object('day', count.day, 'up', count.up) ORDER BY count.day)
      FROM germination_count AS count WHERE count.test_id = test.id), '[]') AS counts
  FROM germination_test AS test`;

/** Germination tests of seed lots. */
export class GerminationTestsStore {
  /** Tests of lots, newest first. */
  ofLots(tx: Tx, lotIds: readonly string[]): Promise<StoredTest[]> {
    return tx.query(`${tests} WHERE test.lot_id = ANY($1) ORDER BY test.started_on DESC, test.id`, [lotIds]);
  }

  /** One test, held until the transaction ends; 404 when the lot has none such. */
  async lock(tx: Tx, lotId: string, testId: string): Promise<StoredTest> {
    const rows: StoredTest[] = await tx.query(
      `${tests} WHERE test.lot_id = $1 AND test.id = $2 FOR UPDATE OF test`,
      [lotId, testId],
    );
    const test = rows[0];
    if (test === undefined) throw notFound('germination test');
    return test;
  }

  /** Adds a test and returns its id. */
  async add(tx: Tx, test: Omit<StoredTest, 'id' | 'counts'>): Promise<string> {
    return (await tx.save(GerminationTestEntity, test)).id;
  }

  /** Notes a count; one of the same day is replaced. */
  async count(tx: Tx, testId: string, day: number, up: number): Promise<void> {
    await tx.upsert(GerminationCountEntity, { testId, day, up }, ['testId', 'day']);
  }

  /** Removes a test with its counts and what it took. */
  async remove(tx: Tx, testId: string): Promise<void> {
    await tx.delete(GerminationTestEntity, { id: testId });
  }
}
