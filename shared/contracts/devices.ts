import * as z from 'zod';
import { measuredQuantities } from '../climate/quantity';
import { endpoint, id, instant, line, roomParams } from './endpoint';

/** One reading as a device sends it; `sensor` is the device's own name for it. */
export const sentReading = z.object({
  sensor: z.string().min(1).max(80),
  at: instant,
  value: z.number(),
});
/** One reading as a device sends it. */
export type SentReading = z.infer<typeof sentReading>;

/** The most readings in one batch. */
export const maxBatchReadings = 5000;

/** What a device emits as `readings:batch`. */
export const readingsBatch = z.object({
  readings: z.array(sentReading).min(1).max(maxBatchReadings),
  /** Battery charge, 0–100 %. */
  batteryPct: z.number().min(0).max(100).optional(),
});
/** What a device emits as `readings:batch`. */
export type ReadingsBatch = z.infer<typeof readingsBatch>;

/** Why one reading was refused; sending it again unchanged cannot help. */
export const refusalCodes = [
  'UNKNOWN_SENSOR',
  'IN_FUTURE',
  'TOO_OLD',
  'OUT_OF_RANGE',
  'NOT_A_READING',
  'DIFFERENT_VALUE_HELD',
] as const;

/** The answer after the commit. */
export const readingsReceipt = z.object({
  stored: z.number().int().nonnegative(),
  alreadyHeld: z.number().int().nonnegative(),
  refused: z.array(
    z.object({ index: z.number().int().nonnegative(), code: z.enum(refusalCodes), message: z.string() }),
  ),
});
/** The answer after the commit. */
export type ReadingsReceipt = z.infer<typeof readingsReceipt>;

/** A SenML pack (RFC 8428, JSON); base fields and relative times are resolved on arrival. */
export const senmlPack = z
  .array(
    z.looseObject({
      bn: z.string().optional(),
      bt: z.number().optional(),
      bu: z.string().optional(),
      bv: z.number().optional(),
      bver: z.number().optional(),
      n: z.string().optional(),
      u: z.string().optional(),
      v: z.number().optional(),
      t: z.number().optional(),
    }),
  )
  .min(1)
  .max(maxBatchReadings);
/** A SenML pack (RFC 8428, JSON). */
export type SenmlPack = z.infer<typeof senmlPack>;

/** Takes readings over plain HTTP, for controllers without socket.io. */
export const postReadings = endpoint({
  name: 'postReadings',
  method: 'post',
  path: '/devices/readings',
  access: 'device',
  summary: 'Send readings as SenML JSON (RFC 8428) with the device token as bearer',
  body: senmlPack,
  reply: readingsReceipt,
  media: { request: 'application/senml+json' },
});

/** Tells a device what is held of each of its sensors, so that it can go on from there. */
export const getDeviceState = endpoint({
  name: 'getDeviceState',
  method: 'get',
  path: '/devices/state',
  access: 'device',
  summary: 'The newest reading held of each sensor of this device',
  reply: z.array(z.object({ sensor: z.string(), latestAt: instant.nullable() })),
});

/** A sensor with the shelf where it is now. */
export const sensor = z.object({
  id,
  deviceId: id,
  key: z.string(),
  quantity: z.enum(measuredQuantities),
  expectedIntervalS: z.number().int(),
  lightThreshold: z.number().nullable(),
  shelfId: id.nullable(),
  latestAt: instant.nullable(),
});
/** A sensor with the shelf where it is now. */
export type Sensor = z.infer<typeof sensor>;

/** A device with its sensors. */
export const device = z.object({
  id,
  name: z.string(),
  lastSeenAt: instant.nullable(),
  batteryPct: z.number().nullable(),
  revokedAt: instant.nullable(),
  sensors: z.array(sensor),
});
/** A device with its sensors. */
export type Device = z.infer<typeof device>;

/** Lists the room's devices. */
export const listDevices = endpoint({
  name: 'listDevices',
  method: 'get',
  path: '/rooms/:roomId/devices',
  access: 'viewer',
  summary: 'Devices and sensors of the room',
  params: roomParams,
  reply: z.array(device),
});

/** Adds a device; its token is in this answer and never again. */
export const addDevice = endpoint({
  name: 'addDevice',
  method: 'post',
  path: '/rooms/:roomId/devices',
  access: 'keeper',
  summary: 'Add a device; the token is shown once',
  params: roomParams,
  body: z.strictObject({ name: line(80) }),
  reply: z.object({ device, token: z.string() }),
  status: 201,
});

const deviceParams = roomParams.extend({ deviceId: id });

/** Gives a device a new token; the old one stops at once. */
export const renewDeviceToken = endpoint({
  name: 'renewDeviceToken',
  method: 'post',
  path: '/rooms/:roomId/devices/:deviceId/token',
  access: 'keeper',
  summary: 'Renew a device token; the old one stops working',
  params: deviceParams,
  reply: z.object({ token: z.string() }),
});

/** Revokes a device: its token stops and its sensors fall silent, its readings stay. */
export const revokeDevice = endpoint({
  name: 'revokeDevice',
  method: 'delete',
  path: '/rooms/:roomId/devices/:deviceId',
  access: 'keeper',
  summary: 'Revoke a device; its readings stay',
  params: deviceParams,
});

/** Adds a sensor to a device. */
export const addSensor = endpoint({
  name: 'addSensor',
  method: 'post',
  path: '/rooms/:roomId/devices/:deviceId/sensors',
  access: 'keeper',
  summary: 'Add a sensor to a device',
  params: deviceParams,
  body: z.strictObject({
    key: line(80),
    quantity: z.enum(measuredQuantities),
    expectedIntervalS: z.number().int().min(1).max(86_400),
    lightThreshold: z.number().nonnegative().nullable().optional(),
  }),
  reply: sensor,
  status: 201,
});

/** Puts a sensor on a shelf from an instant on. */
export const placeSensor = endpoint({
  name: 'placeSensor',
  method: 'post',
  path: '/rooms/:roomId/sensors/:sensorId/placements',
  access: 'keeper',
  summary: 'Place a sensor on a shelf from an instant on; earlier readings stay where they were taken',
  params: roomParams.extend({ sensorId: id }),
  body: z.strictObject({ shelfId: id, from: instant }),
  reply: sensor,
  status: 201,
});

/**
 * Says that a sensor was on its first shelf earlier than was known. A grower may: a logger's file often is what shows it,
 * and only time in which the sensor was on no shelf is given to that shelf.
 */
export const placeSensorEarlier = endpoint({
  name: 'placeSensorEarlier',
  method: 'patch',
  path: '/rooms/:roomId/sensors/:sensorId/placements/first',
  access: 'grower',
  summary: 'Say that a sensor was on its first shelf earlier than was known',
  params: roomParams.extend({ sensorId: id }),
  body: z.strictObject({ since: instant }),
  reply: sensor,
});
