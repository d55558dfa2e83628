import type { DeepPartial, EntityTarget } from 'typeorm';
import type { Tx } from '../../server/database/transactions';

let made = 0;

/**
 * A number that no other thing of this spec file has, for names that must differ.
 *
 * @returns 1, 2, 3 and so on.
 */
export function nextNumber(): number {
  made += 1;
  return made;
}

/**
 * Stores one thing.
 *
 * @param tx - The test's database.
 * @param entity - What it is.
 * @param values - Its columns; defaults of the table fill the rest.
 * @returns It as it was stored, with its id.
 */
export function stored<T extends object>(
  tx: Tx,
  entity: EntityTarget<T>,
  values: NoInfer<DeepPartial<T>>,
): Promise<T> {
  return tx.save(entity, tx.create(entity, values));
}
