import * as z from 'zod';
import { cropId } from './crops';
import { day, endpoint, id, instant, line, roomParams } from './endpoint';
import { photo } from './photos';

/** What a lot is counted in. */
export const seedUnits = ['seeds', 'grams'] as const;
/** What a lot is counted in. */
export type SeedUnit = (typeof seedUnits)[number];

const amount = z.number().min(0).max(1_000_000);
const packedYear = z.number().int().min(1950).max(2200);
/** A share with the range that holds the true one in 95 of 100 such tests [%]. */
const proportion = z.object({ percent: z.number(), lowPct: z.number(), highPct: z.number() });
const years = z.object({ low: z.number(), high: z.number() });

/** Age of a lot against the life of its crop's seed. */
export const seedAge = z.object({
  /** Years since packing; null when the year is not known. */
  years: z.number().nullable(),
  /** Years that such seed keeps by the sources; null when none has a figure. */
  lifeYears: years.nullable(),
  sources: z.array(z.string()),
  /** `doubtful` lies between sources that disagree. */
  standing: z.enum(['withinLife', 'doubtful', 'pastLife']).nullable(),
  /** Its last good season has begun or passed and there is seed left: sow it before younger lots. */
  useFirst: z.boolean(),
});

/** What germination may be expected of a lot. */
export const seedExpectation = proportion.extend({
  /** The lot's newest own test, what came up of its sowings here, or the standard for seed on sale. */
  basis: z.enum(['test', 'sowings', 'standard']),
  /** In words: who found it, and how many seeds it rests on. */
  source: z.string(),
});
/** What germination may be expected of a lot. */
export type SeedExpectation = z.infer<typeof seedExpectation>;

/** A packet or bag of seed. */
export const seedLot = z.object({
  id,
  cropId,
  cropName: z.string(),
  variety: z.string().nullable(),
  /** Who it is from. */
  source: z.string(),
  packedYear: packedYear.nullable(),
  unit: z.enum(seedUnits),
  /** What was in it. */
  amount: z.number(),
  /** What is left of it by what was sown, tested and recounted; in its unit. */
  left: z.number(),
  /** Seeds left, where it is counted in seeds or seeds a gram are known. */
  seedsLeft: z.number().nullable(),
  seedsPerGram: z.number().nullable(),
  price: z.number().nullable(),
  /** ISO 4217. */
  currency: z.string().nullable(),
  lotNumber: z.string(),
  note: z.string(),
  age: seedAge,
  expectation: seedExpectation.nullable(),
  /** Put aside: used up, given away or thrown out. */
  finishedOn: day.nullable(),
  /** Its newest photo. */
  photo: photo.nullable(),
});
/** A packet or bag of seed. */
export type SeedLot = z.infer<typeof seedLot>;

/** The room's seed. */
export const listSeedLots = endpoint({
  name: 'listSeedLots',
  method: 'get',
  path: '/rooms/:roomId/seed-lots',
  access: 'viewer',
  summary: 'Seed lots, those to use first at the top',
  params: roomParams,
  query: z.object({ finished: z.enum(['without', 'with']).default('without'), cropId: cropId.optional() }),
  reply: z.array(seedLot),
});

const lotFields = {
  cropId,
  variety: line(80).nullable().default(null),
  source: z.string().trim().max(120).default(''),
  packedYear: packedYear.nullable().default(null),
  unit: z.enum(seedUnits),
  amount: amount.positive(),
  seedsPerGram: z.number().positive().max(1_000_000).nullable().default(null),
  price: z.number().min(0).max(1_000_000).nullable().default(null),
  currency: z
    .string()
    .regex(/^[A-Z]{3}$/, { error: 'must be a currency such as EUR' })
    .nullable()
    .default(null),
  lotNumber: z.string().trim().max(60).default(''),
  note: z.string().trim().max(2000).default(''),
};

/** Adds a lot. */
export const addSeedLot = endpoint({
  name: 'addSeedLot',
  method: 'post',
  path: '/rooms/:roomId/seed-lots',
  access: 'grower',
  summary: 'Add a packet of seed',
  params: roomParams,
  body: z.strictObject(lotFields),
  reply: seedLot,
  status: 201,
});

const lotParams = roomParams.extend({ lotId: id });

/** A look at a germination test. */
export const testCount = z.object({
  /** Days since it was begun. */
  day: z.number().int(),
  /** Germinated by then, in all. */
  up: z.number().int(),
});

/** Seeds of a lot tried on damp paper. */
export const germinationTest = z.object({
  id,
  startedOn: day,
  seeds: z.number().int(),
  note: z.string(),
  /** In order of days. */
  counts: z.array(testCount),
  /** Share with its 95 % interval; null before the first count. */
  result: proportion.nullable(),
  /** Mean germination time and day of half [d]; null when the counts do not say. */
  meanTimeDays: z.number().nullable(),
  t50Days: z.number().nullable(),
});
/** Seeds of a lot tried on damp paper. */
export type GerminationTest = z.infer<typeof germinationTest>;

/** Something that changed what is left of a lot. */
export const seedUse = z.object({
  id,
  at: instant,
  reason: z.enum(['sown', 'tested', 'recounted']),
  /** Taken, in the lot's unit; negative where a recount found more. */
  amount: z.number(),
  plantingId: id.nullable(),
  note: z.string(),
  personName: z.string().nullable(),
});

