import type { ClientRateLimitInfo, Store } from 'express-rate-limit';
import type { Transactions } from '../database/transactions';

/** Counts attempts in PostgreSQL, so that every process counts the same. */
export class RateLimitStore implements Store {
  constructor(
    private readonly transactions: Transactions,
    readonly prefix: string,
    private readonly windowMs: number,
  ) {}

  /** Adds an attempt and tells how many there were in the window. */
  async increment(key: string): Promise<ClientRateLimitInfo> {
    const rows: { hits: number; resets_at: Date }[] = await this.transactions.plain.query(
      `INSERT INTO rate_limit AS held (key, hits, resets_at)
       VALUES ($1, 1, now() + make_interval(secs => $2))
       ON CONFLICT (key) DO UPDATE SET
         hits = CASE WHEN held.resets_at <= now() THEN 1 ELSE held.hits + 1 END,
         resets_at = CASE WHEN held.resets_at <= now() THEN excluded.resets_at ELSE held.resets_at END
       RETURNING hits, resets_at`,
      [this.prefix + key, this.windowMs / 1000],
    );
    const row = rows[0];
    return { totalHits: row?.hits ?? 1, resetTime: row?.resets_at };
  }

  /** Takes an attempt back, for those that succeeded. */
  async decrement(key: string): Promise<void> {
    await this.transactions.plain.query('UPDATE rate_limit SET hits = greatest(hits - 1, 0) WHERE key = $1', [
      this.prefix + key,
    ]);
  }

  /** Forgets a key. */
  async resetKey(key: string): Promise<void> {
    await this.transactions.plain.query('DELETE FROM rate_limit WHERE key = $1', [this.prefix + key]);
  }
}
