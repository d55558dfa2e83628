import * as z from 'zod';
import { careKinds } from '../care/care-kind';
import { shelfEventKinds } from '../care/shelf-event';
import { day, endpoint, id, instant, line, roomParams } from './endpoint';

/** One due piece of care. */
export const task = z.object({
  id,
  kind: z.enum(careKinds),
  title: z.string(),
  detail: z.string(),
  shelfId: id.nullable(),
  shelfLabel: z.string().nullable(),
  dueOn: day,
  personId: id.nullable(),
  personName: z.string().nullable(),
  doneAt: instant.nullable(),
  doneByName: z.string().nullable(),
  note: z.string(),
});
/** One due piece of care. */
export type Task = z.infer<typeof task>;

/** Tasks of a span of days, with everything late before it. */
export const listTasks = endpoint({
  name: 'listTasks',
  method: 'get',
  path: '/rooms/:roomId/tasks',
  access: 'viewer',
  summary: 'Tasks due in a span of days, and those late before it',
  params: roomParams,
  query: z.object({ from: day, to: day }),
  reply: z.array(task),
});

const taskParams = roomParams.extend({ taskId: id });

/** Ticks a task; ticking a done task again changes nothing. */
export const completeTask = endpoint({
  name: 'completeTask',
  method: 'put',
  path: '/rooms/:roomId/tasks/:taskId/completion',
  access: 'helper',
  summary: 'Tick a task; the first tick stays',
  params: taskParams,
  body: z.strictObject({ note: z.string().trim().max(500).default('') }),
  reply: task,
});

/** Takes the tick back. */
export const reopenTask = endpoint({
  name: 'reopenTask',
  method: 'delete',
  path: '/rooms/:roomId/tasks/:taskId/completion',
  access: 'helper',
  summary: 'Take the tick of a task back',
  params: taskParams,
  reply: task,
});

/** Care that recurs. */
export const routine = z.object({
  id,
  kind: z.enum(careKinds),
  title: z.string(),
  detail: z.string(),
  shelfId: id.nullable(),
  rule: z.string(),
  startsOn: day,
  personId: id.nullable(),
});
/** Care that recurs. */
export type Routine = z.infer<typeof routine>;

/** The room's routines. */
export const listRoutines = endpoint({
  name: 'listRoutines',
  method: 'get',
  path: '/rooms/:roomId/routines',
  access: 'viewer',
  summary: 'Routines of the room',
  params: roomParams,
  reply: z.array(routine),
});

/** Adds a routine; its tasks appear ahead of time. */
export const addRoutine = endpoint({
  name: 'addRoutine',
  method: 'post',
  path: '/rooms/:roomId/routines',
  access: 'grower',
  summary: 'Add a routine by an RFC 5545 rule such as FREQ=DAILY;INTERVAL=4',
  params: roomParams,
  body: z.strictObject({
    kind: z.enum(careKinds),
    title: line(120),
    detail: z.string().trim().max(500).default(''),
    shelfId: id.nullable().default(null),
    rule: line(200),
    startsOn: day,
    personId: id.nullable().default(null),
  }),
  reply: routine,
  status: 201,
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
