import { usualUrgency } from '@shared/alerts/alert-defaults';
import { isTemperature, type Quantity } from '@shared/climate/quantity';
import type { WantedRange } from '@shared/contracts/rooms';
import { shownTemperatureDifference, typedTemperatureC, type TemperatureUnit } from '@shared/format/numbers';
import { quantityDecimals, shownValue } from '@shared/format/quantities';

/** A wanted range as it is typed: numbers in the reader's unit, null where a field is empty. */
export interface TypedRange {
  readonly onLow: number | null;
  readonly onHigh: number | null;
  readonly offLow: number | null;
  readonly offHigh: number | null;
  readonly holdMinutes: number | null;
  readonly clearingMargin: number | null;
  /** How far past a limit is urgent; null never by that. */
  readonly urgentBy: number | null;
  /** After how many hours past a limit it is urgent; null never by that. */
  readonly urgentAfterHours: number | null;
  readonly reason: string;
}

/** What is saved of a range. */
export type SavedRange = Omit<WantedRange, 'quantity' | 'since' | 'source'>;

const longestHoldMinutes = 1440;
const widestMargin = 50;
const longestUrgentAfterHours = 168;

/** Usual for a first range: a quarter of an hour of patience, and a margin above the noise of a good sensor. */
const usualHoldMinutes = 15;
const usualMargin: Readonly<Record<Quantity, number>> = {
  airTemperature: 0.5,
  rootZoneTemperature: 0.5,
  relativeHumidity: 2,
  ppfd: 10,
  illuminance: 500,
  vapourPressureDeficit: 0.05,
  dewPoint: 0.5,
  absoluteHumidity: 0.5,
};

/** The fields of a range, or of a first one for a quantity. */
export function typedRange(
  quantity: Quantity,
  range: WantedRange | null,
  temperatureUnit: TemperatureUnit,
): TypedRange {
  const shown = (limit: number | null | undefined): number | null =>
    limit === null || limit === undefined
      ? null
      : rounded(shownValue(quantity, limit, temperatureUnit), quantityDecimals[quantity]);
  const shownDifference = (difference: number): number =>
    rounded(
      isTemperature(quantity) ? shownTemperatureDifference(difference, temperatureUnit) : difference,
      2,
    );
  const urgency = range?.urgency ?? usualUrgency(quantity);
  return {
    onLow: shown(range?.lampsOn.low),
    onHigh: shown(range?.lampsOn.high),
    offLow: shown(range?.lampsOff.low),
    offHigh: shown(range?.lampsOff.high),
    holdMinutes: range?.holdMinutes ?? usualHoldMinutes,
    clearingMargin: shownDifference(range?.clearingMargin ?? usualMargin[quantity]),
    urgentBy: urgency.by === null ? null : shownDifference(urgency.by),
    urgentAfterHours: urgency.afterMinutes === null ? null : rounded(urgency.afterMinutes / 60, 2),
    reason: range?.reason ?? '',
  };
}

/** What is wrong with the fields, in a sentence; null when they can be saved. */
export function rangeProblem(typed: TypedRange): string | null {
  const { onLow, onHigh, offLow, offHigh, holdMinutes, clearingMargin, urgentBy, urgentAfterHours } = typed;
  if ([onLow, onHigh, offLow, offHigh].every((limit) => limit === null))
    return 'Give at least one limit, or remove the range.';
  if (!isBelow(onLow, onHigh)) return 'With lamps on, the lowest must be below the highest.';
  if (!isBelow(offLow, offHigh)) return 'With lamps off, the lowest must be below the highest.';
  if (holdMinutes === null || holdMinutes < 0 || holdMinutes > longestHoldMinutes)
    return 'The patience is from 0 to 1440 minutes.';
  if (clearingMargin === null || clearingMargin < 0 || clearingMargin > widestMargin)
    return 'The margin is from 0 to 50.';
  if (urgentBy !== null && urgentBy < 0) return 'How far off is urgent can’t be below 0.';
  if (urgentAfterHours !== null && (urgentAfterHours < 0 || urgentAfterHours > longestUrgentAfterHours))
    return 'After how long it is urgent is from 0 to 168 hours, a week.';
  return null;
}

/** The fields in stored units. Only for fields without a {@link rangeProblem}. */
export function savedRange(
  quantity: Quantity,
  typed: TypedRange,
  temperatureUnit: TemperatureUnit,
): SavedRange {
  const isWarmth = isTemperature(quantity);
  const stored = (limit: number | null): number | null =>
    limit === null || !isWarmth ? limit : typedTemperatureC(limit, temperatureUnit);
  // A difference: where the scale begins falls out.
  const storedDifference = (difference: number): number =>
    isWarmth
      ? typedTemperatureC(difference, temperatureUnit) - typedTemperatureC(0, temperatureUnit)
      : difference;
  return {
    lampsOn: { low: stored(typed.onLow), high: stored(typed.onHigh) },
    lampsOff: { low: stored(typed.offLow), high: stored(typed.offHigh) },
    holdMinutes: typed.holdMinutes ?? 0,
    clearingMargin: storedDifference(typed.clearingMargin ?? 0),
    urgency: {
      by: typed.urgentBy === null ? null : storedDifference(typed.urgentBy),
      afterMinutes: typed.urgentAfterHours === null ? null : typed.urgentAfterHours * 60,
    },
    reason: typed.reason.trim(),
  };
}

function isBelow(low: number | null, high: number | null): boolean {
  return low === null || high === null || low < high;
}

function rounded(value: number, decimals: number): number {
  return Number(value.toFixed(decimals));
}
