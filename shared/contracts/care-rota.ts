import * as z from 'zod';
import { openSwap, task } from './care';
import { careHolder } from './care-place';
import { day, endpoint, id, roomParams } from './endpoint';

const weekday = z.number().int().min(1).max(7);
const note = z.string().trim().max(200).default('');
const people = z.array(id).max(30);

/** The usual week: who is on duty on each weekday (1 is Monday), and on which nobody comes. */
export const dutyWeekday = z.object({ weekday, isClosed: z.boolean(), onDuty: z.array(careHolder) });
/** A weekday of the usual week. */
export type DutyWeekday = z.infer<typeof dutyWeekday>;

/** Away from one day to another, both included. */
export const absence = z.object({
  id,
  personId: id,
  personName: z.string(),
  from: day,
  to: day,
  note: z.string(),
});
/** Away from one day to another, both included. */
export type Absence = z.infer<typeof absence>;

/** A day of the rota as it is: the usual week, an exception where there is one, less who is away. */
export const dutyDay = z.object({
  day,
  isClosed: z.boolean(),
  /** Those who are there, absent ones left out. */
  onDuty: z.array(careHolder),
  absent: z.array(careHolder),
  /** Something else than the usual week was set. */
  isException: z.boolean(),
  note: z.string(),
});
/** A day of the rota as it is. */
export type DutyDay = z.infer<typeof dutyDay>;

/** The rota of a span of days. */
export const rota = z.object({
  /** False while no weekday has anybody: care is then anybody’s. */
  isKept: z.boolean(),
  week: z.array(dutyWeekday),
  days: z.array(dutyDay),
  /** Those that touch the span. */
  absences: z.array(absence),
  /** Open tasks of the span that are short of hands, late ones too. */
  uncovered: z.array(task),
});
/** The rota of a span of days. */
export type Rota = z.infer<typeof rota>;

/** At most 92 days. */
const span = z
  .object({ from: day, to: day })
  .refine(({ from, to }) => from < to, { error: 'must be after from', path: ['to'] })
  .refine(({ from, to }) => Date.parse(to) - Date.parse(from) <= 92 * 86_400_000, {
    error: 'must be at most 92 days after from',
    path: ['to'],
  });

/** Who is there when. */
export const getRota = endpoint({
  name: 'getRota',
  method: 'get',
  path: '/rooms/:roomId/rota',
  access: 'viewer',
  summary: 'Who is on duty, away and short of, day by day; to is exclusive',
  params: roomParams,
  query: span,
  reply: rota,
});

/** Sets the usual week. */
export const setDutyWeek = endpoint({
  name: 'setDutyWeek',
  method: 'put',
  path: '/rooms/:roomId/rota/week',
  access: 'keeper',
  summary: 'Set who is on duty on each weekday, and which are closed; open tasks from today on follow',
  params: roomParams,
  body: z.strictObject({
    week: z
      .array(z.strictObject({ weekday, isClosed: z.boolean().default(false), personIds: people }))
      .max(7)
      .refine((week) => new Set(week.map((one) => one.weekday)).size === week.length, {
        error: 'names a weekday twice',
      }),
  }),
  reply: z.array(dutyWeekday),
});

const dayParams = roomParams.extend({ day });

/** Sets one day apart from the usual week. */
export const setDutyDay = endpoint({
  name: 'setDutyDay',
  method: 'put',
  path: '/rooms/:roomId/rota/days/:day',
  access: 'keeper',
  summary: 'Set one day apart from the usual week: closed, or with other people on duty',
  params: dayParams,
  body: z.strictObject({
    isClosed: z.boolean().default(false),
    /** Null leaves those of the usual week. */
    personIds: people.nullable().default(null),
    note,
  }),
  reply: dutyDay,
});

/** Makes a day usual again. */
export const clearDutyDay = endpoint({
  name: 'clearDutyDay',
  method: 'delete',
  path: '/rooms/:roomId/rota/days/:day',
  access: 'keeper',
  summary: 'Make a day like the usual week again',
  params: dayParams,
});

/** Says that somebody is away. */
export const addAbsence = endpoint({
  name: 'addAbsence',
  method: 'post',
  path: '/rooms/:roomId/absences',
  access: 'helper',
  summary: 'Say that you are away, or, as a keeper, that somebody else is; takes an Idempotency-Key',
  params: roomParams,
  body: z
    .strictObject({
      /** Yourself, unless given. */
      personId: id.optional(),
      from: day,
      to: day,
      note,
    })
    .refine(({ from, to }) => from <= to, { error: 'must not be before from', path: ['to'] }),
  reply: absence,
  status: 201,
});

/** Takes an absence back. */
export const removeAbsence = endpoint({
  name: 'removeAbsence',
  method: 'delete',
  path: '/rooms/:roomId/absences/:absenceId',
  access: 'helper',
  summary: 'Take an absence back: your own, or as a keeper anybody’s',
  params: roomParams.extend({ absenceId: id }),
});

/** What one person did and has still to do in a span. */
export const careShare = z.object({
  personId: id,
  name: z.string(),
  doneTasks: z.number().int(),
  doneMinutes: z.number().int(),
  openTasks: z.number().int(),
  openMinutes: z.number().int(),
});
/** What one person did and has still to do in a span. */
export type CareShare = z.infer<typeof careShare>;

/** How care is shared out. */
export const getFairShare = endpoint({
  name: 'getFairShare',
  method: 'get',
  path: '/rooms/:roomId/rota/share',
  access: 'viewer',
  summary: 'Tasks and minutes of each person in a span, by name; to is exclusive',
  params: roomParams,
  query: span,
  reply: z.object({ shares: z.array(careShare), uncoveredTasks: z.number().int() }),
});

/** An open offer with its task. */
export const swapOffer = openSwap.extend({ task });
/** An open offer with its task. */
export type SwapOffer = z.infer<typeof swapOffer>;

/** Offers that nobody has taken yet. */
export const listSwaps = endpoint({
  name: 'listSwaps',
  method: 'get',
  path: '/rooms/:roomId/swaps',
  access: 'viewer',
  summary: 'Tasks that somebody would like to hand over, soonest due first',
  params: roomParams,
  reply: z.array(swapOffer),
});

/** Offers a task to others. */
export const offerSwap = endpoint({
  name: 'offerSwap',
  method: 'post',
  path: '/rooms/:roomId/tasks/:taskId/swaps',
  access: 'helper',
  summary:
    'Offer a task of yours to one member or to all who help; they are told by mail; takes an Idempotency-Key',
  params: roomParams.extend({ taskId: id }),
  body: z.strictObject({ toPersonId: id.nullable().default(null), note }),
  reply: swapOffer,
  status: 201,
});

const swapParams = roomParams.extend({ swapId: id });

/** Takes an offered task. */
export const takeSwap = endpoint({
  name: 'takeSwap',
  method: 'put',
  path: '/rooms/:roomId/swaps/:swapId/taking',
  access: 'helper',
  summary: 'Take a task that somebody offers; both are told by mail',
  params: swapParams,
  reply: task,
});

/** Withdraws an offer. */
export const withdrawSwap = endpoint({
  name: 'withdrawSwap',
  method: 'delete',
  path: '/rooms/:roomId/swaps/:swapId',
  access: 'helper',
  summary: 'Withdraw your offer, or as a grower anybody’s; the task stays with who offered it',
  params: swapParams,
});
