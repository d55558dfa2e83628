import type { EpisodeFormatters } from '../alerts/describe-episode';
import type { AlertQuantity } from '../alerts/episode-words';
import type { Quantity } from '../climate/quantity';
import { formatNumber, formatValue, type TemperatureUnit } from './numbers';
import { formatBareQuantity, formatQuantity, formatQuantityDifference } from './quantities';
import { formatDuration, sayWhen } from './room-time';

/** A day's sums of light, which have no series of their own. */
const sumUnit = { lightHours: 'h', dailyLightIntegral: 'mol/m²' } as const;

/**
 * How an alert's numbers and instants are written for a reader.
 *
 * @param temperatureUnit - The reader's.
 * @param zone - IANA name of the room's time zone.
 * @param now - The present [ms since 1970 UTC], which decides what "yesterday" is.
 */
export function episodeFormatters(
  temperatureUnit: TemperatureUnit,
  zone: string,
  now: number,
): EpisodeFormatters {
  return {
    value: (value, quantity) =>
      isSum(quantity)
        ? formatValue(value, sumUnit[quantity], 1)
        : formatQuantity(quantity, value, temperatureUnit),
    bareValue: (value, quantity) =>
      plainly(
        isSum(quantity) ? formatNumber(value, 1) : formatBareQuantity(quantity, value, temperatureUnit),
      ),
    difference: (difference, quantity) =>
      isSum(quantity)
        ? formatValue(difference, sumUnit[quantity], 1)
        : formatQuantityDifference(quantity, difference, temperatureUnit),
    duration: formatDuration,
    time: (at) => sayWhen(at, now, zone),
  };
}

/** A limit as a person set it: 26, not 26.0. */
function plainly(figures: string): string {
  return figures.replace(/\.0+$/, '');
}

function isSum(quantity: AlertQuantity): quantity is Exclude<AlertQuantity, Quantity> {
  return quantity in sumUnit;
}
