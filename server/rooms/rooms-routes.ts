import * as rangesContract from '@shared/contracts/room-ranges';
import * as contract from '@shared/contracts/rooms';
import { authorOf } from '../audit/room-author';
import { route, type Route } from '../http/route';
import type { RoomRangesService } from './room-ranges-service';
import type { RoomsService } from './rooms-service';
import type { ShelfRulesService } from './shelf-rules-service';

/**
 * The room's settings, its racks and shelves, and what is fitted to and wanted of them.
 *
 * @param rooms - Room, racks, shelves, lamps and heat mats.
 * @param rules - Lamp hours, wanted ranges and wanted light.
 * @param ranges - Ranges for the whole room.
 * @returns The routes.
 */
export function roomsRoutes(
  rooms: RoomsService,
  rules: ShelfRulesService,
  ranges: RoomRangesService,
): Route[] {
  return [
    route(contract.getRoom, ({ room }) => rooms.room(room.id)),
    route(contract.changeRoom, (context) => rooms.changeRoom(authorOf(context), context.body)),
    route(contract.listRacks, ({ room }) => rooms.racksOf(room.id)),
    route(contract.addRack, (context) => rooms.addRack(authorOf(context), context.body)),
    route(contract.addShelf, (context) =>
      rooms.addShelf(authorOf(context), context.params.rackId, context.body),
    ),
    route(contract.changeShelf, (context) =>
      rooms.changeShelf(authorOf(context), context.params.shelfId, context.body),
    ),
    route(contract.retireShelf, (context) => rooms.retireShelf(authorOf(context), context.params.shelfId)),
    route(contract.fitLamp, (context) =>
      rooms.fitLamp(authorOf(context), context.params.shelfId, context.body),
    ),
    route(contract.setLampHours, (context) =>
      rules.setLampHours(authorOf(context), context.params.shelfId, context.body),
    ),
    route(contract.setHeatMat, (context) =>
      rooms.setHeatMat(authorOf(context), context.params.shelfId, context.body),
    ),
    route(contract.listWantedRanges, ({ room, params }) => rules.wantedRanges(room.id, params.shelfId)),
    route(contract.setWantedRange, (context) => {
      const { shelfId, quantity } = context.params;
      return rules.setWantedRange(authorOf(context), shelfId, { ...context.body, quantity });
    }),
    route(contract.clearWantedRange, (context) => {
      const { shelfId, quantity } = context.params;
      return rules.clearWantedRange(authorOf(context), shelfId, quantity);
    }),
    route(rangesContract.listRoomRanges, ({ room }) => ranges.list(room.id)),
    route(rangesContract.setRoomRange, (context) =>
      ranges.set(authorOf(context), { ...context.body, quantity: context.params.quantity }),
    ),
    route(rangesContract.clearRoomRange, (context) =>
      ranges.clear(authorOf(context), context.params.quantity),
    ),
    route(contract.setWantedLight, (context) =>
      rules.setWantedLight(authorOf(context), context.params.shelfId, context.body),
    ),
    route(contract.clearWantedLight, (context) =>
      rules.clearWantedLight(authorOf(context), context.params.shelfId),
    ),
  ];
}
