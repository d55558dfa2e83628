import { requireInRange } from '../errors/domain-error';

/** How seed was kept. */
export interface SeedStorage {
  /** Moisture of the seed, share of its fresh weight [%], 5 to 14. */
  readonly moisturePct: number;
  /** Temperature of the store [°C], 0 to 50. */
  readonly temperatureC: number;
}

/** 10 °F. Some copies of the rule round it to 5 or 6 °C. */
const HALVING_STEP_C = 10 / 1.8;

/**
 * How many times longer seed lives in one store than in another, by Harrington's rules of thumb.
 *
 * @param storage - How it is kept.
 * @param reference - What it is compared with.
 * @returns Ratio of the lives, above 1 when `storage` is the better.
 * @throws {@link DomainError} `OUT_OF_RANGE` outside 5–14 % and 0–50 °C, where the rules do not hold.
 *
 * @remarks
 * Each 1 % less moisture and each 10 °F (5.6 °C) cooler doubles the life. Source: Harrington (1959) as extension
 * services quote it; a rule of thumb, not a measurement.
 *
 * @example
 * ```ts
 * seedLifeRatio({ moisturePct: 10, temperatureC: 15 }, { moisturePct: 12, temperatureC: 25 }); // 13.9
 * ```
 */
export function seedLifeRatio(storage: SeedStorage, reference: SeedStorage): number {
  requireStorage(storage);
  requireStorage(reference);
  return (
    2 ** (reference.moisturePct - storage.moisturePct) *
    2 ** ((reference.temperatureC - storage.temperatureC) / HALVING_STEP_C)
  );
}

/**
 * Whether a store is dry and cool enough for seed: °F plus percent humidity at most 100.
 *
 * @param temperatureC - Temperature of the store [°C], −30 to 60.
 * @param relativeHumidityPct - Relative humidity of its air [%], 0 to 100.
 * @returns Whether the rule holds.
 * @throws {@link DomainError} `OUT_OF_RANGE` outside these ranges.
 *
 * @remarks
 * Source: Harrington's rule as extension services quote it.
 */
export function isGoodSeedStore(temperatureC: number, relativeHumidityPct: number): boolean {
  requireInRange('temperatureC', temperatureC, -30, 60);
  requireInRange('relativeHumidityPct', relativeHumidityPct, 0, 100);
  return temperatureC * 1.8 + 32 + relativeHumidityPct <= 100;
}

function requireStorage({ moisturePct, temperatureC }: SeedStorage): void {
  requireInRange('moisturePct', moisturePct, 5, 14);
  requireInRange('temperatureC', temperatureC, 0, 50);
}
