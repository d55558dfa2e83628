import type { AboveRangeRule, BelowRangeRule } from '@shared/alerts/alert-rule';
import { patienceDefaults, rangeRules } from '@shared/alerts/alert-defaults';
import type { WantedRange } from '@shared/contracts/rooms';
import { maxGapMs } from '@shared/series/expected-interval';

const MINUTE_MS = 60_000;

/**
 * The rules of a wanted range, for one sensor.
 *
 * @param wanted - The range.
 * @param expectedIntervalS - Of the sensor [s]; readings farther apart don't make one stretch.
 * @returns One rule for each side.
 */
export function rulesOfRange(
  wanted: Omit<WantedRange, 'since' | 'source' | 'reason'>,
  expectedIntervalS: number,
): readonly [AboveRangeRule, BelowRangeRule] {
  const { quantity, holdMinutes, clearingMargin, urgency } = wanted;
  const { above, below } = rangeRules(quantity, wanted, {
    holdMs: holdMinutes * MINUTE_MS,
    clearMargin: clearingMargin,
    urgentBy: urgency.by,
    urgentAfterMs: urgency.afterMinutes === null ? null : urgency.afterMinutes * MINUTE_MS,
    maxGapMs: Math.max(patienceDefaults[quantity].maxGapMs, maxGapMs(expectedIntervalS)),
  });
  return [above, below];
}
