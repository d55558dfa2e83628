import type { Photo } from '@shared/contracts/photos';
import type { GerminationTest, SeedLot } from '@shared/contracts/seed';
import type { Crop } from '@shared/growing/crops/crop';
import { germinationOf } from '@shared/growing/germination';
import { germinationShare } from '@shared/growing/seed-expectations';
import {
  ageOfLot,
  expectationOfLot,
  isToUseFirst,
  type LotExpectation,
  type SeedTrial,
} from '@shared/growing/seed-stock';
import type { StoredTest } from './germination-tests-store';
import type { StoredLot } from './seed-store';

/** What a lot is seen with. */
export interface LotSurroundings {
  /** Null for a crop that is known no more. */
  readonly crop: Crop | null;
  /** Newest first. */
  readonly tests: readonly StoredTest[];
  /** What came of its finished sowings. */
  readonly sowings: readonly SeedTrial[];
  /** Newest first. */
  readonly photos: readonly Photo[];
  readonly today: string;
}

/**
 * A lot as the API tells it.
 *
 * @param lot - As stored.
 * @param around - What it is seen with.
 * @returns The view.
 */
export function lotView(lot: StoredLot, around: LotSurroundings): SeedLot {
  const { years, lifeYears, sources, standing } = ageOf(lot, around);
  const useFirst = lot.finishedOn === null && isToUseFirst({ years, lifeYears, sources, standing }, lot.left);
  return {
    ...lot,
    cropName: around.crop?.name ?? lot.cropId,
    seedsLeft: seedsIn(lot, lot.left),
    age: { years, lifeYears, sources: [...sources], standing, useFirst },
    expectation: lotExpectation(around),
    photo: around.photos[0] ?? null,
  };
}

/**
 * A lot in words, for a planting's page.
 *
 * @param lot - Which.
 * @returns Such as “packed 2025, lot 17/4, swap at the village hall”.
 */
export function lotWords({
  packedYear,
  lotNumber,
  source,
}: Pick<StoredLot, 'packedYear' | 'lotNumber' | 'source'>): string {
  const words = [
    packedYear === null ? null : `packed ${packedYear}`,
    lotNumber === '' ? null : `lot ${lotNumber}`,
    source === '' ? null : source,
  ].filter((word) => word !== null);
  return words.length === 0 ? 'a lot of no year or number' : words.join(', ');
}

/** The age of a lot. */
export function ageOf(
  { packedYear }: StoredLot,
  { crop, today }: LotSurroundings,
): ReturnType<typeof ageOfLot> {
  return ageOfLot(packedYear, crop?.seed ?? null, today);
}

/** What germination may be expected of a lot. */
export function lotExpectation({ crop, tests, sowings }: LotSurroundings): LotExpectation | null {
  return expectationOfLot({ test: newestTrial(tests), sowings, seed: crop?.seed ?? null });
}

/**
 * Seeds in an amount of a lot.
 *
 * @param lot - In its unit.
 * @param amount - Of it.
 * @returns Whole seeds; null in grams without seeds a gram.
 */
export function seedsIn({ unit, seedsPerGram }: StoredLot, amount: number): number | null {
  if (unit === 'seeds') return Math.round(amount);
  return seedsPerGram === null ? null : Math.round(amount * seedsPerGram);
}

/**
 * The amount that seeds of a lot make.
 *
 * @param lot - In its unit.
 * @param seeds - How many.
 * @returns In the lot's unit; null in grams without seeds a gram.
 */
export function amountOf({ unit, seedsPerGram }: StoredLot, seeds: number): number | null {
  if (unit === 'seeds') return seeds;
  return seedsPerGram === null ? null : seeds / seedsPerGram;
}

/**
 * A test as the API tells it.
 *
 * @param test - As stored.
 * @returns The view, with what its counts say.
 */
export function testView({ lotId: _, counts, ...test }: StoredTest): GerminationTest {
  const found = germinationOf(test.seeds, counts);
  return {
    ...test,
    counts: [...counts],
    result: counts.length === 0 ? null : germinationShare(found.up, test.seeds),
    meanTimeDays: found.meanTimeDays,
    t50Days: found.t50Days,
  };
}

/**
 * What the newest test with a count found.
 *
 * @param tests - Newest first.
 * @returns Seeds and how many germinated; null without a count.
 */
export function newestTrial(tests: readonly StoredTest[]): SeedTrial | null {
  const test = tests.find(({ counts }) => counts.length > 0);
  return test === undefined ? null : { seeds: test.seeds, up: germinationOf(test.seeds, test.counts).up };
}
