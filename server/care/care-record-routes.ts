import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import * as contract from '@shared/contracts/care-record';
import { decodeCursor } from '../http/cursor';
import { route, type Route } from '../http/route';
import type { CareRecordService } from './care-record-service';
import type { DryingService } from './drying-service';

/**
 * What care was done, over HTTP.
 *
 * @param record - Lists and counts it.
 * @param drying - Waterings against drying.
 * @returns The routes.
 */
export function careRecordRoutes(record: CareRecordService, drying: DryingService): Route[] {
  return [
    route(contract.listCareRecord, ({ room, query: { cursor, limit, ...query } }) =>
      record.list(room, query, { after: decodeCursor(cursor), limit }),
    ),
    route(contract.downloadCareRecord, async ({ room, query, res }) => {
      const lines = await record.csv(room, query);
      res.attachment('care.csv');
      res.set('Content-Type', 'text/csv; charset=utf-8');
      await pipeline(Readable.from(lines), res);
      return '';
    }),
    route(contract.getCareYields, ({ room, query }) => record.yields(room, query)),
    route(contract.getCareCompliance, ({ room, query }) => record.compliance(room, query)),
    route(contract.getPlantingDrying, ({ room, params }) => drying.view(room.id, params.plantingId)),
  ];
}
