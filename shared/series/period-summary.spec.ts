import fc from 'fast-check';

import {
  createPeriodFold,
  meanOfPeriod,
  recomputePeriods,
  type PeriodFoldOptions,
  type PeriodSums,
} from './period-summary';
import { roomDayBoundsAt, utcHourBounds } from './room-days';
import type { Sample, Series } from './series';
import { timeWeightedStatistics } from './time-weighted-statistics';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;

const hourly: Pick<PeriodFoldOptions, 'boundsAt' | 'maxGapMs' | 'threshold'> = {
  boundsAt: utcHourBounds,
  maxGapMs: 90 * MINUTE_MS,
  threshold: 10,
};

/** Keeps sums between folds as a database does, and folds a piece the way a live batch is. */
function createStore(options: typeof hourly): {
  foldPiece: (piece: Series) => void;
  sums: () => PeriodSums[];
} {
  const stored = new Map<number, PeriodSums>();
  let previous: Sample | null = null;
  return {
    foldPiece: (piece) => {
      const fold = createPeriodFold({ ...options, previous, load: (start) => stored.get(start) });
      for (const sample of piece) {
        fold.add(sample);
      }
      for (const sums of fold.touched()) {
        stored.set(sums.start, sums);
      }
      previous = piece.at(-1) ?? previous;
    },
    sums: () => [...stored.values()].sort((a, b) => a.start - b.start),
  };
}

function foldAll(series: Series, options: typeof hourly): PeriodSums[] {
  const store = createStore(options);
  store.foldPiece(series);
  return store.sums();
}

function minutes(...pairs: [minute: number, value: number][]): Sample[] {
  return pairs.map(([minute, value]) => ({ at: minute * MINUTE_MS, value }));
}

/** Readings seconds to hours apart, so that some lines pass whole hours and some intervals are gaps. */
const seriesOfReadings = fc
  .tuple(
    fc.integer({ min: 0, max: 48 * HOUR_MS }),
    fc.array(
      fc.tuple(
        fc.oneof(fc.integer({ min: 1, max: 10 * MINUTE_MS }), fc.integer({ min: 1, max: 3 * HOUR_MS })),
        fc.double({ min: -40, max: 85, noNaN: true }),
      ),
      { minLength: 1, maxLength: 80 },
    ),
  )
  .map(([start, steps]) => {
    let at = start;
    return steps.map(([stepMs, value]) => ({ at: (at += stepMs), value }));
  });

const everyBounds = fc.constantFrom(
  utcHourBounds,
  roomDayBoundsAt('Europe/Dublin'),
  roomDayBoundsAt('Australia/Lord_Howe'),
);

