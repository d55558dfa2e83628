import { DomainError } from '../errors/domain-error';
import { forEachCoveredSegment } from '../series/covered-segments';
import { meanExcess, shareAtOrAbove } from '../series/linear-segment';
import type { Series, TimeWindow } from '../series/series';

/**
 * How a day's degree days follow from its extremes: `average` floors the day's mean at the base (McMaster & Wilhelm's
 * method 1), `averageOfFloored` brings each extreme within the limits first (their method 2; with 10 and 30 °C the
 * "86/50" of maize), the sines draw the day as one sine wave or as two halves of different waves.
 */
export type DegreeDayMethod = 'average' | 'averageOfFloored' | 'singleSine' | 'doubleSine';

/**
 * What happens over the upper limit: development goes on at the limit's rate (`horizontal`), slows down by as much as the
 * limit is exceeded (`intermediate`), or stops (`vertical`).
 */
export type UpperCutoff = 'horizontal' | 'intermediate' | 'vertical';

/** The temperatures between which a crop develops. */
export interface DegreeDayLimits {
  /** Base temperature [°C], below which nothing develops. */
  readonly baseC: number;
  /** Upper limit [°C], above the base; without one development is never held back. */
  readonly upperC?: number;
  /** Cutoff at the upper limit; `horizontal` unless given. */
  readonly cutoff?: UpperCutoff;
}

/** Extremes of a day and the method to draw a day from them. */
export interface DailyExtremes extends DegreeDayLimits {
  /** Lowest temperature of the day [°C]. */
  readonly minC: number;
  /** Highest temperature of the day [°C]. */
  readonly maxC: number;
  /** Lowest temperature of the next day [°C]; needed by `doubleSine` alone. */
  readonly nextMinC?: number;
  readonly method: DegreeDayMethod;
}

/** Degree days of a window, and how much of it was measured. */
export interface MeasuredDegreeDays {
  /** Degree days of the covered time [°C·d]; gaps add nothing and are not filled. */
  readonly degreeDaysCD: number;
  /** Time that the series speaks for [ms]. */
  readonly coveredMs: number;
}

const DAY_MS = 86_400_000;

/** A day's course of temperature, reduced to what the cutoffs ask of it. */
interface Course {
  /** Mean of `max(0, T − threshold)` [°C]. */
  readonly excessC: (thresholdC: number) => number;
  /** Share of the time at or above a threshold, 0 to 1. */
  readonly shareAbove: (thresholdC: number) => number;
}

/**
 * Degree days of one day from its extremes, for records that hold nothing more.
 *
 * @param day - Extremes [°C], limits and method. The two averages know the horizontal cutoff only.
 * @returns Degree days [°C·d], at least 0. Temperatures in °F give °F·d.
 * @throws {@link DomainError} `INVALID_ARGUMENT` when a minimum exceeds the maximum, a temperature is not finite, the
 *   upper limit does not exceed the base, `doubleSine` lacks the next minimum, or an average is asked for another cutoff.
 *
 * @remarks
 * Reproduces Table 7 of Zalom et al. (1983), University of California Leaflet 21373, to its two decimals, and Table 1 of
 * McMaster & Wilhelm (1997). For the intermediate cutoff a sine is never taken below its vertical result, as the
 * University of California publishes it. Sources: Baskerville & Emin (1969) single sine; Allen (1976) double sine.
 *
 * @example
 * ```ts
 * degreeDaysFromMinMax({ minC: 8, maxC: 22, baseC: 10, method: 'singleSine' }); // 5.33
 * ```
 */
export function degreeDaysFromMinMax(day: DailyExtremes): number {
  requireLimits(day);
  requireExtremes(day.minC, day.maxC);
  const { minC, maxC, baseC, upperC = Infinity } = day;
  switch (day.method) {
    case 'average':
      requireHorizontal(day);
      return Math.max(0, Math.min((minC + maxC) / 2, upperC) - baseC);
    case 'averageOfFloored': {
      requireHorizontal(day);
      const withinLimits = (temperatureC: number): number => Math.min(Math.max(temperatureC, baseC), upperC);
      return (withinLimits(minC) + withinLimits(maxC)) / 2 - baseC;
    }
    case 'singleSine':
      return degreeDaysOfSine(minC, maxC, day);
    case 'doubleSine': {
      const { nextMinC } = day;
      if (nextMinC === undefined) {
        throw new DomainError('INVALID_ARGUMENT', 'doubleSine needs nextMinC');
      }
      requireExtremes(nextMinC, maxC);
      return (degreeDaysOfSine(minC, maxC, day) + degreeDaysOfSine(nextMinC, maxC, day)) / 2;
    }
  }
}

