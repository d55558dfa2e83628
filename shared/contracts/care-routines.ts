import * as z from 'zod';
import { careKinds } from '../care/care-kind';
import { carePlace } from './care-place';
import { cropId } from './crops';
import { day, endpoint, id, line, roomParams } from './endpoint';

/**
 * When care falls due. By the calendar: a rule of RFC 5545. After doing: so many days after it was last done or found
 * not needed, so that late care pushes the next. By drying: once the air has taken as much from a planting as it
 * usually stands between waterings, and by `fallbackDays` until it has taught that.
 */
export const routineTiming = z.discriminatedUnion('how', [
  z.strictObject({ how: z.literal('calendar'), rule: line(200), startsOn: day }),
  z.strictObject({
    how: z.literal('afterDoing'),
    everyDays: z.number().int().min(1).max(366),
    startsOn: day,
  }),
  z.strictObject({
    how: z.literal('byDrying'),
    fallbackDays: z.number().int().min(1).max(60),
    startsOn: day,
  }),
]);
/** When care falls due. */
export type RoutineTiming = z.infer<typeof routineTiming>;

/** Who does it: always one person, several in turn, two together, or whoever is on duty that day. */
export const routineWho = z.discriminatedUnion('how', [
  z.strictObject({ how: z.literal('person'), personId: id }),
  z.strictObject({ how: z.literal('inTurn'), personIds: z.array(id).min(2).max(30) }),
  z.strictObject({ how: z.literal('pair'), personIds: z.array(id).length(2) }),
  z.strictObject({ how: z.literal('onDuty') }),
]);
/** Who does it. */
export type RoutineWho = z.infer<typeof routineWho>;

const month = z.number().int().min(1).max(12);

/** The months in which care is due, both ends included; from October to March it goes over new year. */
export const routineSeason = z.strictObject({ fromMonth: month, toMonth: month });
/** The months in which care is due. */
export type RoutineSeason = z.infer<typeof routineSeason>;

const routineFields = {
  kind: z.enum(careKinds),
  title: line(120),
  /** A note for whoever does it. */
  detail: z.string().trim().max(500).default(''),
  place: carePlace,
  timing: routineTiming,
  season: routineSeason.nullable().default(null),
  /** Up to so many days after the day it is due it is still in time. */
  windowDays: z.number().int().min(0).max(60).default(0),
  /** How it is done, step by step. */
  steps: z.array(line(200)).max(20).default([]),
  /** How much, in words such as “about 1.2 L for the flat”. */
  amount: z.string().trim().max(120).default(''),
  who: routineWho,
  /** On a closed day a calendar's care is left out; other care waits for the next open day. */
  skipsClosedDays: z.boolean().default(false),
  /** How long it usually takes; what a fair share is counted in. */
  minutes: z.number().int().min(1).max(480).default(10),
};

/** What a routine is made of. */
export const routineDraft = z.strictObject(routineFields);
/** What a routine is made of. */
export type RoutineDraft = z.output<typeof routineDraft>;

/** Care that recurs. */
export const routine = routineDraft.extend({
  id,
  /** Such as “A3”, “Rack A” or “Basil Corvid”; null for the whole room. */
  placeLabel: z.string().nullable(),
  /** The next open task; null where none is planned, as out of season. */
  nextDueOn: day.nullable(),
});
/** Care that recurs. */
export type Routine = z.output<typeof routine>;

/** The room's routines. */
export const listRoutines = endpoint({
  name: 'listRoutines',
  method: 'get',
  path: '/rooms/:roomId/routines',
  access: 'viewer',
  summary: 'Routines of the room that go on, by title',
  params: roomParams,
  query: z.object({ plantingId: id.optional(), shelfId: id.optional() }),
  reply: z.array(routine),
});

/** Adds a routine; its tasks appear ahead of time. */
export const addRoutine = endpoint({
  name: 'addRoutine',
  method: 'post',
  path: '/rooms/:roomId/routines',
  access: 'grower',
  summary:
    'Add a routine by the calendar (RFC 5545 rule such as FREQ=DAILY;INTERVAL=4), after doing, or by drying; takes an Idempotency-Key',
  params: roomParams,
  body: routineDraft,
  reply: routine,
  status: 201,
});

const routineParams = roomParams.extend({ routineId: id });

/** Changes a routine; its open tasks from today on follow, what was done stays. */
export const changeRoutine = endpoint({
  name: 'changeRoutine',
  method: 'put',
  path: '/rooms/:roomId/routines/:routineId',
  access: 'grower',
  summary: 'Change a routine; its open tasks from today on follow, what was done and what is late stays',
  params: routineParams,
  body: routineDraft,
  reply: routine,
});

/** Ends a routine. */
export const endRoutine = endpoint({
  name: 'endRoutine',
  method: 'delete',
  path: '/rooms/:roomId/routines/:routineId',
  access: 'grower',
  summary: 'End a routine; its open tasks go, its history stays',
  params: routineParams,
});

/** A routine as it is usually kept for a crop: common practice, with no source. */
export const readyMadeRoutine = z.object({
  /** Stable, such as `tomato-trim`. */
  id: z.string(),
  kind: z.enum(careKinds),
  title: z.string(),
  detail: z.string(),
  timing: z.discriminatedUnion('how', [
    z.object({ how: z.literal('calendar'), rule: z.string() }),
    z.object({ how: z.literal('afterDoing'), everyDays: z.number().int() }),
    z.object({ how: z.literal('byDrying'), fallbackDays: z.number().int() }),
  ]),
  season: routineSeason.nullable(),
  windowDays: z.number().int(),
  steps: z.array(z.string()),
  amount: z.string(),
  minutes: z.number().int(),
});
/** A routine as it is usually kept for a crop. */
export type ReadyMadeRoutineView = z.infer<typeof readyMadeRoutine>;

/** What care a crop usually gets. */
export const listReadyMadeRoutines = endpoint({
  name: 'listReadyMadeRoutines',
  method: 'get',
  path: '/rooms/:roomId/ready-made-routines',
  access: 'viewer',
  summary:
    'Routines that a crop usually gets, to choose from when a planting starts; common practice, no source',
  params: roomParams,
  query: z.object({ cropId }),
  reply: z.array(readyMadeRoutine),
});

/** Gives a planting some of the ready-made routines of its crop. */
export const adoptRoutines = endpoint({
  name: 'adoptRoutines',
  method: 'post',
  path: '/rooms/:roomId/plantings/:plantingId/routines',
  access: 'grower',
  summary:
    'Give a planting some of the ready-made routines of its crop, from a day on; takes an Idempotency-Key',
  params: roomParams.extend({ plantingId: id }),
  body: z.strictObject({
    readyMadeIds: z.array(z.string().max(80)).min(1).max(20),
    who: routineWho,
    /** Today, unless given. */
    startsOn: day.optional(),
  }),
  reply: z.array(routine),
  status: 201,
});
