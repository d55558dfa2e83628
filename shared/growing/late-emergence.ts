import { formatValue } from '../format/numbers';
import type { SeedFigures } from './crops/crop';

/** What is known of a sowing that is late; null where it is not. */
export interface LateSowing {
  readonly seed: SeedFigures;
  /** Mean root-zone temperature since sowing [°C]. */
  readonly meanC: number | null;
  /** Warmest root zone since sowing [°C]. */
  readonly maxC: number | null;
  /** Depth of sowing [mm]. */
  readonly depthMm: number | null;
  /** Age of the seed [years]. */
  readonly ageYears: number | null;
  /** Whether the seed lies in the dark. */
  readonly isDark: boolean | null;
  /** Share of the time since sowing that was measured, 0 to 1. */
  readonly coverage: number;
}

/**
 * Likely causes of a late emergence, most telling first.
 *
 * @param sowing - What is known.
 * @returns Sentences that say what may be; never empty, for the mix may always have been too dry or too wet.
 */
export function likelyCausesOfLateness(sowing: LateSowing): string[] {
  return [
    temperatureCause(sowing),
    ageCause(sowing),
    depthCause(sowing),
    lightCause(sowing),
    sowing.coverage < 0.8
      ? 'The forecast may be off: a fifth or more of the time since sowing was not measured.'
      : null,
    'The mix may have dried out once, or be so wet that the seed rots.',
  ].filter((cause) => cause !== null);
}

function temperatureCause({ seed, meanC, maxC }: LateSowing): string | null {
  const wanted = seed.temperatures[0]?.value;
  if (wanted === undefined) return null;
  if (meanC !== null && meanC < wanted.optimumC.low) {
    return `It may be too cool: ${degrees(meanC)} on average, best is ${degrees(wanted.optimumC.low)} to ${degrees(wanted.optimumC.high)}.`;
  }
  const tooHotC = wanted.maxC ?? wanted.optimumC.high;
  return maxC !== null && maxC > tooHotC
    ? `It may have been too hot: up to ${degrees(maxC)}, and seed fails from ${degrees(tooHotC)}.`
    : null;
}

function ageCause({ seed, ageYears }: LateSowing): string | null {
  if (ageYears === null || seed.lifeYears.length === 0) return null;
  const shortest = Math.min(...seed.lifeYears.map(({ value }) => value.low));
  return ageYears > shortest
    ? `The seed may be too old: ${formatValue(ageYears, 'years', 0)}, and some sources give it ${shortest}.`
    : null;
}

function depthCause({ seed, depthMm }: LateSowing): string | null {
  const deepest = seed.depthMm?.value.high;
  return depthMm !== null && deepest !== undefined && depthMm > 1.5 * deepest
    ? `It may lie too deep: ${formatValue(depthMm, 'mm', 0)}, where ${formatValue(deepest, 'mm', 0)} is enough.`
    : null;
}

function lightCause({ seed, isDark }: LateSowing): string | null {
  const light = seed.light?.value;
  if (isDark === true && (light === 'needed' || light === 'helps')) {
    return 'It may need light: this seed germinates better uncovered and lit.';
  }
  return isDark === false && light === 'darkness'
    ? 'It may need the dark: this seed germinates better covered.'
    : null;
}

function degrees(temperatureC: number): string {
  return formatValue(temperatureC, '°C', 0);
}
