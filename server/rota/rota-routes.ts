import * as contract from '@shared/contracts/care-rota';
import { authorOf } from '../audit/room-author';
import { route, type Route } from '../http/route';
import type { RotaService } from './rota-service';
import type { SwapsService } from './swaps-service';

/**
 * The rota and what changes hands, over HTTP.
 *
 * @param rota - Who is there when.
 * @param swaps - Offers.
 * @returns The routes.
 */
export function rotaRoutes(rota: RotaService, swaps: SwapsService): Route[] {
  return [
    route(contract.getRota, ({ room, query }) => rota.view(room.id, query)),
    route(contract.setDutyWeek, (context) => rota.setWeek(authorOf(context), context.body.week)),
    route(contract.setDutyDay, (context) => rota.setDay(authorOf(context), context.params.day, context.body)),
    route(contract.clearDutyDay, (context) => rota.clearDay(authorOf(context), context.params.day)),
    route(contract.addAbsence, (context) =>
      rota.addAbsence({ ...authorOf(context), role: context.room.role }, context.body),
    ),
    route(contract.removeAbsence, (context) =>
      rota.removeAbsence({ ...authorOf(context), role: context.room.role }, context.params.absenceId),
    ),
    route(contract.getFairShare, ({ room, query }) => rota.share(room.id, query)),
    route(contract.listSwaps, ({ room }) => swaps.open(room.id)),
    route(contract.offerSwap, (context) =>
      swaps.offer(authorOf(context), context.params.taskId, context.body),
    ),
    route(contract.takeSwap, (context) => swaps.take(authorOf(context), context.params.swapId)),
    route(contract.withdrawSwap, (context) =>
      swaps.withdraw({ ...authorOf(context), role: context.room.role }, context.params.swapId),
    ),
  ];
}
