import type { Transactions } from '../database/transactions';

/**
 * Lets a piece of work run in one process at a time.
 *
 * @param transactions - Of the database that all processes share.
 * @param name - Of the work.
 * @param work - What to do.
 * @returns False when another process is at it.
 */
export async function whenAlone(
  transactions: Transactions,
  name: string,
  work: () => Promise<void>,
): Promise<boolean> {
  return transactions.run(async (tx) => {
    const rows: { got: boolean }[] = await tx.query('SELECT pg_try_advisory_xact_lock(hashtext($1)) AS got', [
      `job ${name}`,
    ]);
    if (rows[0]?.got !== true) return false;
    await work();
    return true;
  });
}
