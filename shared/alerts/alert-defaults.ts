import type { Quantity } from '../climate/quantity';
import { SHORT_DAYS_IN_A_ROW } from '../growing/light-need';
import type {
  AboveRangeRule,
  BelowRangeRule,
  FixedLimitRule,
  LampChange,
  LampRule,
  Patience,
  SilenceRule,
} from './alert-rule';

const minute = 60_000;
const hour = 60 * minute;
/** Days with a change of clocks. */
const [shortestDay, longestDay] = [23 * hour, 25 * hour];

/**
 * Patience with each quantity unless a shelf says otherwise, in stored units.
 *
 * @remarks
 * Common practice, no source: light answers at once, air in some tens of minutes, the root zone in hours; margins are
 * about twice the noise of an ordinary sensor; urgent is what harms seedlings within hours rather than days.
 */
export const patienceDefaults: Readonly<Record<Quantity, Patience & LampChange>> = {
  airTemperature: patience({ holdMin: 15, clearMargin: 0.5, urgentBy: 4, settleMin: 30, rampMin: 60 }),
  rootZoneTemperature: patience({ holdMin: 30, clearMargin: 0.5, urgentBy: 4, settleMin: 60, rampMin: 120 }),
  dewPoint: patience({ holdMin: 30, clearMargin: 0.5, urgentBy: null, settleMin: 30, rampMin: 60 }),
  relativeHumidity: patience({ holdMin: 30, clearMargin: 3, urgentBy: 20, settleMin: 30, rampMin: 60 }),
  vapourPressureDeficit: patience({
    holdMin: 30,
    clearMargin: 0.05,
    urgentBy: 0.8,
    settleMin: 30,
    rampMin: 60,
  }),
  absoluteHumidity: patience({ holdMin: 30, clearMargin: 0.5, urgentBy: null, settleMin: 30, rampMin: 60 }),
  ppfd: patience({ holdMin: 15, clearMargin: 10, urgentBy: null, settleMin: 5, rampMin: 0 }),
  illuminance: patience({ holdMin: 15, clearMargin: 500, urgentBy: null, settleMin: 5, rampMin: 0 }),
};

function patience(of: {
  holdMin: number;
  clearMargin: number;
  urgentBy: number | null;
  settleMin: number;
  rampMin: number;
}): Patience & LampChange {
  return {
    holdMs: of.holdMin * minute,
    clearMargin: of.clearMargin,
    clearHoldMs: 10 * minute,
    maxGapMs: 30 * minute,
    urgentBy: of.urgentBy,
    urgentAfterMs: 6 * hour,
    settleMs: of.settleMin * minute,
    rampMs: of.rampMin * minute,
  };
}

/**
 * From when on an alert of a wanted range is urgent, unless its shelf says otherwise.
 *
 * @param quantity - What the range is about.
 * @returns How far past the limit [stored unit] and after how many minutes; null is never by this.
 */
export function usualUrgency(quantity: Quantity): {
  readonly by: number | null;
  readonly afterMinutes: number | null;
} {
  const { urgentBy, urgentAfterMs } = patienceDefaults[quantity];
  return { by: urgentBy, afterMinutes: urgentAfterMs === null ? null : urgentAfterMs / minute };
}

/** What a shelf wants of a quantity while the lamps are on and while they are off; null is no limit. */
export interface WantedLimits {
  readonly lampsOn: { readonly low: number | null; readonly high: number | null };
  readonly lampsOff: { readonly low: number | null; readonly high: number | null };
}

/**
 * The two rules of a wanted range.
 *
 * @param quantity - The quantity it is about; gives the defaults.
 * @param wanted - Its limits in the stored unit.
 * @param changed - What the shelf has set differently from {@link patienceDefaults}.
 * @returns One rule for each side, also where that side has no limit.
 */
export function rangeRules(
  quantity: Quantity,
  { lampsOn, lampsOff }: WantedLimits,
  changed: Partial<Patience & LampChange> = {},
): { above: AboveRangeRule; below: BelowRangeRule } {
  const patience = { ...patienceDefaults[quantity], ...changed };
  return {
    above: {
      kind: 'aboveRange',
      lampsOn: { high: lampsOn.high },
      lampsOff: { high: lampsOff.high },
      ...patience,
    },
    below: {
      kind: 'belowRange',
      lampsOn: { low: lampsOn.low },
      lampsOff: { low: lampsOff.low },
      ...patience,
    },
  };
}

