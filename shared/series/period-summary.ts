import { DomainError } from '../errors/domain-error';
import { shareAtOrAbove, valueBetween } from './linear-segment';
import { requireAfter, type Sample } from './series';

/** A half-open span of time [ms since epoch] that sums are kept for: an hour in UTC, or a room's day. */
export interface PeriodBounds {
  readonly start: number;
  readonly end: number;
}

/** Sums of one sensor over one period: what is stored, and all that is needed to go on adding to it. */
export interface PeriodSums extends PeriodBounds {
  /** Readings in the period. 0 where only the line between two readings passes over it. */
  readonly count: number;
  /** Time that the readings speak for [ms]. */
  readonly coveredMs: number;
  /** Lowest reading; `null` without readings. Values interpolated at the period's edges don't count here. */
  readonly min: number | null;
  /** Highest reading; `null` without readings. */
  readonly max: number | null;
  /** Integral over the covered time [unit of the value × ms]; divided by `coveredMs` it is the time-weighted mean. */
  readonly integral: number;
  /** Covered time at or above the threshold [ms]; `null` where the quantity has none. */
  readonly aboveThresholdMs: number | null;
  /** Instant and value of the first reading; `null` without readings. */
  readonly firstAt: number | null;
  readonly firstValue: number | null;
  /** Instant and value of the last reading; `null` without readings. */
  readonly lastAt: number | null;
  readonly lastValue: number | null;
}

/** What a fold of readings into periods needs to know. */
export interface PeriodFoldOptions {
  /** Bounds of the period that an instant belongs to, such as `utcHourBounds` or `roomDayBoundsAt(zone)`. */
  readonly boundsAt: (at: number) => PeriodBounds;
  /** Longest interval between two readings that still counts as measured [ms]; a longer one is a gap. */
  readonly maxGapMs: number;
  /** Value from which time is counted as above the threshold, such as a light sensor's; `null` for none. */
  readonly threshold: number | null;
  /** The reading folded last before, from whose instant the first line starts; `null` at the very beginning. */
  readonly previous: Sample | null;
  /** Sums so far of the period that starts at an instant, or `undefined` if it has none. Asked once a period. */
  readonly load: (start: number) => PeriodSums | undefined;
}

/** A running fold of readings into sums of periods. */
export interface PeriodFold {
  /**
   * Adds the next reading.
   *
   * @throws {@link DomainError} `UNORDERED_SERIES` unless it is later than the one before it, `INVALID_ARGUMENT` unless
   *   its value is finite.
   */
  add(sample: Sample): void;
  /** Sums of all periods that readings or lines between them changed, in order of time. */
  touched(): PeriodSums[];
}

/**
 * Time-weighted mean of a period.
 *
 * @param sums - The period's sums.
 * @returns Mean in the unit of the value; `null` where nothing is covered.
 */
export function meanOfPeriod(sums: Pick<PeriodSums, 'integral' | 'coveredMs'>): number | null {
  return sums.coveredMs === 0 ? null : sums.integral / sums.coveredMs;
}

/**
 * Starts a fold of one sensor's readings, in order of time, into sums of periods.
 *
 * @param options - See {@link PeriodFoldOptions}.
 * @returns The fold.
 *
 * @remarks
 * Two readings no further apart than `maxGapMs` are joined by a straight line, whose trapezoids go to every period that
 * it passes. A line is added when its later end arrives, always with the same operations in the same order: fed in one
 * go or in pieces (each going on from the `touched()` sums and the last reading of the piece before), the results are
 * equal to the last bit. So a live increment and a recomputation from scratch agree exactly. To recompute a period,
 * fold the last reading before it as `previous`, its own readings, and the first one after it; the sums of the
 * neighbours that this touches are partial and to be thrown away, see {@link recomputePeriods}.
 */
export function createPeriodFold(options: PeriodFoldOptions): PeriodFold {
  const { boundsAt, maxGapMs, threshold, load } = options;
  const periods: RunningSums[] = [];
  let current: RunningSums | null = null;
  let hasPrevious = options.previous !== null;
  let previousAt = options.previous?.at ?? -Infinity;
  let previousValue = options.previous?.value ?? 0;

  const periodAt = (at: number): RunningSums => {
    if (current === null || at >= current.end) {
      const bounds = boundsAt(at);
      current = new RunningSums(bounds, load(bounds.start), threshold);
      periods.push(current);
    }
    return current;
  };

  const addLine = (toAt: number, toValue: number): void => {
    let at = previousAt;
    let value = previousValue;
    while (at < toAt) {
      const period = periodAt(at);
      const endsInside = toAt <= period.end;
      const endAt = endsInside ? toAt : period.end;
      const endValue = endsInside
        ? toValue
        : valueBetween(previousAt, previousValue, toAt, toValue, period.end);
      period.addLine(value, endValue, endAt - at);
      at = endAt;
      value = endValue;
    }
  };

  return {
    add: ({ at, value }) => {
      requireAfter(previousAt, at);
      requireFinite(at, value);
      if (hasPrevious && at - previousAt <= maxGapMs) {
        addLine(at, value);
      }
      periodAt(at).addReading(at, value);
      hasPrevious = true;
      previousAt = at;
      previousValue = value;
    },
    touched: () => periods.map((period) => period.toSums()),
  };
}

