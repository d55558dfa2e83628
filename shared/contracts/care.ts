import * as z from 'zod';
import { careKinds } from '../care/care-kind';
import { shelfEventKinds } from '../care/shelf-event';
import { taskCovers } from '../care/task-cover';
import { personOutcomes, taskOutcomes } from '../care/task-outcome';
import { careHolder, carePlace } from './care-place';
import { day, endpoint, id, instant, line, roomParams } from './endpoint';

/** An offer to hand a task over, not yet taken. */
export const openSwap = z.object({
  id,
  offeredById: id,
  offeredByName: z.string(),
  /** For whom; null for anybody. */
  toPersonId: id.nullable(),
  toPersonName: z.string().nullable(),
  note: z.string(),
  offeredAt: instant,
});
/** An offer to hand a task over, not yet taken. */
export type OpenSwap = z.infer<typeof openSwap>;

/** One due piece of care. */
export const task = z.object({
  id,
  /** Null for what was asked for once. */
  routineId: id.nullable(),
  kind: z.enum(careKinds),
  title: z.string(),
  /** A note for whoever does it. */
  detail: z.string(),
  /** How it is done, step by step. */
  steps: z.array(z.string()),
  /** How much, in words; empty where nothing is said. */
  amount: z.string(),
  /** How long it usually takes [min]. */
  minutes: z.number().int(),
  plantingId: id.nullable(),
  /** Crop and variety; null where it is not about one planting. */
  plantingLabel: z.string().nullable(),
  rackId: id.nullable(),
  rackName: z.string().nullable(),
  /** The shelf; for a planting where it stands. Null for all others, and for a planting on no shelf. */
  shelfId: id.nullable(),
  shelfLabel: z.string().nullable(),
  dueOn: day,
  /** The last day on which it is in time; from the day after it is late. */
  inTimeUntil: day,
  /** The day of its rule, where somebody moved it to another; else null. */
  movedFrom: day.nullable(),
  /** Who does it; two for a pair. */
  holders: z.array(careHolder),
  /** The holders in words, “Pia Lindqvist and Ravi Sandhill”; null for nobody. */
  personName: z.string().nullable(),
  cover: z.enum(taskCovers),
  /** Open offer to hand it over. */
  swap: openSwap.nullable(),
  /** Null while it is open. */
  outcome: z.enum(taskOutcomes).nullable(),
  /** When it was closed, whatever the outcome; null while it is open. */
  doneAt: instant.nullable(),
  doneById: id.nullable(),
  doneByName: z.string().nullable(),
  /** What was noted with it; for “not needed” and “could not” the reason. */
  note: z.string(),
  /** Water or feed given [ml]. */
  millilitres: z.number().nullable(),
  /** Harvested [g]. */
  grams: z.number().nullable(),
  /** Harvested, or counted otherwise. */
  count: z.number().int().nullable(),
  /** How long it took [min]; null when not said. */
  tookMinutes: z.number().int().nullable(),
  photoIds: z.array(id),
});
/** One due piece of care. */
export type Task = z.infer<typeof task>;

/** Tasks of a span of days, with everything late before it. */
export const listTasks = endpoint({
  name: 'listTasks',
  method: 'get',
  path: '/rooms/:roomId/tasks',
  access: 'viewer',
  summary: 'Tasks due in a span of days, and those still open from before it',
  params: roomParams,
  query: z.object({ from: day, to: day }),
  reply: z.array(task),
});

/** What a phone needs to do care without a signal: today and tomorrow, and everything late. */
export const careDays = z.object({
  roomId: id,
  roomName: z.string(),
  timeZone: z.string(),
  /** When this was so. */
  at: instant,
  today: day,
  tomorrow: day,
  /** Late ones first, then by day; done ones of today too. */
  tasks: z.array(task),
  /** Plantings that a harvest or a watering can be noted at, by the shelf they stand on. */
  plantings: z.array(z.object({ id, label: z.string(), shelfId: id.nullable() })),
});
/** What a phone needs to do care without a signal. */
export type CareDays = z.infer<typeof careDays>;

/** Today’s and tomorrow’s care, to be kept on a phone. */
export const getCareDays = endpoint({
  name: 'getCareDays',
  method: 'get',
  path: '/rooms/:roomId/care/days',
  access: 'viewer',
  summary: 'Today’s and tomorrow’s care with all that is needed to do it without a signal',
  params: roomParams,
  reply: careDays,
});

const taskParams = roomParams.extend({ taskId: id });
const millilitres = z.number().positive().max(1_000_000).nullable();
const grams = z.number().positive().max(1_000_000).nullable();
const count = z.number().int().min(0).max(100_000).nullable();
/** Why not, or what there is to say. */
const note = z.string().trim().max(500).default('');

