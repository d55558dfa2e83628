import { maxGapMs } from '@shared/series/expected-interval';
import { recomputePeriods, type PeriodBounds, type PeriodSums } from '@shared/series/period-summary';
import { createQualityCheck, qualityHistoryMs, qualityLimits } from '@shared/series/quality-tests';
import { roomDayBoundsAt, utcHourBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';
import type { FlaggedSample, ReadingStore, SensorOnRoad } from './reading-store';
import type { SummaryPeriod, SummaryStore } from './summary-store';

/** A span of time in which readings were added, changed or removed, both ends included [ms]. */
export interface TouchedSpan {
  readonly from: number;
  readonly to: number;
}

/** Makes flags and sums right again after readings came out of order, changed or went. */
export class LateReadings {
  constructor(
    private readonly readings: ReadingStore,
    private readonly summaries: SummaryStore,
  ) {}

  /**
   * Recomputes what a touched span can have changed, from the stored readings.
   *
   * @param tx - The transaction that changed the readings, holding the sensor's lock.
   * @param sensor - Whose readings.
   * @param span - Where.
   */
  async recompute(tx: Tx, sensor: SensorOnRoad, span: TouchedSpan): Promise<void> {
    await this.judgeAnew(tx, sensor, span);
    await this.sumAnew(tx, 'hour', sensor, span, utcHourBounds);
    await this.sumAnew(tx, 'day', sensor, span, roomDayBoundsAt(sensor.timeZone));
  }

  /**
   * Sums all days of a sensor anew, for when the room counts its days in another zone.
   *
   * @param tx - Holding the sensor's lock.
   * @param sensor - With the new zone.
   */
  async recountDays(tx: Tx, sensor: SensorOnRoad): Promise<void> {
    const samples = await this.readings.between(tx, sensor.id, 0, Infinity);
    const sums = recomputePeriods(samples, {
      boundsAt: roomDayBoundsAt(sensor.timeZone),
      ...foldOptions(sensor),
      from: -Infinity,
      to: Infinity,
    });
    await this.summaries.replace(tx, 'day', sensor.id, allTime, sums);
  }

  private async judgeAnew(tx: Tx, sensor: SensorOnRoad, span: TouchedSpan): Promise<void> {
    const limits = qualityLimits[sensor.quantity];
    const historyMs = qualityHistoryMs(limits);
    const stored = await this.readings.between(
      tx,
      sensor.id,
      span.from - historyMs,
      span.to + historyMs + 1,
      true,
    );
    const history = stored.filter(({ at }) => at < span.from);
    const check = createQualityCheck(limits, history);
    const changed: FlaggedSample[] = [];
    for (const sample of stored.slice(history.length)) {
      const flags = check.check(sample);
      if (flags !== sample.flags) changed.push({ ...sample, flags });
    }
    await this.readings.updateFlags(tx, sensor.id, changed);
  }

  private async sumAnew(
    tx: Tx,
    period: SummaryPeriod,
    sensor: SensorOnRoad,
    span: TouchedSpan,
    boundsAt: (at: number) => PeriodBounds,
  ): Promise<void> {
    // A reading moves the lines to its neighbours, which reach at most one longest step away.
    const reachMs = maxGapMs(sensor.expectedIntervalS);
    const window = { from: boundsAt(span.from - reachMs).start, to: boundsAt(span.to + reachMs).end };
    const inside = await this.readings.between(tx, sensor.id, window.from, window.to);
    const { previous, next } = await this.readings.neighbours(tx, sensor.id, window.from, window.to);
    const samples = [previous, ...inside, next].filter((sample) => sample !== null);
    const sums: PeriodSums[] = recomputePeriods(samples, { boundsAt, ...foldOptions(sensor), ...window });
    await this.summaries.replace(tx, period, sensor.id, window, sums);
  }
}

/** Readings lie between 1990 and now; a `Date` ends here. */
const allTime = { from: 0, to: 8.64e15 } as const;

function foldOptions(sensor: SensorOnRoad): { maxGapMs: number; threshold: number | null } {
  return { maxGapMs: maxGapMs(sensor.expectedIntervalS), threshold: sensor.lightThreshold };
}
