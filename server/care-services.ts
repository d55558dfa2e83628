import type { RoomChanges } from './audit/room-changes';
import { CarePlaces } from './care/care-places';
import { careRoutes } from './care/care-routes';
import { OpenTasks } from './care/open-tasks';
import { RoutinesService } from './care/routines-service';
import { RoutinesStore } from './care/routines-store';
import { ShelfEventsService } from './care/shelf-events-service';
import { ShelfEventsStore } from './care/shelf-events-store';
import { TaskClosingService } from './care/task-closing-service';
import { TaskEffects } from './care/task-effects';
import { TaskPlanningService } from './care/task-planning-service';
import { TaskPlanningStore } from './care/task-planning-store';
import { TasksService } from './care/tasks-service';
import { TasksStore } from './care/tasks-store';
import type { Clock } from './clock';
import type { Transactions } from './database/transactions';
import type { GrowingServices } from './growing-services';
import type { Route } from './http/route';
import type { LiveFeed } from './live/live-feed';
import type { CareTeller } from './mail/care-teller';
import type { PeopleService } from './people/people-service';
import type { RoomsService } from './rooms/rooms-service';
import { AssignmentStore } from './rota/assignment-store';
import { HolderAssignment } from './rota/holder-assignment';
import { rotaRoutes } from './rota/rota-routes';
import { RotaService } from './rota/rota-service';
import { RotaStore } from './rota/rota-store';
import { ShareStore } from './rota/share-store';
import { SwapsService } from './rota/swaps-service';
import { SwapsStore } from './rota/swaps-store';

/** What sharing care out stands on, before anything grows. */
export interface CareGround {
  readonly tasks: TasksStore;
  readonly rota: RotaStore;
  readonly assignment: HolderAssignment;
  /** For areas that ask for single tasks. */
  readonly openTasks: OpenTasks;
}

/** Makes what other areas need to ask for care. */
export function careGround(rooms: Pick<RoomsService, 'roomOf'>, now: Clock): CareGround {
  const tasks = new TasksStore();
  const rota = new RotaStore();
  const assignment = new HolderAssignment(new AssignmentStore(), rota, rooms, now);
  return { tasks, rota, assignment, openTasks: new OpenTasks(tasks, assignment) };
}

/** What the care side stands on. */
export interface CareFoundation {
  readonly ground: CareGround;
  readonly growing: GrowingServices;
  readonly transactions: Transactions;
  readonly changes: RoomChanges;
  readonly rooms: RoomsService;
  readonly people: PeopleService;
  readonly teller: CareTeller;
  readonly feed: LiveFeed;
  readonly now: Clock;
}

/** What other areas hold on to of the care side. */
export interface CareServices {
  readonly routes: readonly Route[];
  readonly tasks: TasksService;
  readonly planning: TaskPlanningService;
  readonly shelfEvents: ShelfEventsService;
}

/**
 * Makes the services of care and joins them.
 *
 * @param foundation - What they stand on.
 * @returns The services and their routes.
 */
export function careServices(foundation: CareFoundation): CareServices {
  const { ground, growing, transactions, changes, rooms, people, teller, feed, now } = foundation;
  const { tasks: tasksStore, rota, assignment } = ground;
  const { plantings, plantingsStore, plantingEvents, plantingRecords, crops, photos } = growing;
  const shared = { transactions, tasks: tasksStore, swaps: new SwapsStore(), feed, now };
  const places = new CarePlaces(rooms, people, plantingsStore);
  const routinesStore = new RoutinesStore();
  const planned = new TaskPlanningStore();
  const planning = new TaskPlanningService({
    transactions,
    planning: planned,
    routines: routinesStore,
    rota,
    assignment,
    rooms,
    dryingDue: () => Promise.resolve('unknown' as const),
    now,
  });
  const tasks = new TasksService({
    ...shared,
    assignment,
    places,
    rooms,
    plantings,
    tellTakenOver: (...of) => teller.tellTakenOver(...of),
  });
  const closing = new TaskClosingService({
    ...shared,
    planning,
    planned,
    effects: new TaskEffects(plantingsStore, plantingEvents, plantingRecords),
  });
  const routines = new RoutinesService({
    transactions,
    routines: routinesStore,
    planning,
    places,
    cropOf: (...of) => crops.crop(...of),
    changes,
    now,
  });
  const shelfEvents = new ShelfEventsService({
    transactions,
    events: new ShelfEventsStore(),
    rooms,
    feed,
    now,
  });
  const rotas = new RotaService({
    transactions,
    rota,
    shares: new ShareStore(),
    tasks: tasksStore,
    planning,
    places,
    changes,
  });
  const swaps = new SwapsService({ ...shared, places, teller });
  return {
    routes: [...careRoutes({ tasks, closing, routines, shelfEvents, photos }), ...rotaRoutes(rotas, swaps)],
    tasks,
    planning,
    shelfEvents,
  };
}
