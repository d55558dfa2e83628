/**
 * A printed temperature in the stored unit.
 *
 * @param temperatureF - Temperature [°F].
 * @returns Temperature [°C], to a tenth: tables print whole degrees.
 */
export function celsiusFromFahrenheit(temperatureF: number): number {
  return Math.round((temperatureF - 32) / 0.18) / 10;
}
