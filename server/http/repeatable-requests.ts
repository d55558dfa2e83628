import { createHash, randomUUID } from 'node:crypto';
import type { Request } from 'express';
import type { Endpoint } from '@shared/contracts/endpoint';
import { withBeforeCommit } from '../database/commit-scope';
import type { Transactions, Tx } from '../database/transactions';
import { RequestProblem, conflict } from './request-problem';
import type { SignedInPerson } from './route';

interface Held {
  readonly fingerprint: string;
  readonly status: number | null;
  readonly reply: unknown;
  /** It was done, and whoever did it can no longer answer. */
  readonly isAnswerLost: boolean;
}

/** Who runs a request under which key. */
interface Claim {
  readonly personId: string;
  readonly key: string;
  readonly claimId: string;
}

/** A process that runs a request and says nothing for so long may have died with it. */
const STALE_AFTER_S = 10;

/**
 * Writes that a phone may send twice: with an `Idempotency-Key` the first answer is kept, and given again for the same
 * request under the same key.
 *
 * What is done is noted under the key in the very transaction that does it. So a request whose process died is done once:
 * if it had committed, a repetition is told so; if not, the repetition does it. Should the first be slow rather than dead,
 * only one of both commits.
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
   * @throws {@link RequestProblem} 409 `STILL_RUNNING` while the first is, `KEY_USED` when the key was used for something
   *   else, `DONE_BEFORE` when the first was done but its answer is lost: load anew what it was about.
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
    const claim = { personId: person.id, key, claimId: randomUUID() };
    const held = await this.claim(claim, fingerprint);
    return held === null ? this.run(claim, endpoint, run) : this.repeat(held, fingerprint);
  }

  private async run(claim: Claim, endpoint: Endpoint, run: () => Promise<unknown>): Promise<unknown> {
    const { personId, key, claimId } = claim;
    try {
      const reply = await withBeforeCommit((tx) => this.noteCommit(tx, claim), run);
      await this.transactions.plain.query(
        'UPDATE repeatable_request SET status = $4, reply = $5 WHERE person_id = $1 AND key = $2 AND claim_id = $3',
        [personId, key, claimId, endpoint.status, JSON.stringify(reply ?? null)],
      );
      return reply;
    } catch (error) {
      // It did not happen, so the key is free for another try.
      await this.transactions.plain.query(
        `DELETE FROM repeatable_request
         WHERE person_id = $1 AND key = $2 AND claim_id = $3 AND committed_at IS NULL`,
        [personId, key, claimId],
      );
      throw error;
    }
  }

  private async noteCommit(tx: Tx, { personId, key, claimId }: Claim): Promise<void> {
    const [, changed]: [unknown[], number] = await tx.query(
      `UPDATE repeatable_request SET committed_at = now() WHERE person_id = $1 AND key = $2 AND claim_id = $3`,
      [personId, key, claimId],
    );
    if (changed === 0) throw conflict('STILL_RUNNING', 'The same request is being worked on a second time.');
  }

  /** Takes the key, or what died while it held it; null when it is ours now. */
  private async claim({ personId, key, claimId }: Claim, fingerprint: string): Promise<Held | null> {
    const plain = this.transactions.plain;
    const claimed: unknown[] = await plain.query(
      `INSERT INTO repeatable_request AS held (person_id, key, fingerprint, claim_id) VALUES ($1, $2, $3, $4)
       ON CONFLICT ON CONSTRAINT repeatable_request_pkey DO UPDATE SET claim_id = $4, claimed_at = now()
         WHERE held.fingerprint = $3 AND held.status IS NULL AND held.committed_at IS NULL
           AND held.claimed_at < now() - make_interval(secs => $5)
       RETURNING key`,
      [personId, key, fingerprint, claimId, STALE_AFTER_S],
    );
    if (claimed.length > 0) return null;
    const held: Held[] = await plain.query(
      `SELECT fingerprint, status, reply,
         committed_at IS NOT NULL AND claimed_at < now() - make_interval(secs => $3) AS "isAnswerLost"
       FROM repeatable_request WHERE person_id = $1 AND key = $2`,
      [personId, key, STALE_AFTER_S],
    );
    return held[0] ?? null;
  }

  private repeat(held: Held, fingerprint: string): unknown {
    if (held.fingerprint !== fingerprint) {
      throw conflict('KEY_USED', 'This Idempotency-Key was used for another request.');
    }
    if (held.status !== null) return held.reply;
    if (held.isAnswerLost) {
      throw conflict('DONE_BEFORE', 'This was done when you sent it first. Load it anew.');
    }
    throw conflict('STILL_RUNNING', 'The same request is still being worked on.');
  }
}
