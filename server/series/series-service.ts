import { isMeasured, type Quantity } from '@shared/climate/quantity';
import type { ChartLine, ChartPoint, Series as SeriesReply } from '@shared/contracts/series';
import { maxGapMs } from '@shared/series/expected-interval';
import type { Sample } from '@shared/series/series';
import { thinForChart } from '@shared/series/thin-for-chart';
import type { ShelfPlans } from '../board/shelf-now-service';
import type { Transactions, Tx } from '../database/transactions';
import type { ComputedQuantities } from '../readings/computed-quantities';
import type { FlaggedSample, ReadingStore } from '../readings/reading-store';
import type { Bucket, SensorSpan, SeriesStore } from './series-store';
import { wantedSteps } from './wanted-steps';

/** A span of time [ms], half-open. */
export interface Span {
  readonly from: number;
  readonly to: number;
}

/** No line has more points, whatever its span. */
const MAX_POINTS = 2_000;
/** Up to so many readings a line is made from them; beyond, from the sums by hour. */
const MAX_RAW_READINGS = 12_000;
const HOUR_MS = 3_600_000;

/** Makes the lines of charts. */
export class SeriesService {
  constructor(
    private readonly transactions: Transactions,
    private readonly store: SeriesStore,
    private readonly readings: ReadingStore,
    private readonly computed: ComputedQuantities,
    private readonly plans: ShelfPlans,
  ) {}

  /**
   * One quantity of a shelf over a span.
   *
   * @param shelfId - Which, of a room that the caller may see.
   * @param quantity - Which.
   * @param span - When.
   * @returns A line for each sensor that was there, at most 2,000 points each with minima and maxima kept, and the
   *   wanted range as it stepped with the lamps.
   */
  async series(shelfId: string, quantity: Quantity, span: Span): Promise<SeriesReply> {
    const tx = this.transactions.plain;
    const spans = await this.store.sensorsOn(tx, shelfId, quantity, span.from, span.to);
    const lines: ChartLine[] = [];
    for (const sensor of spans) lines.push(await this.line(tx, sensor, quantity));
    const lamps = await this.plans.plannedLamps(tx, [shelfId], new Date(span.from), new Date(span.to));
    const wanted = await this.plans.wantedRangesOf(tx, [shelfId]);
    const range = wanted.get(shelfId)?.find((candidate) => candidate.quantity === quantity);
    return {
      quantity,
      lines,
      wanted: wantedSteps(range, lamps.get(shelfId) ?? [], span.from, span.to).map((step) => ({
        ...step,
        from: new Date(step.from).toISOString(),
        to: new Date(step.to).toISOString(),
      })),
    };
  }

  /**
   * Good readings of a sensor's time on a shelf, or computed points.
   *
   * @param tx - Any.
   * @param sensor - Whose and when.
   * @param quantity - Its own or a computed one.
   * @returns In order.
   */
  async samples(tx: Tx, sensor: SensorSpan, quantity: Quantity): Promise<Sample[]> {
    return isMeasured(quantity)
      ? this.readings.between(tx, sensor.sensorId, sensor.from, sensor.to)
      : this.computed.points(
          tx,
          { id: sensor.sensorId, expectedIntervalS: sensor.expectedIntervalS },
          quantity,
          sensor.from,
          sensor.to,
        );
  }

  /**
   * Readings of a sensor's time on a shelf with their flags, failed ones included, or computed points.
   *
   * @param tx - Any.
   * @param sensor - Whose and when.
   * @param quantity - Its own or a computed one.
   * @returns In order.
   */
  async flaggedSamples(
    tx: Tx,
    {
      sensorId,
      expectedIntervalS,
      from,
      to,
    }: Pick<SensorSpan, 'sensorId' | 'expectedIntervalS' | 'from' | 'to'>,
    quantity: Quantity,
  ): Promise<FlaggedSample[]> {
    if (isMeasured(quantity)) return this.readings.between(tx, sensorId, from, to, true);
    const points = await this.computed.points(tx, { id: sensorId, expectedIntervalS }, quantity, from, to);
    return points.map((point) => ({ ...point, flags: 0 }));
  }

  private async line(tx: Tx, sensor: SensorSpan, quantity: Quantity): Promise<ChartLine> {
    const head = { sensorId: isMeasured(quantity) ? sensor.sensorId : null, name: sensor.deviceName };
    if (sensor.count <= MAX_RAW_READINGS) {
      const samples = await this.samples(tx, sensor, quantity);
      return { ...head, resolution: 'reading', points: pointsOfReadings(samples, sensor) };
    }
    // Half the points: where buckets are missing, breaks come between.
    const hours = Math.ceil((sensor.to - sensor.from) / HOUR_MS / (MAX_POINTS / 2));
    const buckets = await this.store.buckets(tx, sensor, quantity, hours);
    return {
      ...head,
      resolution: hours < 24 ? 'hour' : 'day',
      points: pointsOfBuckets(buckets, hours * HOUR_MS),
    };
  }
}

/**
 * Whether a span has so many readings that its sums are used instead.
 *
 * @param sensor - The sensor's time on the shelf.
 * @returns True beyond about forty days of a reading every five minutes.
 */
export function isLong(sensor: SensorSpan): boolean {
  return sensor.count > MAX_RAW_READINGS;
}

function pointsOfReadings(samples: readonly Sample[], sensor: SensorSpan): ChartPoint[] {
  const thinned = thinForChart(samples, {
    maxPoints: MAX_POINTS,
    maxGapMs: maxGapMs(sensor.expectedIntervalS),
  });
  return thinned.map(({ at, value }) => [at, value, value, value]);
}

function pointsOfBuckets(buckets: readonly Bucket[], widthMs: number): ChartPoint[] {
  const points: ChartPoint[] = [];
  let expectedStart = buckets[0]?.start ?? 0;
  for (const { start, min, max, integral, coveredMs } of buckets) {
    if (start > expectedStart) points.push([expectedStart, null, null, null]);
    expectedStart = start + widthMs;
    // A bucket that a line only passes over has no reading of its own to show.
    if (min === null || max === null) continue;
    const mean = coveredMs > 0 ? integral / coveredMs : (min + max) / 2;
    points.push([start + widthMs / 2, mean, min, max]);
  }
  return points;
}
