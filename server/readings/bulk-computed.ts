import { computedValue } from '@shared/climate/computed-quantities';
import { computedQuantities, type ComputedQuantity } from '@shared/climate/quantity';
import { maxGapMs } from '@shared/series/expected-interval';
import { createPeriodFold, type PeriodFold, type PeriodSums } from '@shared/series/period-summary';
import { utcHourBounds } from '@shared/series/room-days';
import { BulkColumns } from './bulk-columns';
import { addGood, pairColumns } from './bulk-pairing';
import { BulkSpans } from './bulk-spans';
import { within, withOpen, type BulkSums, type BulkTrack } from './bulk-track';
import { withinMs } from './computed-quantities';
import type { TouchedSpan } from './late-readings';
import { lastReadingIn } from './sensor-stream';
import { settledUpTo } from './settling';

/** A thermometer's time on a shelf [ms], both ends included. */
export interface ThermometerStay {
  readonly track: BulkTrack;
  readonly from: number;
  readonly to: number;
}

/** A hygrometer's time on a shelf [ms], half-open, with the thermometers that were ever there. */
export interface HygrometerStay {
  readonly from: number;
  readonly to: number;
  readonly leafOffsetC: number;
  readonly thermometers: readonly ThermometerStay[];
}

interface Running {
  readonly quantity: ComputedQuantity;
  fold: PeriodFold;
  newest: PeriodSums | undefined;
  savedTo: number;
}

/** A computed quantity's sums. */
export interface ComputedBulkSums extends BulkSums {
  readonly quantity: ComputedQuantity;
}

/** The computed quantities of one hygrometer, paired and summed as its readings pass. */
export class BulkComputed {
  /** Deficits [kPa] since the last {@link BulkComputed.clearDeficits}, for the alerts. */
  readonly deficits = new BulkColumns();
  /** Up to where points are in the sums [ms]. */
  settledTo = -Infinity;
  private readonly withinMs: number;
  private readonly reachMs: number;
  private readonly humidity = new BulkColumns();
  private readonly temperatures: BulkColumns[];
  private readonly running: Running[];
  private readonly newPoints: BulkSpans;

  /**
   * @param track - The hygrometer's readings.
   * @param stays - Where it was, in order.
   * @param beside - The thermometers on its shelf now.
   */
  constructor(
    readonly track: BulkTrack,
    private readonly stays: readonly HygrometerStay[],
    private readonly beside: readonly BulkTrack[],
  ) {
    this.withinMs = withinMs(track.sensor);
    this.reachMs = this.withinMs + maxGapMs(track.sensor.expectedIntervalS);
    this.temperatures = stays.map(() => new BulkColumns());
    this.newPoints = new BulkSpans(this.reachMs);
    this.running = computedQuantities.map((quantity) => ({
      quantity,
      fold: this.newFold(undefined),
      newest: undefined,
      savedTo: -Infinity,
    }));
  }

  /** Where humidity or temperature first changed [ms]; null when neither did. */
  get changedFrom(): number | null {
    const own = this.track.spans.firstAt ?? Infinity;
    const theirs = this.thermometers().map(({ spans }) => (spans.firstAt ?? Infinity) - this.withinMs);
    const first = Math.min(own, ...theirs);
    return Number.isFinite(first) ? first : null;
  }

  /** Takes what the tracks have in their columns. */
  take(): void {
    addGood(this.humidity, [{ columns: this.track.columns, from: -Infinity, to: Infinity }]);
    this.stays.forEach(({ thermometers }, stay) => {
      const there = thermometers.map(({ track: { columns }, from, to }) => ({ columns, from, to }));
      const known = this.temperatures[stay];
      if (known !== undefined) addGood(known, there);
    });
  }

  /**
   * Pairs and sums what can't change any more.
   *
   * @param clock - Every reading before this instant has been taken [ms].
   */
  settle(clock: number): void {
    this.settleUpTo(Math.min(this.settledBound(), clock - 1));
  }

  /** Pairs and sums what there is, at the end. */
  settleLast(): void {
    const held = this.track.sensor.computedTo ?? -Infinity;
    this.settleUpTo(Math.max(this.settledBound(), Math.min(held, this.track.latest?.at ?? -Infinity)));
  }

  /** Forgets the deficits once the alerts have read them. */
  clearDeficits(): void {
    this.deficits.clear();
  }

  /** As {@link BulkTrack.completeSums}. */
  completeSums(isLast: boolean): ComputedBulkSums[] {
    return this.running.map((one) => {
      const touched = withOpen(one.newest, one.fold.touched());
      const to = isLast ? Infinity : (touched.at(-1)?.start ?? one.savedTo);
      const stretches = this.touched({ from: one.savedTo, to });
      one.savedTo = to;
      one.newest = touched.at(-1);
      one.fold = this.newFold(one.newest);
      return { quantity: one.quantity, stretches, sums: within(stretches, touched) };
    });
  }

  private touched(window: TouchedSpan): TouchedSpan[] {
    const reaches = [this.track, ...this.thermometers()].map(({ spans }) => spans).concat(this.newPoints);
    return merged(reaches.flatMap((spans) => spans.touchedPeriods(window, this.reachMs, utcHourBounds)));
  }

  private thermometers(): BulkTrack[] {
    return [...new Set(this.stays.flatMap(({ thermometers }) => thermometers.map(({ track }) => track)))];
  }

  private settledBound(): number {
    const { beside } = this;
    const tracks = [this.track, ...beside];
    return settledUpTo(
      this.track.sensor,
      beside.map(({ sensor }) => sensor),
      ({ id }) => tracks.find(({ sensor }) => sensor.id === id)?.latest?.at ?? -Infinity,
    );
  }

  private settleUpTo(bound: number): void {
    if (bound <= this.settledTo) return;
    this.settledTo = bound;
    this.stays.forEach(({ from, to, leafOffsetC }, stay) => {
      const temperature = this.temperatures[stay];
      if (temperature === undefined) return;
      const humidity = { columns: this.humidity, from, to: Math.min(to - 1, bound) };
      pairColumns(humidity, temperature, this.withinMs, (at, humidityPct, temperatureC) =>
        this.sum(at, humidityPct, temperatureC, leafOffsetC),
      );
      temperature.dropUpTo(bound - this.withinMs - 1);
    });
    this.humidity.dropUpTo(bound);
  }

  private sum(at: number, humidityPct: number, temperatureC: number, leafOffsetC: number): void {
    if (at > (this.track.sensor.computedTo ?? -Infinity)) this.newPoints.add(at);
    for (const { quantity, fold } of this.running) {
      const value = computedValue(quantity, temperatureC, humidityPct, leafOffsetC);
      if (value === null) continue;
      fold.add({ at, value });
      if (quantity === 'vapourPressureDeficit') this.deficits.push(at, value, 0);
    }
  }

  private newFold(newest: PeriodSums | undefined): PeriodFold {
    return createPeriodFold({
      boundsAt: utcHourBounds,
      maxGapMs: maxGapMs(this.track.sensor.expectedIntervalS),
      threshold: null,
      previous: lastReadingIn(newest),
      load: (start) => (newest?.start === start ? newest : undefined),
    });
  }
}

function merged(stretches: TouchedSpan[]): TouchedSpan[] {
  const joined: { from: number; to: number }[] = [];
  for (const { from, to } of stretches.sort((a, b) => a.from - b.from)) {
    const last = joined.at(-1);
    if (last !== undefined && from <= last.to) last.to = Math.max(last.to, to);
    else joined.push({ from, to });
  }
  return joined;
}
