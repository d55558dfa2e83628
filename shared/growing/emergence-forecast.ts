import { forEachCoveredSegment } from '../series/covered-segments';
import type { Series } from '../series/series';
import { timeWeightedStatistics } from '../series/time-weighted-statistics';
import type { SeedFigures } from './crops/crop';
import { emergenceSources, thermalSource, type EmergenceSource } from './emergence-sources';

const DAY_MS = 86_400_000;
/** How far back the weather to go on with is taken from. */
const OUTLOOK_MS = 72 * 3_600_000;
/** A room's own emergences from which they narrow the forecast. */
const FEWEST_OWN = 3;
/** Beyond this many days a forecast says nothing. */
const LONGEST_DAYS = 365;
/** Base temperature for a room's own sums where no source has one [°C]. */
const FALLBACK_BASE_C = 5;

/** A sowing that waits. */
export interface WaitingSowing {
  readonly seed: SeedFigures;
  /** Instant of sowing [ms since epoch]. */
  readonly sownAt: number;
  /** Instant of the forecast [ms since epoch], after sowing. */
  readonly now: number;
  /** Root-zone temperature of the shelf, else its air [°C], since sowing. */
  readonly temperature: Series;
  /** Longest interval between readings that is not a gap [ms]. */
  readonly maxGapMs: number;
  /** Thermal time of the room's own past emergences of the crop [°C·d], each by {@link ownThermalTime}. */
  readonly ownSumsCD: readonly number[];
}

/** When one source expects the first seedlings. */
export interface SourceForecast {
  readonly source: string;
  /** [ms since epoch]; null when it never comes at this temperature. */
  readonly at: number | null;
}

/** When to look for the first seedlings. */
export interface EmergenceForecast {
  /** Earliest and latest [ms since epoch] with whom they are from; null when no source expects any. */
  readonly earliest: SourceForecast | null;
  readonly latest: SourceForecast | null;
  /** Every published source, those that never expect any included. */
  readonly published: readonly SourceForecast[];
  /** Whether the room's own past emergences set the range. */
  readonly basis: 'published' | 'room';
  /** Temperature gone on with [°C]: the mean of the last 72 h; null when nothing was measured in them. */
  readonly outlookC: number | null;
  /** Share of the time since sowing that was measured, 0 to 1. Gaps count at the temperature gone on with. */
  readonly coverage: number;
  /** The latest expectation has passed. */
  readonly isLate: boolean;
}

/**
 * Forecasts emergence from the warmth since sowing and, from now on, the mean of the last 72 hours.
 *
 * @param sowing - The sowing, its seed and its temperatures.
 * @returns A range from the sources that disagree, or from the room's own past emergences once there are three. Without
 *   readings in the last 72 hours nothing is expected.
 * @throws {@link DomainError} `INVALID_ARGUMENT` unless sowing precedes now, `UNORDERED_SERIES` as series do.
 *
 * @remarks
 * Published sums differ up to threefold (onion: 80 °C·d on paper, 219 in soil from memory), for first, half or normal
 * seedlings, on paper or under soil: the range is honest about that and no more exact than it looks.
 */
export function forecastEmergence(sowing: WaitingSowing): EmergenceForecast {
  const { sownAt, now, temperature, maxGapMs, seed, ownSumsCD } = sowing;
  const sinceSowing = timeWeightedStatistics(temperature, { from: sownAt, to: now, maxGapMs });
  const outlookC = timeWeightedStatistics(temperature, {
    from: Math.max(sownAt, now - OUTLOOK_MS),
    to: now,
    maxGapMs,
  }).mean;
  const expect = (source: EmergenceSource): SourceForecast => ({
    source: source.source,
    at: outlookC === null ? null : emergenceAt(source, sowing, outlookC),
  });
  const published = emergenceSources(seed).map(expect);
  const own = ownSumsCD.length < FEWEST_OWN ? [] : ownSources(seed, ownSumsCD).map(expect);
  const isOwn = own.length > 0;
  const [earliest, latest] = endsOf(isOwn ? own : published);
  return {
    earliest,
    latest,
    published,
    basis: isOwn ? 'room' : 'published',
    outlookC,
    coverage: sinceSowing.coverage,
    isLate: latest !== null && latest.at !== null && latest.at < now,
  };
}

