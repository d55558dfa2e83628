import type { Logger } from 'pino';
import { adviceRoutes } from './advice/advice-routes';
import { AdviceService } from './advice/advice-service';
import { AdviceStore } from './advice/advice-store';
import type { RoomChanges } from './audit/room-changes';
import type { OpenTasks } from './care/open-tasks';
import type { Clock } from './clock';
import { cropsRoutes } from './crops/crops-routes';
import { CropsService } from './crops/crops-service';
import { CropsStore } from './crops/crops-store';
import { VarietiesService } from './crops/varieties-service';
import { VarietiesStore } from './crops/varieties-store';
import type { Transactions } from './database/transactions';
import { EmergenceService } from './germination/emergence-service';
import { EmergencesStore } from './germination/emergences-store';
import { germinationRoutes } from './germination/germination-routes';
import { GerminationService } from './germination/germination-service';
import { ShelfWarmth } from './germination/shelf-warmth';
import type { Route } from './http/route';
import type { LiveFeed } from './live/live-feed';
import type { PeopleService } from './people/people-service';
import { PhotosService } from './photos/photos-service';
import { photosRoutes } from './photos/photos-routes';
import { PhotosStore } from './photos/photos-store';
import { PlantingEventsService } from './plantings/planting-events-service';
import { PlantingEventsStore } from './plantings/planting-events-store';
import { PlantingRecords } from './plantings/planting-records';
import { PlantingStartService } from './plantings/planting-start-service';
import { plantingsRoutes } from './plantings/plantings-routes';
import { PlantingsService } from './plantings/plantings-service';
import { PlantingsStore } from './plantings/plantings-store';
import { LightShortages } from './progress/light-shortages';
import { progressRoutes } from './progress/progress-routes';
import { ProgressService } from './progress/progress-service';
import { ShelfLight } from './progress/shelf-light';
import type { RoomHooks } from './rooms/room-hooks';
import type { RoomRangesService } from './rooms/room-ranges-service';
import type { RoomsService } from './rooms/rooms-service';
import type { ShelfPlansService } from './rooms/shelf-plans-service';
import type { ShelfPlansStore } from './rooms/shelf-plans-store';
import { GerminationTestsService } from './seed/germination-tests-service';
import { GerminationTestsStore } from './seed/germination-tests-store';
import { seedRoutes } from './seed/seed-routes';
import { SeedService } from './seed/seed-service';
import { SeedStore } from './seed/seed-store';
import { lotWords } from './seed/seed-views';
import { SeriesStore } from './series/series-store';
import { PlaceService } from './sowing/place-service';
import { sowingRoutes } from './sowing/sowing-routes';
import { SowingService } from './sowing/sowing-service';
import { SowingStore } from './sowing/sowing-store';

const DAY_MS = 86_400_000;

/** What the growing side stands on. */
export interface GrowingFoundation {
  readonly transactions: Transactions;
  readonly changes: RoomChanges;
  readonly rooms: RoomsService;
  readonly roomRanges: RoomRangesService;
  readonly plans: ShelfPlansService;
  readonly plansStore: ShelfPlansStore;
  readonly hooks: RoomHooks;
  readonly openTasks: OpenTasks;
  readonly people: PeopleService;
  readonly feed: LiveFeed;
  readonly log: Pick<Logger, 'warn'>;
  readonly now: Clock;
}

/** What other areas hold on to of the growing side. */
export interface GrowingServices {
  readonly routes: readonly Route[];
  readonly plantings: PlantingsService;
  readonly plantingsStore: PlantingsStore;
  readonly plantingEvents: PlantingEventsStore;
  readonly plantingRecords: PlantingRecords;
  readonly crops: CropsService;
  readonly photos: PhotosService;
  readonly germination: GerminationService;
  readonly advice: AdviceService;
}

/**
 * Makes the services of what grows and joins them.
 *
 * @param foundation - What they stand on.
 * @returns The services and their routes.
 */
