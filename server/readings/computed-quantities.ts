import { computedSeries } from '@shared/climate/computed-quantities';
import { computedQuantities, type ComputedQuantity } from '@shared/climate/quantity';
import { maxGapMs } from '@shared/series/expected-interval';
import { createPeriodFold, recomputePeriods, type PeriodSums } from '@shared/series/period-summary';
import { utcHourBounds } from '@shared/series/room-days';
import type { Sample } from '@shared/series/series';
import type { Tx } from '../database/transactions';
import type { ComputedStore, HumiditySpan, ShelfAir } from './computed-store';
import type { TouchedSpan } from './late-readings';
import type { SensorOnRoad } from './reading-store';
import { lastReadingIn } from './sensor-stream';
import type { SensorSums, SummaryStore } from './summary-store';

/** A humidity sensor, as far as reading its points needs it. */
export type HumiditySensor = Pick<SensorOnRoad, 'id' | 'expectedIntervalS'>;

/** A humidity sensor with how far its readings can now be paired for good. */
export interface Settling {
  readonly sensor: SensorOnRoad;
  /** Computed so far, null at the beginning [ms]. */
  readonly computedTo: number | null;
  /** The last humidity reading whose nearest temperature can't change any more by readings in order [ms]. */
  readonly settledTo: number;
}

/** New points of a computed quantity, for the alerts. */
export interface ComputedPoints {
  readonly sensor: SensorOnRoad;
  readonly quantity: ComputedQuantity;
  readonly samples: readonly Sample[];
}

/** Sums computed quantities pointwise, beside the readings that they come from. */
export class ComputedQuantities {
  constructor(
    private readonly store: ComputedStore,
    private readonly summaries: SummaryStore,
  ) {}

  /**
   * Adds the points that have settled since last time.
   *
   * @param tx - Holding the locks of the humidity sensors and of the temperature sensors beside them.
   * @param settling - The humidity sensors with something to add.
   * @returns The added points, for the alerts.
   */
  async extend(tx: Tx, settling: readonly Settling[]): Promise<ComputedPoints[]> {
    if (settling.length === 0) return [];
    const air = await this.store.airOf(
      tx,
      settling.map(({ sensor, computedTo, settledTo }) =>
        spanOf(sensor, computedTo === null ? 0 : computedTo + 1, settledTo + 1),
      ),
    );
    const newest = await this.summaries.newestComputed(
      tx,
      settling.map(({ sensor }) => sensor.id),
      computedQuantities,
    );
    const points = settling.flatMap(({ sensor }) =>
      computedQuantities.map((quantity) => ({ sensor, quantity, samples: pointsOf(quantity, sensor, air) })),
    );
    await this.summaries.saveComputed(
      tx,
      points.flatMap(({ sensor, quantity, samples }) => {
        const before = newest.find((sums) => sums.sensorId === sensor.id && sums.quantity === quantity);
        return added(sensor, samples, before?.sums).map((sums) => ({ sensorId: sensor.id, quantity, sums }));
      }),
    );
    return points;
  }

  /**
   * Computes the hours around a span anew, after humidity or temperature there came late, changed or went.
   *
   * @param tx - As for {@link ComputedQuantities.extend}.
   * @param sensor - The humidity sensor.
   * @param span - Where humidity or temperature was touched.
   * @param computedTo - Up to where the sums reach [ms].
   */
  async recompute(tx: Tx, sensor: SensorOnRoad, span: TouchedSpan, computedTo: number): Promise<void> {
    const reachMs = withinMs(sensor) + maxGapMs(sensor.expectedIntervalS);
    const from = utcHourBounds(span.from - reachMs).start;
    const to = utcHourBounds(span.to + reachMs).end;
    // The lines at both edges need their outer ends.
    const air = await this.store.airOf(tx, [
      spanOf(sensor, from - reachMs, Math.min(to + reachMs, computedTo + 1)),
    ]);
    const sums = computedQuantities.flatMap((quantity) =>
      recomputePeriods(pointsOf(quantity, sensor, air), {
        boundsAt: utcHourBounds,
        maxGapMs: maxGapMs(sensor.expectedIntervalS),
        threshold: null,
        from,
        to,
      }).map((entry) => ({ quantity, sums: entry })),
    );
    await this.summaries.replaceComputed(tx, sensor.id, { from, to }, sums);
  }

  /**
   * Points of a computed quantity over a span, straight from the readings.
   *
   * @param tx - Any.
   * @param sensor - The humidity sensor.
   * @param quantity - Which.
   * @param from - Start [ms], inclusive.
   * @param to - End [ms], exclusive.
   * @returns Points in order; where the sensor moved within the span, of both shelves.
   */
  async points(
    tx: Tx,
    sensor: HumiditySensor,
    quantity: ComputedQuantity,
    from: number,
    to: number,
  ): Promise<Sample[]> {
    // Nothing is paired yet, or not any more, after all of a sensor's readings were taken out.
    if (to <= from) return [];
    return pointsOf(quantity, sensor, await this.store.airOf(tx, [spanOf(sensor, from, to)]));
  }
}

/**
 * The longest distance in time between a humidity reading and its temperature.
 *
 * @param sensor - The humidity sensor.
 * @returns Its expected interval [ms].
 */
export function withinMs(sensor: Pick<SensorOnRoad, 'expectedIntervalS'>): number {
  return sensor.expectedIntervalS * 1_000;
}

function spanOf(sensor: HumiditySensor, from: number, to: number): HumiditySpan {
  return { sensorId: sensor.id, from: Math.max(0, from), to, withinMs: withinMs(sensor) };
}

function pointsOf(quantity: ComputedQuantity, sensor: HumiditySensor, air: readonly ShelfAir[]): Sample[] {
  return air
    .filter(({ sensorId }) => sensorId === sensor.id)
    .flatMap(({ humidity, temperature, leafOffsetC }) =>
      computedSeries(quantity, humidity, temperature, { withinMs: withinMs(sensor), leafOffsetC }),
    )
    .sort((a, b) => a.at - b.at);
}

function added(
  sensor: SensorOnRoad,
  samples: readonly Sample[],
  newest: SensorSums['sums'] | undefined,
): PeriodSums[] {
  const fold = createPeriodFold({
    boundsAt: utcHourBounds,
    maxGapMs: maxGapMs(sensor.expectedIntervalS),
    threshold: null,
    previous: lastReadingIn(newest),
    load: (start) => (newest?.start === start ? newest : undefined),
  });
  for (const sample of samples) fold.add(sample);
  return fold.touched();
}
