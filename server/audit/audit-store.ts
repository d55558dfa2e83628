import type { Tx } from '../database/transactions';
import { AuditEntryEntity } from './audit-entry-entity';

/** One change that somebody made. */
export interface AuditNote {
  /** Null for what a person changes about themselves. */
  readonly roomId: string | null;
  readonly personId: string;
  /** Object and verb, such as `shelf.retire`. */
  readonly action: string;
  /** What was changed. */
  readonly subjectId: string;
  /** What it was changed to; never a secret. */
  readonly detail: Readonly<Record<string, unknown>>;
}

/** Keeps who changed what. */
export class AuditStore {
  /**
   * Notes a change in the transaction that makes it.
   *
   * @param tx - The transaction of the change.
   * @param note - Who changed what.
   */
  async note(tx: Tx, { roomId, personId, action, subjectId, detail }: AuditNote): Promise<void> {
    await tx.insert(AuditEntryEntity, { roomId, personId, action, subjectId, detail: { ...detail } });
  }
}
