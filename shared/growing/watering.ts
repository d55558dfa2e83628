import { median, quantile } from 'simple-statistics';

import { requireInRange } from '../errors/domain-error';
import type { Series, TimeWindow } from '../series/series';
import { timeWeightedStatistics } from '../series/time-weighted-statistics';

const HOUR_MS = 3_600_000;
/** Waterings from which an interval is learned. */
const FEWEST_WATERINGS = 5;

/** How thirsty the air has been. */
export interface Thirst {
  /** Vapour pressure deficit over the covered time [kPa·h]; null where nothing is covered. */
  readonly integralKPaH: number | null;
  /** Covered share of the window, 0 to 1. */
  readonly coverage: number;
}

/** How much a planting stands between waterings. */
export interface WateringInterval {
  /** Median of the past integrals [kPa·h]. */
  readonly medianKPaH: number;
  /** Quarter of the past integrals at most [kPa·h]. */
  readonly lowKPaH: number;
  /** Quarter of the past integrals at least [kPa·h]. */
  readonly highKPaH: number;
  /** Integrals it was learned from. */
  readonly count: number;
}

/**
 * Integral of the vapour pressure deficit since the last watering.
 *
 * @param vpdKPa - Vapour pressure deficit of the shelf's air [kPa], with the neighbours just outside the window where known.
 * @param options - Half-open window [ms since epoch] from the last watering; `maxGapMs`, the longest interval between
 *   readings that is not a gap [ms].
 * @returns The integral of the covered time, not scaled up to the window, and the coverage.
 * @throws {@link DomainError} as {@link timeWeightedStatistics} does.
 *
 * @remarks
 * A pot loses water about in proportion to it; no published coefficient for small pots was found, so each planting
 * learns its own. Growers trigger irrigation by accumulated deficit (interview in a trade journal, 2023).
 */
export function thirstSince(vpdKPa: Series, options: TimeWindow & { readonly maxGapMs: number }): Thirst {
  const { mean, coveredMs, coverage } = timeWeightedStatistics(vpdKPa, options);
  return { integralKPaH: mean === null ? null : (mean * coveredMs) / HOUR_MS, coverage };
}

/**
 * The interval that a planting's own waterings teach.
 *
 * @param pastKPaH - Integrals from each watering to the next [kPa·h], at least 0.
 * @returns Median and quartiles; null for fewer than five.
 * @throws {@link DomainError} `OUT_OF_RANGE` for a negative integral.
 */
export function learnedInterval(pastKPaH: readonly number[]): WateringInterval | null {
  pastKPaH.forEach((integral) => {
    requireInRange('pastKPaH', integral, 0, Number.MAX_VALUE);
  });
  if (pastKPaH.length < FEWEST_WATERINGS) return null;
  const values = [...pastKPaH];
  return {
    medianKPaH: median(values),
    lowKPaH: quantile(values, 0.25),
    highKPaH: quantile(values, 0.75),
    count: values.length,
  };
}

/**
 * Whether a planting is due for water by the air alone; never a substitute for a look and a lift of the pot.
 *
 * @param sinceKPaH - Integral since the last watering [kPa·h].
 * @param interval - What the planting has taught.
 * @returns `soon` from the low quartile, `due` from the median.
 */
export function wateringStanding(sinceKPaH: number, interval: WateringInterval): 'notYet' | 'soon' | 'due' {
  if (sinceKPaH >= interval.medianKPaH) return 'due';
  return sinceKPaH >= interval.lowKPaH ? 'soon' : 'notYet';
}

/**
 * When a planting will be due if the air stays as thirsty as it is.
 *
 * @param sinceKPaH - Integral since the last watering [kPa·h].
 * @param interval - What the planting has taught.
 * @param meanVpdKPa - Mean deficit to go on with [kPa].
 * @returns Hours from now, 0 when due; null while the air takes nothing up.
 */
export function hoursUntilDue(
  sinceKPaH: number,
  interval: WateringInterval,
  meanVpdKPa: number,
): number | null {
  const leftKPaH = Math.max(0, interval.medianKPaH - sinceKPaH);
  if (leftKPaH === 0) return 0;
  return meanVpdKPa > 0 ? leftKPaH / meanVpdKPa : null;
}

/**
 * Share of a pot's available water that is left, by weight.
 *
 * @param weights - Weights of the pot [g]: now, when dry, and at container capacity, which is after a soaking has drained.
 * @returns Share, 0 to 1 for weights in order; outside for a pot drier or wetter than was weighed.
 * @throws {@link DomainError} `OUT_OF_RANGE` unless capacity exceeds dry.
 *
 * @example
 * ```ts
 * waterLeft({ nowG: 640, dryG: 420, capacityG: 820 }); // 0.55
 * ```
 */
export function waterLeft(weights: {
  readonly nowG: number;
  readonly dryG: number;
  readonly capacityG: number;
}): number {
  const availableG = weights.capacityG - weights.dryG;
  requireInRange('availableG', availableG, Number.MIN_VALUE, Number.MAX_VALUE);
  return (weights.nowG - weights.dryG) / availableG;
}
