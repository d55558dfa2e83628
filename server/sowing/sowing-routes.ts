import * as contract from '@shared/contracts/sowing';
import { dayBounds } from '@shared/series/room-days';
import { authorOf } from '../audit/room-author';
import type { Clock } from '../clock';
import { route, type Route } from '../http/route';
import type { PlaceService } from './place-service';
import type { SowingService } from './sowing-service';

/**
 * Frost dates, day length and the sowing calendar over HTTP.
 *
 * @param place - Of the room.
 * @param sowing - Its calendar.
 * @param now - For the year that is not named.
 * @returns The routes.
 */
export function sowingRoutes(place: PlaceService, sowing: SowingService, now: Clock): Route[] {
  return [
    route(contract.getFrostDates, ({ room }) => place.frostDates(room.id)),
    route(contract.setFrostDates, (context) => place.setFrostDates(authorOf(context), context.body)),
    route(contract.getDayLength, ({ room, query }) => {
      const thisYear = Number(dayBounds(now().getTime(), room.timeZone).date.slice(0, 4));
      return place.dayLength(room.id, query.year ?? thisYear);
    }),
    route(contract.getSowingCalendar, ({ room }) => sowing.calendar(room)),
    route(contract.chooseSowingCrop, (context) => {
      const { cropId } = context.params;
      return sowing.choose(authorOf(context), context.room.timeZone, cropId, context.body.everyDays);
    }),
    route(contract.unchooseSowingCrop, (context) =>
      sowing.unchoose(authorOf(context), context.room.timeZone, context.params.cropId),
    ),
    route(contract.addSowingTask, (context) =>
      sowing.addTask(authorOf(context), context.params.cropId, context.body),
    ),
  ];
}
