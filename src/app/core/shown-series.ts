import type { Quantity } from '@shared/climate/quantity';
import type { Measure } from '@shared/contracts/board';
import type { ChartPoint, Series } from '@shared/contracts/series';
import type { TemperatureUnit } from '@shared/format/numbers';
import { quantityDecimals, shownRange, shownUnit, shownValue } from '@shared/format/quantities';
import type { WantedRange } from '@shared/format/standing';
import { maxGapMs } from '@shared/series/expected-interval';

/** A line ready to be drawn, in the reader's unit. */
export interface ShownLine {
  readonly name: string;
  readonly unit: string;
  readonly decimals: number;
  readonly points: readonly ChartPoint[];
}

/** What is wanted from one instant to another [ms since 1970 UTC], in the reader's unit. */
export interface ShownWanted extends WantedRange {
  readonly from: number;
  readonly to: number;
}

/** A value that came after the chart was fetched. */
export type LiveValue = Pick<Measure, 'at' | 'value' | 'expectedIntervalS'>;

/**
 * The lines of a chart in the reader's unit, the newest of them carried on with what came live.
 *
 * @param live - In order of time, in the stored unit.
 */
export function shownLines(
  { quantity, lines }: Series,
  live: readonly LiveValue[],
  temperatureUnit: TemperatureUnit,
): ShownLine[] {
  const newest = newestLine(lines.map(({ points }) => points));
  return lines.map(({ name, resolution, points }, index) => ({
    name,
    unit: shownUnit(quantity, temperatureUnit),
    decimals: quantityDecimals[quantity],
    points: (index === newest && resolution === 'reading' ? carriedOn(points, live) : points).map((point) =>
      shownPoint(quantity, point, temperatureUnit),
    ),
  }));
}

/** The wanted range over time in the reader's unit; where nothing is wanted there is no span. */
export function shownWanted({ quantity, wanted }: Series, temperatureUnit: TemperatureUnit): ShownWanted[] {
  return wanted
    .filter(({ low, high }) => low !== null || high !== null)
    .map(({ from, to, ...range }) => ({
      from: Date.parse(from),
      to: Date.parse(to),
      ...shownRange(quantity, range, temperatureUnit),
    }));
}

/** Whether a chart has anything to draw. */
export function hasReadings({ lines }: Series): boolean {
  return lines.some(({ points }) => points.some(([, mean]) => mean !== null));
}

/** The live values with another, unless it is held already or older. */
export function withLive(live: readonly LiveValue[], value: LiveValue | null): readonly LiveValue[] {
  if (value === null) return live;
  const last = live.at(-1);
  return last !== undefined && Date.parse(value.at) <= Date.parse(last.at) ? live : [...live, value];
}

function newestLine(lines: readonly (readonly ChartPoint[])[]): number {
  const ends = lines.map((points) => points.at(-1)?.[0] ?? -Infinity);
  return ends.indexOf(Math.max(...ends));
}

function carriedOn(points: readonly ChartPoint[], live: readonly LiveValue[]): readonly ChartPoint[] {
  const carried = [...points];
  for (const { at: instant, value, expectedIntervalS } of live) {
    const at = Date.parse(instant);
    const last = carried.at(-1)?.[0] ?? at;
    if (carried.length > 0 && at <= last) continue;
    if (at - last > maxGapMs(expectedIntervalS)) carried.push([last + 1, null, null, null]);
    carried.push([at, value, value, value]);
  }
  return carried;
}

function shownPoint(
  quantity: Quantity,
  [at, mean, low, high]: ChartPoint,
  temperatureUnit: TemperatureUnit,
): ChartPoint {
  const shown = (value: number | null): number | null =>
    value === null ? null : shownValue(quantity, value, temperatureUnit);
  return [at, shown(mean), shown(low), shown(high)];
}
