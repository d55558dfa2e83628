import { airFromReadings, dewPointC } from '../climate/psychrometrics';
import type { ObservationColumns, Quality } from './alert-state';

const msPerHour = 3_600_000;

/** A series being built. */
interface Columns extends ObservationColumns {
  readonly times: number[];
  readonly values: number[];
  readonly qualities: Quality[];
}

/**
 * Joins series as a clock would see them: at every reading of any of them, the latest of each that is young enough.
 *
 * @remarks
 * Nothing looks ahead, so a value never changes through readings taken after it, and a reading that comes late
 * changes none before it. Look-back: to fold from an instant, hand in readings from `withinMs` before it.
 *
 * @param sources - The series to join, in order of time.
 * @param withinMs - Longest age at which a reading still speaks for now [ms].
 * @param combine - Makes the value from one value of each series, null where none is young enough, and the instant;
 * null for no value.
 * @returns The joined series, as doubtful as the most doubtful reading in each value. Failed readings are left out.
 */
export function joinLatest(
  sources: readonly ObservationColumns[],
  withinMs: number,
  combine: (values: readonly (number | null)[], at: number) => number | null,
): ObservationColumns {
  const joined = emptyColumns();
  const passed = sources.map(() => 0);
  const latest = sources.map(() => ({ at: -Infinity, value: NaN, isPass: true }));
  for (let at = nextTime(sources, passed); at < Infinity; at = nextTime(sources, passed)) {
    sources.forEach((source, s) => {
      const i = passed[s] ?? 0;
      if (source.times[i] !== at) return;
      passed[s] = i + 1;
      if (source.qualities[i] === 'fail') return;
      latest[s] = { at, value: source.values[i] ?? NaN, isPass: source.qualities[i] === 'pass' };
    });
    const isYoung = (reading: { readonly at: number }): boolean => at - reading.at <= withinMs;
    const value = combine(
      latest.map((reading) => (isYoung(reading) ? reading.value : null)),
      at,
    );
    if (value === null) continue;
    const isPass = latest.every((reading) => reading.isPass || !isYoung(reading));
    append(joined, at, value, isPass ? 'pass' : 'suspect');
  }
  return joined;
}

/**
 * As {@link joinLatest}, with a value only where every series has a reading that is young enough.
 *
 * @param sources - As there.
 * @param withinMs - As there.
 * @param combine - Makes the value from one value of each series and the instant; null for none.
 * @returns As there.
 */
export function joinAsOf(
  sources: readonly ObservationColumns[],
  withinMs: number,
  combine: (values: readonly number[], at: number) => number | null,
): ObservationColumns {
  return joinLatest(sources, withinMs, (values, at) => {
    const known = values.filter((value) => value !== null);
    return known.length < values.length ? null : combine(known, at);
  });
}

/**
 * Readings of sensors that measure the same thing as one series, such as two thermometers of a shelf.
 *
 * @param sources - In order of time; of two readings at one instant that of the source named first counts.
 * @returns All of them in order.
 */
export function mergedReadings(sources: readonly ObservationColumns[]): ObservationColumns {
  const [only] = sources;
  if (sources.length === 1 && only !== undefined) return only;
  const merged = emptyColumns();
  const passed = sources.map(() => 0);
  for (let at = nextTime(sources, passed); at < Infinity; at = nextTime(sources, passed)) {
    const isThere = (source: ObservationColumns, s: number): boolean => source.times[passed[s] ?? 0] === at;
    const first = sources.findIndex(isThere);
    const i = passed[first] ?? 0;
    append(merged, at, sources[first]?.values[i] ?? NaN, sources[first]?.qualities[i] ?? 'fail');
    sources.forEach((source, s) => {
      if (isThere(source, s)) passed[s] = (passed[s] ?? 0) + 1;
    });
  }
  return merged;
}

