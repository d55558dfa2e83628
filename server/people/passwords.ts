import { randomBytes } from 'node:crypto';
import { argon2id, hash, verify } from 'argon2';

/**
 * 19 MiB, two passes, one lane: the smallest cost that the OWASP Password Storage Cheat Sheet recommends for Argon2id.
 */
const cost = { type: argon2id, memoryCost: 19 * 1024, timeCost: 2, parallelism: 1 } as const;

let hashOfNobody: Promise<string> | undefined;

/**
 * Hashes a password with Argon2id and a salt of its own.
 *
 * @param password - As the person typed it.
 * @returns The hash with its parameters, for {@link passwordMatches}.
 */
export function hashPassword(password: string): Promise<string> {
  return hash(password, cost);
}

/**
 * Checks a password, in the same time whether there is anybody to check it for.
 *
 * @param password - As the person typed it.
 * @param stored - From {@link hashPassword}; null when the person is unknown.
 * @returns Whether it is the person's password; never for null.
 */
export async function passwordMatches(password: string, stored: string | null): Promise<boolean> {
  hashOfNobody ??= hashPassword(randomBytes(32).toString('base64'));
  const matches = await verify(stored ?? (await hashOfNobody), password);
  return matches && stored !== null;
}
