import type { Crop } from '@shared/growing/crops/crop';
import {
  forecastEmergence,
  ownThermalTime,
  type EmergenceForecast,
} from '@shared/growing/emergence-forecast';
import type { Clock } from '../clock';
import type { Tx } from '../database/transactions';
import type { EmergencesStore } from './emergences-store';
import { HOURLY_GAP_MS, type ShelfTime, type ShelfWarmth, type Warmth } from './shelf-warmth';

/** So many past sowings narrow a forecast; older ones lay in another mix, or in a colder winter. */
const MOST_PAST = 6;

/** A sowing of which nothing is up. */
export interface WaitingPlanting {
  readonly startedAt: Date;
  readonly places: readonly ShelfTime[];
}

/** Forecasts when a sowing comes up, from the warmth of the shelves that it stood on. */
export class EmergenceService {
  constructor(
    private readonly warmth: ShelfWarmth,
    private readonly emergences: EmergencesStore,
    private readonly now: Clock,
  ) {}

  /**
   * Forecasts the emergence of a sowing.
   *
   * @param tx - To read with.
   * @param roomId - Whose past sowings narrow it.
   * @param crop - What was sown.
   * @param planting - When and where.
   * @returns The forecast with the temperatures it rests on; null for a crop without figures of its seed.
   */
  async forecast(
    tx: Tx,
    roomId: string,
    crop: Crop,
    { startedAt, places }: WaitingPlanting,
  ): Promise<{ readonly forecast: EmergenceForecast; readonly warmth: Warmth; readonly now: number } | null> {
    if (crop.seed === null) return null;
    const sownAt = startedAt.getTime();
    // Sown this very moment: there is no time yet to have measured in.
    const now = Math.max(this.now().getTime(), sownAt + 1);
    const warmth = await this.warmth.along(tx, places, sownAt, now);
    const forecast = forecastEmergence({
      seed: crop.seed,
      sownAt,
      now,
      temperature: warmth.series,
      maxGapMs: HOURLY_GAP_MS,
      ownSumsCD: await this.ownSums(tx, roomId, crop),
    });
    return { forecast, warmth, now };
  }

  private async ownSums(tx: Tx, roomId: string, { id, seed }: Crop): Promise<number[]> {
    if (seed === null) return [];
    const sums: number[] = [];
    for (const { startedAt, firstUpAt, places } of await this.emergences.past(tx, roomId, id, MOST_PAST)) {
      const [sownAt, upAt] = [startedAt.getTime(), firstUpAt.getTime()];
      const { series } = await this.warmth.along(tx, places, sownAt, upAt);
      const sum = ownThermalTime(seed, { sownAt, upAt, temperature: series, maxGapMs: HOURLY_GAP_MS });
      if (sum !== null) sums.push(sum);
    }
    return sums;
  }
}
