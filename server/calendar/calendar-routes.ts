import * as contract from '@shared/contracts/care-feed';
import { route, type Route } from '../http/route';
import type { CalendarService } from './calendar-service';

/**
 * Calendar feeds over HTTP.
 *
 * @param calendars - The service.
 * @returns The routes.
 */
export function calendarRoutes(calendars: CalendarService): Route[] {
  return [
    route(contract.getCalendarFeed, ({ person }) => calendars.feed(person.id)),
    route(contract.renewCalendarFeed, ({ person }) => calendars.renew(person.id)),
    route(contract.removeCalendarFeed, ({ person }) => calendars.remove(person.id)),
    route(contract.readCalendarFeed, async ({ params, res }) => {
      const calendar = await calendars.read(params.token);
      res.set({ 'Content-Type': 'text/calendar; charset=utf-8', 'Cache-Control': 'private, no-store' });
      res.send(calendar);
      return '';
    }),
  ];
}
