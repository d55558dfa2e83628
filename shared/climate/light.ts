import { requireInRange } from '../errors/domain-error';
import type { Series, TimeWindow } from '../series/series';
import { timeWeightedStatistics } from '../series/time-weighted-statistics';

/** Kinds of lamp, and the two skies, for which a factor between lux and PPFD is known. */
export type LampKind =
  | 'whiteLed'
  | 'fluorescent'
  | 'highPressureSodium'
  | 'highPressureSodiumDoubleEnded'
  | 'metalHalide'
  | 'ceramicMetalHalide4200K'
  | 'ceramicMetalHalide3100K'
  | 'incandescent'
  | 'sunlight'
  | 'blueSky';

/** How many lux go with one unit of PPFD, and who says so. */
export interface LampLight {
  /** Illuminance per photon flux density [lx per µmol m⁻² s⁻¹]. */
  readonly luxPerUmol: number;
  readonly source: string;
}

const THIMIJAN_HEINS =
  'Thimijan & Heins (1983), HortScience 18:818–822, as reproduced by a maker of quantum sensors';
const FROM_MEMORY =
  'from memory: phosphor white LEDs of 3000–6500 K lie near 65–72; replace by a measurement of the lamp itself';

/**
 * Factors between illuminance and PPFD by kind of lamp. A starting value for a lamp, which keeps a factor of its own.
 *
 * @remarks
 * The sensor maker's sunlight table misprints 200 µmol m⁻² s⁻¹ as 40,800 lx; by its own factor it is 10,800 lx.
 */
export const lampKinds: Readonly<Record<LampKind, LampLight>> = {
  whiteLed: { luxPerUmol: 68, source: FROM_MEMORY },
  fluorescent: { luxPerUmol: 74, source: THIMIJAN_HEINS },
  highPressureSodium: { luxPerUmol: 82, source: THIMIJAN_HEINS },
  highPressureSodiumDoubleEnded: { luxPerUmol: 77, source: THIMIJAN_HEINS },
  metalHalide: { luxPerUmol: 71, source: THIMIJAN_HEINS },
  ceramicMetalHalide4200K: { luxPerUmol: 65, source: THIMIJAN_HEINS },
  ceramicMetalHalide3100K: { luxPerUmol: 59, source: THIMIJAN_HEINS },
  incandescent: { luxPerUmol: 50, source: THIMIJAN_HEINS },
  sunlight: { luxPerUmol: 54, source: THIMIJAN_HEINS },
  blueSky: { luxPerUmol: 52, source: THIMIJAN_HEINS },
};

const SECONDS_PER_HOUR = 3600;
const UMOL_PER_MOL = 1e6;
const MS_PER_SECOND = 1000;

/** A light sum and how much of the day it was measured over. */
export interface MeasuredLight {
  /** Photons received during the covered time [mol m⁻²]; `null` where nothing is covered. */
  readonly lightIntegralMolM2: number | null;
  /** Covered share of the window, 0 to 1. */
  readonly coverage: number;
}

/** Hours of light and how much of the day they were measured over. */
export interface MeasuredLightTime {
  /** Covered time at or above the threshold [s]; `null` where nothing is covered. */
  readonly lightSeconds: number | null;
  /** Covered share of the window, 0 to 1. */
  readonly coverage: number;
}

/**
 * Light sum of measured PPFD: integrated over time, with straight lines between readings.
 *
 * @param series - PPFD [µmol m⁻² s⁻¹], with the neighbours just outside the window where they are known.
 * @param options - Half-open window [ms since epoch]: the room's calendar day makes it a daily light integral; and
 *   `maxGapMs`, the longest interval between readings that is not a gap [ms].
 * @returns The sum of the covered time, not scaled up to the window, and the coverage.
 * @throws {@link DomainError} as {@link timeWeightedStatistics} does.
 */
export function dailyLightIntegralMolM2(
  series: Series,
  options: TimeWindow & { readonly maxGapMs: number },
): MeasuredLight {
  const { mean, coveredMs, coverage } = timeWeightedStatistics(series, options);
  const lightIntegralMolM2 = mean === null ? null : (mean * coveredMs) / MS_PER_SECOND / UMOL_PER_MOL;
  return { lightIntegralMolM2, coverage };
}

/**
 * Daily light integral under a lamp of constant output.
 *
 * @param ppfdUmolM2S - PPFD [µmol m⁻² s⁻¹], 0 to 5000.
 * @param hours - Hours of light a day, 0 to 24.
 * @returns Daily light integral [mol m⁻² d⁻¹].
 * @throws {@link DomainError} `OUT_OF_RANGE` outside these ranges.
 *
 * @example
 * ```ts
 * dliFromConstantPpfdMolM2D(200, 16); // 11.52
 * ```
 */
export function dliFromConstantPpfdMolM2D(ppfdUmolM2S: number, hours: number): number {
  requireInRange('ppfdUmolM2S', ppfdUmolM2S, 0, 5000);
  requireInRange('hours', hours, 0, 24);
  return (ppfdUmolM2S * hours * SECONDS_PER_HOUR) / UMOL_PER_MOL;
}

/**
 * PPFD from a lux meter under a lamp of known kind.
 *
 * @param illuminanceLx - Illuminance [lx], 0 to 400 000.
 * @param luxPerUmol - The lamp's factor [lx per µmol m⁻² s⁻¹], 10 to 200; see {@link lampKinds}.
 * @returns PPFD [µmol m⁻² s⁻¹].
 * @throws {@link DomainError} `OUT_OF_RANGE` outside these ranges.
 *
 * @remarks
 * As good as the factor: lux weighs light as eyes do, so a wrong kind of lamp is wrong by up to half.
 */
export function ppfdFromIlluminanceUmolM2S(illuminanceLx: number, luxPerUmol: number): number {
  requireInRange('illuminanceLx', illuminanceLx, 0, 400_000);
  requireInRange('luxPerUmol', luxPerUmol, 10, 200);
  return illuminanceLx / luxPerUmol;
}

/**
 * Time with light, as the sensor saw it.
 *
 * @param series - PPFD [µmol m⁻² s⁻¹] or illuminance [lx], with the neighbours just outside the window where known.
 * @param options - Half-open window and `maxGapMs` as for {@link dailyLightIntegralMolM2}; `threshold`, the reading from
 *   which light counts as on, in the unit of the series.
 * @returns Time at or above the threshold and the coverage.
 * @throws {@link DomainError} as {@link timeWeightedStatistics} does.
 */
export function lightSeconds(
  series: Series,
  options: TimeWindow & { readonly maxGapMs: number; readonly threshold: number },
): MeasuredLightTime {
  const { inRangeMs, coveredMs, coverage } = timeWeightedStatistics(series, {
    ...options,
    range: { low: options.threshold, high: null },
  });
  return { lightSeconds: coveredMs === 0 ? null : inRangeMs / MS_PER_SECOND, coverage };
}
