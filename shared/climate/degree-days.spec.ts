import fc from 'fast-check';

import {
  degreeDaysFromMinMax,
  degreeDaysFromSeries,
  type DailyExtremes,
  type UpperCutoff,
} from './degree-days';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const invalid = expect.objectContaining({ code: 'INVALID_ARGUMENT' });

const temperatures = fc.double({ min: -20, max: 50, noNaN: true });
const days = fc
  .tuple(temperatures, temperatures, fc.double({ min: 0, max: 10, noNaN: true }))
  .map(([a, b, cooling]) => {
    const minC = Math.min(a, b);
    return { minC, maxC: Math.max(a, b), nextMinC: minC - cooling };
  });
const methods = fc.constantFrom('average', 'averageOfFloored', 'singleSine', 'doubleSine');
const cutoffs = fc.constantFrom('horizontal', 'intermediate', 'vertical');

/** A day sampled from one sine wave, minimum at both ends, both ends included. */
function sineDay(minC: number, maxC: number, intervals: number): { at: number; value: number }[] {
  return Array.from({ length: intervals + 1 }, (_, index) => ({
    at: (index * DAY_MS) / intervals,
    value: (minC + maxC) / 2 - ((maxC - minC) / 2) * Math.cos((2 * Math.PI * index) / intervals),
  }));
}

describe('degreeDaysFromMinMax', () => {
  it('never rises when the base rises, by any method', () => {
    fc.assert(
      fc.property(
        days,
        methods,
        temperatures,
        fc.double({ min: 0, max: 20, noNaN: true }),
        (day, method, baseC, up) => {
          const lower = degreeDaysFromMinMax({ ...day, baseC, method });
          const higher = degreeDaysFromMinMax({ ...day, baseC: baseC + up, method });
          expect(higher).toBeLessThanOrEqual(lower + 1e-9);
        },
      ),
    );
  });

  it('is the same by every method on a day between the limits', () => {
    fc.assert(
      fc.property(days, methods, (day, method) => {
        const baseC = day.minC - 1;
        const steady = { ...day, nextMinC: day.minC };
        const meanC = (day.minC + day.maxC) / 2;
        expect(degreeDaysFromMinMax({ ...steady, baseC, method })).toBeCloseTo(meanC - baseC, 9);
      }),
    );
  });

  it('is ordered horizontal, intermediate, vertical, and never negative', () => {
    fc.assert(
      fc.property(days, fc.constantFrom('singleSine', 'doubleSine'), (day, method) => {
        const by = (cutoff: UpperCutoff): number =>
          degreeDaysFromMinMax({ ...day, baseC: 10, upperC: 25, method, cutoff });
        expect(by('horizontal')).toBeGreaterThanOrEqual(by('intermediate') - 1e-9);
        expect(by('intermediate')).toBeGreaterThanOrEqual(by('vertical') - 1e-9);
        expect(by('vertical')).toBeGreaterThanOrEqual(-1e-9);
      }),
    );
  });

  it.each([
    ['horizontal', 15],
    ['intermediate', 10],
    ['vertical', 0],
  ] as const)('on a level day 5 °C over the limit with the %s cutoff is %d', (cutoff, expected) => {
    const day = { minC: 30, maxC: 30, baseC: 10, upperC: 25, method: 'singleSine', cutoff } as const;

    expect(degreeDaysFromMinMax(day)).toBe(expected);
  });

  it('of a sine with the intermediate cutoff is never below the vertical result', () => {
    const day = { minC: 40, maxC: 60, baseC: 10, upperC: 25, method: 'singleSine' } as const;

    expect(degreeDaysFromMinMax({ ...day, cutoff: 'intermediate' })).toBe(0);
  });

  it.each<[string, Partial<DailyExtremes>]>([
    ['a minimum above the maximum', { minC: 21 }],
    ['a temperature that is not a number', { maxC: Number.NaN }],
    ['a base that is not a number', { baseC: Number.NaN }],
    ['an upper limit at the base', { upperC: 10 }],
    ['a double sine without the next minimum', { method: 'doubleSine' }],
    ['an average with a vertical cutoff', { method: 'average', cutoff: 'vertical' }],
  ])('refuses %s', (_title, change) => {
    const day: DailyExtremes = { minC: 12, maxC: 20, baseC: 10, method: 'singleSine' };

    expect(() => degreeDaysFromMinMax({ ...day, ...change })).toThrow(invalid);
  });
});

describe('degreeDaysFromSeries', () => {
  const day = { from: 0, to: DAY_MS, maxGapMs: HOUR_MS };

  it('of a level day is its height over the base', () => {
    const series = [0, 1, 2].map((hour) => ({ at: hour * HOUR_MS, value: 18 }));

    expect(degreeDaysFromSeries(series, { ...day, baseC: 10 })).toEqual({
      degreeDaysCD: (8 * 2) / 24,
      coveredMs: 2 * HOUR_MS,
    });
  });

  it('of a line that crosses the base counts its triangle only', () => {
    const series = [
      { at: 0, value: 8 },
      { at: HOUR_MS, value: 12 },
    ];

    // Half an hour above the base at 1 °C on average.
    expect(degreeDaysFromSeries(series, { ...day, baseC: 10 }).degreeDaysCD).toBeCloseTo(0.5 / 24, 12);
  });

  it('leaves a gap out of sum and coverage', () => {
    const series = [0, 1, 5, 6].map((hour) => ({ at: hour * HOUR_MS, value: 20 }));

    expect(degreeDaysFromSeries(series, { ...day, baseC: 10 })).toEqual({
      degreeDaysCD: (10 * 2) / 24,
      coveredMs: 2 * HOUR_MS,
    });
  });

  it('of a sine sampled hourly lies near the closed form and closes in on it with shorter intervals', () => {
    fc.assert(
      fc.property(days, cutoffs, ({ minC, maxC }, cutoff) => {
        fc.pre(maxC <= 40); // Over 2 × 25 − 10 °C a day and an instant are floored differently, as documented.
        const limits = { baseC: 10, upperC: 25, cutoff };
        const exact = degreeDaysFromMinMax({ minC, maxC, ...limits, method: 'singleSine' });
        const errorWith = (intervals: number): number =>
          Math.abs(
            degreeDaysFromSeries(sineDay(minC, maxC, intervals), { ...day, ...limits }).degreeDaysCD - exact,
          );
        // A chord's error falls with the square of the interval; the vertical cutoff jumps by 15 °C and where a wave
        // only just touches it the time above falls more slowly.
        expect(errorWith(24)).toBeLessThan(cutoff === 'vertical' ? 1.5 : 0.15);
        expect(errorWith(1440)).toBeLessThan(cutoff === 'vertical' ? 0.03 : 1e-4);
      }),
    );
  });

  it('with the intermediate cutoff does not count backwards in great heat', () => {
    const series = [0, 1].map((hour) => ({ at: hour * HOUR_MS, value: 48 }));

    expect(
      degreeDaysFromSeries(series, { ...day, baseC: 10, upperC: 25, cutoff: 'intermediate' }).degreeDaysCD,
    ).toBeCloseTo(0, 12);
  });

  it('refuses limits in the wrong order', () => {
    expect(() => degreeDaysFromSeries([], { ...day, baseC: 10, upperC: 9 })).toThrow(invalid);
  });
});
