import { getDegreeDays, getSeries, getShelf, getShelfReport } from '@shared/contracts/series';
import { route, type Route } from '../http/route';
import type { SeriesService, Span } from './series-service';
import type { ShelfPageService } from './shelf-page-service';
import type { ShelfReportService } from './shelf-report-service';

/**
 * A shelf's page, charts and tables over HTTP.
 *
 * @param pages - Knows which shelves a room has.
 * @param series - Makes lines.
 * @param reports - Makes tables.
 * @returns Its routes.
 */
export function seriesRoutes(
  pages: ShelfPageService,
  series: SeriesService,
  reports: ShelfReportService,
): Route[] {
  return [
    route(getShelf, ({ room, params }) => pages.page(room.id, params.shelfId)),
    route(getSeries, async ({ room, params, query }) => {
      await pages.requireShelf(room.id, params.shelfId);
      return series.series(params.shelfId, params.quantity, spanOf(query));
    }),
    route(getShelfReport, async ({ room, params, query }) => {
      await pages.requireShelf(room.id, params.shelfId);
      return reports.report(params.shelfId, room.timeZone, spanOf(query));
    }),
    route(getDegreeDays, async ({ room, params, query }) => {
      await pages.requireShelf(room.id, params.shelfId);
      return reports.degreeDays(params.shelfId, room.timeZone, spanOf(query), query);
    }),
  ];
}

function spanOf(query: { from: string; to: string }): Span {
  return { from: Date.parse(query.from), to: Date.parse(query.to) };
}
