import { acknowledgeAlert, getAlert, listAlerts } from '@shared/contracts/alerts';
import { route, type Route } from '../http/route';
import type { AlertService } from './alert-service';

/**
 * Alerts over HTTP.
 *
 * @param alerts - The service.
 * @returns Its routes.
 */
export function alertRoutes(alerts: AlertService): Route[] {
  return [
    route(listAlerts, ({ room, query }) => alerts.list(room.id, query)),
    route(getAlert, ({ room, params }) => alerts.one(room.id, params.alertId)),
    route(acknowledgeAlert, ({ room, params, person, body }) =>
      alerts.acknowledge(room.id, params.alertId, person, body.note),
    ),
  ];
}
