import { humidityRatioAtSaturationKgKg } from './moist-air';
import { smoothNoiseAt } from './random';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const YEAR_DAYS = 365.2425;
const TWO_PI = 2 * Math.PI;

/** Where the room is, and which of all possible weathers it has. */
export interface Climate {
  readonly seed: number;
  /** Degrees, north positive. */
  readonly latitudeDeg: number;
  /** Degrees, east positive. */
  readonly longitudeDeg: number;
}

/** The air outside. */
export interface OutdoorAir {
  readonly temperatureC: number;
  readonly humidityRatioKgKg: number;
}

/**
 * The air outside the room at an instant: season, time of day, and weather that drifts over days.
 *
 * @remarks
 * Annual mean and seasonal swing are straight lines through what mild maritime places have (about 10 °C and ±5 °C at
 * 53°); the dew point lies a few degrees below the day's mean. From memory, no source: it has to be plausible, not true.
 */
export function outdoorAirAt(climate: Climate, at: number): OutdoorAir {
  const days = at / DAY_MS;
  const yearAngle = (TWO_PI * (days % YEAR_DAYS)) / YEAR_DAYS;
  const hemisphere = climate.latitudeDeg < 0 ? -1 : 1;
  const steepness = Math.abs(climate.latitudeDeg);
  // Warmest about a month after the longest day, 29 July in the north.
  const season = hemisphere * Math.cos(yearAngle - (TWO_PI * 209) / YEAR_DAYS);
  const fronts =
    3 * smoothNoiseAt(climate.seed + 11, days / 4.5) +
    smoothNoiseAt(climate.seed + 12, days / 1.3) +
    0.4 * smoothNoiseAt(climate.seed + 13, days / 0.25);
  const dayMeanC = 27.5 - 0.33 * steepness + 0.1 * steepness * season + fronts;

  const solarHour = ((at / HOUR_MS + climate.longitudeDeg / 15) % 24) - 15;
  const clearness = 0.75 + 0.35 * smoothNoiseAt(climate.seed + 14, days / 1.9);
  const halfRangeC = (0.8 + 3.4 * noonHeight(climate.latitudeDeg, yearAngle)) * clearness;
  const temperatureC = dayMeanC + halfRangeC * Math.cos((TWO_PI * solarHour) / 24);

  const depressionC = 3.2 + 1.8 * smoothNoiseAt(climate.seed + 15, days / 2.7);
  const dewPointC = Math.min(temperatureC - 0.2, dayMeanC - depressionC);
  return { temperatureC, humidityRatioKgKg: humidityRatioAtSaturationKgKg(dewPointC) };
}

/** Sine of the sun's height at noon, 0 when it does not rise. Declination by Cooper's formula. */
function noonHeight(latitudeDeg: number, yearAngle: number): number {
  const declinationDeg = -23.45 * Math.cos(yearAngle + (TWO_PI * 10) / YEAR_DAYS);
  return Math.max(0, Math.cos(((latitudeDeg - declinationDeg) * Math.PI) / 180));
}
