import { requireInRange } from '../errors/domain-error';

/** The state of moist air as a shelf's sensors see it. */
export interface Air {
  /** Air temperature [°C]. */
  readonly temperatureC: number;
  /** Relative humidity over liquid water [%], 0 to 100. */
  readonly relativeHumidityPct: number;
}

/** Air temperatures that the formulas here accept [°C]. */
export const AIR_TEMPERATURE_RANGE_C = { low: -20, high: 60 } as const;

/** Humidity sensors overshoot in saturated air; up to this reading [%] it still means saturated (common practice). */
const HIGHEST_SATURATED_READING_PCT = 105;

const TETENS_KPA = 0.6108;
const TETENS_FACTOR = 17.27;
const TETENS_OFFSET_C = 237.3;
const ZERO_CELSIUS_K = 273.15;
/** Specific gas constant of water vapour [J kg⁻¹ K⁻¹]. */
const WATER_VAPOUR_GAS_CONSTANT = 461.5;

/** FAO-56 eq. 11 without its range, for arguments that follow from checked ones: leaf temperatures, dew points. */
function tetensKPa(temperatureC: number): number {
  return TETENS_KPA * Math.exp((TETENS_FACTOR * temperatureC) / (temperatureC + TETENS_OFFSET_C));
}

function requireAirTemperature(temperatureC: number): void {
  requireInRange('temperatureC', temperatureC, AIR_TEMPERATURE_RANGE_C.low, AIR_TEMPERATURE_RANGE_C.high);
}

function requireAir({ temperatureC, relativeHumidityPct }: Air): void {
  requireAirTemperature(temperatureC);
  requireInRange('relativeHumidityPct', relativeHumidityPct, 0, 100);
}

/**
 * Turns a pair of readings, as they came, into air that the formulas here accept.
 *
 * @param temperatureC - Air temperature reading [°C].
 * @param relativeHumidityPct - Relative humidity reading [%].
 * @returns The air; readings over 100 up to 105 % count as saturated, because sensors overshoot there. `null` for
 *   readings that say nothing about air: outside −20 to 60 °C, below 0 or above 105 %, or NaN.
 */
export function airFromReadings(temperatureC: number, relativeHumidityPct: number): Air | null {
  const { low, high } = AIR_TEMPERATURE_RANGE_C;
  const isAir =
    temperatureC >= low &&
    temperatureC <= high &&
    relativeHumidityPct >= 0 &&
    relativeHumidityPct <= HIGHEST_SATURATED_READING_PCT;
  return isAir ? { temperatureC, relativeHumidityPct: Math.min(relativeHumidityPct, 100) } : null;
}

/**
 * Saturation vapour pressure over liquid water (Tetens form), the one saturation formula of the product.
 *
 * @param temperatureC - Air temperature [°C], −20 to 60.
 * @returns Saturation vapour pressure [kPa].
 * @throws {@link DomainError} `OUT_OF_RANGE` outside −20 to 60 °C, or for NaN.
 *
 * @remarks
 * Within 0.15 % of ASHRAE Fundamentals (2017) ch. 1 eq. 6 from 0 to 60 °C. Below 0 °C it stays the curve over supercooled
 * water, which is what humidity sensors report against; over ice the pressure is lower (by 18 % at −20 °C).
 * Source: Allen et al. (1998), FAO Irrigation and Drainage Paper 56, ch. 3, eq. 11.
 *
 * @example
 * ```ts
 * saturationVapourPressureKPa(25); // 3.168
 * ```
 */
export function saturationVapourPressureKPa(temperatureC: number): number {
  requireAirTemperature(temperatureC);
  return tetensKPa(temperatureC);
}

/**
 * Slope of the saturation vapour pressure curve.
 *
 * @param temperatureC - Air temperature [°C], −20 to 60.
 * @returns Slope [kPa °C⁻¹].
 * @throws {@link DomainError} `OUT_OF_RANGE` outside −20 to 60 °C, or for NaN.
 *
 * @remarks
 * The exact derivative of {@link saturationVapourPressureKPa}; FAO-56 rounds the factor 17.27 × 237.3 to 4098.
 * Source: Allen et al. (1998), FAO Irrigation and Drainage Paper 56, ch. 3, eq. 13.
 */
export function saturationVapourPressureSlopeKPaC(temperatureC: number): number {
  const saturationKPa = saturationVapourPressureKPa(temperatureC);
  return (TETENS_FACTOR * TETENS_OFFSET_C * saturationKPa) / (temperatureC + TETENS_OFFSET_C) ** 2;
}

/**
 * Vapour pressure that the air really holds.
 *
 * @param air - Temperature −20 to 60 °C, relative humidity 0 to 100 %.
 * @returns Actual vapour pressure [kPa].
 * @throws {@link DomainError} `OUT_OF_RANGE` for air outside these ranges.
 *
 * @remarks
 * Source: Allen et al. (1998), FAO Irrigation and Drainage Paper 56, ch. 3, eq. 10.
 */
export function actualVapourPressureKPa(air: Air): number {
  requireAir(air);
  return (tetensKPa(air.temperatureC) * air.relativeHumidityPct) / 100;
}

