import { maxGapMs } from '@shared/series/expected-interval';
import type { PeriodSums } from '@shared/series/period-summary';
import { qualityHistoryMs, qualityLimits } from '@shared/series/quality-tests';
import { roomDayBoundsAt, utcHourBounds } from '@shared/series/room-days';
import { BulkColumns } from './bulk-columns';
import { BulkSpans } from './bulk-spans';
import type { TouchedSpan } from './late-readings';
import type { FlaggedSample, SensorOnRoad } from './reading-store';
import { SensorStream, positionFromStored } from './sensor-stream';

/** Sums to be written in place of all that start in some stretches. */
export interface BulkSums {
  readonly stretches: readonly TouchedSpan[];
  readonly sums: readonly PeriodSums[];
}

/**
 * One sensor's readings, those held and those that a file brings merged in order of time: judged, summed and kept for the
 * moment in columns. It is the fold of live readings, so the outcome is the same to the last bit.
 */
export class BulkTrack {
  readonly spans: BulkSpans;
  /** Readings since the last {@link BulkTrack.clearColumns}. */
  readonly columns = new BulkColumns();
  /** Held readings that are judged anew. */
  flagChanges: FlaggedSample[] = [];
  /** Held readings whose value the file replaces. */
  replacements: FlaggedSample[] = [];
  /** The newest reading so far. */
  latest: FlaggedSample | null = null;
  /** The newest reading that the file itself brought [ms]. */
  broughtTo = -Infinity;
  broughtValue = 0;
  private stream: SensorStream;
  private readonly historyMs: number;
  private readonly reachMs: number;
  private hoursSavedTo = -Infinity;
  private daysSavedTo = -Infinity;
  /** Periods that were not complete at the last {@link BulkTrack.completeSums}. */
  private openHour: PeriodSums | undefined;
  private openDay: PeriodSums | undefined;
  private readonly dayBoundsAt: (at: number) => { start: number; end: number };

  /**
   * @param sensor - As it was before.
   * @param place - Its place in the list of sensors.
   */
  constructor(
    readonly sensor: SensorOnRoad,
    readonly place: number,
  ) {
    this.reachMs = maxGapMs(sensor.expectedIntervalS);
    this.historyMs = qualityHistoryMs(qualityLimits[sensor.quantity]);
    this.spans = new BulkSpans(2 * this.reachMs);
    this.dayBoundsAt = roomDayBoundsAt(sensor.timeZone);
    this.stream = new SensorStream(sensor, positionFromStored(sensor, [], undefined, undefined));
  }

  /** Takes a reading that is held already. */
  takeHeld(at: number, value: number, flags: number): void {
    const judged = this.take(at, value);
    if (judged.flags !== flags && this.spans.isWithin(at, this.historyMs)) this.flagChanges.push(judged);
  }

  /**
   * Takes a reading that is not held yet.
   *
   * @returns Its flags.
   */
  takeFresh(at: number, value: number): number {
    this.spans.add(at);
    return this.take(at, value).flags;
  }

  /** Takes a reading in place of the one held for its instant. */
  takeReplacement(at: number, value: number): number {
    this.spans.add(at);
    const judged = this.take(at, value);
    this.replacements.push(judged);
    return judged.flags;
  }

  /** Forgets the columns once everybody has read them. */
  clearColumns(): void {
    this.columns.clear();
  }

  /**
   * Sums that changed and are complete, since the last call.
   *
   * @param isLast - No more readings follow, so the last periods are as complete as they get.
   */
  completeSums(isLast: boolean): { hours: BulkSums; days: BulkSums } {
    const hours = withOpen(this.openHour, this.stream.touchedHours());
    const days = withOpen(this.openDay, this.stream.touchedDays());
    const hoursTo = isLast ? Infinity : (hours.at(-1)?.start ?? this.hoursSavedTo);
    const daysTo = isLast ? Infinity : (days.at(-1)?.start ?? this.daysSavedTo);
    const complete = {
      hours: this.touched(hours, { from: this.hoursSavedTo, to: hoursTo }, utcHourBounds),
      days: this.touched(days, { from: this.daysSavedTo, to: daysTo }, this.dayBoundsAt),
    };
    this.hoursSavedTo = hoursTo;
    this.daysSavedTo = daysTo;
    this.openHour = hours.at(-1);
    this.openDay = days.at(-1);
    this.stream = new SensorStream(this.sensor, this.stream.positionNow());
    return complete;
  }

  private touched(
    sums: readonly PeriodSums[],
    window: TouchedSpan,
    boundsAt: (at: number) => { start: number; end: number },
  ): BulkSums {
    const stretches = this.spans.touchedPeriods(window, this.reachMs, boundsAt);
    return { stretches, sums: within(stretches, sums) };
  }

  private take(at: number, value: number): FlaggedSample {
    const judged = this.stream.take({ at, value });
    this.latest = judged;
    this.columns.push(at, value, judged.flags);
    return judged;
  }
}

/**
 * The periods to go on with: one that was open belongs to them, even when nothing was added to it since.
 *
 * @param open - The last period of the stretch before.
 * @param touched - The periods of this stretch, in order.
 */
export function withOpen(
  open: PeriodSums | undefined,
  touched: readonly PeriodSums[],
): readonly PeriodSums[] {
  return open === undefined || touched[0]?.start === open.start ? touched : [open, ...touched];
}

/**
 * Sums that start in any of some stretches.
 *
 * @param stretches - Half-open, in order, not overlapping.
 * @param sums - In order.
 */
export function within(stretches: readonly TouchedSpan[], sums: readonly PeriodSums[]): PeriodSums[] {
  let index = 0;
  return sums.filter(({ start }) => {
    while (start >= (stretches[index]?.to ?? Infinity)) index += 1;
    return start >= (stretches[index]?.from ?? Infinity);
  });
}
