import type { Quantity } from '@shared/climate/quantity';
import { shownValue } from '@shared/format/quantities';
import type { TemperatureUnit } from '@shared/format/numbers';
import type { WantedRange } from '@shared/format/standing';
import type { MeasureScale } from './measure-strip';

/** Between which values each quantity lies on a shelf, in its stored unit: what a growing room sees in a year. */
const usualScale: Readonly<Record<Quantity, MeasureScale>> = {
  airTemperature: { low: 10, high: 34 },
  rootZoneTemperature: { low: 6, high: 36 },
  relativeHumidity: { low: 20, high: 100 },
  ppfd: { low: 0, high: 600 },
  illuminance: { low: 0, high: 40_000 },
  vapourPressureDeficit: { low: 0, high: 2.4 },
  dewPoint: { low: 0, high: 26 },
  absoluteHumidity: { low: 0, high: 26 },
};

/**
 * The scale on which a value is drawn: the usual one, so that shelves can be compared at a glance, widened where the
 * value or its wanted range lies beyond it.
 *
 * @param value - In the stored unit; null when there is no reading.
 * @param wanted - In the stored unit.
 * @returns In the unit in which the person reads it.
 */
export function measureScale(
  quantity: Quantity,
  value: number | null,
  wanted: WantedRange | null,
  temperatureUnit: TemperatureUnit,
): MeasureScale {
  const usual = usualScale[quantity];
  const seen = [value, wanted?.low, wanted?.high].filter((end) => typeof end === 'number');
  return {
    low: shownValue(quantity, Math.min(usual.low, ...seen), temperatureUnit),
    high: shownValue(quantity, Math.max(usual.high, ...seen), temperatureUnit),
  };
}
