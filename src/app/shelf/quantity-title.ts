import type { Quantity } from '@shared/climate/quantity';
import { quantityName } from '@shared/format/quantities';

/** The quantities that have a chart, in the order of their charts. */
export const chartedQuantities: readonly Quantity[] = [
  'airTemperature',
  'rootZoneTemperature',
  'relativeHumidity',
  'vapourPressureDeficit',
  'ppfd',
  'illuminance',
];

/** A quantity's name at the beginning of a line: "Root zone". */
export function quantityTitle(quantity: Quantity): string {
  const name = quantityName[quantity];
  return name.charAt(0).toUpperCase() + name.slice(1);
}
