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
 * Joins series as a clock would see them: at every reading of any of them, the latest of each.
 *
 * @remarks
 * Nothing looks ahead, so a value never changes through readings taken after it, and a reading that comes late
 * changes none before it. Look-back: to fold from an instant, hand in readings from `withinMs` before it.
 *
 * @param sources - The series to join, in order of time.
 * @param withinMs - Longest age at which a reading still speaks for now [ms].
 * @param combine - Makes the value from one value of each series and the instant; null for none.
 * @returns The joined series, as doubtful as the most doubtful reading in each value. Failed readings are left out.
 */
export function joinAsOf(
  sources: readonly ObservationColumns[],
  withinMs: number,
  combine: (values: readonly number[], at: number) => number | null,
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
    if (latest.some((reading) => at - reading.at > withinMs)) continue;
    const value = combine(
      latest.map((reading) => reading.value),
      at,
    );
    if (value !== null) append(joined, at, value, latest.every(({ isPass }) => isPass) ? 'pass' : 'suspect');
  }
  return joined;
}

function nextTime(sources: readonly ObservationColumns[], passed: readonly number[]): number {
  return Math.min(...sources.map(({ times }, s) => times[passed[s] ?? 0] ?? Infinity));
}

/**
 * How far two sensors of one quantity on one shelf are apart; for `sensorsDisagree`.
 *
 * @param one - Readings of one sensor.
 * @param other - Readings of the other.
 * @param withinMs - Longest age of a reading [ms]; see {@link joinAsOf}.
 * @returns The absolute difference in their unit.
 */
export function disagreement(
  one: ObservationColumns,
  other: ObservationColumns,
  withinMs: number,
): ObservationColumns {
  return joinAsOf([one, other], withinMs, ([a = NaN, b = NaN]) => Math.abs(a - b));
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

/**
 * How far the dew point of the air lies above the temperature of a surface; for `condensation`.
 *
 * @param air - Air temperature [°C] and relative humidity [%].
 * @param surface - Temperature of the surface [°C].
 * @param withinMs - Longest age of a reading [ms]; see {@link joinAsOf}.
 * @returns The difference [°C], positive where water condenses; no value where the readings say nothing about air.
 */
export function dewPointSurplus(
  air: { readonly temperature: ObservationColumns; readonly humidity: ObservationColumns },
  surface: ObservationColumns,
  withinMs: number,
): ObservationColumns {
  return joinAsOf(
    [air.temperature, air.humidity, surface],
    withinMs,
    ([temperatureC = NaN, relativeHumidityPct = NaN, surfaceC = NaN]) => {
      const air = airFromReadings(temperatureC, relativeHumidityPct);
      const dewPoint = air && dewPointC(air);
      return dewPoint === null ? null : dewPoint - surfaceC;
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
 * @returns Wet time in this spell and window [h].
 */
export function wetHours(
  humidity: ObservationColumns,
  temperature: ObservationColumns,
  wet: WetLeaves,
): ObservationColumns {
  const [lowC, highC] = wet.betweenC ?? [-Infinity, Infinity];
  const sources = wet.betweenC === null ? [humidity] : [humidity, temperature];
  const wetness = joinAsOf(sources, wet.maxGapMs, ([humidityPct = NaN, temperatureC = 0]) =>
    Number(humidityPct >= wet.wetFromPct && temperatureC >= lowC && temperatureC <= highC),
  );
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

/**
 * Whether each reading failed its quality tests; for `sensorFailed`.
 *
 * @param readings - Readings of one sensor.
 * @returns 1 where one failed, else 0; every value passes, because the verdict itself is not in doubt.
 */
export function failures({ times, qualities }: ObservationColumns): ObservationColumns {
  const failed = emptyColumns();
  for (let i = 0; i < times.length; i += 1) {
    append(failed, times[i] ?? NaN, Number(qualities[i] === 'fail'), 'pass');
  }
  return failed;
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
