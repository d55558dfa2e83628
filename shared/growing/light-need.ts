import type { ValueRange } from '../series/time-weighted-statistics';
import { formatNumber } from '../format/numbers';

/** Days in a row short of light from which it is no longer the weather or a late start. */
export const SHORT_DAYS_IN_A_ROW = 3;
/** Share of a day that must be measured for its light to count. */
export const LEAST_COVERAGE = 0.8;
/** Output from which on a lamp may be the cause, as tubes come to after their first months; common practice, no source. */
const WORN_OUTPUT = 0.9;

/** Light of one finished day over a planting. */
export interface PlantingLightDay {
  /** Daily light integral [mol m⁻² d⁻¹]; null when nothing was measured. */
  readonly dliMolM2D: number | null;
  /** Covered share of the day, 0 to 1. */
  readonly coverage: number;
  /** Measured hours of light; null when not measured. */
  readonly lightHours: number | null;
}

/** What is known of the lamp over it. */
export interface LampOverPlanting {
  /** Planned hours a day; null when not known. */
  readonly plannedHours: number | null;
  /** Share of its first light that it gives by its hours, 0 to 1; null when not known. */
  readonly output: number | null;
}

/** A planting that lives on too little light. */
export interface LightShortage {
  /** Mean of the short days [mol m⁻² d⁻¹]. */
  readonly meanMolM2D: number;
  /** What is missing to the least wanted [mol m⁻² d⁻¹]. */
  readonly missingMolM2D: number;
  /** Likely causes, as sentences that say what may be. */
  readonly causes: readonly string[];
}

/**
 * Whether a planting has been short of light for three days in a row, and why that may be.
 *
 * @param days - Finished days, oldest first; a day of which less than four fifths were measured tells nothing, so three
 *   days in a row are three that were measured and short.
 * @param wanted - Daily light integral that its crop wants at its stage [mol m⁻² d⁻¹].
 * @param lamp - What is known of the lamp.
 * @returns The shortage; null when there is none, or when the last three days do not show one.
 */
export function lightShortage(
  days: readonly PlantingLightDay[],
  wanted: ValueRange,
  lamp: LampOverPlanting,
): LightShortage | null {
  const least = wanted.low;
  const last = days.slice(-SHORT_DAYS_IN_A_ROW);
  const sums = last.flatMap(({ dliMolM2D, coverage }) =>
    dliMolM2D !== null && coverage >= LEAST_COVERAGE ? [dliMolM2D] : [],
  );
  if (least === null || sums.length < SHORT_DAYS_IN_A_ROW || sums.some((sum) => sum >= least)) return null;
  const meanMolM2D = sums.reduce((total, sum) => total + sum, 0) / sums.length;
  return { meanMolM2D, missingMolM2D: least - meanMolM2D, causes: causesOf(last, least / meanMolM2D, lamp) };
}

function causesOf(
  days: readonly PlantingLightDay[],
  timesTooLittle: number,
  lamp: LampOverPlanting,
): string[] {
  const causes = [
    shortDays(days, lamp.plannedHours),
    wornLamp(lamp.output),
    shortPlan(timesTooLittle, lamp.plannedHours),
  ];
  return [
    ...causes.filter((cause) => cause !== null),
    'The lamp may hang too high, be dirty, or be too weak for this crop.',
  ];
}

function shortDays(days: readonly PlantingLightDay[], plannedHours: number | null): string | null {
  const hours = days.flatMap(({ lightHours }) => (lightHours === null ? [] : [lightHours]));
  const longest = Math.max(...hours);
  return plannedHours !== null && hours.length > 0 && longest < plannedHours - 0.5
    ? `The lamp may not burn as planned: ${formatNumber(longest, 1)} h at most, planned are ${formatNumber(plannedHours, 1)} h.`
    : null;
}

function wornLamp(output: number | null): string | null {
  return output !== null && output <= WORN_OUTPUT
    ? `The lamp may be worn: by its hours it gives ${formatNumber(100 * output, 0)} % of its first light.`
    : null;
}

function shortPlan(timesTooLittle: number, plannedHours: number | null): string | null {
  if (plannedHours === null || plannedHours === 0) return null;
  const neededHours = plannedHours * timesTooLittle;
  return neededHours <= 18
    ? `Its day may be too short: at this strength ${formatNumber(neededHours, 1)} h would do.`
    : null;
}
