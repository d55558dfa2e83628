import { expectedSeedlings, germinationShare, type Proportion } from './seed-expectations';

/** What a sowing is compared with; null where it is not known. */
export interface GerminationYardsticks {
  /** Germination that the lot's own test found [%]. */
  readonly lotPct: number | null;
  /** Minimum germination for seed to be sold, or another standard [%]. */
  readonly standardPct: number | null;
  /** Years since the seed was harvested or packed. */
  readonly ageYears: number | null;
  /** Years that seed of the crop keeps; sources disagree, so a range. */
  readonly lifeYears: { readonly low: number; readonly high: number } | null;
}

/** How a result compares with a yardstick, chance allowed for. */
export type Comparison = 'lower' | 'asExpected' | 'higher';
/** Age of a lot against the life of its crop's seed; `doubtful` lies between the sources that disagree. */
export type SeedAge = 'withinLife' | 'doubtful' | 'pastLife';

/** What a sowing says of its seed. Null where the yardstick is not known. */
export interface GerminationVerdict {
  /** Share of this sowing with its 95 % interval. */
  readonly found: Proportion;
  readonly againstLot: Comparison | null;
  readonly againstStandard: Comparison | null;
  readonly age: SeedAge | null;
}

/**
 * Compares a sowing with its lot's test, the standard and the age of the seed.
 *
 * @param up - Seedlings that came up.
 * @param sown - Seeds sown, at least 1.
 * @param yardsticks - What to compare with.
 * @returns The verdict. `lower` and `higher` say that chance alone gives such a number in fewer than one of 40 sowings
 *   of that germination.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for counts that are none, `OUT_OF_RANGE` for a percentage that is none.
 */
export function germinationVerdict(
  up: number,
  sown: number,
  yardsticks: GerminationYardsticks,
): GerminationVerdict {
  return {
    found: germinationShare(up, sown),
    againstLot: compare(up, sown, yardsticks.lotPct),
    againstStandard: compare(up, sown, yardsticks.standardPct),
    age: seedAge(yardsticks),
  };
}

function compare(up: number, sown: number, germinationPct: number | null): Comparison | null {
  if (germinationPct === null) return null;
  const { low, high } = expectedSeedlings(sown, germinationPct);
  if (up < low) return 'lower';
  return up > high ? 'higher' : 'asExpected';
}

/**
 * Judges the age of seed.
 *
 * @param seed - Its age and the life of its crop's seed [years].
 * @returns The judgement; null when either is not known.
 */
export function seedAge({
  ageYears,
  lifeYears,
}: Pick<GerminationYardsticks, 'ageYears' | 'lifeYears'>): SeedAge | null {
  if (ageYears === null || lifeYears === null) return null;
  if (ageYears <= lifeYears.low) return 'withinLife';
  return ageYears <= lifeYears.high ? 'doubtful' : 'pastLife';
}
