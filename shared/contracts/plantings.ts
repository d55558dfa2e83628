import * as z from 'zod';
import { plantHabits, plantingStages } from '../growing/planting-stage';
import { cropId } from './crops';
import { day, endpoint, id, instant, line, roomParams } from './endpoint';
import { photo } from './photos';
import { plantingEvent } from './planting-events';

/** What a planting grew from. */
export const plantingOrigins = ['sown', 'broughtIn', 'split'] as const;

/** A planting as a list shows it. */
export const planting = z.object({
  id,
  /** Null for what was written down before crops had figures. */
  cropId: cropId.nullable(),
  crop: z.string(),
  variety: z.string().nullable(),
  habit: z.enum(plantHabits),
  stage: z.enum(plantingStages),
  stageSince: day,
  startedOn: day,
  endedOn: day.nullable(),
  origin: z.enum(plantingOrigins),
  /** Seeds sown; null for what was brought in or split off. */
  sown: z.number().int().nullable(),
  /** How many have come up in all; null where nothing was sown. */
  up: z.number().int().nullable(),
  /** Plants that stand now; before the first is up, the seeds. */
  count: z.number().int(),
  container: z.string(),
  /** Where it stands; null for outdoors, or for a place that is no shelf. */
  shelfId: id.nullable(),
  shelfLabel: z.string().nullable(),
  /** Harvested so far. */
  harvestedGrams: z.number(),
  harvestedCount: z.number().int(),
});
/** A planting as a list shows it. */
export type Planting = z.infer<typeof planting>;

/** The room's plantings. */
export const listPlantings = endpoint({
  name: 'listPlantings',
  method: 'get',
  path: '/rooms/:roomId/plantings',
  access: 'viewer',
  summary: 'Plantings, newest first, by cursor',
  params: roomParams,
  query: z.object({
    state: z.enum(['growing', 'ended', 'all']).default('growing'),
    cropId: cropId.optional(),
    lotId: id.optional(),
    shelfId: id.optional(),
    cursor: z.string().max(200).optional(),
    limit: z.coerce.number().int().min(1).max(200).default(100),
  }),
  reply: z.object({ plantings: z.array(planting), nextCursor: z.string().nullable() }),
});

/** A time at a place. */
export const plantingPlace = z.object({
  shelfId: id.nullable(),
  shelfLabel: z.string().nullable(),
  from: instant,
  /** Null for where it stands now. */
  to: instant.nullable(),
});

/** A planting with its story. */
export const plantingDetail = planting.extend({
  lotId: id.nullable(),
  /** The lot in words, such as “packed 2025, lot 17/4”; null without one. */
  lotName: z.string().nullable(),
  /** Where plants that were brought in came from. */
  source: z.string(),
  /** Sowing depth [mm]; null when not written down. */
  depthMm: z.number().nullable(),
  /** Sown or brought in at this instant. */
  startedAt: instant,
  places: z.array(plantingPlace),
  /** Oldest first. */
  events: z.array(plantingEvent),
  photos: z.array(photo),
  /** The event that may be undone now; null when none. */
  undoableEventId: id.nullable(),
});
/** A planting with its story. */
export type PlantingDetail = z.infer<typeof plantingDetail>;

const plantingParams = roomParams.extend({ plantingId: id });

/** One planting. */
export const getPlanting = endpoint({
  name: 'getPlanting',
  method: 'get',
  path: '/rooms/:roomId/plantings/:plantingId',
  access: 'viewer',
  summary: 'A planting with its places, time line and photos',
  params: plantingParams,
  reply: plantingDetail,
});

const begun = {
  variety: line(80).nullable().default(null),
  /** Null for a place that is no shelf of the room. */
  shelfId: id.nullable(),
  container: z.string().trim().max(120).default(''),
  note: z.string().trim().max(1000).default(''),
  /** Now, unless given. */
  at: instant.optional(),
};
const plantCount = z.number().int().min(1).max(100_000);

/** A sowing, or plants that come from elsewhere. */
export const newPlanting = z.discriminatedUnion('how', [
  z.strictObject({
    how: z.literal('sown'),
    ...begun,
    /** Needed without a lot; with one it is the lot’s. */
    cropId: cropId.optional(),
    lotId: id.nullable().default(null),
    count: plantCount,
    /** Taken from a lot in grams; by its seeds a gram unless given. */
    grams: z.number().positive().max(1_000_000).nullable().default(null),
    depthMm: z.number().min(0).max(300).nullable().default(null),
  }),
  z.strictObject({
    how: z.literal('broughtIn'),
    ...begun,
    cropId,
    count: plantCount,
    stage: z.enum(['seedling', 'growingOn', 'fruiting', 'resting']).default('growingOn'),
    /** Such as “cutting of our own”, “division”, “bought”. */
    source: z.string().trim().max(120).default(''),
  }),
]);
/** A sowing, or plants that come from elsewhere. */
export type NewPlanting = z.output<typeof newPlanting>;

/** Sows, or brings plants in. */
export const startPlanting = endpoint({
  name: 'startPlanting',
  method: 'post',
  path: '/rooms/:roomId/plantings',
  access: 'grower',
  summary: 'Sow, from a lot or not, or bring plants in; takes an Idempotency-Key',
  params: roomParams,
  body: newPlanting,
  reply: plantingDetail,
  status: 201,
});

/** Removes a planting written down by mistake. */
export const removePlanting = endpoint({
  name: 'removePlanting',
  method: 'delete',
  path: '/rooms/:roomId/plantings/:plantingId',
  access: 'grower',
  summary: 'Remove a planting to which nothing has happened yet; its seed goes back to the lot',
  params: plantingParams,
});

/** Corrects what is written of a planting. */
export const changePlanting = endpoint({
  name: 'changePlanting',
  method: 'patch',
  path: '/rooms/:roomId/plantings/:plantingId',
  access: 'grower',
  summary: 'Correct variety, source or depth of a planting',
  params: plantingParams,
  body: z.strictObject({
    variety: line(80).nullable().optional(),
    source: z.string().trim().max(120).optional(),
    depthMm: z.number().min(0).max(300).nullable().optional(),
  }),
  reply: plantingDetail,
});

/** Parts a planting in two. */
export const splitPlanting = endpoint({
  name: 'splitPlanting',
  method: 'post',
  path: '/rooms/:roomId/plantings/:plantingId/split',
  access: 'grower',
  summary: 'Part a planting: so many plants become one of their own, here or on another shelf',
  params: plantingParams,
  body: z.strictObject({
    count: plantCount,
    shelfId: id.nullable().optional(),
    container: z.string().trim().max(120).optional(),
    note: z.string().trim().max(1000).default(''),
    at: instant.optional(),
  }),
  /** The new planting. */
  reply: plantingDetail,
  status: 201,
});

/** Puts two plantings of a crop together. */
export const mergePlanting = endpoint({
  name: 'mergePlanting',
  method: 'post',
  path: '/rooms/:roomId/plantings/:plantingId/merge',
  access: 'grower',
  summary: 'Take the plants of another planting of the same crop into this one; the other ends',
  params: plantingParams,
  body: z.strictObject({
    otherId: id,
    note: z.string().trim().max(1000).default(''),
    at: instant.optional(),
  }),
  reply: plantingDetail,
});
