import type { SeedFigures } from './crops/crop';
import type { Span } from './crops/figure';
import { seedAge, type SeedAge } from './germination-verdict';
import { germinationShare, type Proportion } from './seed-expectations';

/** Age of a lot against what the sources say of its crop's seed. */
export interface LotAge {
  /** Years since packing; null when the year is not known. */
  readonly years: number | null;
  /** From the shortest to the longest life that a source gives; null when none does. */
  readonly lifeYears: Span | null;
  readonly sources: readonly string[];
  readonly standing: SeedAge | null;
}

/**
 * Judges the age of a lot.
 *
 * @param packedYear - Year on the packet; null when not known.
 * @param seed - Figures of its crop's seed; null for a crop without.
 * @param today - `YYYY-MM-DD`.
 * @returns Its age in calendar years, for packets carry no more than a year.
 */
export function ageOfLot(packedYear: number | null, seed: SeedFigures | null, today: string): LotAge {
  const years = packedYear === null ? null : Math.max(0, Number(today.slice(0, 4)) - packedYear);
  const figures = seed?.lifeYears ?? [];
  const lifeYears =
    figures.length === 0
      ? null
      : {
          low: Math.min(...figures.map(({ value }) => value.low)),
          high: Math.max(...figures.map(({ value }) => value.high)),
        };
  return {
    years,
    lifeYears,
    sources: [...new Set(figures.map(({ source }) => source))],
    standing: seedAge({ ageYears: years, lifeYears }),
  };
}

/**
 * Whether a lot should be sown before younger ones: its last good season by the most cautious source has begun or passed.
 *
 * @param age - Of the lot.
 * @param left - What is left of it, in any unit.
 * @returns False where nothing is left or its age can't be judged.
 */
export function isToUseFirst({ years, lifeYears }: LotAge, left: number): boolean {
  return left > 0 && years !== null && lifeYears !== null && years >= lifeYears.low;
}

/**
 * Orders lots: those to use first, then by the seasons left to them, unjudged ones last.
 *
 * @param one - A lot.
 * @param other - Another.
 * @returns Negative when the one comes first.
 */
export function compareUrgency(one: LotAge, other: LotAge): number {
  const ofOne = seasonsLeft(one);
  const ofOther = seasonsLeft(other);
  return ofOne === ofOther ? 0 : ofOne - ofOther; // Infinity less itself would be no number.
}

function seasonsLeft({ years, lifeYears }: LotAge): number {
  return years === null || lifeYears === null ? Infinity : lifeYears.low - years;
}

/** Seeds tried, and those that came up. */
export interface SeedTrial {
  readonly seeds: number;
  readonly up: number;
}

/** What germination may be expected, and what that rests on. */
export interface LotExpectation extends Proportion {
  readonly basis: 'test' | 'sowings' | 'standard';
  readonly source: string;
}

/**
 * The germination to expect of a lot: by its newest own test, else by all that was sown of it here, else by the standard
 * for seed on sale.
 *
 * @param known - The newest test with a count, the finished sowings, and the figures of the crop's seed.
 * @returns Percent with its 95 % interval; a standard is taken as it stands. Null where nothing is known.
 */
export function expectationOfLot({
  test,
  sowings,
  seed,
}: {
  readonly test: SeedTrial | null;
  readonly sowings: readonly SeedTrial[];
  readonly seed: SeedFigures | null;
}): LotExpectation | null {
  if (test !== null) {
    return {
      ...germinationShare(test.up, test.seeds),
      basis: 'test',
      source: `own test: ${test.up} of ${test.seeds}`,
    };
  }
  const seeds = sowings.reduce((sum, sowing) => sum + sowing.seeds, 0);
  if (seeds > 0) {
    const up = sowings.reduce((sum, sowing) => sum + sowing.up, 0);
    const source = `sown here: ${up} of ${seeds} came up`;
    return { ...germinationShare(up, seeds), basis: 'sowings', source };
  }
  const standard = seed?.minimumGerminationPct ?? null;
  if (standard === null) return null;
  const { value, source } = standard;
  return { percent: value, lowPct: value, highPct: value, basis: 'standard', source };
}
