import * as z from 'zod';
import { day, endpoint, id, instant, roomParams } from './endpoint';

/** How far a planting has grown against what it needs. */
export const plantingProgress = z.object({
  /** What it was counted up to. */
  at: instant,
  degreeDays: z
    .object({
      baseC: z.number(),
      upperC: z.number().nullable(),
      source: z.string(),
      /** Since it was started [°C·d]. */
      sumCD: z.number(),
      /** Mean of the last three days [°C·d/d]; null when not measured. */
      perDayCD: z.number().nullable(),
      coverage: z.number(),
    })
    .nullable(),
  light: z
    .object({
      wanted: z.object({ low: z.number().nullable(), high: z.number().nullable() }),
      source: z.string(),
      /** Finished days, oldest first, at most thirty. */
      days: z.array(
        z.object({
          day,
          dliMolM2D: z.number().nullable(),
          lightHours: z.number().nullable(),
          coverage: z.number(),
        }),
      ),
      /** Light since it was started [mol m⁻²]. */
      sumMolM2: z.number().nullable(),
      /** Three days in a row short of light, and why that may be. */
      shortage: z
        .object({
          meanMolM2D: z.number(),
          missingMolM2D: z.number(),
          causes: z.array(z.string()),
        })
        .nullable(),
    })
    .nullable(),
  /** When it should be big enough to plant out, and the degree days to it at the present warmth. */
  transplant: z
    .object({
      earliest: day,
      latest: day,
      source: z.string(),
      degreeDaysToEarliest: z.number().nullable(),
      degreeDaysToLatest: z.number().nullable(),
    })
    .nullable(),
});
/** How far a planting has grown against what it needs. */
export type PlantingProgress = z.infer<typeof plantingProgress>;

/** Light and degree days of a planting. */
export const getPlantingProgress = endpoint({
  name: 'getPlantingProgress',
  method: 'get',
  path: '/rooms/:roomId/plantings/:plantingId/progress',
  access: 'viewer',
  summary: 'Light and degree days of a planting so far against what its crop needs',
  params: roomParams.extend({ plantingId: id }),
  reply: plantingProgress,
});
