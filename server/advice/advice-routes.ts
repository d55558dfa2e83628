import { getShelfAdvice } from '@shared/contracts/advice';
import { route, type Route } from '../http/route';
import type { AdviceService } from './advice-service';

/**
 * Advice on shelves over HTTP.
 *
 * @param advice - The service.
 * @returns The routes.
 */
export function adviceRoutes(advice: AdviceService): Route[] {
  return [route(getShelfAdvice, ({ room, params }) => advice.shelfAdvice(room.id, params.shelfId))];
}
