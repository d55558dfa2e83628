import { AsyncLocalStorage } from 'node:async_hooks';
import type { EntityManager } from 'typeorm';

/** What is to happen in every transaction of a piece of work, right before it commits. */
export type BeforeCommit = (tx: EntityManager) => Promise<void>;

const scope = new AsyncLocalStorage<BeforeCommit>();

/**
 * Runs work whose transactions all do something more before they commit.
 *
 * @param beforeCommit - Does it; throwing rolls the transaction back.
 * @param work - The work.
 * @returns What the work returned.
 */
export function withBeforeCommit<T>(beforeCommit: BeforeCommit, work: () => Promise<T>): Promise<T> {
  return scope.run(beforeCommit, work);
}

/** What the present piece of work wants before its transactions commit; undefined for nothing. */
export function presentBeforeCommit(): BeforeCommit | undefined {
  return scope.getStore();
}
