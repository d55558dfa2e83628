import type { LoggerQuantity, UnitDimension } from './quantities';
import { quantityRules } from './quantities';

/** Units that are understood in files. The first of each dimension is the stored one. */
export type LoggerUnit =
  | '°C'
  | '°F'
  | 'K'
  | '%'
  | 'fraction'
  | 'µmol m⁻² s⁻¹'
  | 'lx'
  | 'klx'
  | 'fc'
  | 'kPa'
  | 'hPa'
  | 'mbar'
  | 'Pa'
  | 'g m⁻³';

/** `stored = (value - zero) * factor`. */
interface UnitRule {
  readonly dimension: UnitDimension;
  readonly zero: number;
  readonly factor: number;
  /** Matches the folded text of the unit, see {@link foldUnitText}. */
  readonly text: RegExp;
}

// Exact by definition: 1 ft = 0.3048 m, 1 fc = 1 lm/ft², 0 °C = 273.15 K, 1 mbar = 1 hPa.
const LUX_PER_FOOT_CANDLE = 1 / 0.3048 ** 2;

const unitRules: Readonly<Record<LoggerUnit, UnitRule>> = {
  '°C': { dimension: 'temperature', zero: 0, factor: 1, text: /^(a?°|deg(rees?)?|grad)?c(elsius|el)?$/ },
  '°F': { dimension: 'temperature', zero: 32, factor: 5 / 9, text: /^(a?°|deg(rees?)?|grad)?f(ahrenheit)?$/ },
  K: { dimension: 'temperature', zero: 273.15, factor: 1, text: /^(a?°|deg(rees?)?)?k(elvin)?$/ },
  '%': {
    dimension: 'humidity',
    zero: 0,
    factor: 1,
    text: /^(%|pct|percent|prozent)(rh|hr|rf|rv|r\.?h\.?)?$|^(rh|hr)%$/,
  },
  fraction: { dimension: 'humidity', zero: 0, factor: 100, text: /^(fraction|0-1|0\.\.1)$/ },
  'µmol m⁻² s⁻¹': { dimension: 'photonFlux', zero: 0, factor: 1, text: /^[μu]mol\/?m(-?2)?\/?s(-?1)?$/ },
  lx: { dimension: 'illuminance', zero: 0, factor: 1, text: /^(lx|lux)$/ },
  klx: { dimension: 'illuminance', zero: 0, factor: 1000, text: /^k(lx|lux)$/ },
  fc: {
    dimension: 'illuminance',
    zero: 0,
    factor: LUX_PER_FOOT_CANDLE,
    text: /^(fc|ft-?c|foot-?candles?|lm\/ft2)$/,
  },
  kPa: { dimension: 'pressure', zero: 0, factor: 1, text: /^kpa$/ },
  hPa: { dimension: 'pressure', zero: 0, factor: 0.1, text: /^hpa$/ },
  mbar: { dimension: 'pressure', zero: 0, factor: 0.1, text: /^mbar$/ },
  Pa: { dimension: 'pressure', zero: 0, factor: 0.001, text: /^pa$/ },
  'g m⁻³': { dimension: 'density', zero: 0, factor: 1, text: /^g\/?m-?3$/ },
};

const units = Object.keys(unitRules) as LoggerUnit[];

/** The dimension of a unit. */
export function dimensionOf(unit: LoggerUnit): UnitDimension {
  return unitRules[unit].dimension;
}

/** All units in which a quantity may be given, the stored one first. */
export function unitsOf(quantity: LoggerQuantity): LoggerUnit[] {
  return units.filter((unit) => unitRules[unit].dimension === quantityRules[quantity].dimension);
}

/** The unit in which a quantity is stored. */
export function storedUnitOf(quantity: LoggerQuantity): LoggerUnit {
  return unitsOf(quantity)[0] as LoggerUnit;
}

/**
 * Reads the text of a unit, however it is spelled: `deg C`, `℃`, `umol/m2/s`, `[µmol·m⁻²·s⁻¹]`.
 *
 * @param text - The unit alone, with or without brackets.
 * @returns The unit, or null where the text is not one.
 */
export function unitOfText(text: string): LoggerUnit | null {
  if (text.length > 40) return null;
  const folded = foldUnitText(text);
  return units.find((unit) => unitRules[unit].text.test(folded)) ?? null;
}

// Compatibility form turns superscripts into digits, ℃ into °C and the micro sign into the Greek letter.
function foldUnitText(text: string): string {
  return text
    .replace(/º/g, '°')
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[−–]/g, '-')
    .replace(/â/g, 'a')
    .replace(/[\s·*^()[\]{}]/g, '');
}

/**
 * Converts a value into the stored unit of its dimension.
 *
 * @param unit - Unit of the value.
 * @returns Values rounded to 1e-6, so that 70.7 °F becomes 21.5 °C and not 21.500000000000004; a value that is in
 * the stored unit already comes back untouched.
 *
 * @example
 * storedValue('°F', 68); // 20
 */
export function storedValue(unit: LoggerUnit, value: number): number {
  const { zero, factor } = unitRules[unit];
  if (zero === 0 && factor === 1) return value;
  return Math.round((value - zero) * factor * 1e6) / 1e6;
}

/** The inverse of {@link storedValue}, for showing limits in the unit of a file. */
export function valueInUnit(unit: LoggerUnit, stored: number): number {
  const { zero, factor } = unitRules[unit];
  return Math.round((stored / factor + zero) * 1e6) / 1e6;
}
