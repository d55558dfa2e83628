import fc from 'fast-check';

import { thinForChart } from './thin-for-chart';

const seriesOfReadings = fc
  .array(fc.tuple(fc.integer({ min: 1, max: 20 }), fc.double({ min: -40, max: 85, noNaN: true })), {
    minLength: 1,
    maxLength: 300,
  })
  .map((steps) => {
    let at = 0;
    return steps.map(([step, value]) => ({ at: (at += step), value }));
  });

describe('thinForChart', () => {
  it('gives a short series back whole, with a break in the middle of a gap', () => {
    const series = [
      { at: 0, value: 1 },
      { at: 10, value: 2 },
      { at: 40, value: 0 },
    ];

    expect(thinForChart(series, { maxPoints: 6, maxGapMs: 10 })).toEqual([
      { at: 0, value: 1 },
      { at: 10, value: 2 },
      { at: 25, value: null },
      { at: 40, value: 0 },
    ]);
  });

  it('keeps a lone spike of a long series, where it was', () => {
    const series = Array.from({ length: 100_000 }, (_, at) => ({ at, value: at === 54_321 ? 40 : 20 }));

    expect(thinForChart(series, { maxPoints: 300, maxGapMs: 1 })).toContainEqual({ at: 54_321, value: 40 });
  });

  it('of a thinned series breaks the line across a gap wider than its points', () => {
    const series = Array.from({ length: 2000 }, (_, index) => ({
      at: index < 1000 ? index : index + 5000,
      value: index % 10,
    }));
    const breaks = thinForChart(series, { maxPoints: 100, maxGapMs: 1 }).filter(
      ({ value }) => value === null,
    );

    expect(breaks).toEqual([{ at: (999 + 6000) / 2, value: null }]);
  });

  it('of nothing is nothing', () => {
    expect(thinForChart([], { maxPoints: 6, maxGapMs: 1 })).toEqual([]);
  });

  it('refuses fewer than 6 points and a series out of order', () => {
    const unordered = [
      { at: 1, value: 0 },
      { at: 1, value: 0 },
    ];

    expect(() => thinForChart([], { maxPoints: 5, maxGapMs: 1 })).toThrow(
      expect.objectContaining({ code: 'OUT_OF_RANGE' }),
    );
    expect(() => thinForChart(unordered, { maxPoints: 6, maxGapMs: 1 })).toThrow(
      expect.objectContaining({ code: 'UNORDERED_SERIES' }),
    );
  });

  it('never exceeds its points, invents none, keeps order, ends and extremes', () => {
    fc.assert(
      fc.property(
        seriesOfReadings,
        fc.integer({ min: 6, max: 100 }),
        fc.integer({ min: 1, max: 20 }),
        (series, maxPoints, maxGapMs) => {
          const points = thinForChart(series, { maxPoints, maxGapMs });
          const drawn = points.filter(({ value }) => value !== null);
          const valuesDrawn = drawn.map(({ value }) => value);
          const values = series.map(({ value }) => value);

          expect(points.length).toBeLessThanOrEqual(maxPoints);
          expect(points.every(({ at }, index) => index === 0 || at > points[index - 1]!.at)).toBe(true);
          expect(series).toEqual(expect.arrayContaining(drawn));
          expect([drawn[0], drawn.at(-1)]).toEqual([series[0], series.at(-1)]);
          expect(valuesDrawn).toContain(Math.min(...values));
          expect(valuesDrawn).toContain(Math.max(...values));
        },
      ),
    );
  });
});
