import * as z from 'zod';
import { quantities } from '../climate/quantity';
import { plantHabits, plantingStages } from '../growing/planting-stage';
import { shelfAdvice } from './advice';
import { alert } from './alerts';
import { task } from './care';
import { day, endpoint, id, instant, roomParams } from './endpoint';
import { sowingNow } from './germination';
import { limits } from './rooms';

/** The newest value of one quantity on a shelf, against what is wanted at this moment. */
export const measure = z.object({
  quantity: z.enum(quantities),
  value: z.number(),
  at: instant,
  /** A quality test doubts it. */
  suspect: z.boolean(),
  /** After this many seconds a value counts as old. */
  expectedIntervalS: z.number(),
  /** The range wanted now, with the lamps as they are planned now; null when none is set. */
  wanted: limits.nullable(),
});
/** The newest value of one quantity on a shelf. */
export type Measure = z.infer<typeof measure>;

/** Part of a day, as instants. */
export const interval = z.object({ from: instant, to: instant });
/** Part of a day, as instants. */
export type Interval = z.infer<typeof interval>;

/** The light of a shelf's day so far. */
export const lampDay = z.object({
  hasLamp: z.boolean(),
  /** As the light sensor saw it last, else as planned; null when neither is known. */
  lit: z.boolean().nullable(),
  planned: z.array(interval),
  measured: z.array(interval),
  /** Hours of light measured since midnight; null without a light sensor. */
  measuredHours: z.number().nullable(),
  dliMolM2D: z.number().nullable(),
});
/** The light of a shelf's day so far. */
export type LampDay = z.infer<typeof lampDay>;

/** Something growing, as far as a label and a drawing need it. */
export const plantingSummary = z.object({
  id,
  crop: z.string(),
  variety: z.string().nullable(),
  habit: z.enum(plantHabits),
  count: z.number().int(),
  stage: z.enum(plantingStages),
  startedOn: day,
  stageSince: day,
});
/** Something growing, as far as a label and a drawing need it. */
export type PlantingSummary = z.infer<typeof plantingSummary>;

/** What changes on a shelf when readings arrive. */
export const shelfNow = z.object({ shelfId: id, measures: z.array(measure), lampDay });
/** What changes on a shelf when readings arrive. */
export type ShelfNow = z.infer<typeof shelfNow>;

/** A shelf as it stands in the room now. */
export const boardShelf = z.object({
  id,
  label: z.string(),
  heatMatOn: z.boolean().nullable(),
  plantings: z.array(plantingSummary),
  /** Its sowings that still come up, with when to expect the first. */
  sowings: z.array(sowingNow),
  /** What it should be for them; null until it was worked out. */
  advice: shelfAdvice.nullable(),
  now: shelfNow,
});
/** A shelf as it stands in the room now. */
export type BoardShelf = z.infer<typeof boardShelf>;

/** A rack as it stands in the room now, shelves from the top. */
export const boardRack = z.object({ id, name: z.string(), note: z.string(), shelves: z.array(boardShelf) });
/** A rack as it stands in the room now. */
export type BoardRack = z.infer<typeof boardRack>;

/** The room as it is now: all that the first screen draws. */
export const board = z.object({
  roomId: id,
  roomName: z.string(),
  timeZone: z.string(),
  /** The server's clock, so that ages are right on a phone whose own is not. */
  at: instant,
  today: day,
  dayStart: instant,
  dayEnd: instant,
  /** Sensors whose devices report by themselves. */
  sensorCount: z.number().int(),
  sensorsReporting: z.number().int(),
  racks: z.array(boardRack),
  openAlerts: z.array(alert),
  tasks: z.array(task),
});
/** The room as it is now. */
export type Board = z.infer<typeof board>;

/** The room as it is now. */
export const getBoard = endpoint({
  name: 'getBoard',
  method: 'get',
  path: '/rooms/:roomId/board',
  access: 'viewer',
  summary: 'The room as it is now: shelves, newest values, lamps, plants, open alerts, today’s care',
  params: roomParams,
  reply: board,
});