/**
 * Vapour pressure deficit: how strongly the air draws water from a leaf.
 *
 * @param air - Temperature −20 to 60 °C, relative humidity 0 to 100 %, and `leafOffsetC`, leaf minus air temperature
 *   [°C], −10 to 10. Without an offset (or with 0) this is the deficit of the air itself.
 * @returns Deficit [kPa]. Negative where the leaf is below the dew point: water condenses on it, which is reported and
 *   not hidden as 0.
 * @throws {@link DomainError} `OUT_OF_RANGE` for arguments outside these ranges.
 *
 * @remarks
 * Pointwise: the mean deficit of an hour is the mean of deficits, never the deficit of means.
 * Sources: FAO Irrigation and Drainage Paper 56, ch. 3, eq. 10 and 11; leaf form: Ohio State University Extension,
 * AEX-804.
 *
 * @example
 * ```ts
 * vapourPressureDeficitKPa({ temperatureC: 25, relativeHumidityPct: 60 }); // 1.267
 * vapourPressureDeficitKPa({ temperatureC: 25, relativeHumidityPct: 60, leafOffsetC: -2 }); // 0.909
 * ```
 */
export function vapourPressureDeficitKPa(air: Air & { readonly leafOffsetC?: number }): number {
  const { leafOffsetC = 0 } = air;
  requireInRange('leafOffsetC', leafOffsetC, -10, 10);
  return tetensKPa(air.temperatureC + leafOffsetC) - actualVapourPressureKPa(air);
}

/**
 * Temperature at which the air's water begins to condense: the inverse of {@link saturationVapourPressureKPa}.
 *
 * @param air - Temperature −20 to 60 °C, relative humidity 0 to 100 %.
 * @returns Dew point over liquid water [°C]; `null` at 0 %, where there is no water to condense.
 * @throws {@link DomainError} `OUT_OF_RANGE` for air outside these ranges.
 *
 * @remarks
 * Within 0.03 °C of ASHRAE Fundamentals (2017) for dew points from 0 to 60 °C.
 *
 * @example
 * ```ts
 * dewPointC({ temperatureC: 20, relativeHumidityPct: 60 }); // 12.0
 * ```
 */
export function dewPointC(air: Air): number | null {
  requireAir(air);
  const { temperatureC, relativeHumidityPct } = air;
  if (relativeHumidityPct === 0) {
    return null;
  }
  const exponent =
    Math.log(relativeHumidityPct / 100) + (TETENS_FACTOR * temperatureC) / (temperatureC + TETENS_OFFSET_C);
  return (TETENS_OFFSET_C * exponent) / (TETENS_FACTOR - exponent);
}

/**
 * Relative humidity of air whose dew point is known: the inverse of {@link dewPointC}.
 *
 * @param air - Air temperature [°C], −20 to 60, and dew point [°C], −100 up to the air temperature.
 * @returns Relative humidity [%], above 0 up to 100.
 * @throws {@link DomainError} `OUT_OF_RANGE` outside these ranges, so also for a dew point above the air temperature.
 */
export function relativeHumidityFromDewPointPct(air: {
  readonly temperatureC: number;
  readonly dewPointC: number;
}): number {
  requireAirTemperature(air.temperatureC);
  requireInRange('dewPointC', air.dewPointC, -100, air.temperatureC);
  return (100 * tetensKPa(air.dewPointC)) / tetensKPa(air.temperatureC);
}

/**
 * Mass of water in a volume of air.
 *
 * @param air - Temperature −20 to 60 °C, relative humidity 0 to 100 %.
 * @returns Absolute humidity [g m⁻³].
 * @throws {@link DomainError} `OUT_OF_RANGE` for air outside these ranges.
 *
 * @remarks
 * Ideal gas law for water vapour with the specific gas constant 461.5 J kg⁻¹ K⁻¹.
 *
 * @example
 * ```ts
 * absoluteHumidityGM3({ temperatureC: 20, relativeHumidityPct: 50 }); // 8.64
 * ```
 */
export function absoluteHumidityGM3(air: Air): number {
  // kPa → Pa and kg → g: two factors of a thousand.
  const vapourPressureMilliPa = actualVapourPressureKPa(air) * 1e6;
  return vapourPressureMilliPa / (WATER_VAPOUR_GAS_CONSTANT * (air.temperatureC + ZERO_CELSIUS_K));
}

/**
 * Standard uncertainty of the air's vapour pressure deficit that follows from those of its two sensors.
 *
 * @param air - Temperature −20 to 60 °C, relative humidity 0 to 100 %.
 * @param sensors - Standard uncertainties: of temperature [°C], 0 to 10, and of relative humidity [%], 0 to 50.
 * @returns Standard uncertainty of the deficit [kPa].
 * @throws {@link DomainError} `OUT_OF_RANGE` for arguments outside these ranges.
 *
 * @remarks
 * First-order propagation of independent errors through `es(T) (1 − RH)`, after the Guide to the Expression of
 * Uncertainty in Measurement (JCGM 100:2008), 5.1.2.
 */
export function vpdUncertaintyKPa(
  air: Air,
  sensors: { readonly temperatureC: number; readonly relativeHumidityPct: number },
): number {
  requireAir(air);
  requireInRange('sensors.temperatureC', sensors.temperatureC, 0, 10);
  requireInRange('sensors.relativeHumidityPct', sensors.relativeHumidityPct, 0, 50);
  const dryShare = 1 - air.relativeHumidityPct / 100;
  const fromTemperatureKPa =
    dryShare * saturationVapourPressureSlopeKPaC(air.temperatureC) * sensors.temperatureC;
  const fromHumidityKPa = (tetensKPa(air.temperatureC) * sensors.relativeHumidityPct) / 100;
  return Math.hypot(fromTemperatureKPa, fromHumidityKPa);
}
