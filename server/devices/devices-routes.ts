import * as contract from '@shared/contracts/devices';
import { authorOf } from '../audit/room-author';
import { route, type Route } from '../http/route';
import type { DevicesService } from './devices-service';

/**
 * Devices, their tokens, their sensors, and where those are.
 *
 * @param devices - Does it.
 * @returns The routes.
 */
export function devicesRoutes(devices: DevicesService): Route[] {
  return [
    route(contract.listDevices, ({ room }) => devices.list(room.id)),
    route(contract.addDevice, (context) => devices.add(authorOf(context), context.body.name)),
    route(contract.renewDeviceToken, (context) =>
      devices.renewToken(authorOf(context), context.params.deviceId),
    ),
    route(contract.revokeDevice, (context) => devices.revoke(authorOf(context), context.params.deviceId)),
    route(contract.addSensor, (context) =>
      devices.addSensor(authorOf(context), context.params.deviceId, context.body),
    ),
    route(contract.placeSensor, (context) => {
      const { shelfId, from } = context.body;
      return devices.place(authorOf(context), context.params.sensorId, { shelfId, from: new Date(from) });
    }),
    route(contract.placeSensorEarlier, (context) => {
      const since = new Date(context.body.since);
      return devices.placeEarlier(authorOf(context), context.params.sensorId, since);
    }),
  ];
}
