import { getDeviceState, postReadings } from '@shared/contracts/devices';
import { route, type Route } from '../http/route';
import type { DeviceIntakeService } from './device-intake-service';

/**
 * The HTTP road for controllers without socket.io.
 *
 * @param intake - Takes the readings.
 * @returns Its routes.
 */
export function deviceIntakeRoutes(intake: DeviceIntakeService): Route[] {
  return [
    route(postReadings, ({ device, body }) => intake.takeSenml(device, body)),
    route(getDeviceState, ({ device }) => intake.state(device)),
  ];
}
