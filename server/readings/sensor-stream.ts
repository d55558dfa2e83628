import { maxGapMs } from '@shared/series/expected-interval';
import {
  createPeriodFold,
  type PeriodBounds,
  type PeriodFold,
  type PeriodSums,
} from '@shared/series/period-summary';
import {
  createQualityCheck,
  qualityLevel,
  qualityLimits,
  type QualityCheck,
} from '@shared/series/quality-tests';
import { roomDayBoundsAt, utcHourBounds } from '@shared/series/room-days';
import type { Sample, Series } from '@shared/series/series';
import type { FlaggedSample, SensorOnRoad } from './reading-store';

/** What has to be known of a stream to go on with it. */
export interface StreamPosition {
  readonly check: QualityCheck;
  readonly hour: PeriodSums | undefined;
  readonly day: PeriodSums | undefined;
}

/**
 * One sensor's readings in order: each is put to the quality tests and added to the sums of its hour and its day.
 * The same fold serves live readings and files, so their sums agree to the last bit.
 */
export class SensorStream {
  private readonly hours: PeriodFold;
  private readonly days: PeriodFold;

  constructor(
    sensor: SensorOnRoad,
    private readonly position: StreamPosition,
  ) {
    this.hours = foldFrom(sensor, position.hour, utcHourBounds);
    this.days = foldFrom(sensor, position.day, roomDayBoundsAt(sensor.timeZone));
  }

  /**
   * Takes the next reading.
   *
   * @param sample - Later than all before it.
   * @returns The reading with its flags; a failed one is in no sum.
   */
  take(sample: Sample): FlaggedSample {
    const flags = this.position.check.check(sample);
    if (qualityLevel(flags) !== 'fail') {
      this.hours.add(sample);
      this.days.add(sample);
    }
    return { at: sample.at, value: sample.value, flags };
  }

  /** Hours that changed, in order. */
  touchedHours(): PeriodSums[] {
    return this.hours.touched();
  }

  /** Days that changed, in order. */
  touchedDays(): PeriodSums[] {
    return this.days.touched();
  }

  /** Where the stream stands now, for the next readings. */
  positionNow(): StreamPosition {
    return {
      check: this.position.check,
      hour: this.touchedHours().at(-1) ?? this.position.hour,
      day: this.touchedDays().at(-1) ?? this.position.day,
    };
  }
}

/**
 * A position made from what is stored.
 *
 * @param sensor - The sensor.
 * @param history - Its readings as far back as the quality tests look.
 * @param hour - Its newest hour.
 * @param day - Its newest day.
 * @returns The position after all stored readings.
 */
export function positionFromStored(
  sensor: SensorOnRoad,
  history: Series,
  hour: PeriodSums | undefined,
  day: PeriodSums | undefined,
): StreamPosition {
  return { check: createQualityCheck(qualityLimits[sensor.quantity], history), hour, day };
}

function foldFrom(
  sensor: SensorOnRoad,
  newest: PeriodSums | undefined,
  boundsAt: (at: number) => PeriodBounds,
): PeriodFold {
  return createPeriodFold({
    // Most batches stay within the newest period, which spares asking the calendar.
    boundsAt: (at) => (newest !== undefined && at >= newest.start && at < newest.end ? newest : boundsAt(at)),
    maxGapMs: maxGapMs(sensor.expectedIntervalS),
    threshold: sensor.lightThreshold,
    previous: lastReadingIn(newest),
    load: (start) => (newest?.start === start ? newest : undefined),
  });
}

/**
 * The last reading that a period holds.
 *
 * @param sums - The newest period of a series, if there is one.
 * @returns The reading, null without one.
 */
export function lastReadingIn(sums: PeriodSums | undefined): Sample | null {
  return sums === undefined || sums.lastAt === null || sums.lastValue === null
    ? null
    : { at: sums.lastAt, value: sums.lastValue };
}
