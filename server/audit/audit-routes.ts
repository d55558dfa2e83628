import * as contract from '@shared/contracts/audit';
import { route, type Route } from '../http/route';
import type { AuditLogService } from './audit-log-service';

/**
 * Who changed what.
 *
 * @param log - Tells it.
 * @returns The routes.
 */
export function auditRoutes(log: AuditLogService): Route[] {
  return [route(contract.listAuditEntries, ({ room, query }) => log.list(room, query))];
}
