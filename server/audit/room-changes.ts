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
  private follow: (roomId: string) => Promise<void> = () => Promise.resolve();

  constructor(
    private readonly transactions: Transactions,
    private readonly audit: AuditStore,
    private readonly feed: LiveFeed,
  ) {}

  /**
   * Names what follows every change, before dashboards hear of it.
   *
   * @param work - Must not fail: the change is made already.
   */
  followBy(work: (roomId: string) => Promise<void>): void {
    this.follow = work;
  }

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
    await this.follow(by.roomId);
    this.feed.publish(by.roomId, 'room:changed', { roomId: by.roomId });
    return done;
  }
}
