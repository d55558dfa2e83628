import type { Transactions, Tx } from '../database/transactions';
import type { LiveFeed } from '../live/live-feed';
import type { AuditNote, AuditStore } from './audit-store';
import type { RoomAuthor } from './room-author';

/** What came of a change, and how it is noted. */
export interface NotedChange<T> extends Pick<AuditNote, 'action' | 'subjectId' | 'detail'> {
  readonly result: T;
}

/** The one way in which people change a room: in one transaction with who did it; its dashboards hear of it afterwards. */
export class RoomChanges {
  constructor(
    private readonly transactions: Transactions,
    private readonly audit: AuditStore,
    private readonly feed: LiveFeed,
  ) {}

  /**
   * Makes a change.
   *
   * @param by - Who, in which room.
   * @param work - Changes, and tells what is noted; throwing leaves everything as it was.
   * @returns The result of the work, after the commit.
   */
  async make<T>(by: RoomAuthor, work: (tx: Tx) => Promise<NotedChange<T>>): Promise<T> {
    const done = await this.transactions.run(async (tx) => {
      const { result, ...note } = await work(tx);
      await this.audit.note(tx, { ...by, ...note });
      return result;
    });
    this.feed.publish(by.roomId, 'room:changed', { roomId: by.roomId });
    return done;
  }
}
