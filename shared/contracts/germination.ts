import * as z from 'zod';
import { endpoint, id, instant, roomParams } from './endpoint';

/** When one source expects the first seedlings. */
const sourceForecast = z.object({
  source: z.string(),
  /** Null when it never comes at this temperature. */
  at: instant.nullable(),
});

/** When to look for the first seedlings, from the shelf's own warmth. */
export const emergenceForecast = z.object({
  earliest: sourceForecast.nullable(),
  latest: sourceForecast.nullable(),
  /** Every published source. */
  published: z.array(sourceForecast),
  /** Whether the room's own past emergences set the range. */
  basis: z.enum(['published', 'room']),
  /** What temperatures were taken; null when none was measured. */
  measuredBy: z.enum(['rootZoneTemperature', 'airTemperature']).nullable(),
  /** Temperature gone on with [°C]: the mean of the last 72 h. */
  outlookC: z.number().nullable(),
  /** Share of the time since sowing that was measured, 0 to 1. */
  coverage: z.number(),
  isLate: z.boolean(),
  /** Likely causes while it is late. */
  causes: z.array(z.string()),
});
/** When to look for the first seedlings. */
export type EmergenceForecastView = z.infer<typeof emergenceForecast>;

const comparison = z.enum(['lower', 'asExpected', 'higher']).nullable();

/** How a sowing comes up. */
export const germination = z.object({
  sown: z.number().int(),
  up: z.number().int(),
  /** Looks in order: days since sowing, how many were up by then. */
  curve: z.array(z.object({ at: instant, day: z.number(), up: z.number().int(), percent: z.number() })),
  /** Of all seeds sown [%]. */
  percent: z.number(),
  firstDay: z.number().nullable(),
  lastDay: z.number().nullable(),
  /** From first to last [d]. */
  spreadDays: z.number().nullable(),
  /** Day by which half of those that came up were up [d]. */
  t50Days: z.number().nullable(),
  meanTimeDays: z.number().nullable(),
  /** Standard error of the mean time [d]. */
  standardErrorDays: z.number().nullable(),
  /** Whether more may come. */
  isOpen: z.boolean(),
  /** Share with its 95 % interval, and how it compares with the lot's test and the standard; null before anything is up. */
  verdict: z
    .object({
      lowPct: z.number(),
      highPct: z.number(),
      lotPct: z.number().nullable(),
      againstLot: comparison,
      standardPct: z.number().nullable(),
      standardSource: z.string().nullable(),
      againstStandard: comparison,
      age: z.enum(['withinLife', 'doubtful', 'pastLife']).nullable(),
    })
    .nullable(),
  /** While nothing is up and the crop has figures. */
  forecast: emergenceForecast.nullable(),
});
/** How a sowing comes up. */
export type GerminationView = z.infer<typeof germination>;

/** Germination of a planting. */
export const getGermination = endpoint({
  name: 'getGermination',
  method: 'get',
  path: '/rooms/:roomId/plantings/:plantingId/germination',
  access: 'viewer',
  summary: 'How a sowing comes up: curve, figures, forecast, and causes when it is late',
  params: roomParams.extend({ plantingId: id }),
  reply: germination,
});

/** A sowing that is still coming up, as the room's screen shows it. */
export const sowingNow = z.object({
  plantingId: id,
  sown: z.number().int(),
  up: z.number().int(),
  /** Whole days since sowing. */
  day: z.number().int(),
  /** When to expect the first; null once one is up or when nothing can be said. */
  expectedFrom: instant.nullable(),
  expectedTo: instant.nullable(),
  isLate: z.boolean(),
});
/** A sowing that is still coming up, as the room's screen shows it. */
export type SowingNow = z.infer<typeof sowingNow>;
