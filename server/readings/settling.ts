import { withinMs } from './computed-quantities';
import type { SensorWork } from './reading-intake-service';
import type { SensorOnRoad } from './reading-store';

/**
 * The air temperature sensors on a humidity sensor's shelf.
 *
 * @param humidity - The humidity sensor.
 * @param sensors - All that were locked.
 * @returns Those beside it; none when it is on no shelf.
 */
export function temperaturesBeside(humidity: SensorOnRoad, sensors: readonly SensorOnRoad[]): SensorOnRoad[] {
  return sensors.filter(
    ({ quantity, shelfId }) =>
      quantity === 'airTemperature' && shelfId !== null && shelfId === humidity.shelfId,
  );
}

/**
 * Where new readings can have changed pairs that were settled. In the ordinary case, humidity and temperature coming
 * together and in order, that is nowhere: `changedFrom` is then Infinity.
 *
 * @param humidity - The humidity sensor, as before the new readings.
 * @param beside - Its temperature sensors, as before.
 * @param work - What was stored.
 * @returns The span [ms]; null when nothing around the sensor is new.
 */
export function touchedAround(
  humidity: SensorOnRoad,
  beside: readonly SensorOnRoad[],
  work: readonly SensorWork[],
): { changedFrom: number; to: number } | null {
  const own = work.find(({ sensor }) => sensor.id === humidity.id);
  const temperatures = work.filter(({ sensor }) => beside.some(({ id }) => id === sensor.id));
  if (own === undefined && temperatures.length === 0) return null;
  // Pairs up to here were made with every temperature on both sides known.
  const temperatureKnownTo = Math.max(-Infinity, ...beside.map(({ latestAt }) => latestAt ?? -Infinity));
  const isOrdinary = temperatureKnownTo >= (humidity.computedTo ?? -Infinity);
  const starts = temperatures.map(({ fresh }) => fresh[0]?.at ?? Infinity);
  const inThePast = starts.filter((at) => !isOrdinary || at <= temperatureKnownTo);
  const changedFrom = Math.min(
    own?.late?.from ?? Infinity,
    ...inThePast.map((at) => at - withinMs(humidity)),
  );
  const ends = [
    own?.late?.to ?? -Infinity,
    ...temperatures.map(({ fresh }) => fresh.at(-1)?.at ?? -Infinity),
  ];
  return { changedFrom, to: Math.max(...ends) + withinMs(humidity) };
}

/**
 * The last instant at which a humidity reading's nearest temperature is known, whatever comes next in order.
 *
 * @param humidity - The humidity sensor.
 * @param beside - Its temperature sensors.
 * @param newestOf - Instant of a sensor's newest reading, the new ones included [ms].
 * @returns The instant [ms].
 */
export function settledUpTo(
  humidity: SensorOnRoad,
  beside: readonly SensorOnRoad[],
  newestOf: (sensor: SensorOnRoad) => number,
): number {
  const humidityTo = newestOf(humidity);
  const temperatureTo = Math.max(-Infinity, ...beside.map(newestOf));
  return Math.min(humidityTo, Math.max(temperatureTo, humidityTo - withinMs(humidity)));
}
