import { createHash, randomBytes } from 'node:crypto';

/**
 * A new token for a device.
 *
 * @returns 32 random bytes as base64url; to be shown once.
 */
export function newDeviceToken(): string {
  return randomBytes(32).toString('base64url');
}

/**
 * What is kept of a token. A plain hash is enough: nobody can guess 256 random bits.
 *
 * @param token - As the device sends it.
 * @returns Its SHA-256, hexadecimal.
 */
export function deviceTokenHash(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
