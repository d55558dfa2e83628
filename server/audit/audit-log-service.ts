import type { AuditEntry } from '@shared/contracts/audit';
import { dayBounds } from '@shared/series/room-days';
import type { Transactions } from '../database/transactions';
import { decodeCursor, encodeCursor } from '../http/cursor';
import type { AuditStore } from './audit-store';

/** Which changes of a room to list; days of its calendar, `to` exclusive. */
export interface AuditFilter {
  readonly personId?: string | undefined;
  readonly object?: string | undefined;
  readonly from?: string | undefined;
  readonly to?: string | undefined;
  readonly limit: number;
  readonly cursor?: string | undefined;
}

/** Tells who changed what. */
export class AuditLogService {
  constructor(
    private readonly transactions: Transactions,
    private readonly audit: AuditStore,
  ) {}

  /**
   * A page of a room's changes, newest first.
   *
   * @param room - Whose; its time zone says what a day is.
   * @param filter - Which.
   * @returns The page, and a cursor where there are more.
   * @throws {@link RequestProblem} 422 for a cursor that is none.
   */
  async list(
    room: { readonly id: string; readonly timeZone: string },
    { personId, object, from, to, limit, cursor }: AuditFilter,
  ): Promise<{ entries: AuditEntry[]; nextCursor: string | null }> {
    const startOf = (day: string | undefined): Date | null =>
      day === undefined ? null : new Date(dayBounds(day, room.timeZone).start);
    const found = await this.audit.page(this.transactions.plain, room.id, {
      personId: personId ?? null,
      object: object ?? null,
      from: startOf(from),
      to: startOf(to),
      before: decodeCursor(cursor),
      limit: limit + 1,
    });
    const entries = found.slice(0, limit);
    const last = found.length > limit ? entries.at(-1) : undefined;
    return { entries, nextCursor: last === undefined ? null : encodeCursor(last.at, last.id) };
  }
}
