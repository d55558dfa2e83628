import type { MeasuredQuantity } from '@shared/climate/quantity';
import type { SimulatedSensor } from '@shared/contracts/simulation';
import { gaussianAt, hashOfName, mix32, smoothNoiseAt, uniformAt } from '../room/random';
import type { ShelfClimate } from '../room/room-model';
import { fullDrift, type SensorEffect } from '../scenarios/catalogue';

const DAY_MS = 86_400_000;
const OUTAGE_MS = 20 * 60_000;
const SHARE_OF_READINGS_LOST = 0.002;
const SHARE_OF_OUTAGES = 1 / 500;
/** The time from one height of a sensor's slow wandering to the next. */
const WANDERING_DAYS = 25;

interface Instrument {
  /** Standard deviation of one reading, in the quantity's unit or, for light, as a share of the reading. */
  readonly noise: number;
  /** The step in which readings come. */
  readonly resolution: number;
  /** Farthest that the sensor wanders over weeks, as `noise`. */
  readonly wandering: number;
  readonly low: number;
  readonly high: number;
  readonly isRelative: boolean;
}

// What inexpensive sensors do; from memory, no source.
const instruments: Readonly<Record<MeasuredQuantity, Instrument>> = {
  airTemperature: instrument(0.05, 0.01, 0.15, -40, 80),
  rootZoneTemperature: instrument(0.03, 0.0625, 0.15, -40, 80),
  relativeHumidity: instrument(0.4, 0.1, 1.2, 0, 100),
  ppfd: { ...instrument(0.006, 0.1, 0.01, 0, 3000), isRelative: true },
  illuminance: { ...instrument(0.006, 1, 0.01, 0, 200_000), isRelative: true },
};

function instrument(
  noise: number,
  resolution: number,
  wandering: number,
  low: number,
  high: number,
): Instrument {
  return { noise, resolution, wandering, low, high, isRelative: false };
}

const truth: Readonly<Record<MeasuredQuantity, (climate: ShelfClimate) => number>> = {
  airTemperature: ({ airC }) => airC,
  rootZoneTemperature: ({ rootZoneC }) => rootZoneC,
  relativeHumidity: ({ relativeHumidityPct }) => relativeHumidityPct,
  ppfd: ({ ppfdUmolM2S }) => ppfdUmolM2S,
  illuminance: ({ illuminanceLx }) => illuminanceLx,
};

/** One sensor's own chance: made once, so that every reading need not hash its name again. */
export interface SampledSensor {
  readonly sensor: SimulatedSensor;
  readonly seed: number;
  readonly deviceSeed: number;
}

/** Gives a sensor its own chance. Names decide, not ids, so that a room filled anew repeats its history. */
export function sampledSensor(sensor: SimulatedSensor, deviceName: string, seed: number): SampledSensor {
  const deviceSeed = mix32(seed, hashOfName(deviceName));
  return { sensor, deviceSeed, seed: mix32(deviceSeed, hashOfName(sensor.key)) };
}

/**
 * What a sensor reads: the truth with the sensor's slow wandering, noise and resolution, and whatever befalls it.
 *
 * @param sampled - The sensor.
 * @param climate - What a perfect instrument would find there.
 * @param at - Instant [ms since 1970 UTC].
 * @param effect - What a scenario does to the sensor.
 * @returns The reading in the stored unit; `null` when none comes.
 */
export function readingAt(
  sampled: SampledSensor,
  climate: ShelfClimate,
  at: number,
  effect: SensorEffect,
): number | null {
  const { sensor, seed } = sampled;
  const second = Math.floor(at / 1000);
  if (effect.isSilent === true || uniformAt(seed, second, 3) < SHARE_OF_READINGS_LOST) return null;
  const { noise, resolution, wandering, low, high, isRelative } = instruments[sensor.quantity];
  const { add, multiply } = fullDrift[sensor.quantity];
  const drift = effect.drift ?? 0;
  const value = truth[sensor.quantity](climate) * (1 + drift * (multiply - 1)) + drift * add;
  const error =
    noise * gaussianAt(seed, second) + wandering * smoothNoiseAt(seed, at / (WANDERING_DAYS * DAY_MS));
  const measured = isRelative ? value * (1 + error) : value + error;
  const stepped = Math.round(Math.min(high, Math.max(low, measured)) / resolution) * resolution;
  return Number(stepped.toFixed(4));
}

/** Whether the device was without power or network for this half hour; about once in ten days. */
export function isOutage({ deviceSeed }: SampledSensor, at: number): boolean {
  return uniformAt(deviceSeed, Math.floor(at / OUTAGE_MS)) < SHARE_OF_OUTAGES;
}