/**
 * Degree days of measured temperatures: the exact integral along the straight lines between readings.
 *
 * @param series - Temperatures [°C], with the neighbours just outside the window where they are known.
 * @param options - Limits; half-open window [ms since epoch]; `maxGapMs`, the longest interval between readings that is
 *   not a gap [ms].
 * @returns Degree days and the time they cover. The day's own course is used, so no method is to be chosen.
 * @throws {@link DomainError} `INVALID_ARGUMENT` for limits or a window that make no sense, `UNORDERED_SERIES` unless
 *   readings are strictly increasing in time.
 *
 * @remarks
 * With the intermediate cutoff the rate falls to 0 at the upper limit plus the width of the range and stays there; a
 * daily formula instead floors the day as a whole, which differs only on days hotter than that.
 */
export function degreeDaysFromSeries(
  series: Series,
  options: DegreeDayLimits & TimeWindow & { readonly maxGapMs: number },
): MeasuredDegreeDays {
  requireLimits(options);
  let degreeMs = 0;
  let coveredMs = 0;
  forEachCoveredSegment(series, options, options.maxGapMs, (fromC, toC, durationMs) => {
    coveredMs += durationMs;
    degreeMs += meanRateOfLineC(fromC, toC, options) * durationMs;
  });
  return { degreeDaysCD: degreeMs / DAY_MS, coveredMs };
}

function meanRateOfLineC(fromC: number, toC: number, limits: DegreeDayLimits): number {
  const { baseC, upperC, cutoff } = limits;
  const line: Course = {
    excessC: (thresholdC) => meanExcess(fromC, toC, thresholdC),
    shareAbove: (thresholdC) => shareAtOrAbove(fromC, toC, thresholdC),
  };
  const rateC = meanRateC(line, limits);
  // The falling rate is 0 from here on; without this it would go negative.
  return upperC !== undefined && cutoff === 'intermediate' ? rateC + line.excessC(2 * upperC - baseC) : rateC;
}

function degreeDaysOfSine(minC: number, maxC: number, limits: DegreeDayLimits): number {
  const sine = sineCourse(minC, maxC);
  const rateC = meanRateC(sine, limits);
  return limits.cutoff === 'intermediate'
    ? Math.max(rateC, meanRateC(sine, { ...limits, cutoff: 'vertical' }))
    : rateC;
}

/** Mean rate of development along a course [°C], by the cutoff's formula. */
function meanRateC(course: Course, { baseC, upperC, cutoff = 'horizontal' }: DegreeDayLimits): number {
  const aboveBaseC = course.excessC(baseC);
  if (upperC === undefined) {
    return aboveBaseC;
  }
  const aboveUpperC = course.excessC(upperC);
  switch (cutoff) {
    case 'horizontal':
      return aboveBaseC - aboveUpperC;
    case 'intermediate':
      return aboveBaseC - 2 * aboveUpperC;
    case 'vertical':
      return aboveBaseC - aboveUpperC - (upperC - baseC) * course.shareAbove(upperC);
  }
}

/** A day as one sine wave from its minimum to its maximum. */
function sineCourse(minC: number, maxC: number): Course {
  const middleC = (minC + maxC) / 2;
  const amplitudeC = (maxC - minC) / 2;
  // Angle, from −π/2 at the minimum to π/2 at the maximum, at which the rising wave passes the threshold.
  const passingAngle = (thresholdC: number): number => Math.asin((thresholdC - middleC) / amplitudeC);
  return {
    excessC: (thresholdC) => {
      if (thresholdC <= minC) {
        return middleC - thresholdC;
      }
      if (thresholdC >= maxC) {
        return 0;
      }
      const angle = passingAngle(thresholdC);
      return ((middleC - thresholdC) * (Math.PI / 2 - angle) + amplitudeC * Math.cos(angle)) / Math.PI;
    },
    shareAbove: (thresholdC) => {
      if (thresholdC <= minC) {
        return 1;
      }
      return thresholdC >= maxC ? 0 : 0.5 - passingAngle(thresholdC) / Math.PI;
    },
  };
}

function requireLimits({ baseC, upperC }: DegreeDayLimits): void {
  const isOrdered = Number.isFinite(baseC) && (upperC === undefined || upperC > baseC);
  if (!isOrdered) {
    throw new DomainError('INVALID_ARGUMENT', 'baseC must be finite and below upperC', {
      baseC,
      upperC: upperC ?? 'none',
    });
  }
}

function requireExtremes(minC: number, maxC: number): void {
  const isOrdered = Number.isFinite(minC) && Number.isFinite(maxC) && minC <= maxC;
  if (!isOrdered) {
    throw new DomainError('INVALID_ARGUMENT', 'a minimum must be finite and not exceed the maximum', {
      minC,
      maxC,
    });
  }
}

function requireHorizontal({ method, cutoff = 'horizontal' }: DailyExtremes): void {
  if (cutoff !== 'horizontal') {
    throw new DomainError('INVALID_ARGUMENT', `${method} knows the horizontal cutoff only`, {
      method,
      cutoff,
    });
  }
}
