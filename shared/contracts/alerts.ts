import * as z from 'zod';
import type { AlertKind, Urgency } from '../alerts/alert-rule';
import type { Episode } from '../alerts/episode';
import { quantities } from '../climate/quantity';
import { endpoint, id, instant, roomParams } from './endpoint';

const alertKind = z.enum([
  'aboveRange',
  'belowRange',
  'fastRise',
  'fastFall',
  'sensorSilent',
  'deviceSilent',
  'sensorFailed',
  'sensorsDisagree',
  'lampDark',
  'lampLit',
  'lightShort',
  'matStuckOn',
  'condensation',
  'wetHours',
  'dangerHigh',
  'dangerLow',
] as const satisfies readonly AlertKind[]);
const urgency = z.enum(['lookToday', 'goNow'] as const satisfies readonly Urgency[]);

/** An episode as people see it. Values are in the stored unit of the quantity. */
export const alert = z.object({
  id,
  shelfId: id,
  shelfLabel: z.string(),
  sensorId: id.nullable(),
  quantity: z.enum(quantities),
  kind: alertKind,
  urgency: urgency,
  beganAt: instant,
  openedAt: instant,
  peakAt: instant,
  peakValue: z.number(),
  peakExcess: z.number(),
  /** The limit that applied at the peak. */
  peakLimit: z.number(),
  /** The first reading that showed it to be over. */
  endedAt: instant.nullable(),
  clearedAt: instant.nullable(),
  foundLater: z.boolean(),
  /** When the mail about it went into the outbox, null if nobody was written to. */
  toldAt: instant.nullable(),
  acknowledgedAt: instant.nullable(),
  acknowledgedByName: z.string().nullable(),
  acknowledgeNote: z.string(),
});
/** An episode as people see it. */
export type Alert = z.infer<typeof alert>;

/** Open alerts, or the newest of all, newest first. */
export const listAlerts = endpoint({
  name: 'listAlerts',
  method: 'get',
  path: '/rooms/:roomId/alerts',
  access: 'viewer',
  summary: 'Alerts of the room, newest first; a page at a time',
  params: roomParams,
  query: z.object({
    open: z.enum(['true', 'false']).optional(),
    shelfId: id.optional(),
    limit: z.coerce.number().int().min(1).max(200).default(50),
    cursor: z.string().max(200).optional(),
  }),
  reply: z.object({ alerts: z.array(alert), nextCursor: z.string().nullable() }),
});

/** One alert. */
export const getAlert = endpoint({
  name: 'getAlert',
  method: 'get',
  path: '/rooms/:roomId/alerts/:alertId',
  access: 'viewer',
  summary: 'One alert of the room',
  params: roomParams.extend({ alertId: id }),
  reply: alert,
});

/** Says "I have seen it". */
export const acknowledgeAlert = endpoint({
  name: 'acknowledgeAlert',
  method: 'post',
  path: '/rooms/:roomId/alerts/:alertId/acknowledgement',
  access: 'helper',
  summary: 'Acknowledge an alert; the first acknowledgement stays',
  params: roomParams.extend({ alertId: id }),
  body: z.strictObject({ note: z.string().trim().max(500).default('') }),
  reply: alert,
});

/**
 * The episode that an alert tells of, for the words and sums of shared/alerts.
 *
 * @param shown - The alert.
 * @returns Its episode, instants in milliseconds.
 */
export function episodeOf(shown: Alert): Episode {
  return {
    beganAt: Date.parse(shown.beganAt),
    openedAt: Date.parse(shown.openedAt),
    peakAt: Date.parse(shown.peakAt),
    peakValue: shown.peakValue,
    peakExcess: shown.peakExcess,
    limit: shown.peakLimit,
    endedAt: shown.endedAt === null ? null : Date.parse(shown.endedAt),
    clearedAt: shown.clearedAt === null ? null : Date.parse(shown.clearedAt),
    urgency: shown.urgency,
  };
}
