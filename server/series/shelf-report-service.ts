import type { LampInterval } from '@shared/alerts/lamp-plan';
import { degreeDaysFromMinMax, degreeDaysFromSeries } from '@shared/climate/degree-days';
import {
  computedQuantities,
  type ComputedQuantity,
  type MeasuredQuantity,
  type Quantity,
} from '@shared/climate/quantity';
import type { ShelfEvent } from '@shared/contracts/care';
import type { DegreeDays, LightOfDay, QuantityStatistics, ShelfReport } from '@shared/contracts/series';
import { maxGapMs } from '@shared/series/expected-interval';
import { dayBounds, roomDayBoundsAt, type DayBounds } from '@shared/series/room-days';
import type { ShelfPlans } from '../board/shelf-now-service';
import type { Transactions, Tx } from '../database/transactions';
import { dliMolM2 } from './light-sums';
import type { LightStore } from './light-store';
import { isLong, type SeriesService, type Span } from './series-service';
import type { Bucket, SensorSpan, SeriesStore } from './series-store';
import { statisticsOfBuckets, statisticsOfSamples } from './span-statistics';
import { wantedSteps } from './wanted-steps';

/** What the report shows that other areas keep. */
export interface ReportSources extends ShelfPlans {
  eventsOf(shelfId: string, from: Date, to: Date): Promise<ShelfEvent[]>;
  luxPerUmolOf(tx: Tx, shelfId: string): Promise<number | null>;
}

/** What to sum degree days of. */
export interface DegreeDayRequest {
  readonly quantity: 'airTemperature' | 'rootZoneTemperature';
  readonly baseC: number;
  readonly upperC?: number | undefined;
}

const DAY_MS = 86_400_000;
/** Beyond, stretches of light are too many to draw and too many to find. */
const LONGEST_LIT_SPAN_MS = 32 * DAY_MS;

/** Tables, light and degree days of a shelf over a span. */
export class ShelfReportService {
  constructor(
    private readonly transactions: Transactions,
    private readonly store: SeriesStore,
    private readonly series: SeriesService,
    private readonly lightStore: LightStore,
    private readonly sources: ReportSources,
  ) {}

  /**
   * Everything beside the charts.
   *
   * @param shelfId - Which, of a room that the caller may see.
   * @param timeZone - The room's.
   * @param span - When.
   * @returns Statistics a quantity, light a day, lamps and events.
   */
  async report(shelfId: string, timeZone: string, span: Span): Promise<ShelfReport> {
    const tx = this.transactions.plain;
    const planned = await this.sources.plannedLamps(tx, [shelfId], new Date(span.from), new Date(span.to));
    const lamps = planned.get(shelfId) ?? [];
    return {
      statistics: await this.statistics(tx, shelfId, span, lamps),
      light: await this.light(tx, shelfId, timeZone, span, lamps),
      plannedLamps: lamps.map(({ onAt, offAt }) => intervalOf(onAt, offAt)),
      measuredLamps: await this.measuredLamps(tx, shelfId, span),
      events: await this.sources.eventsOf(shelfId, new Date(span.from), new Date(span.to)),
    };
  }

  /**
   * Degree days, integrated from the readings; beyond some forty days from the hours' minima and maxima, where only
   * hours that cross a limit are approximated (by a sine, within 0.1 °C·d a month on an ordinary shelf).
   *
   * @param shelfId - Which.
   * @param timeZone - The room's, whose days are summed.
   * @param span - When.
   * @param request - Of what, and above which base.
   * @returns The sum with its coverage; gaps are not filled.
   */
  async degreeDays(
    shelfId: string,
    timeZone: string,
    span: Span,
    request: DegreeDayRequest,
  ): Promise<DegreeDays> {
    const tx = this.transactions.plain;
    const sensors = await this.store.sensorsOn(tx, shelfId, request.quantity, span.from, span.to);
    const sensor = best(sensors);
    const perDay =
      sensor === undefined
        ? []
        : isLong(sensor)
          ? dailyFromHours(await this.store.buckets(tx, sensor, request.quantity, 1), timeZone, span, request)
          : await this.dailyFromReadings(tx, sensor, timeZone, span, request);
    const covered = perDay.reduce((sum, day) => sum + day.coveredMs, 0);
    return {
      quantity: request.quantity,
      baseC: request.baseC,
      upperC: request.upperC ?? null,
      degreeDaysCD: perDay.reduce((sum, day) => sum + day.degreeDaysCD, 0),
      coverage: Math.min(1, covered / (span.to - span.from)),
      perDay: perDay.map(({ bounds, degreeDaysCD, coveredMs }) => ({
        day: bounds.date,
        degreeDaysCD,
        coverage: Math.min(1, coveredMs / (bounds.end - bounds.start)),
      })),
    };
  }

  private async statistics(
    tx: Tx,
    shelfId: string,
    span: Span,
    lamps: readonly LampInterval[],
  ): Promise<QuantityStatistics[]> {
    const wanted = (await this.sources.wantedRangesOf(tx, [shelfId])).get(shelfId) ?? [];
    const { quantities } = await this.store.everMeasured(tx, shelfId);
    const found: QuantityStatistics[] = [];
    for (const quantity of withComputed(quantities)) {
      const sensor = best(await this.store.sensorsOn(tx, shelfId, quantity, span.from, span.to));
      if (sensor === undefined) continue;
      const range = wanted.find((candidate) => candidate.quantity === quantity);
      const steps = wantedSteps(range, lamps, span.from, span.to);
      found.push(
        isLong(sensor)
          ? statisticsOfBuckets(quantity, await this.store.buckets(tx, sensor, quantity, 1), span, steps)
          : statisticsOfSamples(
              quantity,
              await this.series.samples(tx, sensor, quantity),
              span,
              steps,
              sensor,
            ),
      );
    }
    return found;
  }

