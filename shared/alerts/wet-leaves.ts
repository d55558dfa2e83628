import type { ObservationColumns } from './alert-state';
import { joinAsOf } from './joined-series';
import { append, emptyColumns, type Columns } from './observation-columns';

const msPerHour = 3_600_000;

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
