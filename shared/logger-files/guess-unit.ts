import type { LoggerQuantity } from './quantities';
import type { LoggerUnit } from './units';
import { storedUnitOf, storedValue, unitsOf } from './units';

/** Values of a column that matter for its unit. */
export interface ValueSpan {
  readonly low: number;
  readonly median: number;
  readonly high: number;
}

/** What indoor growing rooms show, by the middle value of a file in stored units. Common practice, no source. */
const usualMedian: Readonly<Record<LoggerQuantity, readonly [low: number, high: number]>> = {
  airTemperature: [-15, 42],
  rootZoneTemperature: [-15, 42],
  relativeHumidity: [8, 105],
  ppfd: [-5, 2500],
  illuminance: [0, 200_000],
  vapourPressureDeficit: [0, 6],
  dewPoint: [-30, 40],
  absoluteHumidity: [0, 60],
};

/** Lowest, middle and highest of the values that are numbers, or null where there are none. */
export function spanOf(values: readonly number[]): ValueSpan | null {
  const sorted = values.filter((value) => Number.isFinite(value)).sort((a, b) => a - b);
  const [low] = sorted;
  if (low === undefined) return null;
  return { low, median: sorted[Math.floor(sorted.length / 2)] as number, high: sorted.at(-1) as number };
}

/** Tells whether values in a unit are what a growing room can show. */
export function isUsual(quantity: LoggerQuantity, unit: LoggerUnit, { median, high }: ValueSpan): boolean {
  const [least, most] = usualMedian[quantity];
  const value = storedValue(unit, median);
  // Up to 1 the values are a fraction, even where a very dry room would also be possible in percent.
  if (quantity === 'relativeHumidity' && unit === 'fraction') return high <= 1.1 && value >= least;
  return value >= least && value <= most;
}

/**
 * The unit that fits values whose unit the file does not state: the stored unit where it is possible, else the first that is.
 *
 * @returns The unit, or null where no unit fits or there are no values.
 */
export function guessUnit(quantity: LoggerQuantity, values: readonly number[]): LoggerUnit | null {
  const span = spanOf(values);
  if (span === null) return null;
  const stored = storedUnitOf(quantity);
  if (isUsual(quantity, stored, span)) return stored;
  return unitsOf(quantity).find((unit) => isUsual(quantity, unit, span)) ?? null;
}
