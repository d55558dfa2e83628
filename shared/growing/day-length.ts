import { requireInRange } from '../errors/domain-error';
import { dayAfter, dayOfYear } from './calendar-day';

const RADIANS = Math.PI / 180;
/** Depth of the sun's centre below the horizon while its upper limb shows, refraction included [°]. */
const UPPER_LIMB_DEG = 0.8333;

/**
 * Length of the day: from the moment the sun's upper limb rises to the moment it has set, refraction included.
 *
 * @param latitudeDeg - Latitude [°], −90 (south) to 90 (north).
 * @param day - `YYYY-MM-DD`.
 * @returns Day length [h], 0 in the polar night, 24 in the polar day.
 * @throws {@link DomainError} `OUT_OF_RANGE` for a latitude that is none, `INVALID_ARGUMENT` for a day that is none.
 *
 * @remarks
 * The CBM model of Forsythe et al. (1995), Ecological Modelling 80:87–95, with p = 0.8333°; this is the one definition
 * of day length in the product. Within 0.07 h of almanac algorithms up to 52° and 0.12 h up to 65°, both ways. FAO Paper 56 eq. 34
 * takes the sun's centre without refraction and is 0.1 to 0.4 h shorter below 52°; civil twilight, which plants notice too, makes
 * the day 0.7 h (equator) to 1.6 h (51.5° in June) longer.
 *
 * @example
 * ```ts
 * dayLengthHours(51.5, '2023-06-21'); // 16.64
 * ```
 */
export function dayLengthHours(latitudeDeg: number, day: string): number {
  requireInRange('latitudeDeg', latitudeDeg, -90, 90);
  const latitude = latitudeDeg * RADIANS;
  const declination = solarDeclination(dayOfYear(day));
  const cosine =
    (Math.sin(UPPER_LIMB_DEG * RADIANS) + Math.sin(latitude) * Math.sin(declination)) /
    (Math.cos(latitude) * Math.cos(declination));
  // Beyond ±1 the sun does not cross the horizon that day.
  return 24 - (24 / Math.PI) * Math.acos(Math.min(1, Math.max(-1, cosine)));
}

/** The day length of one day. */
export interface DayLength {
  /** `YYYY-MM-DD` */
  readonly day: string;
  readonly hours: number;
}

/**
 * Day lengths of a year, for a chart.
 *
 * @param latitudeDeg - Latitude [°], −90 to 90.
 * @param year - Calendar year, 1900 to 2200.
 * @returns One for each day, in order.
 * @throws {@link DomainError} `OUT_OF_RANGE` outside these ranges.
 */
export function dayLengthsOfYear(latitudeDeg: number, year: number): DayLength[] {
  requireInRange('year', year, 1900, 2200);
  const first = `${year}-01-01`;
  return Array.from({ length: dayOfYear(`${year}-12-31`) }, (_, index) => {
    const day = dayAfter(first, index);
    return { day, hours: dayLengthHours(latitudeDeg, day) };
  });
}

/**
 * The longest day of a year.
 *
 * @param latitudeDeg - Latitude [°], −90 to 90.
 * @param year - Calendar year, 1900 to 2200.
 * @returns The day, the first of equals where the sun stays up, and its length.
 * @throws {@link DomainError} `OUT_OF_RANGE` outside these ranges.
 */
export function longestDay(latitudeDeg: number, year: number): DayLength {
  return dayLengthsOfYear(latitudeDeg, year).reduce((longest, one) =>
    one.hours > longest.hours ? one : longest,
  );
}

/** The sun's declination on a day of the year [rad]. */
function solarDeclination(ordinal: number): number {
  const revolution = 0.2163108 + 2 * Math.atan(0.9671396 * Math.tan(0.0086 * (ordinal - 186)));
  return Math.asin(0.39795 * Math.cos(revolution));
}
