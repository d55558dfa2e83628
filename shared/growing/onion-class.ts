import { requireInRange } from '../errors/domain-error';
import { longestDay } from './day-length';

/** Onions by the day length that makes them form bulbs. */
export type OnionClass = 'short' | 'intermediate' | 'long';

/**
 * Day length from which each class forms bulbs [h].
 *
 * @remarks
 * Source: Iowa State University Extension (short 10–12, intermediate 12–14, long 14 or more). Another source gives
 * short-day onions 11–13 h.
 */
export const bulbingFromHours: Readonly<Record<OnionClass, number>> = {
  short: 10,
  intermediate: 12,
  long: 14,
};

const className: Readonly<Record<OnionClass, string>> = {
  short: 'short-day',
  intermediate: 'intermediate-day',
  long: 'long-day',
};

/**
 * Bands of latitude in which each class is grown [°].
 *
 * Common practice, no source: long-day roughly above 37–40, short-day roughly below 32–35; where growers disagree both
 * classes stand. (The National Gardening Association has long-day onions north of 35.)
 */
const latitudeBand: Readonly<Record<OnionClass, { readonly low: number; readonly high: number }>> = {
  short: { low: 0, high: 35 },
  intermediate: { low: 32, high: 40 },
  long: { low: 37, high: 90 },
};

/**
 * The onion classes that suit a place.
 *
 * @param latitudeDeg - Latitude [°], −90 to 90; south counts as north.
 * @returns One class, or two where growers disagree.
 * @throws {@link DomainError} `OUT_OF_RANGE` for a latitude that is none.
 */
export function onionClassesFor(latitudeDeg: number): OnionClass[] {
  requireInRange('latitudeDeg', latitudeDeg, -90, 90);
  const latitude = Math.abs(latitudeDeg);
  return (['short', 'intermediate', 'long'] as const).filter(
    (onion) => latitude >= latitudeBand[onion].low && latitude <= latitudeBand[onion].high,
  );
}

/** How a class of onions will do at a place. */
export interface OnionFit {
  readonly fit: 'suits' | 'daysTooShort' | 'bulbsTooSoon';
  /** A sentence for a person; null when the class suits. */
  readonly warning: string | null;
}

/**
 * Whether a class of onions suits a place.
 *
 * @param onion - The class.
 * @param latitudeDeg - Latitude [°], −90 to 90.
 * @param year - Year of the longest day.
 * @returns `daysTooShort` where the class belongs nearer the pole, `bulbsTooSoon` where it belongs nearer the equator.
 * @throws {@link DomainError} `OUT_OF_RANGE` for a latitude or year that is none.
 */
export function onionFit(onion: OnionClass, latitudeDeg: number, year: number): OnionFit {
  if (onionClassesFor(latitudeDeg).includes(onion)) return { fit: 'suits', warning: null };
  const needs = bulbingFromHours[onion];
  const longest = longestDay(latitudeDeg, year).hours;
  const name = capitalised(className[onion]);
  if (Math.abs(latitudeDeg) > latitudeBand[onion].high) {
    return {
      fit: 'bulbsTooSoon',
      warning: `${name} onions bulb from ${needs} h of light; here days are longer while plants are still small, so bulbs stay small.`,
    };
  }
  const reason =
    longest < needs
      ? `the longest day here has ${longest.toFixed(1)}`
      : `here days have that for a short time only (the longest ${longest.toFixed(1)} h)`;
  return {
    fit: 'daysTooShort',
    warning: `${name} onions bulb from ${needs} h of light; ${reason}: expect leaves and hardly a bulb.`,
  };
}

function capitalised(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
