import { isTemperature, storedUnit, type Quantity } from '../climate/quantity';
import type { WantedRange } from './standing';
import {
  formatNumber,
  formatRange,
  formatValue,
  shownTemperature,
  shownTemperatureDifference,
  type TemperatureUnit,
} from './numbers';

/** What a quantity is called in a reader's words, in the middle of a sentence. */
export const quantityName: Readonly<Record<Quantity, string>> = {
  airTemperature: 'air',
  rootZoneTemperature: 'root zone',
  relativeHumidity: 'humidity',
  ppfd: 'light',
  illuminance: 'light',
  vapourPressureDeficit: 'VPD',
  dewPoint: 'dew point',
  absoluteHumidity: 'water in air',
};

/** Digits after the point: no finer than a good sensor of a growing room is. */
export const quantityDecimals: Readonly<Record<Quantity, number>> = {
  airTemperature: 1,
  rootZoneTemperature: 1,
  relativeHumidity: 0,
  ppfd: 0,
  illuminance: 0,
  vapourPressureDeficit: 2,
  dewPoint: 1,
  absoluteHumidity: 1,
};

/** The unit in which a person reads a quantity. */
export function shownUnit(quantity: Quantity, temperatureUnit: TemperatureUnit): string {
  return isTemperature(quantity) ? temperatureUnit : storedUnit[quantity];
}

/** A stored value in the unit in which a person reads it. */
export function shownValue(quantity: Quantity, value: number, temperatureUnit: TemperatureUnit): number {
  return isTemperature(quantity) ? shownTemperature(value, temperatureUnit) : value;
}

/** A stored range in the unit in which a person reads it; open ends stay open. */
export function shownRange(
  quantity: Quantity,
  { low, high }: WantedRange,
  temperatureUnit: TemperatureUnit,
): WantedRange {
  const shown = (end: number | null): number | null =>
    end === null ? null : shownValue(quantity, end, temperatureUnit);
  return { low: shown(low), high: shown(high) };
}

/** A stored value as a person reads it: "28.3 °C"; a dash for null. */
export function formatQuantity(
  quantity: Quantity,
  value: number | null,
  temperatureUnit: TemperatureUnit,
): string {
  const shown = value === null ? null : shownValue(quantity, value, temperatureUnit);
  return formatValue(shown, shownUnit(quantity, temperatureUnit), quantityDecimals[quantity]);
}

/** The same without its unit, for where that stands already. */
export function formatBareQuantity(
  quantity: Quantity,
  value: number | null,
  temperatureUnit: TemperatureUnit,
): string {
  const shown = value === null ? null : shownValue(quantity, value, temperatureUnit);
  return formatNumber(shown, quantityDecimals[quantity]);
}

/** A difference between two stored values: 2.3 °C apart is 4.1 °F apart, not 36.1. */
export function formatQuantityDifference(
  quantity: Quantity,
  difference: number,
  temperatureUnit: TemperatureUnit,
): string {
  const shown = isTemperature(quantity)
    ? shownTemperatureDifference(difference, temperatureUnit)
    : difference;
  return formatValue(shown, shownUnit(quantity, temperatureUnit), quantityDecimals[quantity]);
}

/** A stored range as a person reads it: "20–26 °C", with decimals only where an end needs them. */
export function formatQuantityRange(
  quantity: Quantity,
  range: WantedRange,
  temperatureUnit: TemperatureUnit,
): string {
  const shown = shownRange(quantity, range, temperatureUnit);
  const isWhole = [shown.low, shown.high].every((end) => end === null || Number.isInteger(end));
  return formatRange(shown, shownUnit(quantity, temperatureUnit), isWhole ? 0 : quantityDecimals[quantity]);
}
