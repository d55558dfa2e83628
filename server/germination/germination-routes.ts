import { getGermination } from '@shared/contracts/germination';
import { route, type Route } from '../http/route';
import type { GerminationService } from './germination-service';

/**
 * How sowings come up, over HTTP.
 *
 * @param germination - The service.
 * @returns The routes.
 */
export function germinationRoutes(germination: GerminationService): Route[] {
  return [route(getGermination, ({ room, params }) => germination.view(room.id, params.plantingId))];
}
