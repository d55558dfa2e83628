import type { LampKind } from '../climate/light';
import { DomainError, requireInRange } from '../errors/domain-error';
import { dayAfter } from './calendar-day';
import { COMMON_PRACTICE, type Figure } from './crops/figure';

/** Hours until an LED gives a share of its first light, as its maker states them; null where not stated. */
export interface LedLife {
  /** Hours to 90 %. */
  readonly l90Hours: number | null;
  /** Hours to 70 %. */
  readonly l70Hours: number | null;
}

/** The exponential fall of an LED's light, `b·exp(−α·t)`. */
export interface LedDecay {
  /** Share at the start of the fit, about 1. */
  readonly b: number;
  /** Rate [1/h]. */
  readonly alphaPerHour: number;
}

/** Days after which fluorescent tubes are replaced. */
const TUBE_LIFE_DAYS = 365;

/**
 * The fall of an LED's light from the hours its maker states.
 *
 * @param life - L70 and L90 [h], L90 the shorter.
 * @returns Through both points where both are stated, else through the one from full light when new; null for neither.
 * @throws {@link DomainError} `INVALID_ARGUMENT` unless hours are above 0 and L90 comes before L70.
 *
 * @remarks
 * Form of IES TM-21 (from memory; its definitions of L70 and L90 and the limit below were read).
 */
export function ledDecay({ l70Hours, l90Hours }: LedLife): LedDecay | null {
  const isOrdered = [l70Hours, l90Hours].every((hours) => hours === null || hours > 0);
  if (!isOrdered || (l70Hours !== null && l90Hours !== null && l90Hours >= l70Hours)) {
    throw new DomainError('INVALID_ARGUMENT', 'L90 must come after 0 and before L70', {
      l90Hours: l90Hours ?? 'none',
      l70Hours: l70Hours ?? 'none',
    });
  }
  if (l70Hours !== null && l90Hours !== null) {
    const alphaPerHour = Math.log(0.9 / 0.7) / (l70Hours - l90Hours);
    return { b: 0.9 * Math.exp(alphaPerHour * l90Hours), alphaPerHour };
  }
  if (l70Hours !== null) return { b: 1, alphaPerHour: Math.log(1 / 0.7) / l70Hours };
  return l90Hours === null ? null : { b: 1, alphaPerHour: Math.log(1 / 0.9) / l90Hours };
}

/**
 * Share of its first light that an LED gives.
 *
 * @param decay - See {@link ledDecay}.
 * @param hours - Hours run, at least 0.
 * @returns Share, at most 1.
 * @throws {@link DomainError} `OUT_OF_RANGE` for negative hours.
 */
export function ledOutput({ b, alphaPerHour }: LedDecay, hours: number): number {
  requireInRange('hours', hours, 0, Number.MAX_VALUE);
  return Math.min(1, b * Math.exp(-alphaPerHour * hours));
}

/**
 * Hours until an LED gives a share of its first light.
 *
 * @param decay - See {@link ledDecay}.
 * @param percent - Share [%], above 0, at most 100.
 * @returns `ln(100·b/p)/α` [h], at least 0.
 * @throws {@link DomainError} `OUT_OF_RANGE` for another share.
 *
 * @example
 * ```ts
 * ledHoursTo({ b: 1, alphaPerHour: 5.095e-6 }, 70); // 70 005
 * ```
 */
export function ledHoursTo({ b, alphaPerHour }: LedDecay, percent: number): number {
  requireInRange('percent', percent, Number.MIN_VALUE, 100);
  return Math.max(0, Math.log((100 * b) / percent) / alphaPerHour);
}

/**
 * Longest life that a test of LEDs may be projected to: six times its own length (IES TM-21).
 *
 * @param testHours - Length of the test [h].
 * @returns Hours.
 */
export function longestProjectionHours(testHours: number): number {
  return 6 * testHours;
}

/** A lamp as far as its wear goes. */
export interface WearingLamp extends LedLife {
  readonly kind: LampKind;
  /** `YYYY-MM-DD` */
  readonly fittedOn: string;
  /** Measured light hours since [h]. */
  readonly hoursRun: number;
}

/**
 * Share of its first light that a lamp gives by its hours.
 *
 * @param lamp - The lamp.
 * @returns Share and source; null for kinds and lives for which no figure was found.
 *
 * @remarks
 * Fluorescent: T5 tubes keep more than 95 % at 8000 h (Lighting Research Center 2002); other tri-phosphor tubes are said
 * to lose about 10 % in the first 1000 h and then to stay near 90 % (a lighting consultant in a hobby forum, weak). The lower
 * one stands.
 */
export function lampOutput(lamp: WearingLamp): Figure<number> | null {
  if (lamp.kind === 'whiteLed') {
    const decay = ledDecay(lamp);
    return (
      decay && { value: ledOutput(decay, lamp.hoursRun), source: 'the lamp’s stated L70 or L90, IES TM-21' }
    );
  }
  if (lamp.kind !== 'fluorescent') return null;
  return {
    value: 1 - 0.1 * Math.min(1, lamp.hoursRun / 1000),
    source: 'a lighting consultant on tri-phosphor tubes (weak); T5 keep more, Lighting Research Center 2002',
  };
}

/**
 * When a lamp is due for replacement.
 *
 * @param lamp - The lamp.
 * @param hoursPerDay - Light hours a day to go on with, 0 to 24.
 * @param today - `YYYY-MM-DD`.
 * @returns The day and its source: a year after fitting for fluorescent tubes, the stated L70 (else L90) hours for LEDs;
 *   null for other kinds, for LEDs without stated hours, and for LEDs that never burn.
 * @throws {@link DomainError} `OUT_OF_RANGE` for hours that are none, `INVALID_ARGUMENT` for dates that are none.
 */
export function lampDueOn(lamp: WearingLamp, hoursPerDay: number, today: string): Figure<string> | null {
  requireInRange('hoursPerDay', hoursPerDay, 0, 24);
  if (lamp.kind === 'fluorescent') {
    return { value: dayAfter(lamp.fittedOn, TUBE_LIFE_DAYS), source: COMMON_PRACTICE };
  }
  const lifeHours = lamp.kind === 'whiteLed' ? (lamp.l70Hours ?? lamp.l90Hours) : null;
  if (lifeHours === null || hoursPerDay === 0) return null;
  const daysLeft = Math.max(0, lifeHours - lamp.hoursRun) / hoursPerDay;
  return { value: dayAfter(today, Math.floor(daysLeft)), source: 'the lamp’s stated hours' };
}

/**
 * Electrical energy of a lamp.
 *
 * @param watts - Power [W], at least 0.
 * @param hours - Hours run, at least 0.
 * @returns Energy [kWh].
 * @throws {@link DomainError} `OUT_OF_RANGE` for negative values.
 */
export function lampEnergyKWh(watts: number, hours: number): number {
  requireInRange('watts', watts, 0, Number.MAX_VALUE);
  requireInRange('hours', hours, 0, Number.MAX_VALUE);
  return (watts * hours) / 1000;
}
