import type { ShelfEvent } from '@shared/contracts/care';
import type { Tx } from '../database/transactions';
import { notFound } from '../http/request-problem';
import { ShelfEventEntity } from './shelf-event-entity';

/** Something done or seen on a shelf, to be noted. */
export interface NewShelfEvent extends Pick<ShelfEvent, 'shelfId' | 'kind' | 'text'> {
  readonly at: Date;
  readonly personId: string;
}

/** Done tasks of a shelf, or of what stands on it, as marks: what was given or picked with them is said after the title. */
const doneTasks = `
  SELECT task.id, shelf.id AS "shelfId", task.done_at AS at,
    CASE task.kind WHEN 'water' THEN 'watered' WHEN 'feed' THEN 'fed' WHEN 'trim' THEN 'trimmed' WHEN 'pick' THEN 'picked'
      WHEN 'countGermination' THEN 'counted' ELSE 'observed' END AS kind,
    concat_ws(', ', task.title, task.millilitres || ' ml', task.grams || ' g', nullif(task.note, '')) AS text,
    person.name AS "personName"
  FROM task
  LEFT JOIN planting ON planting.id = task.planting_id
  JOIN shelf ON shelf.id = coalesce(task.shelf_id, planting.shelf_id)
  LEFT JOIN person ON person.id = task.done_by
  WHERE task.outcome = 'done'`;

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

  /** What was noted or done on a shelf from an instant up to another, in order. */
  async of(tx: Tx, shelfId: string, from: Date, to: Date): Promise<ShelfEvent[]> {
    const rows: EventRow[] = await tx.query(
      `${events} WHERE event.shelf_id = $1 AND event.at >= $2 AND event.at < $3
       UNION ALL ${doneTasks} AND shelf.id = $1 AND task.done_at >= $2 AND task.done_at < $3
       ORDER BY at, id`,
      [shelfId, from, to],
    );
    return rows.map(asEvent);
  }
}

function asEvent({ at, ...event }: EventRow): ShelfEvent {
  return { ...event, at: at.toISOString() };
}
