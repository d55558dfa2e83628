import { binomialDistribution } from 'simple-statistics';

import { DomainError, requireInRange } from '../errors/domain-error';

/** A share with the range that holds the true one in 95 of 100 such tests. */
export interface Proportion {
  /** Share found [%]. */
  readonly percent: number;
  readonly lowPct: number;
  readonly highPct: number;
}

/** How many of a sowing may be expected up. */
export interface ExpectedSeedlings {
  /** Mean number. */
  readonly expected: number;
  /** Fewest and most in 95 of 100 sowings. */
  readonly low: number;
  readonly high: number;
}

/** 97.5 % point of the standard normal distribution, for a two-sided 95 % interval. */
const Z_95 = 1.959963984540054;
const TAIL_95 = 0.025;
/** No tray holds more; the search for seeds ends here. */
const MOST_SEEDS = 100_000;

/**
 * What a germination test says about its lot: share and 95 % interval.
 *
 * @param up - Seeds that germinated, a whole number from 0 to `tested`.
 * @param tested - Seeds tested, a whole number of at least 1.
 * @returns Percent, and the Wilson score interval, which stays within 0 and 100 % and is right for few seeds too.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for anything else.
 *
 * @remarks
 * Source: Wilson (1927), J. Am. Stat. Assoc. 22:209–212; formula from memory.
 *
 * @example
 * ```ts
 * germinationShare(8, 10); // { percent: 80, lowPct: 49.0, highPct: 94.3 }
 * ```
 */
export function germinationShare(up: number, tested: number): Proportion {
  const isTest = Number.isInteger(up) && Number.isInteger(tested) && up >= 0 && tested >= 1 && up <= tested;
  if (!isTest) {
    throw new DomainError('INVALID_ARGUMENT', 'a test has from none to all of at least one seed up', {
      up,
      tested,
    });
  }
  const share = up / tested;
  const shrink = 1 + Z_95 ** 2 / tested;
  const centre = (share + Z_95 ** 2 / (2 * tested)) / shrink;
  const half = (Z_95 / shrink) * Math.sqrt((share * (1 - share)) / tested + (Z_95 / (2 * tested)) ** 2);
  return {
    percent: 100 * share,
    lowPct: 100 * Math.max(0, centre - half),
    highPct: 100 * Math.min(1, centre + half),
  };
}

/**
 * How many seedlings a sowing should give.
 *
 * @param sown - Seeds to sow, a whole number of at least 1.
 * @param germinationPct - Germination of the lot [%], 0 to 100.
 * @returns The mean, and the fewest and most that chance alone gives in 95 of 100 sowings (binomial).
 * @throws {@link DomainError} `INVALID_ARGUMENT` for a number of seeds that is none, `OUT_OF_RANGE` for a percentage
 *   that is none.
 */
export function expectedSeedlings(sown: number, germinationPct: number): ExpectedSeedlings {
  const chances = chancesOf(sown, germinationPct);
  return {
    expected: (sown * germinationPct) / 100,
    low: quantile(chances, TAIL_95),
    high: quantile(chances, 1 - TAIL_95),
  };
}

/**
 * Seeds to sow for a number of plants.
 *
 * @param plants - Plants wanted, a whole number of at least 1.
 * @param germinationPct - Germination of the lot [%], above 0, up to 100.
 * @param certainty - Share of sowings in which it is enough, above 0 and below 1.
 * @returns Fewest seeds that give at least that many plants with that certainty; null when not even 100 000 do.
 * @throws {@link DomainError} as {@link expectedSeedlings}, and `OUT_OF_RANGE` for another certainty.
 */
export function seedsNeeded(plants: number, germinationPct: number, certainty = 0.9): number | null {
  requireInRange('plants', plants, 1, MOST_SEEDS);
  requireInRange('certainty', certainty, 0.5, 0.999);
  const isEnough = (seeds: number): boolean =>
    seeds >= plants && chanceOfAtLeast(plants, chancesOf(seeds, germinationPct)) >= certainty;
  let tooFew = plants - 1;
  let enough = plants;
  while (!isEnough(enough)) {
    if (enough >= MOST_SEEDS) return null;
    tooFew = enough;
    enough = Math.min(MOST_SEEDS, 2 * enough);
  }
  while (enough - tooFew > 1) {
    const middle = Math.floor((tooFew + enough) / 2);
    if (isEnough(middle)) enough = middle;
    else tooFew = middle;
  }
  return enough;
}

function chanceOfAtLeast(least: number, chances: readonly number[]): number {
  return 1 - chances.slice(0, least).reduce((sum, chance) => sum + chance, 0);
}

function quantile(chances: readonly number[], probability: number): number {
  let below = 0;
  const found = chances.findIndex((chance) => {
    below += chance;
    return below >= probability;
  });
  return found === -1 ? chances.length - 1 : found;
}

function chancesOf(sown: number, germinationPct: number): readonly number[] {
  requireInRange('germinationPct', germinationPct, 0, 100);
  const chances = binomialDistribution(sown, germinationPct / 100);
  if (chances === undefined) {
    throw new DomainError('INVALID_ARGUMENT', 'sown must be a whole number of at least 1', { sown });
  }
  return chances;
}
