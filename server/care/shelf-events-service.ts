import type { ShelfEvent } from '@shared/contracts/care';
import type { RoomAuthor } from '../audit/room-author';
import type { Clock } from '../clock';
import type { Transactions } from '../database/transactions';
import type { LiveFeed } from '../live/live-feed';
import { noteInstant } from '../plantings/note-instant';
import type { RoomsService } from '../rooms/rooms-service';
import type { NewShelfEvent, ShelfEventsStore } from './shelf-events-store';

/** What {@link ShelfEventsService} works with. */
export interface ShelfEventsParts {
  readonly transactions: Transactions;
  readonly events: ShelfEventsStore;
  readonly rooms: Pick<RoomsService, 'requireShelf'>;
  readonly feed: LiveFeed;
  readonly now: Clock;
}

/** What was done and seen on shelves. */
export class ShelfEventsService {
  constructor(private readonly parts: ShelfEventsParts) {}

  /** Notes what was done or seen on a shelf, now or earlier. */
  async add(
    by: RoomAuthor,
    event: Pick<NewShelfEvent, 'shelfId' | 'kind' | 'text'> & { readonly at?: string | undefined },
  ): Promise<ShelfEvent> {
    const { transactions, events, rooms, feed, now } = this.parts;
    const at = noteInstant(event.at, now());
    const noted = await transactions.run(async (tx) => {
      await rooms.requireShelf(tx, by.roomId, event.shelfId);
      return events.event(tx, await events.add(tx, { ...event, at, personId: by.personId }));
    });
    feed.publish(by.roomId, 'room:changed', { roomId: by.roomId });
    return noted;
  }

  /** What was done or seen on a shelf from an instant up to another, exclusive, in order. */
  of(shelfId: string, from: Date, to: Date): Promise<ShelfEvent[]> {
    return this.parts.events.of(this.parts.transactions.plain, shelfId, from, to);
  }
}
