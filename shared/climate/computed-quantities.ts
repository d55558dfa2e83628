import { pairNearest } from '../series/pair-nearest';
import type { Sample, Series } from '../series/series';
import { absoluteHumidityGM3, airFromReadings, dewPointC, vapourPressureDeficitKPa } from './psychrometrics';
import type { ComputedQuantity } from './quantity';

/**
 * Values of a computed quantity at each humidity reading that has a temperature near enough in time.
 *
 * @param quantity - Which.
 * @param humidity - Relative humidity [%], in order.
 * @param temperature - Air temperature of the same shelf [°C], in order.
 * @param options - `withinMs`, the longest distance in time of a pair [ms]; `leafOffsetC`, leaf minus air temperature
 *   [°C], for the deficit only.
 * @returns Samples in the stored unit; where the quantity is undefined (dew point of dry air, readings beyond the
 *   formula's range) there is none.
 */
export function computedSeries(
  quantity: ComputedQuantity,
  humidity: Series,
  temperature: Series,
  options: { readonly withinMs: number; readonly leafOffsetC: number },
): Sample[] {
  const samples: Sample[] = [];
  for (const pair of pairNearest(humidity, temperature, options.withinMs)) {
    const value = computedValue(quantity, pair.other, pair.value, options.leafOffsetC);
    if (value !== null) samples.push({ at: pair.at, value });
  }
  return samples;
}

/**
 * One value of a computed quantity.
 *
 * @param quantity - Which.
 * @param temperatureC - Air temperature [°C].
 * @param relativeHumidityPct - Relative humidity as the sensor gave it [%].
 * @param leafOffsetC - Leaf minus air temperature [°C], for the deficit only.
 * @returns The value in the stored unit; null where the readings are beyond the formula's range or it is undefined.
 */
export function computedValue(
  quantity: ComputedQuantity,
  temperatureC: number,
  relativeHumidityPct: number,
  leafOffsetC: number,
): number | null {
  const air = airFromReadings(temperatureC, relativeHumidityPct);
  if (air === null) return null;
  switch (quantity) {
    case 'vapourPressureDeficit':
      // Spelled out: a spread costs more than the sum itself, a million times.
      return vapourPressureDeficitKPa({
        temperatureC: air.temperatureC,
        relativeHumidityPct: air.relativeHumidityPct,
        leafOffsetC,
      });
    case 'dewPoint':
      return dewPointC(air);
    case 'absoluteHumidity':
      return absoluteHumidityGM3(air);
  }
}
