import { airFromReadings, dewPointC } from '../climate/psychrometrics';
import type { ObservationColumns } from './alert-state';
import { joinAsOf, joinLatest } from './joined-series';
import type { AlertContext } from './lamp-plan';
import { append, emptyColumns, type Columns } from './observation-columns';

const msPerHour = 3_600_000;

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

/**
 * Change that the planned lamps don't ask for; for `fastRise` and `fastFall`.
 *
 * @param rates - From {@link changePerHour}.
 * @param lampsAt - The planned lamps.
 * @param settleMs - Time after the lamps go on in which air may warm as fast as it likes, and cool after they go off [ms].
 * @returns The rates, 0 where the lamps ask for them, so that an open alert clears.
 */
export function unaskedChange(
  { times, values, qualities }: ObservationColumns,
  lampsAt: AlertContext['lampsAt'],
  settleMs: number,
): ObservationColumns {
  const rates = emptyColumns();
  for (let i = 0; i < times.length; i += 1) {
    const [at, rate] = [times[i] ?? NaN, values[i] ?? NaN];
    const { on, since } = lampsAt(at);
    const isAsked = at - since < settleMs && (on ? rate > 0 : rate < 0);
    append(rates, at, isAsked ? 0 : rate, qualities[i] ?? 'fail');
  }
  return rates;
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
 * One value a day, at its end; for `lightShort` and `lightSumShort`.
 *
 * @param days - Finished days in order; their ends come from the room's calendar, so 23 and 25 hours are right.
 * @param minCoverage - Share of a day below which its sum says nothing, 0 to 1.
 * @returns The series of days.
 */
export function lightDays(days: readonly LightDay[], minCoverage: number): ObservationColumns {
  const series = emptyColumns();
  for (const { endAt, value, coverage } of days) {
    append(series, endAt, value, coverage >= minCoverage ? 'pass' : 'fail');
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
