import { createHash, randomBytes } from 'node:crypto';

/**
 * A new secret of a calendar's link.
 *
 * @returns 32 random bytes as base64url; to be shown once.
 */
export function newFeedSecret(): string {
  return randomBytes(32).toString('base64url');
}

/**
 * What is kept of a secret. A plain hash is enough: nobody can guess 256 random bits.
 *
 * @param secret - As the link has it.
 * @returns Its SHA-256, hexadecimal.
 */
export function feedSecretHash(secret: string): string {
  return createHash('sha256').update(secret).digest('hex');
}
