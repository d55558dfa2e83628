import type { Sample, Series } from '@shared/series/series';
import type { Tx } from '../database/transactions';
import type { SensorSpan, SeriesStore } from '../series/series-store';

/** What was taken for the warmth around seed. */
export type WarmthQuantity = 'rootZoneTemperature' | 'airTemperature';

/** Temperatures where something stood. */
export interface Warmth {
  /** Mean of each hour, at its middle. */
  readonly series: Series;
  /** Null when nothing was measured. */
  readonly measuredBy: WarmthQuantity | null;
}

/** A time on a shelf. */
export interface ShelfTime {
  readonly shelfId: string | null;
  readonly fromAt: Date;
  /** Null while it stands there. */
  readonly toAt: Date | null;
}

const HOUR_MS = 3_600_000;
/** Hours come one an hour; one may be missing. */
export const HOURLY_GAP_MS = 2.5 * HOUR_MS;

/** Tells how warm it was where something stood: at the roots where that is measured, else in the air. */
export class ShelfWarmth {
  constructor(private readonly series: Pick<SeriesStore, 'sensorsOn' | 'buckets'>) {}

  /**
   * Temperatures along the places of a planting.
   *
   * @param tx - To read with.
   * @param places - In order.
   * @param from - Start [ms].
   * @param to - End [ms], exclusive.
   * @param prefer - What to take where both are measured.
   * @returns Hourly means in order; what was measured on no shelf is a gap.
   */
  async along(
    tx: Tx,
    places: readonly ShelfTime[],
    from: number,
    to: number,
    prefer: WarmthQuantity = 'rootZoneTemperature',
  ): Promise<Warmth> {
    const series: Sample[] = [];
    let measuredBy: WarmthQuantity | null = null;
    for (const { shelfId, fromAt, toAt } of places) {
      const start = Math.max(from, fromAt.getTime());
      const end = Math.min(to, toAt?.getTime() ?? to);
      if (shelfId === null || start >= end) continue;
      const sensor = await this.sensor(tx, shelfId, start, end, prefer);
      if (sensor === null) continue;
      measuredBy ??= sensor.quantity as WarmthQuantity;
      const lastAt = series.at(-1)?.at ?? -Infinity;
      const hours = await this.hours(tx, sensor);
      series.push(...hours.filter(({ at }) => at > lastAt && at >= start && at < end));
    }
    return { series, measuredBy };
  }

  private async sensor(
    tx: Tx,
    shelfId: string,
    from: number,
    to: number,
    prefer: WarmthQuantity,
  ): Promise<SensorSpan | null> {
    const other = prefer === 'airTemperature' ? 'rootZoneTemperature' : 'airTemperature';
    for (const quantity of [prefer, other] as const) {
      const found = await this.series.sensorsOn(tx, shelfId, quantity, from, to);
      const [most] = [...found].sort((one, another) => another.count - one.count);
      if (most !== undefined && most.count > 0) return most;
    }
    return null;
  }

  private async hours(tx: Tx, sensor: SensorSpan): Promise<Sample[]> {
    const buckets = await this.series.buckets(tx, sensor, sensor.quantity, 1);
    return buckets
      .filter(({ coveredMs }) => coveredMs > 0)
      .map(({ start, integral, coveredMs }) => ({ at: start + HOUR_MS / 2, value: integral / coveredMs }));
  }
}
