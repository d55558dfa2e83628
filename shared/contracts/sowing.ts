import * as z from 'zod';
import { cropId } from './crops';
import { task } from './care';
import { day, endpoint, id, roomParams } from './endpoint';

const daysOfMonth = [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;
/** A day of every year, `MM-DD`; 29 February counts as the 28th in common years. */
export const yearDay = z
  .string()
  .regex(/^(0[1-9]|1[0-2])-(0[1-9]|[12]\d|3[01])$/, { error: 'must be a month and day such as 05-12' })
  .refine((value) => Number(value.slice(3)) <= (daysOfMonth[Number(value.slice(0, 2)) - 1] ?? 0), {
    error: 'is no day of the calendar',
  });

/** How a frost date was stated; the first two conventions run in opposite directions in spring. */
export const frostWording = z.discriminatedUnion('kind', [
  /** The chance that frost comes on the wrong side of the date. */
  z.strictObject({ kind: z.literal('probability'), percent: z.number().min(0).max(100) }),
  /** The place of the date among the years' dates, from early to late. */
  z.strictObject({ kind: z.literal('percentile'), percent: z.number().min(0).max(100) }),
  z.strictObject({ kind: z.literal('average') }),
]);
/** How a frost date was stated. */
export type FrostWordingView = z.infer<typeof frostWording>;

/** A frost date and how it was stated. */
export const frostDate = z.strictObject({ on: yearDay, wording: frostWording });

/** Frost dates as they are entered. */
export const frostDatesEntry = z.strictObject({
  lastSpring: frostDate.nullable(),
  firstAutumn: frostDate.nullable(),
  /** Where they are from, such as a weather station, and for which temperature. */
  note: z.string().trim().max(500).default(''),
});

/** Frost dates of the room's place. */
export const frostDates = frostDatesEntry.extend({
  /** Risk of frost left at each date, 0 to 1; null for an average, and without a date. */
  lastSpringRisk: z.number().nullable(),
  firstAutumnRisk: z.number().nullable(),
  /** What the wording means, in sentences for a person. */
  explanation: z.array(z.string()),
});
/** Frost dates of the room's place. */
export type FrostDates = z.infer<typeof frostDates>;

/** The room's frost dates. */
export const getFrostDates = endpoint({
  name: 'getFrostDates',
  method: 'get',
  path: '/rooms/:roomId/frost-dates',
  access: 'viewer',
  summary: 'Frost dates of the room’s place, the risk left at them, and what their wording means',
  params: roomParams,
  reply: frostDates,
});

/** Sets the room's frost dates. */
export const setFrostDates = endpoint({
  name: 'setFrostDates',
  method: 'put',
  path: '/rooms/:roomId/frost-dates',
  access: 'grower',
  summary: 'Set the frost dates of the room’s place and how they were stated',
  params: roomParams,
  body: frostDatesEntry,
  reply: frostDates,
});

const dayLength = z.object({ day, hours: z.number() });

/** Day length through a year at the room's place. */
export const dayLengthYear = z.object({
  /** Null until the room has a place. */
  latitudeDeg: z.number().nullable(),
  year: z.number().int(),
  /** One for each day; empty without a place. */
  days: z.array(dayLength),
  longest: dayLength.nullable(),
  shortest: dayLength.nullable(),
  /** Onion classes that suit the place. */
  onionClasses: z.array(z.enum(['short', 'intermediate', 'long'])),
  /** Lengths of day from which each class forms bulbs [h], for lines in the chart. */
  bulbing: z.array(z.object({ onion: z.enum(['short', 'intermediate', 'long']), fromHours: z.number() })),
});
/** Day length through a year at the room's place. */
export type DayLengthYear = z.infer<typeof dayLengthYear>;

/** Day length at the room's place. */
export const getDayLength = endpoint({
  name: 'getDayLength',
  method: 'get',
  path: '/rooms/:roomId/day-length',
  access: 'viewer',
  summary: 'Day length through a year at the room’s place, and the onions that suit it',
  params: roomParams,
  query: z.object({ year: z.coerce.number().int().min(1900).max(2200).optional() }),
  reply: dayLengthYear,
});

const window = z.object({ opens: day, closes: day });

/** When to sow a chosen crop. */
export const sowingPlan = z.object({
  cropId,
  cropName: z.string(),
  /** Days between sowings that follow each other; null for one sowing. */
  everyDays: z.number().int().nullable(),
  /** From the earliest to the latest of the sources; null without a frost date or figures. */
  window: window.nullable(),
  bySource: z.array(window.extend({ source: z.string() })),
  standing: z.enum(['notYet', 'open', 'past']).nullable(),
  /** The last frost that the window is counted from. */
  lastFrost: day.nullable(),
  /** Days on which to sow: the first alone unless sowings follow each other. */
  sowings: z.array(
    z.object({
      on: day,
      /** When it would be ready to go out; null without figures. */
      transplantFrom: day.nullable(),
      transplantTo: day.nullable(),
      transplantSource: z.string().nullable(),
    }),
  ),
  /** Why there is no window, or that the onion does not suit the place. */
  warnings: z.array(z.string()),
  /** Seed of it that is left. */
  lots: z.array(z.object({ lotId: id, name: z.string(), useFirst: z.boolean() })),
  /** Plantings of it sown inside the window. */
  sownOn: z.array(day),
  /** The open care task for it. */
  taskId: id.nullable(),
});
/** When to sow a chosen crop. */
export type SowingPlan = z.infer<typeof sowingPlan>;

/** The sowing calendar. */
export const sowingCalendar = z.object({
  today: day,
  frost: frostDates,
  latitudeDeg: z.number().nullable(),
  /** Chosen crops by the day on which their window opens; those without a window last. */
  plans: z.array(sowingPlan),
  /** Sowings due in the seven days from today or before, not made yet, while their window is open. */
  thisWeek: z.array(z.object({ cropId, cropName: z.string(), on: day, closes: day })),
});
/** The sowing calendar. */
export type SowingCalendar = z.infer<typeof sowingCalendar>;

/** The sowing calendar of the room. */
export const getSowingCalendar = endpoint({
  name: 'getSowingCalendar',
  method: 'get',
  path: '/rooms/:roomId/sowing',
  access: 'viewer',
  summary: 'Sowing windows of chosen crops against the last frost, and what to sow this week',
  params: roomParams,
  reply: sowingCalendar,
});

const choiceParams = roomParams.extend({ cropId });

/** Puts a crop on the calendar. */
export const chooseSowingCrop = endpoint({
  name: 'chooseSowingCrop',
  method: 'put',
  path: '/rooms/:roomId/sowing/crops/:cropId',
  access: 'grower',
  summary: 'Put a crop on the sowing calendar, with one sowing or one every so many days',
  params: choiceParams,
  body: z.strictObject({ everyDays: z.number().int().min(1).max(366).nullable().default(null) }),
  reply: sowingCalendar,
});

/** Takes a crop off the calendar. */
export const unchooseSowingCrop = endpoint({
  name: 'unchooseSowingCrop',
  method: 'delete',
  path: '/rooms/:roomId/sowing/crops/:cropId',
  access: 'grower',
  summary: 'Take a crop off the sowing calendar',
  params: choiceParams,
  reply: sowingCalendar,
});

/** Makes a care task of a sowing day. */
export const addSowingTask = endpoint({
  name: 'addSowingTask',
  method: 'post',
  path: '/rooms/:roomId/sowing/crops/:cropId/task',
  access: 'grower',
  summary: 'Make a care task to sow a crop on a day; an open one for the crop is kept',
  params: choiceParams,
  body: z.strictObject({ on: day, personId: id.nullable().default(null) }),
  reply: task,
  status: 201,
});
