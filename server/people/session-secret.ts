import { randomBytes } from 'node:crypto';
import type { Transactions } from '../database/transactions';

/**
 * The secret that signs session cookies: the configured one, or else a random one that all processes share through the
 * database.
 *
 * @param transactions - Of the migrated database.
 * @param configured - From the settings; null when none is set.
 * @returns The secret.
 */
export async function sessionSecret(transactions: Transactions, configured: string | null): Promise<string> {
  if (configured !== null) return configured;
  // Setting the name to itself changes nothing, but returns the row that an earlier process made.
  const rows: { value: string }[] = await transactions.plain.query(
    `INSERT INTO instance_secret (name, value) VALUES ('session', $1)
     ON CONFLICT (name) DO UPDATE SET name = excluded.name RETURNING value`,
    [randomBytes(32).toString('base64url')],
  );
  const secret = rows[0]?.value;
  if (secret === undefined) throw new Error('The database kept no session secret');
  return secret;
}
