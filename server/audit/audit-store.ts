import type { AuditEntry } from '@shared/contracts/audit';
import type { Tx } from '../database/transactions';
import type { Cursor } from '../http/cursor';
import { requestOrigin } from '../http/request-origin';
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

/** Which changes of a room to list; null for any. */
export interface AuditSelection {
  readonly personId: string | null;
  /** What was changed, the part of the action before the point. */
  readonly object: string | null;
  readonly from: Date | null;
  /** Exclusive. */
  readonly to: Date | null;
  /** Only those before the last one of the page before. */
  readonly before: Cursor | null;
  readonly limit: number;
}

type AuditRow = Omit<AuditEntry, 'at'> & { readonly at: Date };

/** Keeps who changed what, when and from where. Entries are added and read, never changed. */
export class AuditStore {
  /**
   * Notes a change in the transaction that makes it.
   *
   * @param tx - The transaction of the change.
   * @param note - Who changed what.
   */
  async note(tx: Tx, { roomId, personId, action, subjectId, detail }: AuditNote): Promise<void> {
    const origin = requestOrigin();
    await tx.insert(AuditEntryEntity, {
      ...{ roomId, personId, action, subjectId, origin },
      detail: { ...detail },
    });
  }

  /** A page of a room's changes, newest first. */
  async page(tx: Tx, roomId: string, selection: AuditSelection): Promise<AuditEntry[]> {
    const { personId, object, from, to, before, limit } = selection;
    // A cursor holds milliseconds, the database keeps microseconds.
    const rows: AuditRow[] = await tx.query(
      `SELECT entry.id, date_trunc('milliseconds', entry.at) AS at, entry.person_id AS "personId",
              person.name AS "personName", entry.action, entry.subject_id AS "subjectId", entry.origin, entry.detail
       FROM audit_entry AS entry LEFT JOIN person ON person.id = entry.person_id
       WHERE entry.room_id = $1
         AND ($2::uuid IS NULL OR entry.person_id = $2)
         AND ($3::text IS NULL OR split_part(entry.action, '.', 1) = $3)
         AND ($4::timestamptz IS NULL OR entry.at >= $4)
         AND ($5::timestamptz IS NULL OR entry.at < $5)
         AND ($6::timestamptz IS NULL OR (date_trunc('milliseconds', entry.at), entry.id) < ($6, $7::uuid))
       ORDER BY date_trunc('milliseconds', entry.at) DESC, entry.id DESC LIMIT $8`,
      [roomId, personId, object, from, to, before?.at ?? null, before?.id ?? null, limit],
    );
    return rows.map((row) => ({ ...row, at: row.at.toISOString() }));
  }
}
