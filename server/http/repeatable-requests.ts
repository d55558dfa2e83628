import { createHash } from 'node:crypto';
import type { Request } from 'express';
import type { Endpoint } from '@shared/contracts/endpoint';
import type { Transactions } from '../database/transactions';
import { RequestProblem, conflict } from './request-problem';
import type { SignedInPerson } from './route';

interface Held {
  readonly fingerprint: string;
  readonly status: number | null;
  readonly reply: unknown;
}

/**
 * Writes that a phone may send twice: with an `Idempotency-Key` the first answer is kept, and given again for the same
 * request under the same key.
 */
export class RepeatableRequests {
  constructor(private readonly transactions: Transactions) {}

  /**
   * Runs a request at most once a key.
   *
   * @param endpoint - What is called.
   * @param person - By whom; without a person there is nothing to repeat for.
   * @param req - Its header names the key.
   * @param run - Does it.
   * @returns The reply, of now or of the first time.
   * @throws {@link RequestProblem} 409 while the first is still running, or when the key was used for something else.
   */
  async once(
    endpoint: Endpoint,
    person: SignedInPerson | undefined,
    req: Request,
    run: () => Promise<unknown>,
  ): Promise<unknown> {
    const key = req.get('Idempotency-Key');
    if (key === undefined || person === undefined || endpoint.method === 'get') return run();
    if (!/^[\w-]{8,80}$/.test(key)) {
      throw new RequestProblem(
        422,
        'BAD_IDEMPOTENCY_KEY',
        'Idempotency-Key must be 8 to 80 letters or digits.',
      );
    }
    const fingerprint = createHash('sha256')
      .update(JSON.stringify([endpoint.name, req.params, req.body ?? null]))
      .digest('hex');
    const held = await this.claim(person.id, key, fingerprint);
    if (held !== null) return this.repeat(held, fingerprint);
    try {
      const reply = await run();
      await this.transactions.plain.query(
        'UPDATE repeatable_request SET status = $3, reply = $4 WHERE person_id = $1 AND key = $2',
        [person.id, key, endpoint.status, JSON.stringify(reply ?? null)],
      );
      return reply;
    } catch (error) {
      // It did not happen, so the key is free for another try.
      await this.transactions.plain.query(
        'DELETE FROM repeatable_request WHERE person_id = $1 AND key = $2',
        [person.id, key],
      );
      throw error;
    }
  }

  private async claim(personId: string, key: string, fingerprint: string): Promise<Held | null> {
    const plain = this.transactions.plain;
    const claimed: unknown[] = await plain.query(
      `INSERT INTO repeatable_request (person_id, key, fingerprint) VALUES ($1, $2, $3)
       ON CONFLICT DO NOTHING RETURNING key`,
      [personId, key, fingerprint],
    );
    if (claimed.length > 0) return null;
    const held: Held[] = await plain.query(
      'SELECT fingerprint, status, reply FROM repeatable_request WHERE person_id = $1 AND key = $2',
      [personId, key],
    );
    return held[0] ?? null;
  }

  private repeat(held: Held, fingerprint: string): unknown {
    if (held.fingerprint !== fingerprint) {
      throw conflict('KEY_USED', 'This Idempotency-Key was used for another request.');
    }
    if (held.status === null) throw conflict('STILL_RUNNING', 'The same request is still being worked on.');
    return held.reply;
  }
}
