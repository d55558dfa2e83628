import * as contract from '@shared/contracts/care';
import { authorOf } from '../audit/room-author';
import { route, type Route } from '../http/route';
import type { CareService } from './care-service';

/**
 * Tasks, routines, and what was done and seen on shelves.
 *
 * @param care - Does it.
 * @returns The routes.
 */
export function careRoutes(care: CareService): Route[] {
  return [
    route(contract.listTasks, ({ room, query }) => care.listTasks(room.id, query)),
    route(contract.completeTask, (context) =>
      care.completeTask(authorOf(context), context.params.taskId, context.body.note),
    ),
    route(contract.reopenTask, ({ room, params }) => care.reopenTask(room.id, params.taskId)),
    route(contract.listRoutines, ({ room }) => care.routinesOf(room.id)),
    route(contract.addRoutine, (context) =>
      care.addRoutine(authorOf(context), context.room.timeZone, context.body),
    ),
    route(contract.addShelfEvent, (context) => {
      const { kind, text, at } = context.body;
      const { shelfId } = context.params;
      return care.addShelfEvent(authorOf(context), {
        shelfId,
        kind,
        text,
        at: at === undefined ? null : new Date(at),
      });
    }),
  ];
}