  private async light(
    tx: Tx,
    shelfId: string,
    timeZone: string,
    span: Span,
    lamps: readonly LampInterval[],
  ): Promise<LightOfDay[]> {
    const sensor = await this.lightSensor(tx, shelfId, span);
    if (sensor === undefined) return [];
    const luxPerUmol = await this.sources.luxPerUmolOf(tx, shelfId);
    return (await this.store.days(tx, sensor)).map((day) => ({
      day: dayBounds(day.start, timeZone).date,
      lightHours: day.aboveThresholdMs / 3_600_000,
      plannedHours: plannedHours(lamps, day),
      dliMolM2D: dliMolM2(day.integral, sensor.quantity, luxPerUmol),
      coverage: Math.min(1, day.coveredMs / (day.end - day.start)),
    }));
  }

  private async measuredLamps(tx: Tx, shelfId: string, span: Span): Promise<ShelfReport['measuredLamps']> {
    if (span.to - span.from > LONGEST_LIT_SPAN_MS) return [];
    const sensor = await this.lightSensor(tx, shelfId, span);
    if (sensor === undefined) return [];
    const { sensorId, lightThreshold, expectedIntervalS, from, to } = sensor;
    const light = { sensorId, threshold: lightThreshold ?? 0, maxGapMs: maxGapMs(expectedIntervalS) };
    return (await this.lightStore.litSpans(tx, [light], from, to)).map((lit) => intervalOf(lit.from, lit.to));
  }

  private async lightSensor(tx: Tx, shelfId: string, span: Span): Promise<SensorSpan | undefined> {
    const ppfd = await this.store.sensorsOn(tx, shelfId, 'ppfd', span.from, span.to);
    return best(ppfd) ?? best(await this.store.sensorsOn(tx, shelfId, 'illuminance', span.from, span.to));
  }

  private async dailyFromReadings(
    tx: Tx,
    sensor: SensorSpan,
    timeZone: string,
    span: Span,
    { quantity, ...limits }: DegreeDayRequest,
  ): Promise<DaySum[]> {
    const samples = await this.series.samples(tx, sensor, quantity);
    return daysOf(span, timeZone).map((bounds) => ({
      bounds,
      ...degreeDaysFromSeries(samples, {
        ...limits,
        from: Math.max(bounds.start, span.from),
        to: Math.min(bounds.end, span.to),
        maxGapMs: maxGapMs(sensor.expectedIntervalS),
      }),
    }));
  }
}

interface DaySum {
  readonly bounds: DayBounds;
  readonly degreeDaysCD: number;
  readonly coveredMs: number;
}

/** Where several sensors measured the same, the one with the most to say. */
function best(sensors: readonly SensorSpan[]): SensorSpan | undefined {
  return sensors.reduce<SensorSpan | undefined>(
    (most, sensor) => (most === undefined || sensor.count > most.count ? sensor : most),
    undefined,
  );
}

function withComputed(measured: readonly MeasuredQuantity[]): Quantity[] {
  const hasBoth = measured.includes('airTemperature') && measured.includes('relativeHumidity');
  const computed: readonly ComputedQuantity[] = hasBoth ? computedQuantities : [];
  return [...measured, ...computed];
}

function intervalOf(from: number, to: number): { from: string; to: string } {
  return { from: new Date(from).toISOString(), to: new Date(to).toISOString() };
}

function plannedHours(lamps: readonly LampInterval[], day: { start: number; end: number }): number {
  const overlaps = lamps.map(({ onAt, offAt }) => Math.min(offAt, day.end) - Math.max(onAt, day.start));
  return overlaps.reduce((sum, ms) => sum + Math.max(0, ms), 0) / 3_600_000;
}

function daysOf(span: Span, timeZone: string): DayBounds[] {
  const days: DayBounds[] = [];
  for (let day = dayBounds(span.from, timeZone); day.start < span.to; day = dayBounds(day.end, timeZone)) {
    days.push(day);
  }
  return days;
}

function dailyFromHours(
  hours: readonly Bucket[],
  timeZone: string,
  span: Span,
  { baseC, upperC }: DegreeDayRequest,
): DaySum[] {
  const boundsAt = roomDayBoundsAt(timeZone);
  const sums = new Map(
    daysOf(span, timeZone).map((bounds) => [bounds.start, { bounds, degreeDaysCD: 0, coveredMs: 0 }]),
  );
  for (const { start, min, max, coveredMs } of hours) {
    const day = sums.get(boundsAt(start).start);
    if (day === undefined || min === null || max === null) continue;
    const ofDay = degreeDaysFromMinMax({
      minC: min,
      maxC: max,
      baseC,
      upperC,
      method: 'singleSine',
      cutoff: 'horizontal',
    });
    day.degreeDaysCD += (ofDay * coveredMs) / DAY_MS;
    day.coveredMs += coveredMs;
  }
  return [...sums.values()];
}
