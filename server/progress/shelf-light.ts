import type { PlantingLightDay } from '@shared/growing/light-need';
import { dayBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';
import type { ShelfTime } from '../germination/shelf-warmth';
import { dliMolM2 } from '../series/light-sums';
import type { SensorSpan, SeriesStore } from '../series/series-store';

/** The light of one day where something stood. */
export interface ShelfLightDay extends PlantingLightDay {
  readonly day: string;
  /** End of the day [ms]. */
  readonly end: number;
}

const HOUR_MS = 3_600_000;

/** Tells how much light there was where something stood. */
export class ShelfLight {
  constructor(private readonly series: Pick<SeriesStore, 'sensorsOn' | 'days' | 'luxPerUmolOf'>) {}

  /**
   * The light along the places of a planting, by day; of a day on two shelves, that of the later one.
   *
   * @param tx - To read with.
   * @param places - In order.
   * @param timeZone - Of the room.
   * @param from - Start [ms].
   * @param to - End [ms], exclusive.
   * @returns Days on which something was measured, in order.
   */
  async along(
    tx: Tx,
    places: readonly ShelfTime[],
    timeZone: string,
    from: number,
    to: number,
  ): Promise<ShelfLightDay[]> {
    const byDay = new Map<string, ShelfLightDay>();
    for (const { shelfId, fromAt, toAt } of places) {
      const start = Math.max(from, fromAt.getTime());
      const end = Math.min(to, toAt?.getTime() ?? to);
      if (shelfId === null || start >= end) continue;
      for (const day of await this.onShelf(tx, shelfId, timeZone, start, end)) byDay.set(day.day, day);
    }
    return [...byDay.values()].sort((one, other) => one.end - other.end);
  }

  /** Measured hours of light on a shelf from an instant up to another [h]; null without a light sensor. */
  async hoursOn(tx: Tx, shelfId: string, timeZone: string, from: number, to: number): Promise<number | null> {
    const days = await this.onShelf(tx, shelfId, timeZone, from, to);
    return days.length === 0 ? null : days.reduce((sum, { lightHours }) => sum + (lightHours ?? 0), 0);
  }

  private async onShelf(
    tx: Tx,
    shelfId: string,
    timeZone: string,
    from: number,
    to: number,
  ): Promise<ShelfLightDay[]> {
    const sensor = await this.sensor(tx, shelfId, from, to);
    if (sensor === null) return [];
    const luxPerUmol = await this.series.luxPerUmolOf(tx, shelfId);
    return (await this.series.days(tx, sensor)).map(
      ({ start, end, integral, coveredMs, aboveThresholdMs }) => ({
        day: dayBounds(start, timeZone).date,
        end,
        dliMolM2D: dliMolM2(integral, sensor.quantity, luxPerUmol),
        lightHours: aboveThresholdMs / HOUR_MS,
        coverage: Math.min(1, coveredMs / (end - start)),
      }),
    );
  }

  private async sensor(tx: Tx, shelfId: string, from: number, to: number): Promise<SensorSpan | null> {
    for (const quantity of ['ppfd', 'illuminance'] as const) {
      const found = await this.series.sensorsOn(tx, shelfId, quantity, from, to);
      const [most] = [...found].sort((one, other) => other.count - one.count);
      if (most !== undefined) return most;
    }
    return null;
  }
}
