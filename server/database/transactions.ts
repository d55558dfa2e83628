import type { DataSource, EntityManager } from 'typeorm';

import { presentBeforeCommit } from './commit-scope';

/** A connection inside a transaction, or outside one where only reading is done; stores take it, services pass it on. */
export type Tx = EntityManager;

/** Opens transactions; what services need of the database. */
export class Transactions {
  constructor(private readonly dataSource: DataSource) {}

  /** For single statements that need no transaction. */
  get plain(): Tx {
    return this.dataSource.manager;
  }

  /**
   * Takes a connection out of the pool, for what belongs to a connection, such as its advisory locks.
   *
   * @returns The connection, outside any transaction, and the way to give it back.
   */
  async connection(): Promise<{ readonly tx: Tx; release(): Promise<void> }> {
    const runner = this.dataSource.createQueryRunner();
    await runner.connect();
    return { tx: runner.manager, release: () => runner.release() };
  }

  /**
   * Runs work in one transaction.
   *
   * @param work - Gets the transaction; throwing rolls everything back.
   * @returns What the work returned, after the commit.
   */
  run<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
    const beforeCommit = presentBeforeCommit();
    return this.dataSource.transaction(async (tx) => {
      const result = await work(tx);
      await beforeCommit?.(tx);
      return result;
    });
  }
}
