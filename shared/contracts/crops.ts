import * as z from 'zod';
import { cropGroups, type ClimateStage, type DayLengthResponse } from '../growing/crops/crop';
import { plantHabits } from '../growing/planting-stage';
import { endpoint, id, line, roomParams } from './endpoint';

/**
 * A crop's name for programs: that of the library, such as `onion-long-day`, or the identifier of a crop that the room
 * made its own.
 */
export const cropId = z.string().regex(/^[a-z0-9][a-z0-9-]{0,79}$/, {
  error: 'must be a crop of the library or of this room',
});

/** A figure and who says so. */
const figure = <T extends z.ZodType>(value: T) => z.strictObject({ value, source: line(400) });
const ordered = (range: { readonly low: number | null; readonly high: number | null }): boolean =>
  range.low === null || range.high === null || range.low <= range.high;
const notOrdered = { error: 'low must not be above high', path: ['high'] };
const span = (least: number, most: number) =>
  z
    .strictObject({ low: z.number().min(least).max(most), high: z.number().min(least).max(most) })
    .refine(ordered, notOrdered);
const range = (least: number, most: number) =>
  z
    .strictObject({
      low: z.number().min(least).max(most).nullable(),
      high: z.number().min(least).max(most).nullable(),
    })
    .refine(ordered, notOrdered);
const temperatureC = z.number().min(-20).max(60);
const temperatureRange = figure(range(-20, 60)).nullable();

const stageClimate = z.strictObject({
  airDayC: temperatureRange,
  airNightC: temperatureRange,
  rootZoneC: temperatureRange,
  relativeHumidityPct: figure(range(0, 100)).nullable(),
  vpdKPa: figure(range(0, 10)).nullable(),
  dliMolM2D: figure(range(0, 100)).nullable(),
  illuminanceLx: figure(range(0, 200_000)).nullable(),
  photoperiodH: figure(span(0, 24)).nullable(),
});

const climateStages = [
  'germinating',
  'seedling',
  'growingOn',
  'fruiting',
  'resting',
  'hardeningOff',
] as const satisfies readonly ClimateStage[];

const seedFigures = z.strictObject({
  emergence: figure(
    z.array(z.strictObject({ temperatureC, days: z.number().positive().max(400).nullable() })).max(20),
  ).nullable(),
  normalSeedlings: figure(
    z.array(z.strictObject({ temperatureC, percent: z.number().min(0).max(100) })).max(20),
  ).nullable(),
  temperatures: z
    .array(
      figure(
        z.strictObject({
          minC: temperatureC.nullable(),
          optimumC: span(-20, 60),
          bestC: temperatureC.nullable(),
          maxC: temperatureC.nullable(),
        }),
      ),
    )
    .max(5),
  thermalTimes: z
    .array(
      figure(
        z.strictObject({
          baseC: temperatureC,
          sumCD: z.number().positive().max(5000),
          upperC: temperatureC.nullable(),
        }),
      ),
    )
    .max(5),
  depthMm: figure(span(0, 300)).nullable(),
  light: figure(z.enum(['needed', 'helps', 'indifferent', 'darkness'])).nullable(),
  lifeYears: z.array(figure(span(0, 50))).max(5),
  minimumGerminationPct: figure(z.number().min(0).max(100)).nullable(),
});

const hours = z.number().min(0).max(24);
const dayLengthResponse: z.ZodType<DayLengthResponse, DayLengthResponse> = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('bulbs'),
    fromHours: hours,
    onion: z.enum(['short', 'intermediate', 'long']).nullable(),
  }),
  z.strictObject({ kind: z.literal('bolts'), fromHours: hours }),
  z.strictObject({ kind: z.literal('flowersUnder'), toHours: hours }),
  z.strictObject({ kind: z.literal('indifferent') }),
]);

const weeks = (least: number, most: number) => figure(span(least, most));

/** All that can be changed of a crop that the room made its own; every figure with its source. */
export const cropFigures = z.strictObject({
  name: line(80),
  botanicalName: z.string().trim().max(120),
  group: z.enum(cropGroups),
  habit: z.enum(plantHabits),
  eaten: line(80).nullable(),
  toxicToPets: figure(z.enum(['toxic', 'notKnownToBeToxic'])).nullable(),
  seed: seedFigures.nullable(),
  sowing: z.strictObject({
    weeksToTransplant: z.array(weeks(0, 104)).max(8),
    plantingOutWeeks: weeks(-52, 52).nullable(),
    sowBeforeFrostWeeks: z.array(weeks(-52, 104)).max(8),
  }),
  climate: z.partialRecord(z.enum(climateStages), stageClimate),
  degreeDays: figure(
    z.strictObject({ baseC: z.number().min(-10).max(40), upperC: z.number().min(0).max(60).nullable() }),
  ).nullable(),
  dayLength: figure(dayLengthResponse).nullable(),
  usualPot: figure(line(120)).nullable(),
});
/** All that can be changed of a room's own crop. */
export type CropFigures = z.infer<typeof cropFigures>;

