import type { MeasuredQuantity } from '../climate/quantity';
import { requireAfter, type Sample, type Series } from './series';

/** Tests that a reading is put to on arrival. */
export type QualityTest = 'grossRange' | 'rateOfChange' | 'flatLine';

/** The worst that any test says of a reading. */
export type QualityLevel = 'pass' | 'suspect' | 'fail';

/** Limits of the tests for one quantity, in its stored unit. `null` where a test makes no sense for the quantity. */
export interface QualityLimits {
  /** What the sensor can measure, both limits included; outside it the reading fails. */
  readonly sensorRange: { readonly low: number; readonly high: number };
  /** What happens in a growing room, both limits included; outside it the reading is suspect. */
  readonly plausibleRange: { readonly low: number; readonly high: number };
  /** Fastest plausible change a minute; a faster one is suspect. */
  readonly changePerMinute: number | null;
  /** Spread that a living signal exceeds within a time; a flatter one is suspect. */
  readonly flatLine: { readonly tolerance: number; readonly durationMs: number } | null;
}

/**
 * Limits by quantity. Common practice for low-cost sensors in heated rooms, no source; the tests are those of QARTOD.
 *
 * @remarks
 * Humidity sensors overshoot in saturated air, so up to 105 % is suspect and not yet failed. Light jumps when lamps
 * switch and is level, or 0, for hours by design, so it is tested for range only. Saturated air under a propagator's lid
 * is level too: a flat line never fails a reading.
 */
export const qualityLimits: Readonly<Record<MeasuredQuantity, QualityLimits>> = {
  airTemperature: {
    sensorRange: { low: -40, high: 85 },
    plausibleRange: { low: 0, high: 50 },
    changePerMinute: 5,
    flatLine: { tolerance: 0.05, durationMs: 12 * 3_600_000 },
  },
  rootZoneTemperature: {
    sensorRange: { low: -40, high: 85 },
    plausibleRange: { low: 0, high: 45 },
    changePerMinute: 3,
    flatLine: { tolerance: 0.05, durationMs: 12 * 3_600_000 },
  },
  relativeHumidity: {
    sensorRange: { low: 0, high: 105 },
    plausibleRange: { low: 5, high: 100 },
    changePerMinute: 30,
    flatLine: { tolerance: 0.1, durationMs: 12 * 3_600_000 },
  },
  ppfd: {
    sensorRange: { low: 0, high: 4000 },
    plausibleRange: { low: 0, high: 2500 },
    changePerMinute: null,
    flatLine: null,
  },
  illuminance: {
    sensorRange: { low: 0, high: 200_000 },
    plausibleRange: { low: 0, high: 120_000 },
    changePerMinute: null,
    flatLine: null,
  },
};

const TEST_BITS: Readonly<Record<QualityTest, number>> = { grossRange: 1, rateOfChange: 2, flatLine: 4 };
const SUSPECT_BIT = 16;

/** Flags from this number on mean a failed reading: kept, but left out of sums. A plain comparison in SQL. */
export const FIRST_FAILED_FLAGS = 32;

const MINUTE_MS = 60_000;

/** A reading this long after the one before it starts afresh: no rate, no flat line across it. */
const LONGEST_INTERVAL_MS = 3 * 3_600_000;

/**
 * The worst level that flags stand for.
 *
 * @param flags - Flags of a reading.
 * @returns `fail`, `suspect`, or `pass` for 0.
 */
export function qualityLevel(flags: number): QualityLevel {
  if (flags >= FIRST_FAILED_FLAGS) {
    return 'fail';
  }
  return flags >= SUSPECT_BIT ? 'suspect' : 'pass';
}

/**
 * The tests that objected to a reading.
 *
 * @param flags - Flags of a reading.
 * @returns Names of the tests; none for 0.
 */
export function objectingTests(flags: number): QualityTest[] {
  const tests = Object.keys(TEST_BITS) as QualityTest[];
  return tests.filter((test) => (flags & TEST_BITS[test]) !== 0);
}

/**
 * Whether a reading speaks against its sensor: beyond what it can measure or what happens in a room, or jumping. A level
 * line alone does not, since saturated air under a propagator's lid is level.
 *
 * @param flags - Flags of a reading.
 * @returns True for such a reading.
 */
export function isFaulty(flags: number): boolean {
  return flags >= FIRST_FAILED_FLAGS || (flags & (TEST_BITS.grossRange | TEST_BITS.rateOfChange)) !== 0;
}

/** Puts readings of one sensor, in order of time, to the tests. */
export interface QualityCheck {
  /**
   * Tests the next reading.
   *
   * @returns Its flags: the bits 1 gross range, 2 rate of change, 4 flat line say which tests objected, and the bits 16
   *   suspect or 32 fail how badly. 0 is a pass. They fit a `smallint`.
   * @throws {@link DomainError} `UNORDERED_SERIES` unless it is later than the one before it.
   */
  check(sample: Sample): number;
}

