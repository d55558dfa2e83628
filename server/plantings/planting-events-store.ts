import type { LossReason } from '@shared/growing/planting-event';
import type { PlaceSpan } from '@shared/growing/planting-history';
import type { PlantingStage } from '@shared/growing/planting-stage';
import type { Tx } from '../database/transactions';
import { PlantingEventEntity } from './planting-event-entity';
import { PlantingPlaceEntity } from './planting-place-entity';

/** An event as it is stored, with the names of whom and where. */
export interface StoredEvent {
  readonly id: string;
  readonly seq: number;
  readonly at: Date;
  readonly kind: PlantingEventEntity['kind'];
  readonly count: number | null;
  readonly grams: number | null;
  readonly millilitres: number | null;
  readonly stage: PlantingStage | null;
  readonly container: string | null;
  readonly shelfId: string | null;
  readonly shelfLabel: string | null;
  readonly lossReason: LossReason | null;
  readonly otherPlantingId: string | null;
  readonly isLast: boolean;
  readonly note: string;
  readonly personId: string | null;
  readonly personName: string | null;
  readonly taskId: string | null;
}

/** An event to note. */
export type NewEvent = Pick<StoredEvent, 'kind' | 'at'> &
  Partial<Omit<StoredEvent, 'id' | 'seq' | 'kind' | 'at' | 'shelfLabel' | 'personName'>>;

/** A time at a place, with its label. */
export interface StoredPlace {
  readonly shelfId: string | null;
  readonly shelfLabel: string | null;
  readonly fromAt: Date;
  readonly toAt: Date | null;
}

/** What happened to plantings, and where they stood. */
export class PlantingEventsStore {
  /** The events of a planting in the order they were noted. */
  of(tx: Tx, plantingId: string): Promise<StoredEvent[]> {
    return tx.query(
      `SELECT event.id, event.seq, event.at, event.kind, event.count, event.grams, event.millilitres, event.stage, event.container,
         event.shelf_id AS "shelfId", shelf.label AS "shelfLabel", event.loss_reason AS "lossReason",
         event.other_planting_id AS "otherPlantingId", event.is_last AS "isLast", event.note,
         event.person_id AS "personId", person.name AS "personName", event.task_id AS "taskId"
       FROM planting_event AS event
       LEFT JOIN shelf ON shelf.id = event.shelf_id LEFT JOIN person ON person.id = event.person_id
       WHERE event.planting_id = $1 ORDER BY event.seq`,
      [plantingId],
    );
  }

  /** Notes an event after the others, and returns its id. */
  async add(tx: Tx, plantingId: string, event: NewEvent): Promise<string> {
    const last = await tx.maximum(PlantingEventEntity, 'seq', { plantingId });
    return (await tx.save(PlantingEventEntity, { ...event, plantingId, seq: (last ?? -1) + 1 })).id;
  }

  /** The plantings that a task wrote something at, each with what. */
  async ofTask(tx: Tx, taskId: string): Promise<{ plantingId: string; eventId: string }[]> {
    const events = await tx.find(PlantingEventEntity, { where: { taskId }, order: { plantingId: 'ASC' } });
    return events.map(({ plantingId, id }) => ({ plantingId, eventId: id }));
  }

  /** Takes an event back. */
  async remove(tx: Tx, eventId: string): Promise<void> {
    await tx.delete(PlantingEventEntity, { id: eventId });
  }

  /** Writes where a planting stood, in place of what was written before. */
  async setPlaces(tx: Tx, plantingId: string, places: readonly PlaceSpan[]): Promise<void> {
    await tx.delete(PlantingPlaceEntity, { plantingId });
    await tx.insert(
      PlantingPlaceEntity,
      places.map(({ shelfId, from, to }) => ({
        plantingId,
        shelfId,
        fromAt: new Date(from),
        toAt: to === null ? null : new Date(to),
      })),
    );
  }

  /** Where a planting stood, in order. */
  placesOf(tx: Tx, plantingId: string): Promise<StoredPlace[]> {
    return tx.query(
      `SELECT place.shelf_id AS "shelfId", shelf.label AS "shelfLabel", place.from_at AS "fromAt",
         place.to_at AS "toAt"
       FROM planting_place AS place LEFT JOIN shelf ON shelf.id = place.shelf_id
       WHERE place.planting_id = $1 ORDER BY place.from_at, place.to_at NULLS LAST`,
      [plantingId],
    );
  }
}
