/** The word for "nothing measured", where a number would stand. */
export const noValue = '–';

const noBreakSpace = '\u00a0';
const groupSpace = '\u202f';
const minus = '\u2212';

const formatters = new Map<number, Intl.NumberFormat>();

function formatter(decimals: number): Intl.NumberFormat {
  const known = formatters.get(decimals);
  if (known !== undefined) return known;
  const made = new Intl.NumberFormat('en-GB', {
    minimumFractionDigits: decimals,
    maximumFractionDigits: decimals,
  });
  formatters.set(decimals, made);
  return made;
}

/**
 * A number as a person reads it: fixed decimals, thin spaces between thousands, a real minus sign.
 *
 * @param value - Any finite number; null stands for no measurement.
 * @param decimals - Digits after the point, 0 to 20.
 *
 * @example
 * formatNumber(120214, 0); // '120 214'
 * formatNumber(-0.04, 1); // '0.0'
 */
export function formatNumber(value: number | null, decimals: number): string {
  if (value === null) return noValue;
  const text = formatter(decimals).format(value).replaceAll(',', groupSpace);
  if (!text.startsWith('-')) return text;
  return /[1-9]/.test(text) ? text.replace('-', minus) : text.slice(1);
}

/**
 * A number with its unit, which never part at the end of a line.
 *
 * @example
 * formatValue(28.34, '°C', 1); // '28.3 °C'
 */
export function formatValue(value: number | null, unit: string, decimals: number): string {
  return value === null ? noValue : `${formatNumber(value, decimals)}${noBreakSpace}${unit}`;
}

/**
 * A wanted range in words; an open end says so.
 *
 * @example
 * formatRange(airWanted, '°C', 0); // '20–26 °C', or 'up to 26 °C' with no low end
 */
export function formatRange(
  range: { readonly low: number | null; readonly high: number | null },
  unit: string,
  decimals: number,
): string {
  const { low, high } = range;
  if (low !== null && high !== null)
    return `${formatNumber(low, decimals)}–${formatValue(high, unit, decimals)}`;
  if (high !== null) return `up to ${formatValue(high, unit, decimals)}`;
  return low === null ? noValue : `at least ${formatValue(low, unit, decimals)}`;
}

/**
 * A share as a whole percentage. It says 100 % or 0 % only when nothing, or everything, is missing.
 *
 * @param share - 0 to 1; null stands for not known.
 */
export function formatShare(share: number | null): string {
  if (share === null) return noValue;
  const percent = Math.round(share * 100);
  if (percent === 100 && share < 1) return formatValue(99, '%', 0);
  if (percent === 0 && share > 0) return `under ${formatValue(1, '%', 0)}`;
  return formatValue(percent, '%', 0);
}

/** The units a person may read temperatures in. Stored temperatures are always °C. */
export type TemperatureUnit = '°C' | '°F';

const fahrenheitPerCelsius = 9 / 5;
const fahrenheitAtFreezing = 32;

/** A temperature in the reader's unit. @param temperatureC - [°C]. */
export function shownTemperature(temperatureC: number, unit: TemperatureUnit): number {
  return unit === '°C' ? temperatureC : temperatureC * fahrenheitPerCelsius + fahrenheitAtFreezing;
}

/** The inverse of {@link shownTemperature}, for what a person typed. @returns [°C]. */
export function typedTemperatureC(temperature: number, unit: TemperatureUnit): number {
  return unit === '°C' ? temperature : (temperature - fahrenheitAtFreezing) / fahrenheitPerCelsius;
}

/** A difference of temperatures in the reader's unit; a difference has no freezing point. */
export function shownTemperatureDifference(differenceC: number, unit: TemperatureUnit): number {
  return unit === '°C' ? differenceC : differenceC * fahrenheitPerCelsius;
}
