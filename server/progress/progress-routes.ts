import { getPlantingProgress } from '@shared/contracts/planting-progress';
import { route, type Route } from '../http/route';
import type { ProgressService } from './progress-service';

/**
 * How far plantings have grown, over HTTP.
 *
 * @param progress - The service.
 * @returns The routes.
 */
export function progressRoutes(progress: ProgressService): Route[] {
  return [route(getPlantingProgress, ({ room, params }) => progress.view(room, params.plantingId))];
}
