/** What a sensor can measure. */
export const measuredQuantities = [
  'airTemperature',
  'rootZoneTemperature',
  'relativeHumidity',
  'ppfd',
  'illuminance',
] as const;
/** What is computed from pairs of readings, point by point. */
export const computedQuantities = ['vapourPressureDeficit', 'dewPoint', 'absoluteHumidity'] as const;
/** Every quantity that has a series. */
export const quantities = [...measuredQuantities, ...computedQuantities] as const;

/** A quantity that a sensor measures. */
export type MeasuredQuantity = (typeof measuredQuantities)[number];
/** A quantity computed from humidity and temperature. */
export type ComputedQuantity = (typeof computedQuantities)[number];
/** Any quantity that has a series. */
export type Quantity = (typeof quantities)[number];

/** The stored unit of each quantity, as it is written (SI as the trade uses it). */
export const storedUnit: Readonly<Record<Quantity, string>> = {
  airTemperature: '°C',
  rootZoneTemperature: '°C',
  relativeHumidity: '%',
  ppfd: 'µmol m⁻² s⁻¹',
  illuminance: 'lx',
  vapourPressureDeficit: 'kPa',
  dewPoint: '°C',
  absoluteHumidity: 'g m⁻³',
};

/**
 * Tells a measured quantity from a computed one.
 *
 * @param quantity - Any quantity.
 * @returns Whether a sensor measures it.
 */
export function isMeasured(quantity: Quantity): quantity is MeasuredQuantity {
  return (measuredQuantities as readonly Quantity[]).includes(quantity);
}

/**
 * Tells temperatures, which a person may want in °F, from the rest.
 *
 * @param quantity - Any quantity.
 * @returns Whether its stored unit is °C.
 */
export function isTemperature(quantity: Quantity): boolean {
  return storedUnit[quantity] === '°C';
}