export function growingServices(foundation: GrowingFoundation): GrowingServices {
  const { transactions, changes, rooms, plans, now } = foundation;
  const varietiesStore = new VarietiesStore();
  const crops = new CropsService({
    transactions,
    crops: new CropsStore(),
    varieties: varietiesStore,
    changes,
    now,
  });
  const varieties = new VarietiesService({ transactions, varieties: varietiesStore, crops, changes });

  const photosStore = new PhotosStore();
  const plantingsStore = new PlantingsStore();
  const testsStore = new GerminationTestsStore();
  const seed = new SeedService({
    transactions,
    seed: new SeedStore(),
    tests: testsStore,
    crops,
    varieties,
    sowingsOf: (tx, lotId) => plantingsStore.trialsOf(tx, lotId),
    photosOf: async (tx, lotId) => (await photosStore.of(tx, 'lots', [lotId])).get(lotId) ?? [],
    changes,
    now,
  });
  const tests = new GerminationTestsService(testsStore, seed, now);

  const eventsStore = new PlantingEventsStore();
  const records = new PlantingRecords(plantingsStore, eventsStore);
  const plantings = new PlantingsService({
    transactions,
    plantings: plantingsStore,
    events: eventsStore,
    records,
    photosOf: async (tx, id) => (await photosStore.of(tx, 'plantings', [id])).get(id) ?? [],
    lotName: async (tx, roomId, lotId) => lotWords(await seed.lot(tx, roomId, lotId)),
  });
  const parts = {
    plantings: plantingsStore,
    events: eventsStore,
    records,
    reader: plantings,
    rooms,
    changes,
    now,
  };
  const start = new PlantingStartService({ ...parts, crops, varieties, seed });
  const happening = new PlantingEventsService(parts);

  const seriesStore = new SeriesStore();
  const warmth = new ShelfWarmth(seriesStore);
  const light = new ShelfLight(seriesStore);
  const shortages = new LightShortages({
    rooms,
    plans,
    light,
    placesOf: (...of) => plantings.placesOf(...of),
  });
  const progress = new ProgressService({
    transactions,
    plantings,
    crops,
    warmth,
    light,
    shortages,
    now,
  });
  const germination = new GerminationService({
    transactions,
    plantings,
    crops,
    emergence: new EmergenceService(warmth, new EmergencesStore(), now),
    lotFacts: (tx, roomId, lotId) => seed.facts(tx, roomId, lotId),
    isDark: async (tx, shelfId) => {
      const today = now();
      const lamps = await plans.plannedLamps(tx, [shelfId], new Date(today.getTime() - DAY_MS), today);
      return (lamps.get(shelfId) ?? []).length === 0;
    },
    now,
  });
  const advice = new AdviceService({
    transactions,
    advice: new AdviceStore(),
    rooms,
    plantings,
    crops,
    ranges: {
      of: (tx, shelfIds) => plans.wantedRangesOf(tx, shelfIds),
      ofRoom: (tx, roomId) => foundation.roomRanges.of(tx, roomId),
      set: (...of) => foundation.plansStore.setWantedRange(...of),
      clear: (...of) => foundation.plansStore.clearWantedRange(...of),
    },
    shortageOf: (...of) => shortages.shortageOf(...of),
    light: {
      of: (tx, shelfIds) => plans.wantedLightOf(tx, shelfIds),
      set: (...of) => foundation.plansStore.setWantedLight(...of),
      clear: (...of) => foundation.plansStore.clearWantedLight(...of),
    },
    hooks: foundation.hooks,
    tasks: foundation.openTasks,
    feed: foundation.feed,
    now,
  });
  changes.followBy((roomId) =>
    // The change itself is made; advice is worked out again within minutes anyway.
    advice.refresh(roomId).catch((error: unknown) => {
      foundation.log.warn({ err: error }, 'advice not worked out');
    }),
  );
  const sowingStore = new SowingStore();
  const place = new PlaceService(transactions, sowingStore, rooms, changes);
  const sowing = new SowingService({
    transactions,
    sowing: sowingStore,
    place,
    rooms,
    crops,
    seed,
    people: foundation.people,
    tasks: foundation.openTasks,
    changes,
    now,
  });
  const photos = new PhotosService({
    transactions,
    photos: photosStore,
    plantingOfTask: async (tx, roomId, taskId) =>
      (await foundation.openTasks.task(tx, roomId, taskId)).plantingId,
    requireSubject: async (tx, roomId, subject) => {
      if ('lotId' in subject) await seed.lot(tx, roomId, subject.lotId);
      else if ('taskId' in subject) await foundation.openTasks.task(tx, roomId, subject.taskId);
      else await plantings.planting(tx, roomId, subject.plantingId);
    },
    changes,
    now,
  });

  return {
    routes: [
      ...cropsRoutes(crops, varieties),
      ...seedRoutes(seed, tests),
      ...plantingsRoutes(plantings, start, happening),
      ...photosRoutes(photos),
      ...germinationRoutes(germination),
      ...progressRoutes(progress),
      ...adviceRoutes(advice),
      ...sowingRoutes(place, sowing, now),
    ],
    plantings,
    plantingsStore,
    plantingEvents: eventsStore,
    plantingRecords: records,
    crops,
    photos,
    germination,
    advice,
  };
}