/**
 * How far back {@link createQualityCheck} looks.
 *
 * @param limits - Limits of the quantity.
 * @returns Time before the first reading to test from which history matters [ms].
 */
export function qualityHistoryMs(limits: QualityLimits): number {
  // A flat line must be measured over its whole duration, from a reading that may lie one interval before it begins.
  return LONGEST_INTERVAL_MS + (limits.flatLine?.durationMs ?? 0);
}

/**
 * Starts the quality tests of one sensor.
 *
 * @param limits - Limits of its quantity, from {@link qualityLimits} or a sensor's own.
 * @param history - Its readings before the first one to test, from {@link qualityHistoryMs} back. A shorter history only
 *   means fewer objections.
 * @returns The check.
 * @throws {@link DomainError} `UNORDERED_SERIES` unless the history is strictly increasing in time.
 *
 * @remarks
 * After the gross range, rate of change and flat line tests of QARTOD (US IOOS, Manual for Real-Time Quality Control), with
 * three choices of our own. The tests look back only, so flags once stored stay true; the spike test, which needs the
 * next reading, is `spikeFlags` for displays. Only the gross range fails a reading: failing hangs on its value
 * alone, so sums that leave failed readings out don't hang on the order in which readings came. Failed readings are no
 * history: after a lone 999.9 the next good reading is compared with the good one before.
 */
export function createQualityCheck(limits: QualityLimits, history: Series): QualityCheck {
  const { sensorRange, plausibleRange, changePerMinute, flatLine } = limits;
  const flatLineWindow =
    flatLine === null ? null : new FlatLineWindow(flatLine.tolerance, flatLine.durationMs);
  let previousAt = -Infinity;
  let previousGoodAt = -Infinity;
  let previousGoodValue = 0;

  const check = ({ at, value }: Sample): number => {
    requireAfter(previousAt, at);
    previousAt = at;
    if (!isWithin(value, sensorRange)) {
      return TEST_BITS.grossRange | FIRST_FAILED_FLAGS;
    }
    let tests = isWithin(value, plausibleRange) ? 0 : TEST_BITS.grossRange;
    const intervalMs = at - previousGoodAt;
    const isContinuous = intervalMs <= LONGEST_INTERVAL_MS;
    if (changePerMinute !== null && isContinuous) {
      // Under a minute counts as one: the resolution of a quick sensor is not a rate.
      const minutes = Math.max(1, intervalMs / MINUTE_MS);
      if (Math.abs(value - previousGoodValue) > changePerMinute * minutes) {
        tests |= TEST_BITS.rateOfChange;
      }
    }
    if (flatLineWindow?.isFlatWith(at, value, isContinuous) === true) {
      tests |= TEST_BITS.flatLine;
    }
    previousGoodAt = at;
    previousGoodValue = value;
    return tests === 0 ? 0 : tests | SUSPECT_BIT;
  };

  for (const sample of history) {
    check(sample);
  }
  return { check };
}

// A conjunction, so that NaN is in no range and fails.
function isWithin(value: number, { low, high }: { readonly low: number; readonly high: number }): boolean {
  return value >= low && value <= high;
}

/** Finds, reading by reading, whether the values of the last `durationMs` spread by less than a tolerance. */
class FlatLineWindow {
  private continuousSince = Infinity;
  private readonly lowest = new WindowMinimum();
  private readonly negatedHighest = new WindowMinimum();

  constructor(
    private readonly tolerance: number,
    private readonly durationMs: number,
  ) {}

  /** Adds the next reading; true when the window that ends with it is measured throughout and flat. */
  isFlatWith(at: number, value: number, isContinuous: boolean): boolean {
    if (!isContinuous) {
      this.continuousSince = at;
    }
    const low = this.lowest.with(at, value, at - this.durationMs);
    const high = -this.negatedHighest.with(at, -value, at - this.durationMs);
    return at - this.continuousSince >= this.durationMs && high - low < this.tolerance;
  }
}

/**
 * Minimum of a sliding window in constant time a reading: a queue of those readings that no later one undercuts, and that
 * can therefore still become the minimum.
 */
class WindowMinimum {
  private readonly ats: number[] = [];
  private readonly values: number[] = [];
  private head = 0;

  with(at: number, value: number, windowFrom: number): number {
    while (this.head < this.values.length && (this.values[this.values.length - 1] ?? value) >= value) {
      this.values.pop();
      this.ats.pop();
    }
    this.values.push(value);
    this.ats.push(at);
    while ((this.ats[this.head] ?? at) < windowFrom) {
      this.head += 1;
    }
    this.dropPassed();
    return this.values[this.head] ?? value;
  }

  private dropPassed(): void {
    const isMostlyPassed = this.head > 1000 && this.head * 2 > this.values.length;
    if (isMostlyPassed) {
      this.ats.splice(0, this.head);
      this.values.splice(0, this.head);
      this.head = 0;
    }
  }
}
