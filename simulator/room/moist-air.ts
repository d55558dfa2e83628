import { saturationVapourPressureKPa } from '@shared/climate/psychrometrics';

const PRESSURE_KPA = 101.325;
/** Molar mass of water over that of dry air (ASHRAE Fundamentals 2017, ch. 1). */
const MASS_RATIO = 0.621945;

/** Specific heat of air [J g⁻¹ K⁻¹]. */
export const HEAT_OF_AIR_J_G_K = 1.006;
/** Heat taken up by evaporating water near 20 °C [J g⁻¹]. */
export const HEAT_OF_EVAPORATION_J_G = 2454;

/** Water in saturated air [kg per kg of dry air] at sea level; −20 to 60 °C. */
export function humidityRatioAtSaturationKgKg(temperatureC: number): number {
  const vapourKPa = saturationVapourPressureKPa(temperatureC);
  return (MASS_RATIO * vapourKPa) / (PRESSURE_KPA - vapourKPa);
}

/** Relative humidity [%] of air at a temperature that holds this much water; capped at 100, where the rest is fog. */
export function relativeHumidityPct(temperatureC: number, humidityRatioKgKg: number): number {
  const vapourKPa = (PRESSURE_KPA * humidityRatioKgKg) / (MASS_RATIO + humidityRatioKgKg);
  return Math.min(100, (100 * vapourKPa) / saturationVapourPressureKPa(temperatureC));
}
