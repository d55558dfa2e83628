import { degreeDaysFromSeries } from '../climate/degree-days';
import { forEachCoveredSegment } from '../series/covered-segments';
import type { Series, TimeWindow } from '../series/series';
import type { EmergenceAt, SeedFigures } from './crops/crop';
import type { Figure } from './crops/figure';
import type { ThermalTime } from './crops/published/thermal-times';

const DAY_MS = 86_400_000;

/** What a source says of the way from sowing (0) to emergence (1). */
export interface EmergenceSource {
  readonly source: string;
  /** Progress at a steady temperature [1/d]; 0 where nothing germinates. */
  readonly ratePerDay: (temperatureC: number) => number;
  /** Progress over the covered time of a window. */
  readonly progressOver: (series: Series, window: TimeWindow & { readonly maxGapMs: number }) => number;
}

/**
 * The sources of a crop's emergence: thermal times, and the days of a trial.
 *
 * @param seed - Figures of the seed.
 * @returns One for each figure; none for a crop without.
 */
export function emergenceSources(seed: SeedFigures): EmergenceSource[] {
  const trial = seed.emergence === null ? [] : [trialSource(seed.emergence)];
  return [...seed.thermalTimes.map(thermalSource), ...trial];
}

/**
 * A source from a thermal time: degree days above its base over its sum.
 *
 * @param figure - Base, sum and upper limit.
 * @returns The source.
 */
export function thermalSource({ value, source }: Figure<ThermalTime>): EmergenceSource {
  const { baseC, sumCD, upperC } = value;
  const limits = upperC === null ? { baseC } : { baseC, upperC };
  return {
    source,
    ratePerDay: (temperatureC) => Math.max(0, Math.min(temperatureC, upperC ?? Infinity) - baseC) / sumCD,
    progressOver: (series, window) =>
      degreeDaysFromSeries(series, { ...window, ...limits }).degreeDaysCD / sumCD,
  };
}

/**
 * A source from the days of a trial: at every temperature the inverse of its days, with straight lines between those
 * tested.
 *
 * @param figure - Days by temperature, in order.
 * @returns The source. Below the coldest and above the hottest temperature tested nothing is known, so the rate there is 0.
 *
 * @remarks
 * Each line between readings counts at its middle, which is exact to the second order: readings come minutes apart.
 */
export function trialSource({ value, source }: Figure<readonly EmergenceAt[]>): EmergenceSource {
  const ratePerDay = (temperatureC: number): number => rateBetween(value, temperatureC);
  return {
    source,
    ratePerDay,
    progressOver: (series, window) => {
      let progress = 0;
      forEachCoveredSegment(series, window, window.maxGapMs, (fromC, toC, durationMs) => {
        progress += (ratePerDay((fromC + toC) / 2) * durationMs) / DAY_MS;
      });
      return progress;
    },
  };
}

function rateBetween(trial: readonly EmergenceAt[], temperatureC: number): number {
  const above = trial.findIndex((tested) => tested.temperatureC >= temperatureC);
  const warmer = trial[above];
  const cooler = trial[above - 1];
  if (warmer === undefined) return 0;
  if (warmer.temperatureC === temperatureC) return rateOf(warmer);
  if (cooler === undefined) return 0;
  const share = (temperatureC - cooler.temperatureC) / (warmer.temperatureC - cooler.temperatureC);
  return rateOf(cooler) + share * (rateOf(warmer) - rateOf(cooler));
}

function rateOf({ days }: EmergenceAt): number {
  return days === null ? 0 : 1 / days;
}