/** What became of a task. */
export const taskCompletion = z
  .strictObject({
    outcome: z.enum(personOutcomes).default('done'),
    /** The reason, where it was not done. */
    note,
    /** Of water or feed; noted at the planting, or at each on the shelf. */
    millilitres: millilitres.default(null),
    /** Of a harvest; noted at the planting. */
    grams: grams.default(null),
    count: count.default(null),
    tookMinutes: z.number().int().min(1).max(1_440).nullable().default(null),
    /** What was harvested or watered, where the task is about a shelf with several plantings. */
    plantingId: id.nullable().default(null),
    /** When it was done, for what was ticked without a signal; now unless given, at most seven days ago. */
    doneAt: instant.optional(),
  })
  .refine(({ outcome, note }) => outcome === 'done' || note !== '', {
    error: 'say why',
    path: ['note'],
  });
/** What became of a task. */
export type TaskCompletion = z.output<typeof taskCompletion>;

/** Closes a task; the same person closing it again changes nothing. */
export const completeTask = endpoint({
  name: 'completeTask',
  method: 'put',
  path: '/rooms/:roomId/tasks/:taskId/completion',
  access: 'helper',
  summary:
    'Say that a task is done, not needed or could not be done; 409 TASK_CLOSED with who and when where somebody else did; takes an Idempotency-Key',
  params: taskParams,
  body: taskCompletion,
  reply: task,
});

/** Takes the tick back. */
export const reopenTask = endpoint({
  name: 'reopenTask',
  method: 'delete',
  path: '/rooms/:roomId/tasks/:taskId/completion',
  access: 'helper',
  summary: 'Take back what was said of a task, with all that it wrote elsewhere; takes an Idempotency-Key',
  params: taskParams,
  reply: task,
});

/** Adds a task of no routine. */
export const addTask = endpoint({
  name: 'addTask',
  method: 'post',
  path: '/rooms/:roomId/tasks',
  access: 'helper',
  summary:
    'Add a task that no routine planned; a helper for themselves or whoever is on duty; takes an Idempotency-Key',
  params: roomParams,
  body: z.strictObject({
    kind: z.enum(careKinds),
    title: line(120),
    detail: z.string().trim().max(500).default(''),
    place: carePlace,
    /** Today, unless given. */
    dueOn: day.optional(),
    windowDays: z.number().int().min(0).max(60).default(0),
    minutes: z.number().int().min(1).max(480).default(10),
    /** Whoever is on duty, when empty. */
    personIds: z.array(id).max(2).default([]),
  }),
  reply: task,
  status: 201,
});

/** Removes a task of no routine. */
export const removeTask = endpoint({
  name: 'removeTask',
  method: 'delete',
  path: '/rooms/:roomId/tasks/:taskId',
  access: 'helper',
  summary: 'Remove an open task that no routine planned; a helper their own',
  params: taskParams,
});

/** Moves a task to another day. */
export const moveTask = endpoint({
  name: 'moveTask',
  method: 'put',
  path: '/rooms/:roomId/tasks/:taskId/day',
  access: 'grower',
  summary: 'Move an open task to another day, from today to a year ahead; its routine keeps its rhythm',
  params: taskParams,
  body: z.strictObject({ dueOn: day }),
  reply: task,
});

/** Gives a task to somebody. */
export const assignTask = endpoint({
  name: 'assignTask',
  method: 'put',
  path: '/rooms/:roomId/tasks/:taskId/holders',
  access: 'grower',
  summary: 'Give an open task to one or two members, or back to the rota with an empty list',
  params: taskParams,
  body: z.strictObject({ personIds: z.array(id).max(2) }),
  reply: task,
});

/** Takes somebody else’s task over. */
export const takeOverTask = endpoint({
  name: 'takeOverTask',
  method: 'put',
  path: '/rooms/:roomId/tasks/:taskId/take-over',
  access: 'helper',
  summary: 'Take an open task over from whoever holds it; they are told by mail',
  params: taskParams,
  reply: task,
});

/** Adds a photo to a task. */
export const addTaskPhoto = endpoint({
  name: 'addTaskPhoto',
  method: 'post',
  path: '/rooms/:roomId/tasks/:taskId/photos',
  access: 'helper',
  summary:
    'Add a photo to a task (JPEG, PNG or WebP in field “file”); shown at its planting too; takes an Idempotency-Key',
  params: taskParams,
  query: z.object({ caption: z.string().trim().max(200).default('') }),
  reply: task,
  status: 201,
  media: { request: 'multipart/form-data' },
});

/** Something a person did or saw on a shelf. */
export const shelfEvent = z.object({
  id,
  shelfId: id,
  at: instant,
  kind: z.enum(shelfEventKinds),
  text: z.string(),
  personName: z.string().nullable(),
});
/** Something a person did or saw on a shelf. */
export type ShelfEvent = z.infer<typeof shelfEvent>;

/** Notes what was done or seen on a shelf. */
export const addShelfEvent = endpoint({
  name: 'addShelfEvent',
  method: 'post',
  path: '/rooms/:roomId/shelves/:shelfId/events',
  access: 'helper',
  summary: 'Note an observation or a piece of work on a shelf',
  params: roomParams.extend({ shelfId: id }),
  body: z.strictObject({ kind: z.enum(shelfEventKinds), text: line(500), at: instant.optional() }),
  reply: shelfEvent,
  status: 201,
});
