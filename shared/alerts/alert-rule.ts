/** Kinds that compare a series with an upper limit. */
export const aboveKinds = [
  'aboveRange',
  'fastRise',
  'lampLit',
  'matStuckOn',
  'condensation',
  'wetHours',
  'sensorsDisagree',
  'sensorFailed',
  'dangerHigh',
] as const;
/** Kinds that compare a series with a lower limit. */
export const belowKinds = [
  'belowRange',
  'fastFall',
  'lampDark',
  'lightShort',
  'lightSumShort',
  'dangerLow',
] as const;
/** Kinds that watch for readings that don't come. */
export const silenceKinds = ['sensorSilent', 'deviceSilent'] as const;
/** Kinds that rest on several sensors of a shelf. */
export const joinedKinds = [
  'sensorsDisagree',
  'matStuckOn',
  'condensation',
  'wetHours',
] as const satisfies readonly AlertKind[];
/** Everything an alert can be about. */
export const alertKinds = [...aboveKinds, ...belowKinds, ...silenceKinds] as const;
/** How soon someone should go to the shelf, the calmer first. */
export const urgencies = ['lookToday', 'goNow'] as const;

/** A kind that compares a series with an upper limit. */
export type AboveKind = (typeof aboveKinds)[number];
/** A kind that compares a series with a lower limit. */
export type BelowKind = (typeof belowKinds)[number];
/** A kind that watches for readings that don't come. */
export type SilenceKind = (typeof silenceKinds)[number];
/** What an alert can be about. */
export type AlertKind = (typeof alertKinds)[number];
/** How soon someone should go to the shelf. */
export type Urgency = (typeof urgencies)[number];

/** How long and how far past a limit a series must be, and how surely back, for an alert to open and to clear. */
export interface Patience {
  /** Time past the limit, from the first such reading, before the alert opens [ms]; 0 opens on that reading. */
  readonly holdMs: number;
  /** How far inside the limit counts as over, in the unit of the series; keeps noise from reopening. */
  readonly clearMargin: number;
  /** Time inside by that margin before the alert clears [ms]. */
  readonly clearHoldMs: number;
  /** Readings farther apart than this don't make one stretch [ms]. */
  readonly maxGapMs: number;
  /** Excess from which it is urgent, in the unit of the series; 0 is urgent at once, null never by excess. */
  readonly urgentBy: number | null;
  /** Time past the limit from which it is urgent [ms]; null never by time. */
  readonly urgentAfterMs: number | null;
}

/** How a limit follows the lamps; see `limitLine`. */
export interface LampChange {
  /** Time after a change of the lamps during which the looser of both limits stays [ms]. */
  readonly settleMs: number;
  /** Time after that in which the limit moves evenly to the tighter one [ms]. */
  readonly rampMs: number;
}

/** Above the wanted range of a quantity; null means no upper limit. */
export interface AboveRangeRule extends Patience, LampChange {
  readonly kind: 'aboveRange';
  readonly lampsOn: { readonly high: number | null };
  readonly lampsOff: { readonly high: number | null };
}

/** Below the wanted range of a quantity; null means no lower limit. */
export interface BelowRangeRule extends Patience, LampChange {
  readonly kind: 'belowRange';
  readonly lampsOn: { readonly low: number | null };
  readonly lampsOff: { readonly low: number | null };
}

/** Less light than `limit` while the lamps should be on, or more while they should be off [unit of the light sensor]. */
export interface LampRule extends Patience, LampChange {
  readonly kind: 'lampDark' | 'lampLit';
  readonly limit: number;
}

/** One limit at all hours, for a measured quantity (danger) or a series of `derived-series.ts`. */
export interface FixedLimitRule extends Patience {
  readonly kind: Exclude<AboveKind | BelowKind, 'aboveRange' | 'belowRange' | 'lampDark' | 'lampLit'>;
  readonly limit: number;
}

/** Any rule that compares a series with a limit. */
export type LimitRule = AboveRangeRule | BelowRangeRule | LampRule | FixedLimitRule;

/** No reading for longer than `silentAfterMs`. */
export interface SilenceRule {
  readonly kind: SilenceKind;
  /** Longest ordinary time between readings [ms]. */
  readonly silentAfterMs: number;
  /** Time since the last reading from which it is urgent [ms]; null never. */
  readonly urgentAfterMs: number | null;
}

/** A rule as stored and sent: plain JSON, told apart by `kind`. */
export type AlertRule = LimitRule | SilenceRule;

/**
 * Tells rules about missing readings from rules about limits.
 *
 * @param rule - Any rule.
 * @returns Whether it is a {@link SilenceRule}.
 */
export function isSilenceRule(rule: AlertRule): rule is SilenceRule {
  return (silenceKinds as readonly AlertKind[]).includes(rule.kind);
}

/**
 * The side of its limit on which a kind is broken.
 *
 * @param kind - Kind of a limit rule.
 * @returns 1 when too high is wrong, -1 when too low is, so that `side * (value - limit)` is the excess.
 */
export function brokenSide(kind: AboveKind | BelowKind): 1 | -1 {
  return (belowKinds as readonly AlertKind[]).includes(kind) ? -1 : 1;
}
