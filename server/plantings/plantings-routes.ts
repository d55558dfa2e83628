import * as eventsContract from '@shared/contracts/planting-events';
import * as contract from '@shared/contracts/plantings';
import { authorOf } from '../audit/room-author';
import { decodeCursor } from '../http/cursor';
import { route, type Route } from '../http/route';
import type { PlantingEventsService } from './planting-events-service';
import type { PlantingStartService } from './planting-start-service';
import type { PlantingsService } from './plantings-service';

/**
 * Plantings and what happens to them over HTTP.
 *
 * @param plantings - Reads them.
 * @param start - Begins, corrects and removes them.
 * @param events - Notes what happens.
 * @returns The routes.
 */
export function plantingsRoutes(
  plantings: PlantingsService,
  start: PlantingStartService,
  events: PlantingEventsService,
): Route[] {
  return [
    route(contract.listPlantings, ({ room, query: { cursor, ...filter } }) =>
      plantings.list(room.id, { ...filter, after: decodeCursor(cursor) }),
    ),
    route(contract.getPlanting, ({ room, params }) => plantings.detail(room.id, params.plantingId)),
    route(contract.startPlanting, (context) =>
      start.start(authorOf(context), context.room.timeZone, context.body),
    ),
    route(contract.changePlanting, (context) =>
      start.change(authorOf(context), context.params.plantingId, context.body),
    ),
    route(contract.removePlanting, (context) => start.remove(authorOf(context), context.params.plantingId)),
    route(contract.splitPlanting, (context) =>
      events.split(authorOf(context), context.room.timeZone, context.params.plantingId, context.body),
    ),
    route(contract.mergePlanting, (context) =>
      events.merge(authorOf(context), context.room.timeZone, context.params.plantingId, context.body),
    ),
    route(eventsContract.observePlanting, (context) =>
      events.note(authorOf(context), context.room.timeZone, context.params.plantingId, context.body),
    ),
    route(eventsContract.stepPlanting, (context) =>
      events.note(authorOf(context), context.room.timeZone, context.params.plantingId, context.body),
    ),
    route(eventsContract.undoPlantingEvent, (context) => {
      const { plantingId, eventId } = context.params;
      const by = { ...authorOf(context), role: context.room.role };
      return events.undo(by, context.room.timeZone, plantingId, eventId);
    }),
  ];
}
