import type { ShelfEvent } from '@shared/contracts/care';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { ShelfEventEntity } from './shelf-event-entity';

/** Something done or seen on a shelf, to be noted. */
export interface NewShelfEvent extends Pick<ShelfEvent, 'shelfId' | 'kind' | 'text'> {
  readonly at: Date;
  readonly personId: string;
}

type EventRow = Omit<ShelfEvent, 'at'> & { readonly at: Date };

const events = `
  SELECT event.id, event.shelf_id AS "shelfId", event.at, event.kind, event.text, person.name AS "personName"
  FROM shelf_event AS event LEFT JOIN person ON person.id = event.person_id`;

/** What happened on shelves. */
export class ShelfEventsStore {
  /** Notes what was done or seen, and returns its id. */
  async add(tx: Tx, event: NewShelfEvent): Promise<string> {
    const { id } = await tx.save(ShelfEventEntity, event);
    return id;
  }

  /** One event. */
  async event(tx: Tx, eventId: string): Promise<ShelfEvent> {
    const rows: EventRow[] = await tx.query(`${events} WHERE event.id = $1`, [eventId]);
    const row = rows[0];
    if (row === undefined) throw notFound('event');
    return asEvent(row);
  }

  /** What was done or seen on a shelf from an instant up to another, in order. */
  async of(tx: Tx, shelfId: string, from: Date, to: Date): Promise<ShelfEvent[]> {
    const rows: EventRow[] = await tx.query(
      `${events} WHERE event.shelf_id = $1 AND event.at >= $2 AND event.at < $3 ORDER BY event.at, event.id`,
      [shelfId, from, to],
    );
    return rows.map(asEvent);
  }
}

function asEvent({ at, ...event }: EventRow): ShelfEvent {
  return { ...event, at: at.toISOString() };
}