function nextTime(sources: readonly ObservationColumns[], passed: readonly number[]): number {
  return Math.min(...sources.map(({ times }, s) => times[passed[s] ?? 0] ?? Infinity));
}

/**
 * How far sensors of one quantity on one shelf are apart; for `sensorsDisagree`.
 *
 * @param sensors - Readings of each.
 * @param withinMs - Longest age of a reading [ms]; see {@link joinLatest}.
 * @returns The highest less the lowest, in their unit, wherever at least two sensors speak.
 */
export function disagreement(sensors: readonly ObservationColumns[], withinMs: number): ObservationColumns {
  return joinLatest(sensors, withinMs, (values) => {
    const known = values.filter((value) => value !== null);
    return known.length < 2 ? null : Math.max(...known) - Math.min(...known);
  });
}

/**
 * Warmth of the root zone above the air that nothing on the shelf asks for; for `matStuckOn`.
 *
 * @param rootZone - Root-zone temperature [°C].
 * @param air - Air temperature [°C].
 * @param withinMs - Longest age of a reading [ms]; see {@link joinAsOf}.
 * @param isWarmthWanted - Whether something waits to germinate at an instant.
 * @returns The difference [°C]; 0 while warmth is wanted, so that an open alert clears.
 */
export function unaskedWarmth(
  rootZone: ObservationColumns,
  air: ObservationColumns,
  withinMs: number,
  isWarmthWanted: (at: number) => boolean,
): ObservationColumns {
  return joinAsOf([rootZone, air], withinMs, ([root = NaN, around = NaN], at) =>
    isWarmthWanted(at) ? 0 : root - around,
  );
}

/** Surfaces of a shelf on which water may condense. */
export interface ShelfSurfaces {
  /** How much warmer than the air its leaves are [°C], negative in dry air. */
  readonly leafOffsetC: number;
  /** Root-zone temperature [°C]; empty where nothing measures it. */
  readonly rootZone: ObservationColumns;
}

/** What {@link dewPointSurplus} is on a shelf whose seed is still under its cover [°C]: well inside the limit. */
const SWEATING_AS_MEANT_C = -1;

/**
 * How far the dew point of the air lies above the temperature of the coldest surface that is known; for `condensation`.
 *
 * @remarks
 * Leaves are taken at air temperature plus the shelf's leaf offset, and pots and mix at that of the root zone, where it
 * is measured: those are what a grower's sensors know of. Walls and panes may be colder.
 *
 * @param air - Air temperature [°C] and relative humidity [%].
 * @param surfaces - What is known of the shelf's surfaces.
 * @param withinMs - Longest age of a reading [ms]; see {@link joinLatest}.
 * @param isGerminating - Whether something waits to germinate at an instant, under a cover that is meant to sweat.
 * @returns The difference [°C], positive where water condenses; no value where the readings say nothing about air.
 */
export function dewPointSurplus(
  air: { readonly temperature: ObservationColumns; readonly humidity: ObservationColumns },
  surfaces: ShelfSurfaces,
  withinMs: number,
  isGerminating: (at: number) => boolean,
): ObservationColumns {
  return joinLatest(
    [air.temperature, air.humidity, surfaces.rootZone],
    withinMs,
    ([temperatureC, relativeHumidityPct, rootZoneC], at) => {
      if (typeof temperatureC !== 'number' || typeof relativeHumidityPct !== 'number') return null;
      if (isGerminating(at)) return SWEATING_AS_MEANT_C;
      const known = airFromReadings(temperatureC, relativeHumidityPct);
      const dewPoint = known && dewPointC(known);
      const leafC = temperatureC + surfaces.leafOffsetC;
      return dewPoint === null ? null : dewPoint - Math.min(leafC, rootZoneC ?? leafC);
    },
  );
}