/** A kind whose limit does not come from a wanted range, with its default rule. */
type StandingRule = FixedLimitRule | LampRule | SilenceRule;

/** Ordinary patience of a fixed limit; each rule below says where it differs. */
const fixed: Patience = {
  holdMs: 15 * minute,
  clearMargin: 0,
  clearHoldMs: 10 * minute,
  maxGapMs: 30 * minute,
  urgentBy: null,
  urgentAfterMs: null,
};
const danger: Patience = { ...fixed, holdMs: 5 * minute, clearMargin: 1, urgentBy: 0 };
const light = { ...fixed, settleMs: 5 * minute, rampMs: 0 };

/**
 * Rules that apply without a wanted range. All limits are common practice without a source unless named.
 *
 * @remarks
 * `dangerLow` and `dangerHigh` [°C] hold for air and root zone whatever is planted. `fastRise` and `fastFall` [°C/h]
 * are 3 °C in a quarter of an hour, which an open window makes; what lamps do to a shelf at their changes is as fast, and
 * is left out of the series. `lampDark` and `lampLit` [µmol m⁻² s⁻¹] suit a PPFD sensor, `sensorsDisagree` [°C] temperatures. `wetHours` [h] is the shorter of the
 * 8 to 12 h of wet leaves that Botrytis needs (University of Massachusetts Extension).
 */
export const standingRules = {
  dangerLow: { kind: 'dangerLow', limit: 2, ...danger },
  dangerHigh: { kind: 'dangerHigh', limit: 38, ...danger },
  fastFall: { kind: 'fastFall', limit: -12, ...fixed, holdMs: 0, clearMargin: 3 },
  fastRise: { kind: 'fastRise', limit: 12, ...fixed, holdMs: 0, clearMargin: 3 },
  lampDark: { kind: 'lampDark', limit: 10, ...light, urgentAfterMs: 4 * hour },
  lampLit: { kind: 'lampLit', limit: 10, ...light, urgentAfterMs: 6 * hour },
  matStuckOn: { kind: 'matStuckOn', limit: 3, ...fixed, holdMs: 2 * hour, clearMargin: 1 },
  condensation: { kind: 'condensation', limit: 0, ...fixed, holdMs: 30 * minute, clearMargin: 0.5 },
  wetHours: { kind: 'wetHours', limit: 8, ...fixed, holdMs: 0, urgentBy: 4 },
  sensorsDisagree: { kind: 'sensorsDisagree', limit: 2, ...fixed, holdMs: hour, clearMargin: 0.5 },
  sensorFailed: { kind: 'sensorFailed', limit: 0.5, ...fixed, holdMs: 0 },
  sensorSilent: { kind: 'sensorSilent', silentAfterMs: 30 * minute, urgentAfterMs: 6 * hour },
  deviceSilent: { kind: 'deviceSilent', silentAfterMs: 15 * minute, urgentAfterMs: 2 * hour },
} as const satisfies Readonly<Record<string, StandingRule>>;

/**
 * The rule for a day's hours of light.
 *
 * @param wanted - Light hours [h] that a day should reach.
 * @returns A rule over `lightDays`: one short day opens it, the next day that reaches it clears it.
 */
export function lightShortRule(wanted: number): FixedLimitRule {
  return { kind: 'lightShort', limit: wanted, ...fixed, holdMs: 0, clearHoldMs: 0 };
}

/**
 * The rule for a day's light sum.
 *
 * @param least - Daily light integral [mol m⁻² d⁻¹] that what grows there should get.
 * @returns A rule over `lightDays`: as many short days in a row as make a planting short of light open it, so that a dull
 *   day does not; the next day that reaches it clears it.
 */
export function lightSumShortRule(least: number): FixedLimitRule {
  const holdMs = (SHORT_DAYS_IN_A_ROW - 2) * 24 * hour + shortestDay;
  return { kind: 'lightSumShort', limit: least, ...fixed, holdMs, clearHoldMs: 0, maxGapMs: longestDay };
}
