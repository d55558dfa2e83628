import type { Sample, Series } from '@shared/series/series';
import type { Tx } from '../database/transactions';
import { HOURLY_GAP_MS, type ShelfTime } from '../germination/shelf-warmth';
import type { SeriesStore } from '../series/series-store';

const HOUR_MS = 3_600_000;

/** The longest interval between hours that is not a gap [ms]. */
export const THIRST_GAP_MS = HOURLY_GAP_MS;

/** Tells how thirsty the air was where something stood. */
export class ShelfThirst {
  constructor(private readonly series: Pick<SeriesStore, 'sensorsOn' | 'buckets'>) {}

  /**
   * Vapour pressure deficit along the places of a planting.
   *
   * @param tx - To read with.
   * @param places - In order.
   * @param from - Start [ms].
   * @param to - End [ms], exclusive.
   * @returns Hourly means at the middle of their hours [kPa], of the sensor that measured most on each shelf.
   */
  async along(tx: Tx, places: readonly ShelfTime[], from: number, to: number): Promise<Series> {
    const series: Sample[] = [];
    for (const { shelfId, fromAt, toAt } of places) {
      const start = Math.max(from, fromAt.getTime());
      const end = Math.min(to, toAt?.getTime() ?? to);
      if (shelfId === null || start >= end) continue;
      const found = await this.series.sensorsOn(tx, shelfId, 'vapourPressureDeficit', start, end);
      const [most] = [...found].sort((one, other) => other.count - one.count);
      if (most === undefined) continue;
      const lastAt = series.at(-1)?.at ?? -Infinity;
      for (const hour of await this.series.buckets(tx, most, 'vapourPressureDeficit', 1)) {
        const at = hour.start + HOUR_MS / 2;
        if (hour.coveredMs > 0 && at > lastAt) series.push({ at, value: hour.integral / hour.coveredMs });
      }
    }
    return series;
  }
}
