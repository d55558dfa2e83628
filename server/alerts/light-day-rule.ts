import { lightShortRule } from '@shared/alerts/alert-defaults';
import type { FixedLimitRule } from '@shared/alerts/alert-rule';
import type { LampInterval } from '@shared/alerts/lamp-plan';

/** Share of a day's planned light below which the day was short. Common practice, no source. */
const ENOUGH_OF_PLAN = 0.9;

const HOUR_MS = 3_600_000;

/**
 * The rule for one day's hours of light.
 *
 * @param planned - Stretches of planned light, in order.
 * @param day - The room's day [ms], half-open.
 * @returns Nine tenths of the hours planned within the day; none on a day without a plan, so that any light is enough.
 */
export function ruleOfDay(
  planned: readonly LampInterval[],
  day: { readonly startAt: number; readonly endAt: number },
): FixedLimitRule {
  const plannedMs = planned.reduce(
    (sum, { onAt, offAt }) => sum + Math.max(0, Math.min(offAt, day.endAt) - Math.max(onAt, day.startAt)),
    0,
  );
  return lightShortRule((ENOUGH_OF_PLAN * plannedMs) / HOUR_MS);
}
