import * as z from 'zod';
import type { AlertKind, Urgency } from '../alerts/alert-rule';
import type { Episode } from '../alerts/episode';
import { quantities } from '../climate/quantity';
import { endpoint, id, instant, roomParams } from './endpoint';

/** What an alert can be about. */
export const alertKind = z.enum([
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
  'lightSumShort',
  'matStuckOn',
  'condensation',
  'wetHours',
  'dangerHigh',
  'dangerLow',
] as const satisfies readonly AlertKind[]);
const urgency = z.enum(['lookToday', 'goNow'] as const satisfies readonly Urgency[]);

/** Something that was done about an alert, in a person's words. */
export const alertDeed = z.object({
  id,
  at: instant,
  /** Null once the person has left. */
  personId: id.nullable(),
  personName: z.string().nullable(),
  text: z.string(),
});
/** Something that was done about an alert. */
export type AlertDeed = z.infer<typeof alertDeed>;

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
  acknowledgedById: id.nullable(),
  acknowledgeNote: z.string(),
  /** Nobody is written to until then about this kind of alert on the shelf; null where nobody said so or ended it. */
  quiet: z.object({ until: instant, setAt: instant, setByName: z.string().nullable() }).nullable(),
  /** Who looks after it. */
  assignee: z.object({ personId: id, name: z.string() }).nullable(),
  /** What was done about it, in order. */
  deeds: z.array(alertDeed),
});
/** An episode as people see it. */
export type Alert = z.infer<typeof alert>;

const alertFilter = z.object({
  shelfId: id.optional(),
  kind: alertKind.optional(),
  /** A month of the room's calendar, `YYYY-MM`, in which they opened. */
  month: z
    .string()
    .regex(/^(19|20)\d\d-(0[1-9]|1[0-2])$/, { error: 'must be a month such as 2026-04' })
    .optional(),
});

/** Open alerts, or the newest of all, newest first. */
export const listAlerts = endpoint({
  name: 'listAlerts',
  method: 'get',
  path: '/rooms/:roomId/alerts',
  access: 'viewer',
  summary: 'Alerts of the room, newest first; a page at a time',
  params: roomParams,
  query: alertFilter.extend({
    open: z.enum(['true', 'false']).optional(),
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

/** How many alerts there were. */
export const alertCounts = z.object({
  /** Of all that the filter lets through. */
  total: z.number().int(),
  /** Each list counts with the other filters, but not its own, so that one sees what else there is to choose. */
  byShelf: z.array(z.object({ shelfId: id, shelfLabel: z.string(), count: z.number().int() })),
  /** The most frequent first. */
  byKind: z.array(z.object({ kind: alertKind, count: z.number().int() })),
  /** The newest first. */
  byMonth: z.array(z.object({ month: z.string(), count: z.number().int() })),
});
/** How many alerts there were. */
export type AlertCounts = z.infer<typeof alertCounts>;

/** Counts the alerts of a room. */
export const countAlerts = endpoint({
  name: 'countAlerts',
  method: 'get',
  path: '/rooms/:roomId/alert-counts',
  access: 'viewer',
  summary: 'How many alerts there were by shelf, kind and month of the room’s calendar',
  params: roomParams,
  query: alertFilter,
  reply: alertCounts,
});

/** What happened to an alert beside the readings: who was written to, when it was quiet, who looked after it. */
export const alertTimeLine = z.object({
  mails: z.array(
    z.object({
      personName: z.string(),
      reason: z.enum(['opened', 'urgent', 'escalated', 'assigned', 'cleared']),
      writtenAt: instant,
      sentAt: instant.nullable(),
      /** When the mail server refused it for good. */
      refusedAt: instant.nullable(),
      /** When it is sent, or tried again; null once it is sent or refused. */
      dueAt: instant.nullable(),
      attempts: z.number().int(),
    }),
  ),
  /** Of its kind on its shelf, while it was open. */
  quiets: z.array(
    z.object({
      setAt: instant,
      until: instant,
      setByName: z.string().nullable(),
      /** Before its time; null when it ran to its end or still runs. */
      endedAt: instant.nullable(),
      endedByName: z.string().nullable(),
    }),
  ),
  assignments: z.array(
    z.object({
      at: instant,
      /** Null when it was taken from whoever had it. */
      personName: z.string().nullable(),
      assignedByName: z.string().nullable(),
    }),
  ),
});
/** What happened to an alert beside the readings. */
export type AlertTimeLine = z.infer<typeof alertTimeLine>;

/** What happened to one alert. */
export const getAlertTimeLine = endpoint({
  name: 'getAlertTimeLine',
  method: 'get',
  path: '/rooms/:roomId/alerts/:alertId/time-line',
  access: 'viewer',
  summary: 'Who was written to about an alert, when it was quiet, and who looked after it',
  params: roomParams.extend({ alertId: id }),
  reply: alertTimeLine,
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
