import * as z from 'zod';
import { careKinds } from '../care/care-kind';
import { task } from './care';
import { cropId } from './crops';
import { day, endpoint, id, instant, roomParams } from './endpoint';

const recordFilter = {
  plantingId: id.optional(),
  shelfId: id.optional(),
  personId: id.optional(),
  kind: z.enum(careKinds).optional(),
  /** Closed on this day or later. */
  from: day.optional(),
  /** Closed before this day. */
  to: day.optional(),
};

/** What was done, found not needed, could not be done, or was missed. */
export const listCareRecord = endpoint({
  name: 'listCareRecord',
  method: 'get',
  path: '/rooms/:roomId/care/record',
  access: 'viewer',
  summary: 'Closed tasks, newest first, by cursor; by planting, shelf, person, kind and span',
  params: roomParams,
  query: z.object({
    ...recordFilter,
    cursor: z.string().max(200).optional(),
    limit: z.coerce.number().int().min(1).max(200).default(50),
  }),
  reply: z.object({ tasks: z.array(task), nextCursor: z.string().nullable() }),
});

/** The same as a file. */
export const downloadCareRecord = endpoint({
  name: 'downloadCareRecord',
  method: 'get',
  path: '/rooms/:roomId/care/record.csv',
  access: 'grower',
  summary: 'Closed tasks as CSV (RFC 4180), oldest first',
  params: roomParams,
  query: z.object(recordFilter),
  reply: z.string(),
  media: { reply: 'text/csv' },
});

const harvested = {
  grams: z.number(),
  count: z.number().int(),
  /** How often it was picked. */
  harvests: z.number().int(),
};

/** What was harvested. */
export const careYields = z.object({
  crops: z.array(
    z.object({
      cropId: cropId.nullable(),
      crop: z.string(),
      ...harvested,
      plantings: z.array(z.object({ plantingId: id, label: z.string(), ...harvested })),
    }),
  ),
});
/** What was harvested. */
export type CareYields = z.infer<typeof careYields>;

/** Harvests by crop and planting. */
export const getCareYields = endpoint({
  name: 'getCareYields',
  method: 'get',
  path: '/rooms/:roomId/care/yields',
  access: 'viewer',
  summary: 'What was harvested in a span, by crop and planting, most first; to is exclusive',
  params: roomParams,
  query: z.object({ from: day, to: day }),
  reply: careYields,
});

const compliance = {
  /** Tasks whose time was up in the span. */
  due: z.number().int(),
  /** Done, or found not needed, in time. */
  inTime: z.number().int(),
  late: z.number().int(),
  /** Still open, missed, or could not be done. */
  notDone: z.number().int(),
  /** `inTime` of `due`, 0 to 1; null where nothing was due. */
  share: z.number().nullable(),
};

/** How much was done in time, for the room and by kind: nobody is ranked. */
export const careCompliance = z.object({
  ...compliance,
  kinds: z.array(z.object({ kind: z.enum(careKinds), ...compliance })),
});
/** How much was done in time. */
export type CareCompliance = z.infer<typeof careCompliance>;

/** How much was done in time. */
export const getCareCompliance = endpoint({
  name: 'getCareCompliance',
  method: 'get',
  path: '/rooms/:roomId/care/compliance',
  access: 'viewer',
  summary: 'How much care was done in time in a span, in all and by kind; to is exclusive',
  params: roomParams,
  query: z.object({ from: day, to: day }),
  reply: careCompliance,
});

/** A planting's waterings against how thirsty the air was. */
export const plantingDrying = z.object({
  at: instant,
  /** Days until it is due, where its own drying does not tell; null without a routine by drying. */
  fallbackDays: z.number().int().nullable(),
  /** Waterings, oldest first; the first span begins at the first of them, or when the planting started. */
  spans: z.array(
    z.object({
      from: instant,
      /** The watering that ended it; null for the one that runs. */
      to: instant.nullable(),
      /** Vapour pressure deficit over the covered time [kPa·h]; null where nothing is covered. */
      integralKPaH: z.number().nullable(),
      /** Covered share of the span, 0 to 1. */
      coverage: z.number(),
      millilitres: z.number().nullable(),
      /** Whether the interval is learned from it: ended, and well covered. */
      isLearnedFrom: z.boolean(),
    }),
  ),
  /** The integral as it grew, falling to 0 at each watering; for the chart. */
  curve: z.array(z.object({ at: instant, integralKPaH: z.number() })),
  /** Null before it has taught enough. */
  interval: z
    .object({
      medianKPaH: z.number(),
      lowKPaH: z.number(),
      highKPaH: z.number(),
      count: z.number().int(),
    })
    .nullable(),
  standing: z.enum(['notYet', 'soon', 'due']).nullable(),
  /** When it will be due if the air stays as thirsty as in the last day; null where that can't be told. */
  dueAt: instant.nullable(),
});
/** A planting's waterings against how thirsty the air was. */
export type PlantingDrying = z.infer<typeof plantingDrying>;

/** A planting's waterings against drying. */
export const getPlantingDrying = endpoint({
  name: 'getPlantingDrying',
  method: 'get',
  path: '/rooms/:roomId/plantings/:plantingId/drying',
  access: 'viewer',
  summary:
    'A planting’s waterings of the last 60 days against the vapour pressure deficit, and what it has taught',
  params: roomParams.extend({ plantingId: id }),
  reply: plantingDrying,
});
