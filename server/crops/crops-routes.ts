import * as contract from '@shared/contracts/crops';
import { authorOf } from '../audit/room-author';
import { route, type Route } from '../http/route';
import type { CropsService } from './crops-service';
import type { VarietiesService } from './varieties-service';

/**
 * Crops and varieties over HTTP.
 *
 * @param crops - The library and the room's own.
 * @param varieties - Of the room.
 * @returns The routes.
 */
export function cropsRoutes(crops: CropsService, varieties: VarietiesService): Route[] {
  return [
    route(contract.listCrops, ({ room }) => crops.list(room.id)),
    route(contract.getCrop, ({ room, params }) => crops.view(room.id, params.cropId)),
    route(contract.copyCrop, (context) => crops.copy(authorOf(context), context.body)),
    route(contract.changeCrop, (context) =>
      crops.change(authorOf(context), context.params.cropId, context.body),
    ),
    route(contract.retireCrop, (context) => crops.retire(authorOf(context), context.params.cropId)),
    route(contract.listVarieties, ({ room }) => varieties.list(room.id)),
    route(contract.addVariety, (context) => varieties.add(authorOf(context), context.body)),
    route(contract.changeVariety, (context) =>
      varieties.change(authorOf(context), context.params.varietyId, context.body),
    ),
    route(contract.removeVariety, (context) => varieties.remove(authorOf(context), context.params.varietyId)),
  ];
}
