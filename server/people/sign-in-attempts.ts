import { createHash } from 'node:crypto';
import { ipKeyGenerator } from 'express-rate-limit';
import type { Transactions } from '../database/transactions';
import { RateLimitStore } from '../http/rate-limit-store';
import { RequestProblem } from '../http/request-problem';

const WINDOW_MS = 15 * 60_000;
const MOST_PER_ADDRESS = 10;
const MOST_PER_IP = 50;

/** Who tries: the account that is tried and where from. */
export interface Attempt {
  readonly email: string;
  readonly ip: string;
}

interface Limit {
  readonly store: RateLimitStore;
  readonly most: number;
  readonly keyOf: (attempt: Attempt) => string;
}

/** Slows down guessing: failures are counted by account and place, and by place alone. */
export class SignInAttempts {
  private readonly limits: readonly Limit[];

  constructor(transactions: Transactions) {
    this.limits = [
      {
        store: new RateLimitStore(transactions, 'sign-in:', WINDOW_MS),
        most: MOST_PER_ADDRESS,
        // Hashed, because addresses that people mistype have no business in the database.
        keyOf: ({ email, ip }) =>
          createHash('sha256')
            .update(`${email.toLowerCase()} ${ipKeyGenerator(ip)}`)
            .digest('base64url'),
      },
      {
        store: new RateLimitStore(transactions, 'sign-in-ip:', WINDOW_MS),
        most: MOST_PER_IP,
        keyOf: ({ ip }) => ipKeyGenerator(ip),
      },
    ];
  }

  /**
   * Counts an attempt before it is made, so that many at once can't slip through.
   *
   * @param attempt - Who tries.
   * @throws {@link RequestProblem} 429 `TOO_MANY_ATTEMPTS` with `Retry-After` when there were too many failures.
   */
  async count(attempt: Attempt): Promise<void> {
    for (const { store, most, keyOf } of this.limits) {
      const { totalHits, resetTime } = await store.increment(keyOf(attempt));
      if (totalHits > most) throw tooMany(resetTime);
    }
  }

  /**
   * Takes an attempt back that was no guess.
   *
   * @param attempt - As it was counted.
   */
  async takeBack(attempt: Attempt): Promise<void> {
    for (const { store, keyOf } of this.limits) await store.decrement(keyOf(attempt));
  }
}

function tooMany(resetTime: Date | undefined): RequestProblem {
  const waitMs = resetTime === undefined ? WINDOW_MS : resetTime.getTime() - Date.now();
  const waitS = Math.max(1, Math.ceil(waitMs / 1000));
  return new RequestProblem(
    429,
    'TOO_MANY_ATTEMPTS',
    `Too many attempts. Try again in ${Math.ceil(waitS / 60)} min.`,
    [],
    { 'Retry-After': String(waitS) },
  );
}