/**
 * Thermal time that a past sowing took to come up in this room, to narrow later forecasts with.
 *
 * @param seed - Figures of the seed, whose first thermal time has the base.
 * @param past - Instants of sowing and emergence and the temperatures between them.
 * @returns Sum [°C·d]; null unless nine tenths of the time were measured. Gaps count at the mean of the rest.
 * @throws {@link DomainError} as {@link forecastEmergence} does.
 */
export function ownThermalTime(
  seed: SeedFigures,
  past: {
    readonly sownAt: number;
    readonly upAt: number;
    readonly temperature: Series;
    readonly maxGapMs: number;
  },
): number | null {
  const window = { from: past.sownAt, to: past.upAt, maxGapMs: past.maxGapMs };
  const { coverage } = timeWeightedStatistics(past.temperature, window);
  if (coverage < 0.9) return null;
  return ownSource(seed, 1, '').progressOver(past.temperature, window) / coverage;
}

function ownSources(seed: SeedFigures, sumsCD: readonly number[]): EmergenceSource[] {
  const words = `this room’s own ${sumsCD.length} past emergences`;
  return [Math.min(...sumsCD), Math.max(...sumsCD)].map((sumCD) => ownSource(seed, sumCD, words));
}

function ownSource(seed: SeedFigures, sumCD: number, source: string): EmergenceSource {
  const baseC = seed.thermalTimes[0]?.value.baseC ?? seed.temperatures[0]?.value.minC ?? FALLBACK_BASE_C;
  const upperC = seed.thermalTimes[0]?.value.upperC ?? null;
  return thermalSource({ value: { baseC, sumCD, upperC }, source });
}

function emergenceAt(source: EmergenceSource, sowing: WaitingSowing, outlookC: number): number | null {
  const { now } = sowing;
  const ratePerDay = source.ratePerDay(outlookC);
  const left = 1 - progressUntil(source, sowing, now, ratePerDay);
  if (left <= 0) return passedAt(source, sowing, ratePerDay);
  const daysLeft = left / ratePerDay;
  return daysLeft <= LONGEST_DAYS ? now + daysLeft * DAY_MS : null;
}

/** Progress from sowing to an instant; what was not measured counts at the rate gone on with. */
function progressUntil(
  source: EmergenceSource,
  { sownAt, temperature, maxGapMs }: WaitingSowing,
  until: number,
  ratePerDay: number,
): number {
  const window = { from: sownAt, to: until, maxGapMs };
  let coveredMs = 0;
  forEachCoveredSegment(temperature, window, maxGapMs, (_from, _to, durationMs) => {
    coveredMs += durationMs;
  });
  const gapDays = (until - sownAt - coveredMs) / DAY_MS;
  return source.progressOver(temperature, window) + gapDays * ratePerDay;
}

/** The instant at which a source's emergence was due, to the minute; progress never falls, so halving finds it. */
function passedAt(source: EmergenceSource, sowing: WaitingSowing, ratePerDay: number): number {
  let before = sowing.sownAt;
  let after = sowing.now;
  while (after - before > 60_000) {
    const middle = (before + after) / 2;
    if (progressUntil(source, sowing, middle, ratePerDay) >= 1) after = middle;
    else before = middle;
  }
  return after;
}

function endsOf(
  forecasts: readonly SourceForecast[],
): readonly [SourceForecast | null, SourceForecast | null] {
  const expected = forecasts
    .flatMap((one) => (one.at === null ? [] : [{ ...one, at: one.at }]))
    .sort((one, other) => one.at - other.at);
  return [expected[0] ?? null, expected.at(-1) ?? null];
}
