import type { RoomChanges } from './audit/room-changes';
import { CalendarService } from './calendar/calendar-service';
import { CalendarStore } from './calendar/calendar-store';
import { calendarRoutes } from './calendar/calendar-routes';
import { CarePlaces } from './care/care-places';
import { careRecordRoutes } from './care/care-record-routes';
import { CareRecordService } from './care/care-record-service';
import { CareRecordStore } from './care/care-record-store';
import { CareReminderJob } from './care/care-reminder-job';
import { CareReminderStore } from './care/care-reminder-store';
import { careRoutes } from './care/care-routes';
import { DryingService } from './care/drying-service';
import { DryingStore } from './care/drying-store';
import { OpenTasks } from './care/open-tasks';
import { RoutinesService } from './care/routines-service';
import { RoutinesStore } from './care/routines-store';
import { ShelfEventsService } from './care/shelf-events-service';
import { ShelfEventsStore } from './care/shelf-events-store';
import { ShelfThirst } from './care/shelf-thirst';
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
import { SeriesStore } from './series/series-store';

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
  /** Where links lead, without a trailing slash. */
  readonly publicUrl: () => string;
  /** Right side of identifiers that leave the house. */
  readonly mailDomain: string;
  readonly now: Clock;
}

/** What other areas hold on to of the care side. */
export interface CareServices {
  readonly routes: readonly Route[];
  readonly tasks: TasksService;
  readonly planning: TaskPlanningService;
  readonly shelfEvents: ShelfEventsService;
  readonly reminderJob: CareReminderJob;
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
  const drying = new DryingService({
    transactions,
    drying: new DryingStore(),
    thirst: new ShelfThirst(new SeriesStore()),
    plantings,
    now,
  });
  const planning = new TaskPlanningService({
    transactions,
    planning: planned,
    routines: routinesStore,
    rota,
    assignment,
    rooms,
    dryingDue: (...of) => drying.due(...of),
    feed,
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
    assignment,
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
  const record = new CareRecordService(transactions, new CareRecordStore(tasksStore), now);
  const calendars = new CalendarService({
    transactions,
    calendars: new CalendarStore(),
    publicUrl: foundation.publicUrl,
    domain: foundation.mailDomain,
    now,
  });
  const swaps = new SwapsService({ ...shared, places, teller });
  return {
    routes: [
      ...careRoutes({ tasks, closing, routines, shelfEvents, photos }),
      ...careRecordRoutes(record, drying),
      ...rotaRoutes(rotas, swaps),
      ...calendarRoutes(calendars),
    ],
    reminderJob: new CareReminderJob(transactions, new CareReminderStore(tasksStore), teller, rooms, now),
    tasks,
    planning,
    shelfEvents,
  };
}
