import * as z from 'zod';
import { endpoint, id, instant, roomParams } from './endpoint';

const range = z.object({ low: z.number().nullable(), high: z.number().nullable() });
/** When a range holds. */
const side = z.enum(['lampsOn', 'lampsOff', 'always']);
/** What wanted ranges are for. */
export const wantedQuantities = [
  'airTemperature',
  'rootZoneTemperature',
  'relativeHumidity',
  'vapourPressureDeficit',
  'illuminance',
  'dailyLightIntegral',
] as const;
const quantity = z.enum(wantedQuantities);

/** What a shelf should be, given what stands on it. */
export const shelfAdvice = z.object({
  shelfId: id,
  /** Since when the advice is this one. */
  since: instant,
  lamps: z.object({
    state: z.enum(['on', 'off']),
    /** Hours a day; null when off, or when no crop here has a figure. */
    hours: z.number().nullable(),
    reason: z.string(),
    /** What to change now; null when nothing, or when the present plan is not known. */
    change: z.enum(['switchOn', 'switchOff', 'lengthen', 'shorten']).nullable(),
  }),
  heatMat: z.object({
    state: z.enum(['on', 'off', 'conflict']),
    reason: z.string(),
    change: z.enum(['switchOn', 'switchOff']).nullable(),
  }),
  wanted: z.array(
    z.object({
      quantity,
      when: side,
      range,
      /** Whose ends these are. */
      reason: z.string(),
      /** Who published the two ends. */
      source: z.string(),
      /** Whether alerts go by it; false where the keeper set a range, or where there is none to set. */
      isSet: z.boolean(),
    }),
  ),
  conflicts: z.array(
    z.object({
      kind: z.enum(['range', 'photoperiod', 'heatMat', 'noHeatMat', 'noLamp']),
      quantity: quantity.nullable(),
      when: side,
      plantingIds: z.array(id),
      /** In the unit of the quantity (photoperiod: h). */
      gap: z.number().nullable(),
      sentence: z.string(),
    }),
  ),
  moves: z.array(
    z.object({ shelfId: id, shelf: z.string(), plantingIds: z.array(id), sentence: z.string() }),
  ),
  dayLength: z.array(
    z.object({
      plantingId: id,
      kind: z.enum(['bulbs', 'bolts', 'staysWithoutFlowers']),
      sentence: z.string(),
    }),
  ),
  notes: z.array(z.string()),
});
/** What a shelf should be, given what stands on it. */
export type ShelfAdviceView = z.infer<typeof shelfAdvice>;

/** Advice on a shelf. */
export const getShelfAdvice = endpoint({
  name: 'getShelfAdvice',
  method: 'get',
  path: '/rooms/:roomId/shelves/:shelfId/advice',
  access: 'viewer',
  summary: 'What the shelf should be for what stands on it: lamps, heat mat, ranges, conflicts, moves',
  params: roomParams.extend({ shelfId: id }),
  reply: shelfAdvice,
});
