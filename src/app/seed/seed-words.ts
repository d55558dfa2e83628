import type {
  GerminationTest,
  SeedExpectation,
  SeedLot,
  SeedUnit,
  SeedsNeeded,
} from '@shared/contracts/seed';
import { formatNumber, formatValue } from '@shared/format/numbers';

/** A lot by crop and variety: "Leek Winter Piper". */
export function lotTitle({ cropName, variety }: Pick<SeedLot, 'cropName' | 'variety'>): string {
  return [cropName, variety].filter((part) => part !== null).join(' ');
}

/** An amount of seed in its unit: "1 seed", "2.5 g". */
export function amountWords(amount: number, unit: SeedUnit): string {
  if (unit === 'seeds') return amount === 1 ? '1 seed' : `${formatNumber(amount, 0)} seeds`;
  return formatValue(amount, 'g', amount < 10 ? 2 : 1);
}

/** What is left of a lot: "40 seeds left", "2.50 g left, about 900 seeds". */
export function leftWords({ left, unit, seedsLeft }: Pick<SeedLot, 'left' | 'unit' | 'seedsLeft'>): string {
  if (left === 0) return 'none left';
  const seeds = unit === 'grams' && seedsLeft !== null ? `, about ${amountWords(seedsLeft, 'seeds')}` : '';
  return `${amountWords(left, unit)} left${seeds}`;
}

/** Age of a lot against the life of such seed: "packed 2024: 2 years old, such seed keeps 1 to 2 years". */
export function ageWords({ packedYear, age }: Pick<SeedLot, 'packedYear' | 'age'>): string {
  const life = age.lifeYears === null ? 'how long such seed keeps is not known' : lifeWords(age.lifeYears);
  if (packedYear === null || age.years === null) return `packing year not known, ${life}`;
  const old = age.years === 0 ? 'this year’s' : `${yearWords(age.years)} old`;
  return `packed ${packedYear}: ${old}, ${life}`;
}

function lifeWords({ low, high }: { readonly low: number; readonly high: number }): string {
  const span = low === high ? yearWords(low) : `${formatNumber(low, 0)} to ${yearWords(high)}`;
  return `such seed keeps ${span}`;
}

function yearWords(years: number): string {
  return years === 1 ? '1 year' : `${formatNumber(years, Number.isInteger(years) ? 0 : 1)} years`;
}

/** How a lot stands, for its badge; null for one that needs no word. */
export function standingOf({
  finishedOn,
  age,
}: Pick<SeedLot, 'finishedOn' | 'age'>): { readonly text: string; readonly tone: string } | null {
  if (finishedOn !== null) return { text: 'Put aside', tone: 'plain' };
  if (age.standing === 'pastLife') return { text: 'Past its life: test it first', tone: 'ember' };
  if (age.useFirst) return { text: 'Use first', tone: 'lamp' };
  return age.standing === 'doubtful' ? { text: 'Ageing', tone: 'lamp' } : null;
}

/** A share with what it may truly be: "80 % (66 to 90 %)". */
export function shareWords(share: {
  readonly percent: number;
  readonly lowPct: number;
  readonly highPct: number;
}): string {
  const range = `${formatNumber(share.lowPct, 0)} to ${formatValue(share.highPct, '%', 0)}`;
  const isExact = Math.round(share.lowPct) === Math.round(share.highPct);
  return formatValue(share.percent, '%', 0) + (isExact ? '' : ` (${range})`);
}

/** What an expectation rests on, in a few words; whose standard it is stands on the lot's own page. */
export function basisWords({ basis, source }: Pick<SeedExpectation, 'basis' | 'source'>): string {
  return basis === 'standard' ? 'the least for seed on sale' : source;
}

/** Where a test stands: "32 of 40 germinated by day 14", or that nobody has looked yet. */
export function testWords({ seeds, counts }: Pick<GerminationTest, 'seeds' | 'counts'>): string {
  const last = counts.at(-1);
  if (last === undefined) return `${amountWords(seeds, 'seeds')}, not counted yet`;
  return `${last.up} of ${seeds} germinated by day ${last.day}`;
}

/** How many seeds to sow for so many plants, and what comes of them. */
export function neededWords(needed: SeedsNeeded, unit: SeedUnit): string {
  if (needed.seeds === null || needed.expected === null)
    return 'Not even 100 000 seeds would do: hardly any of this lot germinates.';
  const { expected, low, high } = needed.expected;
  const weight = unit === 'grams' && needed.takes !== null ? ` (${amountWords(needed.takes, 'grams')})` : '';
  return `Sow ${amountWords(needed.seeds, 'seeds')}${weight}. About ${formatNumber(expected, 0)} come up; in 95 of 100 sowings ${formatNumber(low, 0)} to ${formatNumber(high, 0)}.`;
}