/** A lot with its story. */
export const seedLotDetail = seedLot.extend({
  tests: z.array(germinationTest),
  uses: z.array(seedUse),
  photos: z.array(photo),
});
/** A lot with its story. */
export type SeedLotDetail = z.infer<typeof seedLotDetail>;

/** One lot. */
export const getSeedLot = endpoint({
  name: 'getSeedLot',
  method: 'get',
  path: '/rooms/:roomId/seed-lots/:lotId',
  access: 'viewer',
  summary: 'A lot with its tests, what was taken from it, and photos',
  params: lotParams,
  reply: seedLotDetail,
});

/** Changes what is written of a lot. */
export const changeSeedLot = endpoint({
  name: 'changeSeedLot',
  method: 'patch',
  path: '/rooms/:roomId/seed-lots/:lotId',
  access: 'grower',
  summary: 'Change what is written of a lot, or put it aside',
  params: lotParams,
  body: z.strictObject({
    variety: line(80).nullable().optional(),
    source: z.string().trim().max(120).optional(),
    packedYear: packedYear.nullable().optional(),
    seedsPerGram: z.number().positive().max(1_000_000).nullable().optional(),
    price: z.number().min(0).max(1_000_000).nullable().optional(),
    currency: z
      .string()
      .regex(/^[A-Z]{3}$/, { error: 'must be a currency such as EUR' })
      .nullable()
      .optional(),
    lotNumber: z.string().trim().max(60).optional(),
    note: z.string().trim().max(2000).optional(),
    finishedOn: day.nullable().optional(),
  }),
  reply: seedLotDetail,
});

/** Says what is left, after counting or weighing. */
export const recountSeedLot = endpoint({
  name: 'recountSeedLot',
  method: 'put',
  path: '/rooms/:roomId/seed-lots/:lotId/left',
  access: 'grower',
  summary: 'Say how much is left of a lot',
  params: lotParams,
  body: z.strictObject({ left: amount, note: z.string().trim().max(500).default('') }),
  reply: seedLotDetail,
});

/** Removes a lot that was never used. */
export const removeSeedLot = endpoint({
  name: 'removeSeedLot',
  method: 'delete',
  path: '/rooms/:roomId/seed-lots/:lotId',
  access: 'grower',
  summary: 'Remove a lot added by mistake; one that was sown from is put aside instead',
  params: lotParams,
});

/** Begins a test; its seeds are taken from the lot. */
export const addGerminationTest = endpoint({
  name: 'addGerminationTest',
  method: 'post',
  path: '/rooms/:roomId/seed-lots/:lotId/tests',
  access: 'grower',
  summary: 'Begin a germination test; its seeds are taken from the lot',
  params: lotParams,
  body: z.strictObject({
    startedOn: day,
    seeds: z.number().int().min(1).max(10_000),
    note: z.string().trim().max(500).default(''),
  }),
  reply: seedLotDetail,
  status: 201,
});

const testParams = lotParams.extend({ testId: id });

/** Notes how many had germinated by a day. */
export const countGerminationTest = endpoint({
  name: 'countGerminationTest',
  method: 'put',
  path: '/rooms/:roomId/seed-lots/:lotId/tests/:testId/counts',
  access: 'helper',
  summary: 'Note how many had germinated by a day; a count of the same day is replaced',
  params: testParams,
  body: z.strictObject({ on: day, up: z.number().int().min(0).max(10_000) }),
  reply: seedLotDetail,
});

/** Removes a test; its seeds go back. */
export const removeGerminationTest = endpoint({
  name: 'removeGerminationTest',
  method: 'delete',
  path: '/rooms/:roomId/seed-lots/:lotId/tests/:testId',
  access: 'grower',
  summary: 'Remove a test begun by mistake; its seeds go back to the lot',
  params: testParams,
  reply: seedLotDetail,
});

/** How many seeds give a number of plants. */
export const seedsNeededReply = z.object({
  /** Null when not even 100 000 seeds would do. */
  seeds: z.number().int().nullable(),
  /** Of that many seeds: the mean, and fewest and most in 95 of 100 sowings; null as above. */
  expected: z.object({ expected: z.number(), low: z.number(), high: z.number() }).nullable(),
  germination: seedExpectation,
  /** In the lot's unit; null in grams without seeds a gram. */
  takes: z.number().nullable(),
  isEnoughLeft: z.boolean().nullable(),
});
/** How many seeds give a number of plants. */
export type SeedsNeeded = z.infer<typeof seedsNeededReply>;

/** Seeds to sow for a number of plants. */
export const getSeedsNeeded = endpoint({
  name: 'getSeedsNeeded',
  method: 'get',
  path: '/rooms/:roomId/seed-lots/:lotId/seeds-needed',
  access: 'viewer',
  summary: 'Seeds of a lot to sow for a number of plants, by its own test or the standard',
  params: lotParams,
  query: z.object({
    plants: z.coerce.number().int().min(1).max(10_000),
    /** Share of sowings in which it is enough. */
    certainty: z.coerce.number().min(0.5).max(0.999).default(0.9),
  }),
  reply: seedsNeededReply,
});
