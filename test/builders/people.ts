import { hashPassword } from '../../server/people/passwords';
import type { Tx } from '../../server/database/transactions';
import { MembershipEntity } from '../../server/people/membership-entity';
import { PersonEntity } from '../../server/people/person-entity';
import { aRoom } from './rooms';
import { nextNumber, stored } from './stored';

/** The password of every person in the tests. */
export const testPassword = 'a password for tests';

let testPasswordHash: Promise<string> | undefined;

/** A person who signs in with {@link testPassword}. */
export async function aPerson(tx: Tx, overrides: Partial<PersonEntity> = {}): Promise<PersonEntity> {
  testPasswordHash ??= hashPassword(testPassword); // Hashing is slow on purpose; once a file is enough.
  const number = nextNumber();
  return stored(tx, PersonEntity, {
    email: `person-${number}@example.org`,
    name: `Person ${number}`,
    passwordHash: await testPasswordHash,
    ...overrides,
  });
}

/** A viewer, or what else is said, of a room. */
export async function aMember(tx: Tx, overrides: Partial<MembershipEntity> = {}): Promise<MembershipEntity> {
  return stored(tx, MembershipEntity, {
    role: 'viewer',
    roomId: overrides.roomId ?? (await aRoom(tx)).id,
    personId: overrides.personId ?? (await aPerson(tx)).id,
    ...overrides,
  });
}
