import { formatNumber } from '../format/numbers';
import { frostRiskAt, type FrostSeason, type FrostWording } from './frost-date';

/**
 * What a stated frost date means.
 *
 * @param wording - How it was stated.
 * @param season - Spring's last or autumn's first frost.
 * @returns A sentence for a person.
 * @throws {@link DomainError} `OUT_OF_RANGE` for a percentage that is none.
 */
export function frostMeaning(wording: FrostWording, season: FrostSeason): string {
  const risk = frostRiskAt(wording, season);
  if (risk === null) {
    return season === 'spring'
      ? 'An average of years: in about half of all springs frost comes after it.'
      : 'An average of years: in about half of all autumns frost has come before it.';
  }
  const years = formatNumber(100 * risk, 0);
  return season === 'spring'
    ? `In ${years} of 100 springs frost still comes after it.`
    : `In ${years} of 100 autumns frost has come before it.`;
}

/** The two ways in which weather services state a frost date, and how to tell which one is meant. */
export const frostConventions =
  'A “10 % date” means two opposite things in spring: as a probability, that frost still comes in 10 of 100 springs ' +
  '(a late, safe date); as a percentile, that in 10 of 100 springs the last frost had passed (an early, risky date). ' +
  'If the dates get later as the percentage falls, they are probabilities.';
