import type { Quantity } from '@shared/climate/quantity';
import type { QuantityStatistics } from '@shared/contracts/series';
import { maxGapMs } from '@shared/series/expected-interval';
import type { Sample } from '@shared/series/series';
import { timeWeightedStatistics } from '@shared/series/time-weighted-statistics';
import type { Span } from './series-service';
import type { Bucket, SensorSpan } from './series-store';
import type { WantedStep } from './wanted-steps';

/**
 * Statistics from readings, exact to the lines between them.
 *
 * @param quantity - What they measure.
 * @param samples - In order.
 * @param span - When [ms].
 * @param steps - The wanted range over the span; none without a range.
 * @param sensor - Whose expected interval says what a gap is.
 * @returns Low, mean and high, and the fraction of the covered time inside the range.
 */
export function statisticsOfSamples(
  quantity: Quantity,
  samples: readonly Sample[],
  span: Span,
  steps: readonly WantedStep[],
  sensor: Pick<SensorSpan, 'expectedIntervalS'>,
): QuantityStatistics {
  const gap = { maxGapMs: maxGapMs(sensor.expectedIntervalS) };
  const whole = timeWeightedStatistics(samples, { ...span, ...gap });
  const parts = steps.map(({ from, to, low, high }) =>
    timeWeightedStatistics(samples, { from, to, ...gap, range: { low, high } }),
  );
  const coveredMs = parts.reduce((sum, part) => sum + part.coveredMs, 0);
  const inRangeMs = parts.reduce((sum, part) => sum + part.inRangeMs, 0);
  return {
    quantity,
    min: whole.min,
    mean: whole.mean,
    max: whole.max,
    inRange: coveredMs === 0 ? null : inRangeMs / coveredMs,
    coverage: whole.coverage,
  };
}

/**
 * Statistics from sums by hour, for long spans. Low, mean and high are exact for whole hours; in an hour that crosses a
 * limit, the time inside is taken as the share of its range of values that lies inside.
 *
 * @param quantity - What they measure.
 * @param hours - In order.
 * @param span - When [ms].
 * @param steps - The wanted range over the span; none without a range.
 * @returns As {@link statisticsOfSamples}.
 */
export function statisticsOfBuckets(
  quantity: Quantity,
  hours: readonly Bucket[],
  span: Span,
  steps: readonly WantedStep[],
): QuantityStatistics {
  let low = Infinity;
  let high = -Infinity;
  let integral = 0;
  let coveredMs = 0;
  let rangedMs = 0;
  let inRangeMs = 0;
  let step = 0;
  for (const hour of hours) {
    integral += hour.integral;
    coveredMs += hour.coveredMs;
    if (hour.min === null || hour.max === null) continue;
    low = Math.min(low, hour.min);
    high = Math.max(high, hour.max);
    while (step < steps.length - 1 && (steps[step]?.to ?? Infinity) <= hour.start) step += 1;
    const wanted = steps[step];
    if (wanted === undefined) continue;
    rangedMs += hour.coveredMs;
    inRangeMs += hour.coveredMs * shareInside(hour.min, hour.max, wanted);
  }
  return {
    quantity,
    min: Number.isFinite(low) ? low : null,
    mean: coveredMs === 0 ? null : integral / coveredMs,
    max: Number.isFinite(high) ? high : null,
    inRange: rangedMs === 0 ? null : inRangeMs / rangedMs,
    coverage: Math.min(1, coveredMs / (span.to - span.from)),
  };
}

function shareInside(min: number, max: number, { low, high }: WantedStep): number {
  const from = Math.max(min, low ?? -Infinity);
  const to = Math.min(max, high ?? Infinity);
  if (max === min) return from <= to ? 1 : 0;
  return Math.max(0, to - from) / (max - min);
}
