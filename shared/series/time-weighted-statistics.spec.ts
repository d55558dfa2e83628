import fc from 'fast-check';

import type { Sample } from './series';
import { timeWeightedStatistics } from './time-weighted-statistics';

const HOUR_MS = 3_600_000;

function hourly(...pairs: [hour: number, value: number][]): Sample[] {
  return pairs.map(([hour, value]) => ({ at: hour * HOUR_MS, value }));
}

/** Readings at uneven intervals of up to two hours, over about two days. */
const seriesOfReadings = fc
  .array(fc.tuple(fc.integer({ min: 1, max: 2 * HOUR_MS }), fc.double({ min: -20, max: 50, noNaN: true })), {
    minLength: 2,
    maxLength: 60,
  })
  .map((steps) => {
    let at = 0;
    return steps.map(([stepMs, value]) => ({ at: (at += stepMs), value }));
  });

describe('timeWeightedStatistics', () => {
  // t = 0, 1, 4 h and v = 10, 20, 20: trapezoid 18.75, where steps give 17.5 and the plain mean 16.67 (arithmetic).
  it('weights values by time along straight lines', () => {
    const statistics = timeWeightedStatistics(hourly([0, 10], [1, 20], [4, 20]), {
      from: 0,
      to: 4 * HOUR_MS,
      maxGapMs: 3 * HOUR_MS,
    });

    expect(statistics.mean).toBe(18.75);
    expect(statistics.coverage).toBe(1);
  });

  // 16 → 20 → 24 at 0, 2, 4 h, range 18 to 22: half the time within (arithmetic).
  it('splits lines where they cross the range', () => {
    const statistics = timeWeightedStatistics(hourly([0, 16], [2, 20], [4, 24]), {
      from: 0,
      to: 4 * HOUR_MS,
      maxGapMs: 2 * HOUR_MS,
      range: { low: 18, high: 22 },
    });

    expect(statistics).toMatchObject({ inRangeMs: 2 * HOUR_MS, belowMs: HOUR_MS, aboveMs: HOUR_MS });
  });

  it('counts time exactly on a limit as in range', () => {
    const series = hourly([0, 18], [1, 18]);
    const window = { from: 0, to: HOUR_MS, maxGapMs: HOUR_MS };

    expect(timeWeightedStatistics(series, { ...window, range: { low: 18, high: 22 } }).inRangeMs).toBe(
      HOUR_MS,
    );
    expect(timeWeightedStatistics(series, { ...window, range: { low: 10, high: 18 } }).inRangeMs).toBe(
      HOUR_MS,
    );
  });

  it('leaves a side without limit open', () => {
    const options = { from: 0, to: HOUR_MS, maxGapMs: HOUR_MS, range: { low: null, high: 0 } };

    expect(timeWeightedStatistics(hourly([0, -40], [1, -30]), options)).toMatchObject({
      inRangeMs: HOUR_MS,
      belowMs: 0,
      aboveMs: 0,
    });
  });

  it('does not cover an interval longer than the gap limit, and covers one of just that length', () => {
    const series = hourly([0, 10], [1, 10], [3, 30], [4, 30]);
    const window = { from: 0, to: 4 * HOUR_MS };

    const withGap = timeWeightedStatistics(series, { ...window, maxGapMs: 2 * HOUR_MS - 1 });
    const withoutGap = timeWeightedStatistics(series, { ...window, maxGapMs: 2 * HOUR_MS });

    expect(withGap).toMatchObject({ coveredMs: 2 * HOUR_MS, coverage: 0.5, mean: 20 });
    expect(withoutGap).toMatchObject({ coveredMs: 4 * HOUR_MS, coverage: 1 });
  });

  it('interpolates at the window edges, but takes extremes from samples inside, the end left out', () => {
    const statistics = timeWeightedStatistics(hourly([0, 0], [2, 20], [4, 40], [6, 60]), {
      from: HOUR_MS,
      to: 4 * HOUR_MS,
      maxGapMs: 2 * HOUR_MS,
    });

    expect(statistics).toMatchObject({ count: 1, min: 20, max: 20, mean: 25, coverage: 1 });
  });

  it('of a single sample has extremes and no mean', () => {
    const statistics = timeWeightedStatistics(hourly([1, 0]), {
      from: 0,
      to: 4 * HOUR_MS,
      maxGapMs: HOUR_MS,
    });

    expect(statistics).toMatchObject({ count: 1, min: 0, max: 0, mean: null, coveredMs: 0, coverage: 0 });
  });

  it('of nothing is null and not zero', () => {
    const statistics = timeWeightedStatistics([], { from: 0, to: HOUR_MS, maxGapMs: HOUR_MS });

    expect(statistics).toMatchObject({ count: 0, min: null, max: null, mean: null, coverage: 0 });
  });

  it('refuses samples at the same instant or backwards, and a window that does not run forward', () => {
    const window = { from: 0, to: HOUR_MS, maxGapMs: HOUR_MS };

    expect(() => timeWeightedStatistics(hourly([1, 0], [1, 0]), window)).toThrow(
      expect.objectContaining({ code: 'UNORDERED_SERIES' }),
    );
    expect(() => timeWeightedStatistics([], { ...window, to: 0 })).toThrow(
      expect.objectContaining({ code: 'INVALID_ARGUMENT' }),
    );
  });

  it('adds up over a window split anywhere', () => {
    fc.assert(
      fc.property(
        seriesOfReadings,
        fc.integer({ min: 0, max: HOUR_MS }),
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        (series, from, splitShare) => {
          const to = (series.at(-1)?.at ?? 0) + HOUR_MS;
          const split = Math.round(from + (to - from) * splitShare);
          fc.pre(split > from && split < to);
          const options = { maxGapMs: HOUR_MS, range: { low: 5, high: 25 } };
          const whole = timeWeightedStatistics(series, { from, to, ...options });
          const parts = [
            timeWeightedStatistics(series, { from, to: split, ...options }),
            timeWeightedStatistics(series, { from: split, to, ...options }),
          ] as const;

          const sum = (of: (part: typeof whole) => number): number => of(parts[0]) + of(parts[1]);
          expect(sum((part) => part.count)).toBe(whole.count);
          expect(sum((part) => part.coveredMs)).toBe(whole.coveredMs);
          // Times from crossings are fractions of a line; a thousandth of a millisecond is rounding.
          expect(sum((part) => part.inRangeMs)).toBeCloseTo(whole.inRangeMs, 3);
          expect(sum((part) => part.belowMs)).toBeCloseTo(whole.belowMs, 3);
          expect(sum((part) => part.aboveMs)).toBeCloseTo(whole.aboveMs, 3);
          expect(sum((part) => (part.mean ?? 0) * part.coveredMs) / HOUR_MS).toBeCloseTo(
            ((whole.mean ?? 0) * whole.coveredMs) / HOUR_MS,
            6,
          );
        },
      ),
    );
  });
});
