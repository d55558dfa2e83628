import type { RoomChanges } from './audit/room-changes';
import type { Clock } from './clock';
import { cropsRoutes } from './crops/crops-routes';
import { CropsService } from './crops/crops-service';
import { CropsStore } from './crops/crops-store';
import { VarietiesService } from './crops/varieties-service';
import { VarietiesStore } from './crops/varieties-store';
import type { Transactions } from './database/transactions';
import type { Route } from './http/route';
import { GerminationTestsService } from './seed/germination-tests-service';
import { GerminationTestsStore } from './seed/germination-tests-store';
import { seedRoutes } from './seed/seed-routes';
import { SeedService } from './seed/seed-service';
import { SeedStore } from './seed/seed-store';

/** What the growing side stands on. */
export interface GrowingFoundation {
  readonly transactions: Transactions;
  readonly changes: RoomChanges;
  readonly now: Clock;
}

/** What other areas hold on to of the growing side. */
export interface GrowingServices {
  readonly routes: readonly Route[];
}

/**
 * Makes the services of what grows and joins them.
 *
 * @param foundation - What they stand on.
 * @returns The services and their routes.
 */
export function growingServices({ transactions, changes, now }: GrowingFoundation): GrowingServices {
  const varietiesStore = new VarietiesStore();
  const crops = new CropsService({
    transactions,
    crops: new CropsStore(),
    varieties: varietiesStore,
    changes,
    now,
  });
  const varieties = new VarietiesService({ transactions, varieties: varietiesStore, crops, changes });

  const testsStore = new GerminationTestsStore();
  const seed = new SeedService({
    transactions,
    seed: new SeedStore(),
    tests: testsStore,
    crops,
    varieties,
    changes,
    now,
  });
  const tests = new GerminationTestsService(testsStore, seed, now);

  return { routes: [...cropsRoutes(crops, varieties), ...seedRoutes(seed, tests)] };
}
