import * as z from 'zod';
import { lossReasons, plantingEventKinds, settableStages } from '../growing/planting-event';
import { plantingStages } from '../growing/planting-stage';
import { endpoint, id, instant, roomParams } from './endpoint';

/** Something that happened to a planting; what does not belong to its kind is null. */
export const plantingEvent = z.object({
  id,
  kind: z.enum(plantingEventKinds),
  at: instant,
  personName: z.string().nullable(),
  note: z.string(),
  /** Plants or seeds it is about: sown, up in all, pricked out, parted, planted out, lost, picked. */
  count: z.number().int().nullable(),
  grams: z.number().nullable(),
  /** Water given [ml]. */
  millilitres: z.number().nullable(),
  stage: z.enum(plantingStages).nullable(),
  container: z.string().nullable(),
  shelfId: id.nullable(),
  shelfLabel: z.string().nullable(),
  lossReason: z.enum(lossReasons).nullable(),
  /** The planting parted from, split off or taken in. */
  otherPlantingId: id.nullable(),
  /** For a count: no more will come. */
  isLast: z.boolean(),
});
/** Something that happened to a planting. */
export type PlantingEventView = z.infer<typeof plantingEvent>;

const noted = {
  note: z.string().trim().max(1000).default(''),
  /** Now, unless given. */
  at: instant.optional(),
};
const count = z.number().int().min(1).max(100_000);
const container = z.string().trim().min(1).max(120);

/** What anybody who helps may note. */
export const plantingObservation = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('counted'),
    ...noted,
    /** How many have come up in all, those lost since included. */
    up: z.number().int().min(0).max(100_000),
    /** No more will come: from now on these are seedlings. */
    isLast: z.boolean().default(false),
  }),
  z.strictObject({
    kind: z.literal('harvested'),
    ...noted,
    grams: z.number().positive().max(1_000_000).nullable().default(null),
    count: count.nullable().default(null),
  }),
  z.strictObject({
    kind: z.literal('watered'),
    ...noted,
    millilitres: z.number().positive().max(1_000_000).nullable().default(null),
  }),
  z.strictObject({ kind: z.literal('noted'), at: noted.at, note: z.string().trim().min(1).max(1000) }),
]);
/** What anybody who helps may note. */
export type PlantingObservation = z.output<typeof plantingObservation>;

/** What a grower does with a planting. */
export const plantingStep = z.discriminatedUnion('kind', [
  /** Fewer than all: the rest is thinned out. */
  z.strictObject({ kind: z.literal('prickedOut'), ...noted, count, container }),
  z.strictObject({ kind: z.literal('pottedOn'), ...noted, container }),
  z.strictObject({ kind: z.literal('moved'), ...noted, shelfId: id.nullable() }),
  z.strictObject({ kind: z.literal('staged'), ...noted, stage: z.enum(settableStages) }),
  /** All, unless a count is given; the others stay. */
  z.strictObject({ kind: z.literal('plantedOut'), ...noted, count: count.nullable().default(null) }),
  z.strictObject({ kind: z.literal('lost'), ...noted, count, lossReason: z.enum(lossReasons) }),
  z.strictObject({ kind: z.literal('ended'), ...noted }),
]);
/** What a grower does with a planting. */
export type PlantingStep = z.output<typeof plantingStep>;

const plantingParams = roomParams.extend({ plantingId: id });

/** The planting after an event, with what was noted. */
export const plantingNow = z.object({
  event: plantingEvent,
  /** As in the list. */
  stage: z.enum(plantingStages),
  sown: z.number().int().nullable(),
  up: z.number().int().nullable(),
  count: z.number().int(),
  shelfId: id.nullable(),
});
/** The planting after an event. */
export type PlantingNow = z.infer<typeof plantingNow>;

/** Notes a count, a harvest or an observation. */
export const observePlanting = endpoint({
  name: 'observePlanting',
  method: 'post',
  path: '/rooms/:roomId/plantings/:plantingId/observations',
  access: 'helper',
  summary: 'Note how many are up, a harvest, a watering or an observation; takes an Idempotency-Key',
  params: plantingParams,
  body: plantingObservation,
  reply: plantingNow,
  status: 201,
});

/** Pricks out, pots on, moves, sets the stage, plants out, writes off or ends. */
export const stepPlanting = endpoint({
  name: 'stepPlanting',
  method: 'post',
  path: '/rooms/:roomId/plantings/:plantingId/steps',
  access: 'grower',
  summary: 'Prick out, pot on, move, set the stage, plant out, note losses or end; takes an Idempotency-Key',
  params: plantingParams,
  body: plantingStep,
  reply: plantingNow,
  status: 201,
});

/** Takes the newest event back. */
export const undoPlantingEvent = endpoint({
  name: 'undoPlantingEvent',
  method: 'delete',
  path: '/rooms/:roomId/plantings/:plantingId/events/:eventId',
  access: 'helper',
  summary: 'Undo what was noted last; a helper may undo their own observations',
  params: plantingParams.extend({ eventId: id }),
});
