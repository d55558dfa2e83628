import { listScenarios, startScenario, stopScenario } from '@shared/contracts/scenarios';
import { route, type Route } from '../http/route';
import type { ScenariosService } from './scenarios-service';

/**
 * The simulator's scenarios over HTTP.
 *
 * @param scenarios - The service.
 * @returns Its routes.
 */
export function scenariosRoutes(scenarios: ScenariosService): Route[] {
  return [
    route(listScenarios, ({ room }) => scenarios.list(room.id)),
    route(startScenario, ({ room, body }) => scenarios.start(room.id, body)),
    route(stopScenario, ({ room, params }) => scenarios.stop(room.id, params.run)),
  ];
}