/**
 * Change per hour over a window; for `fastRise` and `fastFall`.
 *
 * @remarks
 * Each reading is compared with the latest one at least `windowMs` before it and at most twice that; look-back is
 * `2 * windowMs`.
 *
 * @param readings - Readings of one sensor; failed ones are left out.
 * @param windowMs - Length of the window [ms].
 * @returns The change [unit per hour] at every reading that has one to compare with.
 */
export function changePerHour(readings: ObservationColumns, windowMs: number): ObservationColumns {
  const { times, values, qualities } = withoutFailed(readings);
  const rates = emptyColumns();
  let reference = 0;
  times.forEach((at, i) => {
    while ((times[reference + 1] ?? Infinity) <= at - windowMs) reference += 1;
    const elapsedMs = at - (times[reference] ?? at);
    if (elapsedMs < windowMs || elapsedMs > 2 * windowMs) return;
    const change = (values[i] ?? NaN) - (values[reference] ?? NaN);
    const isPass = qualities[i] === 'pass' && qualities[reference] === 'pass';
    append(rates, at, (change * msPerHour) / elapsedMs, isPass ? 'pass' : 'suspect');
  });
  return rates;
}

/** When leaves count as wet, and how wet time adds up. */
export interface WetLeaves {
  /** Relative humidity from which leaves count as wet [%]. */
  readonly wetFromPct: number;
  /** Temperatures between which wet time counts [°C]; null counts it at all. */
  readonly betweenC: readonly [low: number, high: number] | null;
  /** Dry time after which the count starts again [ms]. */
  readonly dryAfterMs: number;
  /** Only wet time within this long before now counts [ms]. */
  readonly windowMs: number;
  /** Longest time a reading speaks for [ms]; a longer gap counts as neither wet nor dry. */
  readonly maxGapMs: number;
}

/**
 * The Botrytis window.
 *
 * @remarks
 * An hour is wet at 90 % or more (Sentelhas et al., as a proxy for leaf wetness); 55 to 75 °F is the range for
 * infection in University of Massachusetts Extension's Botrytis advice, which sources contradict each other on the
 * humidity (85 or 93 %). Two hours of drying and a day's window are common practice, no source.
 */
export const botrytisWindow: WetLeaves = {
  wetFromPct: 90,
  betweenC: [12.8, 23.9],
  dryAfterMs: 2 * msPerHour,
  windowMs: 24 * msPerHour,
  maxGapMs: msPerHour / 2,
};

/**
 * Hours of wet leaves up to each reading; for `wetHours`.
 *
 * @remarks
 * A reading speaks for the time until the next. Look-back is `windowMs + maxGapMs`.
 *
 * @param humidity - Relative humidity [%].
 * @param temperature - Air temperature [°C]; read only where the window has temperatures.
 * @param wet - When leaves count as wet.
 * @param isGerminating - Whether something waits to germinate at an instant: a covered tray is meant to be damp, and
 * has no leaves yet.
 * @returns Wet time in this spell and window [h].
 */
export function wetHours(
  humidity: ObservationColumns,
  temperature: ObservationColumns,
  wet: WetLeaves,
  isGerminating: (at: number) => boolean = () => false,
): ObservationColumns {
  const [lowC, highC] = wet.betweenC ?? [-Infinity, Infinity];
  const sources = wet.betweenC === null ? [humidity] : [humidity, temperature];
  const wetness = joinAsOf(sources, wet.maxGapMs, ([humidityPct = NaN, temperatureC = 0], at) => {
    const isWet = humidityPct >= wet.wetFromPct && temperatureC >= lowC && temperatureC <= highC;
    return Number(isWet && !isGerminating(at));
  });
  return accumulateWetTime(wetness, wet);
}

