import * as contract from '@shared/contracts/seed';
import { authorOf } from '../audit/room-author';
import { route, type Route } from '../http/route';
import type { GerminationTestsService } from './germination-tests-service';
import type { SeedService } from './seed-service';

/**
 * Seed lots and germination tests over HTTP.
 *
 * @param seed - The lots.
 * @param tests - Their tests.
 * @returns The routes.
 */
export function seedRoutes(seed: SeedService, tests: GerminationTestsService): Route[] {
  return [
    route(contract.listSeedLots, ({ room, query }) =>
      seed.list(room, { withFinished: query.finished === 'with', cropId: query.cropId }),
    ),
    route(contract.addSeedLot, (context) => seed.add(authorOf(context), context.room.timeZone, context.body)),
    route(contract.getSeedLot, ({ room, params }) => seed.detail(room, params.lotId)),
    route(contract.changeSeedLot, (context) =>
      seed.change(authorOf(context), context.room.timeZone, context.params.lotId, context.body),
    ),
    route(contract.recountSeedLot, (context) =>
      seed.recount(authorOf(context), context.room.timeZone, context.params.lotId, context.body),
    ),
    route(contract.removeSeedLot, (context) => seed.remove(authorOf(context), context.params.lotId)),
    route(contract.getSeedsNeeded, ({ room, params, query }) => seed.needed(room, params.lotId, query)),
    route(contract.addGerminationTest, (context) =>
      tests.add(authorOf(context), context.room.timeZone, context.params.lotId, context.body),
    ),
    route(contract.countGerminationTest, (context) => {
      const { lotId, testId } = context.params;
      return tests.count(authorOf(context), context.room.timeZone, lotId, testId, context.body);
    }),
    route(contract.removeGerminationTest, (context) => {
      const { lotId, testId } = context.params;
      return tests.remove(authorOf(context), context.room.timeZone, lotId, testId);
    }),
  ];
}