describe('createPeriodFold', () => {
  it('sums readings of one hour', () => {
    const [sums] = foldAll(minutes([0, 0], [20, 20], [40, 20]), hourly);

    expect(sums).toEqual({
      start: 0,
      end: HOUR_MS,
      count: 3,
      coveredMs: 40 * MINUTE_MS,
      min: 0,
      max: 20,
      integral: (10 * 20 + 20 * 20) * MINUTE_MS,
      aboveThresholdMs: 30 * MINUTE_MS,
      firstAt: 0,
      firstValue: 0,
      lastAt: 40 * MINUTE_MS,
      lastValue: 20,
    });
  });

  it('splits a line where the hour turns, and counts a reading on the turn to the later hour', () => {
    const [first, second, third] = foldAll(minutes([50, 10], [70, 30], [120, 30]), hourly);

    expect(first).toMatchObject({
      count: 1,
      coveredMs: 10 * MINUTE_MS,
      integral: 15 * 10 * MINUTE_MS,
      max: 10,
    });
    expect(second).toMatchObject({ count: 1, coveredMs: 60 * MINUTE_MS, min: 30, max: 30 });
    expect(third).toMatchObject({ count: 1, coveredMs: 0, integral: 0, firstAt: 120 * MINUTE_MS });
  });

  it('covers an hour that only a line passes, without readings of its own', () => {
    const [, between] = foldAll(minutes([50, 10], [130, 10]), hourly);

    expect(between).toEqual({
      start: HOUR_MS,
      end: 2 * HOUR_MS,
      count: 0,
      coveredMs: HOUR_MS,
      min: null,
      max: null,
      integral: 10 * HOUR_MS,
      aboveThresholdMs: HOUR_MS,
      firstAt: null,
      firstValue: null,
      lastAt: null,
      lastValue: null,
    });
  });

  it('leaves a gap uncovered and the hours within it untouched', () => {
    const sums = foldAll(minutes([0, 10], [10, 10], [200, 10], [210, 10]), hourly);

    expect(sums.map(({ start, coveredMs }) => [start / HOUR_MS, coveredMs / MINUTE_MS])).toEqual([
      [0, 10],
      [3, 10],
    ]);
  });

  it('keeps no time above a threshold where there is none', () => {
    expect(
      foldAll(minutes([0, 10], [10, 10]), { ...hourly, threshold: null })[0]?.aboveThresholdMs,
    ).toBeNull();
  });

  it('refuses a reading at or before the previous one, and one that is not finite', () => {
    const fold = createPeriodFold({ ...hourly, previous: { at: 5, value: 1 }, load: () => undefined });

    expect(() => fold.add({ at: 5, value: 1 })).toThrow(
      expect.objectContaining({ code: 'UNORDERED_SERIES' }),
    );
    expect(() => fold.add({ at: 6, value: Number.NaN })).toThrow(
      expect.objectContaining({ code: 'INVALID_ARGUMENT' }),
    );
  });

  it('comes to the same bits however the readings are cut into pieces', () => {
    fc.assert(
      fc.property(
        seriesOfReadings,
        fc.array(fc.nat(80), { maxLength: 8 }),
        everyBounds,
        (series, cuts, boundsAt) => {
          const options = { ...hourly, boundsAt };
          const edges = [
            0,
            ...cuts.filter((cut) => cut < series.length).sort((a, b) => a - b),
            series.length,
          ];
          const inPieces = createStore(options);
          for (const [index, edge] of edges.slice(1).entries()) {
            inPieces.foldPiece(series.slice(edges[index], edge));
          }

          // toEqual compares numbers by Object.is: equal to the last bit.
          expect(inPieces.sums()).toEqual(foldAll(series, options));
        },
      ),
    );
  });

  it('agrees with statistics computed over each period on their own', () => {
    fc.assert(
      fc.property(seriesOfReadings, everyBounds, (series, boundsAt) => {
        for (const sums of foldAll(series, { ...hourly, boundsAt })) {
          const statistics = timeWeightedStatistics(series, {
            from: sums.start,
            to: sums.end,
            maxGapMs: hourly.maxGapMs,
            range: { low: hourly.threshold, high: null },
          });
          expect(sums).toMatchObject({
            count: statistics.count,
            min: statistics.min,
            max: statistics.max,
            coveredMs: statistics.coveredMs,
          });
          expect(sums.aboveThresholdMs).toBeCloseTo(statistics.inRangeMs, 3);
          expect(meanOfPeriod(sums) ?? 0).toBeCloseTo(statistics.mean ?? 0, 9);
        }
      }),
    );
  });
});

describe('recomputePeriods', () => {
  it('comes to the same bits as live increments, from the readings of the periods and one neighbour each side', () => {
    fc.assert(
      fc.property(
        seriesOfReadings,
        fc.nat(60),
        fc.integer({ min: 1, max: 6 }),
        (series, skippedHours, hours) => {
          const from = utcHourBounds(series[0]!.at).start + skippedHours * HOUR_MS;
          const to = from + hours * HOUR_MS;
          const inside = series.filter(({ at }) => at >= from && at < to);
          const before = series.findLast(({ at }) => at < from);
          const after = series.find(({ at }) => at >= to);
          const needed = [before, ...inside, after].filter((sample) => sample !== undefined);

          const live = foldAll(series, hourly).filter(({ start }) => start >= from && start < to);
          expect(recomputePeriods(needed, { ...hourly, from, to })).toEqual(live);
        },
      ),
    );
  });
});

describe('meanOfPeriod', () => {
  it('of a period without covered time is null, and of a period of zeros 0', () => {
    expect(meanOfPeriod({ integral: 0, coveredMs: 0 })).toBeNull();
    expect(meanOfPeriod({ integral: 0, coveredMs: HOUR_MS })).toBe(0);
  });
});
