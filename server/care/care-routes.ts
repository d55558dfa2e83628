import * as contract from '@shared/contracts/care';
import * as routines from '@shared/contracts/care-routines';
import { PHOTO_MAX_BYTES } from '@shared/contracts/photos';
import { authorOf } from '../audit/room-author';
import { receiveUpload } from '../http/receive-upload';
import { route, type Route, type RouteContext } from '../http/route';
import type { PhotosService } from '../photos/photos-service';
import { wholeUpload } from '../photos/whole-upload';
import type { RoutinesService } from './routines-service';
import type { ShelfEventsService } from './shelf-events-service';
import type { TaskClosingService } from './task-closing-service';
import type { TasksService } from './tasks-service';

/** What answers requests about care. */
export interface CareRouteServices {
  readonly tasks: TasksService;
  readonly closing: TaskClosingService;
  readonly routines: RoutinesService;
  readonly shelfEvents: ShelfEventsService;
  readonly photos: PhotosService;
}

/**
 * Tasks, routines, and what was done and seen on shelves.
 *
 * @param services - Do it.
 * @returns The routes.
 */
export function careRoutes(services: CareRouteServices): Route[] {
  const { tasks, closing, shelfEvents, photos } = services;
  return [
    route(contract.listTasks, ({ room, query }) => tasks.list(room.id, query)),
    route(contract.getCareDays, ({ room }) => tasks.days(room.id)),
    route(contract.completeTask, (context) =>
      closing.complete(memberOf(context), context.room.timeZone, context.params.taskId, context.body),
    ),
    route(contract.reopenTask, (context) =>
      closing.reopen(memberOf(context), context.room.timeZone, context.params.taskId),
    ),
    route(contract.addTask, (context) => tasks.add(memberOf(context), context.room.timeZone, context.body)),
    route(contract.removeTask, (context) => tasks.remove(memberOf(context), context.params.taskId)),
    route(contract.moveTask, (context) =>
      tasks.move(authorOf(context), context.room.timeZone, context.params.taskId, context.body.dueOn),
    ),
    route(contract.assignTask, (context) =>
      tasks.assign(authorOf(context), context.params.taskId, context.body.personIds),
    ),
    route(contract.takeOverTask, (context) => tasks.takeOver(authorOf(context), context.params.taskId)),
    route(contract.addTaskPhoto, async (context) => {
      const { req, res, room, params, query } = context;
      const subject = await photos.subjectOfTask(room.id, params.taskId);
      const bytes = await receiveUpload(req, res, PHOTO_MAX_BYTES, (_name, stream) => wholeUpload(stream));
      await photos.add(authorOf(context), subject, bytes, query.caption);
      return tasks.task(room.id, params.taskId);
    }),
    route(contract.addShelfEvent, (context) =>
      shelfEvents.add(authorOf(context), { ...context.body, shelfId: context.params.shelfId }),
    ),
    ...routineRoutes(services.routines),
  ];
}

function routineRoutes(service: RoutinesService): Route[] {
  return [
    route(routines.listRoutines, ({ room, query }) => service.routinesOf(room.id, query)),
    route(routines.addRoutine, (context) =>
      service.add(authorOf(context), context.room.timeZone, context.body),
    ),
    route(routines.changeRoutine, (context) =>
      service.change(authorOf(context), context.room.timeZone, context.params.routineId, context.body),
    ),
    route(routines.endRoutine, (context) => service.end(authorOf(context), context.params.routineId)),
    route(routines.listReadyMadeRoutines, ({ room, query }) => service.readyMade(room.id, query.cropId)),
    route(routines.adoptRoutines, (context) =>
      service.adopt(authorOf(context), context.room.timeZone, context.params.plantingId, context.body),
    ),
  ];
}

/** Who asks, with their role. */
function memberOf(context: Pick<RouteContext<never, never, never>, 'room' | 'person'>) {
  return { ...authorOf(context), role: context.room.role };
}