/** What is asked of figures that are saved. Those that are kept already are read as they are. */
const savedFigures = cropFigures.superRefine(({ seed }, context) => {
  const refuse = (message: string, ...path: (string | number)[]): void =>
    context.addIssue({ code: 'custom', message, path: ['seed', ...path] });
  for (const [index, { value }] of (seed?.temperatures ?? []).entries()) {
    const { minC, optimumC, bestC, maxC } = value;
    const at = ['temperatures', index, 'value'] as const;
    if (minC !== null && minC > optimumC.low) refuse('must not be above the optimum', ...at, 'minC');
    if (maxC !== null && maxC < optimumC.high) refuse('must not be below the optimum', ...at, 'maxC');
    if (bestC !== null && (bestC < (minC ?? optimumC.low) || bestC > (maxC ?? optimumC.high)))
      refuse('must lie between the least and the most', ...at, 'bestC');
  }
  for (const table of ['emergence', 'normalSeedlings'] as const) {
    const rows = seed?.[table]?.value;
    if (rows?.length === 0) refuse('must have a row', table, 'value');
    if (new Set(rows?.map((row) => row.temperatureC)).size < (rows?.length ?? 0))
      refuse('must have each temperature once', table, 'value');
  }
});

/** A crop with all its figures and where it is from. */
export const crop = cropFigures.extend({
  id: cropId,
  /** Whether the room made it its own; those of the library can be copied and not changed. */
  isOwn: z.boolean(),
  /** The library's crop that it was copied from; null for one of the library. */
  copiedFrom: cropId.nullable(),
});
/** A crop with all its figures and where it is from. */
export type Crop = z.infer<typeof crop>;

/** A crop as a list needs it. */
export const cropSummary = crop
  .pick({
    id: true,
    name: true,
    botanicalName: true,
    group: true,
    habit: true,
    eaten: true,
    isOwn: true,
    copiedFrom: true,
  })
  .extend({
    /** Whether it is raised from seed; others begin as cuttings, sets or bought plants. */
    hasSeed: z.boolean(),
    /** Whether it has a sowing window against the last frost. */
    hasSowingTimes: z.boolean(),
    varieties: z.array(z.string()),
  });
/** A crop as a list needs it. */
export type CropSummary = z.infer<typeof cropSummary>;

/** The library and the room's own crops. */
export const listCrops = endpoint({
  name: 'listCrops',
  method: 'get',
  path: '/rooms/:roomId/crops',
  access: 'viewer',
  summary: 'Crops of the library and of the room, by name, with the varieties grown here',
  params: roomParams,
  reply: z.array(cropSummary),
});

const cropParams = roomParams.extend({ cropId });

/** One crop with its figures. */
export const getCrop = endpoint({
  name: 'getCrop',
  method: 'get',
  path: '/rooms/:roomId/crops/:cropId',
  access: 'viewer',
  summary: 'A crop with every figure and its source',
  params: cropParams,
  reply: crop,
});

/** Makes a crop the room's own. */
export const copyCrop = endpoint({
  name: 'copyCrop',
  method: 'post',
  path: '/rooms/:roomId/crops',
  access: 'grower',
  summary: 'Copy a crop under another name, to change its figures for this room',
  params: roomParams,
  body: z.strictObject({ copyOf: cropId, name: line(80) }),
  reply: crop,
  status: 201,
});

/** Changes a crop of the room. */
export const changeCrop = endpoint({
  name: 'changeCrop',
  method: 'put',
  path: '/rooms/:roomId/crops/:cropId',
  access: 'grower',
  summary: 'Change the figures of a room’s own crop; one of the library must be copied first',
  params: cropParams,
  body: savedFigures,
  reply: crop,
});

/** Takes a crop of the room off its list. */
export const retireCrop = endpoint({
  name: 'retireCrop',
  method: 'delete',
  path: '/rooms/:roomId/crops/:cropId',
  access: 'grower',
  summary: 'Take a room’s own crop off the list; what was grown of it keeps its figures',
  params: cropParams,
});

/** A variety that the room grows or grew. */
export const variety = z.object({ id, cropId, cropName: z.string(), name: z.string(), note: z.string() });
/** A variety that the room grows or grew. */
export type Variety = z.infer<typeof variety>;

/** The room's varieties. */
export const listVarieties = endpoint({
  name: 'listVarieties',
  method: 'get',
  path: '/rooms/:roomId/varieties',
  access: 'viewer',
  summary: 'Varieties of the room, by crop and name',
  params: roomParams,
  reply: z.array(variety),
});

/** Adds a variety; lots and plantings that name a new one add it too. */
export const addVariety = endpoint({
  name: 'addVariety',
  method: 'post',
  path: '/rooms/:roomId/varieties',
  access: 'grower',
  summary: 'Add a variety of a crop',
  params: roomParams,
  body: z.strictObject({ cropId, name: line(80), note: z.string().trim().max(1000).default('') }),
  reply: variety,
  status: 201,
});

const varietyParams = roomParams.extend({ varietyId: id });

/** Renames a variety or its note. */
export const changeVariety = endpoint({
  name: 'changeVariety',
  method: 'patch',
  path: '/rooms/:roomId/varieties/:varietyId',
  access: 'grower',
  summary: 'Rename a variety, on its lots and plantings too, or change its note',
  params: varietyParams,
  body: z.strictObject({ name: line(80).optional(), note: z.string().trim().max(1000).optional() }),
  reply: variety,
});

/** Removes a variety that nothing names. */
export const removeVariety = endpoint({
  name: 'removeVariety',
  method: 'delete',
  path: '/rooms/:roomId/varieties/:varietyId',
  access: 'grower',
  summary: 'Remove a variety that no lot and no planting names',
  params: varietyParams,
});