function accumulateWetTime({ times, values, qualities }: ObservationColumns, wet: WetLeaves): Columns {
  const spells = emptyColumns();
  const intervalMs = (i: number) => {
    const ms = (times[i] ?? NaN) - (times[i - 1] ?? NaN);
    return ms <= wet.maxGapMs ? ms : 0;
  };
  const wetMs = (i: number) => (values[i - 1] === 1 ? intervalMs(i) : 0);
  let oldest = 1;
  let sumMs = 0;
  let dryMs = 0;
  for (let i = 0; i < times.length; i += 1) {
    const at = times[i] ?? NaN;
    sumMs += wetMs(i);
    dryMs = values[i - 1] === 1 ? 0 : dryMs + intervalMs(i);
    if (dryMs >= wet.dryAfterMs) {
      oldest = i + 1;
      sumMs = 0;
    }
    while (oldest <= i && (times[oldest] ?? NaN) <= at - wet.windowMs) {
      sumMs -= wetMs(oldest);
      oldest += 1;
    }
    // The oldest interval may begin before the window does.
    const beforeWindowMs = Math.max(0, at - wet.windowMs - (times[oldest - 1] ?? at));
    const outsideMs = oldest <= i ? Math.min(wetMs(oldest), beforeWindowMs) : 0;
    append(spells, at, (sumMs - outsideMs) / msPerHour, qualities[i] ?? 'pass');
  }
  return spells;
}

/** How many of a sensor's readings must fail before the sensor counts as failed; see {@link failedShare}. */
export interface FailureWindow {
  /** Only readings within this long before now count [ms]. */
  readonly windowMs: number;
  /** With fewer readings than this in the window, the missing ones count as good. */
  readonly fewest: number;
}

/**
 * Share of a sensor's recent readings that failed their quality tests; for `sensorFailed`.
 *
 * @remarks
 * Look-back is `windowMs`.
 *
 * @param readings - Readings of one sensor.
 * @param window - What counts as recent.
 * @returns 0 to 1 at every reading; every value passes, because the verdict itself is not in doubt.
 */
export function failedShare(
  { times, qualities }: ObservationColumns,
  { windowMs, fewest }: FailureWindow,
): ObservationColumns {
  const shares = emptyColumns();
  let oldest = 0;
  let failed = 0;
  for (let i = 0; i < times.length; i += 1) {
    const at = times[i] ?? NaN;
    if (qualities[i] === 'fail') failed += 1;
    for (; (times[oldest] ?? NaN) <= at - windowMs; oldest += 1) {
      if (qualities[oldest] === 'fail') failed -= 1;
    }
    append(shares, at, failed / Math.max(fewest, i + 1 - oldest), 'pass');
  }
  return shares;
}

/** A finished day's light. */
export interface LightDay {
  /** End of the room's day [ms since 1970 UTC]. */
  readonly endAt: number;
  /** Light hours [h] or daily light integral [mol m⁻² d⁻¹]. */
  readonly value: number;
  /** Share of the day that readings speak for, 0 to 1. */
  readonly coverage: number;
}

/**
 * One value a day, at its end; for `lightShort`.
 *
 * @param days - Finished days in order; their ends come from the room's calendar, so 23 and 25 hours are right.
 * @param minCoverage - Share of a day below which its sum is doubtful and opens nothing, 0 to 1.
 * @returns The series of days.
 */
export function lightDays(days: readonly LightDay[], minCoverage: number): ObservationColumns {
  const series = emptyColumns();
  for (const { endAt, value, coverage } of days) {
    append(series, endAt, value, coverage >= minCoverage ? 'pass' : 'suspect');
  }
  return series;
}

function withoutFailed({ times, values, qualities }: ObservationColumns): Columns {
  const kept = emptyColumns();
  for (let i = 0; i < times.length; i += 1) {
    const quality = qualities[i] ?? 'fail';
    if (quality !== 'fail') append(kept, times[i] ?? NaN, values[i] ?? NaN, quality);
  }
  return kept;
}

function emptyColumns(): Columns {
  return { times: [], values: [], qualities: [] };
}

function append(columns: Columns, at: number, value: number, quality: Quality): void {
  columns.times.push(at);
  columns.values.push(value);
  columns.qualities.push(quality);
}
