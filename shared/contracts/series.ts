import * as z from 'zod';
import { quantities } from '../climate/quantity';
import { interval, plantingSummary } from './board';
import { shelfEvent } from './care';
import { day, endpoint, id, instant, roomParams } from './endpoint';
import { shelf, wantedLight, wantedRange } from './rooms';

const shelfParams = roomParams.extend({ shelfId: id });

/** A half-open span of time, at most about ten years. */
export const spanQuery = z
  .object({ from: instant, to: instant })
  .refine((span) => Date.parse(span.from) < Date.parse(span.to), {
    error: 'from must precede to',
    path: ['from'],
  })
  .refine((span) => Date.parse(span.to) - Date.parse(span.from) <= 10 * 366 * 86_400_000, {
    error: 'at most ten years at a time',
    path: ['to'],
  });

/**
 * One drawn point: milliseconds since the epoch (UTC), mean, lowest and highest value of the span it stands for. A
 * single reading has all three the same; a null value is a gap.
 */
export const chartPoint = z.tuple([
  z.number(),
  z.number().nullable(),
  z.number().nullable(),
  z.number().nullable(),
]);
/** One drawn point: instant, mean, lowest, highest. */
export type ChartPoint = z.infer<typeof chartPoint>;

/** One line of a chart. */
export const chartLine = z.object({
  /** Null for a computed quantity, which belongs to the shelf. */
  sensorId: id.nullable(),
  name: z.string(),
  /** What a point stands for. */
  resolution: z.enum(['reading', 'hour', 'day']),
  points: z.array(chartPoint),
});
/** One line of a chart. */
export type ChartLine = z.infer<typeof chartLine>;

/** One quantity of one shelf over a span, at most about 2,000 points a line. */
export const series = z.object({
  quantity: z.enum(quantities),
  lines: z.array(chartLine),
  /** The wanted range as it stepped with the planned lamps. */
  wanted: z.array(
    z.object({ from: instant, to: instant, low: z.number().nullable(), high: z.number().nullable() }),
  ),
});
/** One quantity of one shelf over a span. */
export type Series = z.infer<typeof series>;

/** A chart's line, thinned so that minima and maxima stay. */
export const getSeries = endpoint({
  name: 'getSeries',
  method: 'get',
  path: '/rooms/:roomId/shelves/:shelfId/series/:quantity',
  access: 'viewer',
  summary: 'One quantity of a shelf over a span, thinned with minima and maxima kept',
  params: shelfParams.extend({ quantity: z.enum(quantities) }),
  query: spanQuery,
  reply: series,
});

/** Low, mean and high of one quantity over a span, and how long it was right. */
export const quantityStatistics = z.object({
  quantity: z.enum(quantities),
  min: z.number().nullable(),
  mean: z.number().nullable(),
  max: z.number().nullable(),
  /** Fraction of the covered time inside the wanted range, 0–1; null without a range or without readings. */
  inRange: z.number().nullable(),
  /** Fraction of the span that readings cover, 0–1. */
  coverage: z.number(),
});
/** Low, mean and high of one quantity over a span. */
export type QuantityStatistics = z.infer<typeof quantityStatistics>;

/** The light of one day. */
export const lightOfDay = z.object({
  day,
  lightHours: z.number(),
  plannedHours: z.number(),
  dliMolM2D: z.number().nullable(),
  /** Fraction of the day that readings cover, 0–1. */
  coverage: z.number(),
});
/** The light of one day. */
export type LightOfDay = z.infer<typeof lightOfDay>;

/** Everything beside the charts for one span of a shelf. */
export const shelfReport = z.object({
  statistics: z.array(quantityStatistics),
  light: z.array(lightOfDay),
  /** Planned lamp hours in the span. */
  plannedLamps: z.array(interval),
  /** Light seen by the sensor in the span; empty without a light sensor or for spans over about a month. */
  measuredLamps: z.array(interval),
  events: z.array(shelfEvent),
});
/** Everything beside the charts for one span of a shelf. */
export type ShelfReport = z.infer<typeof shelfReport>;

/** Table, light and marks of a span. */
export const getShelfReport = endpoint({
  name: 'getShelfReport',
  method: 'get',
  path: '/rooms/:roomId/shelves/:shelfId/report',
  access: 'viewer',
  summary: 'Statistics, light per day, lamp hours and events of a shelf over a span',
  params: shelfParams,
  query: spanQuery,
  reply: shelfReport,
});

/** Degree days of a span. */
export const degreeDays = z.object({
  quantity: z.enum(['airTemperature', 'rootZoneTemperature']),
  baseC: z.number(),
  upperC: z.number().nullable(),
  degreeDaysCD: z.number(),
  coverage: z.number(),
  perDay: z.array(z.object({ day, degreeDaysCD: z.number(), coverage: z.number() })),
});
/** Degree days of a span. */
export type DegreeDays = z.infer<typeof degreeDays>;

/** Degree days integrated from the readings. */
export const getDegreeDays = endpoint({
  name: 'getDegreeDays',
  method: 'get',
  path: '/rooms/:roomId/shelves/:shelfId/degree-days',
  access: 'viewer',
  summary: 'Degree days above a base, integrated from the readings; gaps are not filled',
  params: shelfParams,
  query: spanQuery.and(
    z.object({
      quantity: z.enum(['airTemperature', 'rootZoneTemperature']).default('airTemperature'),
      baseC: z.coerce.number().min(-10).max(40).default(10),
      upperC: z.coerce.number().min(0).max(60).optional(),
    }),
  ),
  reply: degreeDays,
});

/** A shelf as its own page shows it. */
export const shelfDetail = z.object({
  shelf,
  rackName: z.string(),
  tier: z.number().int(),
  tiers: z.number().int(),
  plantings: z.array(plantingSummary),
  wantedRanges: z.array(wantedRange),
  /** Null where nothing here wants any. */
  wantedLight: wantedLight.nullable(),
  /** Quantities that have a sensor here now or had one. */
  quantities: z.array(z.enum(quantities)),
  /** First reading ever taken here. */
  firstAt: instant.nullable(),
});
/** A shelf as its own page shows it. */
export type ShelfDetail = z.infer<typeof shelfDetail>;

/** A shelf with what it carries and wants. */
export const getShelf = endpoint({
  name: 'getShelf',
  method: 'get',
  path: '/rooms/:roomId/shelves/:shelfId',
  access: 'viewer',
  summary: 'A shelf with its lamps, plantings and wanted ranges',
  params: shelfParams,
  reply: shelfDetail,
});