/**
 * Computes the sums of whole periods from scratch.
 *
 * @param samples - The readings in the periods, in order, with the last one before and the first one after them where
 *   they exist, because their lines reach in.
 * @param options - `from` and `to`, half-open and on bounds of periods [ms since epoch], and the options of the fold.
 * @returns Sums of the periods that start in the window, in order; bit for bit what live increments come to.
 * @throws {@link DomainError} `UNORDERED_SERIES` or `INVALID_ARGUMENT` as {@link PeriodFold.add} does.
 */
export function recomputePeriods(
  samples: Iterable<Sample>,
  options: Pick<PeriodFoldOptions, 'boundsAt' | 'maxGapMs' | 'threshold'> & {
    readonly from: number;
    readonly to: number;
  },
): PeriodSums[] {
  const { from, to, ...rest } = options;
  const fold = createPeriodFold({ ...rest, previous: null, load: () => undefined });
  for (const sample of samples) {
    fold.add(sample);
  }
  return fold.touched().filter(({ start }) => start >= from && start < to);
}

function requireFinite(at: number, value: number): void {
  if (!Number.isFinite(value)) {
    throw new DomainError('INVALID_ARGUMENT', 'a reading must be finite; a missing one is left out', {
      at,
      value,
    });
  }
}

/**
 * Sums under way. Plain numbers throughout, infinities standing for "no reading yet": a million readings are folded
 * without an allocation for each, which nullable fields would cost.
 */
class RunningSums {
  readonly start: number;
  readonly end: number;
  private count: number;
  private coveredMs: number;
  private min: number;
  private max: number;
  private integral: number;
  private aboveThresholdMs: number;
  private firstAt: number;
  private firstValue: number;
  private lastAt: number;
  private lastValue: number;
  private readonly hasThreshold: boolean;
  private readonly threshold: number;

  constructor(bounds: PeriodBounds, soFar: PeriodSums | undefined, threshold: number | null) {
    this.start = bounds.start;
    this.end = bounds.end;
    this.count = soFar?.count ?? 0;
    this.coveredMs = soFar?.coveredMs ?? 0;
    this.min = soFar?.min ?? Infinity;
    this.max = soFar?.max ?? -Infinity;
    this.integral = soFar?.integral ?? 0;
    this.aboveThresholdMs = soFar?.aboveThresholdMs ?? 0;
    this.firstAt = soFar?.firstAt ?? Infinity;
    this.firstValue = soFar?.firstValue ?? 0;
    this.lastAt = soFar?.lastAt ?? -Infinity;
    this.lastValue = soFar?.lastValue ?? 0;
    this.hasThreshold = threshold !== null;
    this.threshold = threshold ?? Infinity;
  }

  addReading(at: number, value: number): void {
    if (this.count === 0) {
      this.firstAt = at;
      this.firstValue = value;
    }
    this.count += 1;
    this.lastAt = at;
    this.lastValue = value;
    if (value < this.min) {
      this.min = value;
    }
    if (value > this.max) {
      this.max = value;
    }
  }

  addLine(fromValue: number, toValue: number, durationMs: number): void {
    this.coveredMs += durationMs;
    this.integral += ((fromValue + toValue) / 2) * durationMs;
    if (this.hasThreshold) {
      this.aboveThresholdMs += shareAtOrAbove(fromValue, toValue, this.threshold) * durationMs;
    }
  }

  toSums(): PeriodSums {
    const hasReadings = this.count > 0;
    return {
      start: this.start,
      end: this.end,
      count: this.count,
      coveredMs: this.coveredMs,
      min: hasReadings ? this.min : null,
      max: hasReadings ? this.max : null,
      integral: this.integral,
      aboveThresholdMs: this.hasThreshold ? this.aboveThresholdMs : null,
      firstAt: hasReadings ? this.firstAt : null,
      firstValue: hasReadings ? this.firstValue : null,
      lastAt: hasReadings ? this.lastAt : null,
      lastValue: hasReadings ? this.lastValue : null,
    };
  }
}
