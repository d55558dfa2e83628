import fc from 'fast-check';

import type { MeasuredQuantity } from '../climate/quantity';
import {
  createQualityCheck,
  FIRST_FAILED_FLAGS,
  objectingTests,
  qualityHistoryMs,
  qualityLevel,
  qualityLimits,
  type QualityLimits,
} from './quality-tests';
import type { Sample, Series } from './series';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;

function flagsOf(series: Series, limits: QualityLimits, history: Series = []): number[] {
  const check = createQualityCheck(limits, history);
  return series.map((sample) => check.check(sample));
}

/** What the flags of one reading say, in words. */
function verdict(flags: number): string {
  return [qualityLevel(flags), ...objectingTests(flags)].join(' ');
}

function everyMinutes(step: number, values: readonly number[]): Sample[] {
  return values.map((value, index) => ({ at: index * step * MINUTE_MS, value }));
}

const temperature = qualityLimits.airTemperature;

/** Temperatures a minute to hours apart, often level and sometimes absurd. */
const temperatures = fc
  .array(
    fc.tuple(
      fc.integer({ min: MINUTE_MS, max: 4 * HOUR_MS }),
      fc.oneof(
        { weight: 4, arbitrary: fc.constantFrom(20, 20.01) },
        fc.double({ min: -100, max: 200, noNaN: true }),
      ),
    ),
    { maxLength: 60 },
  )
  .map((steps) => {
    let at = 0;
    return steps.map(([stepMs, value]) => ({ at: (at += stepMs), value }));
  });

describe('gross range', () => {
  it.each<[MeasuredQuantity, number, string]>([
    ['airTemperature', 0, 'pass'],
    ['airTemperature', -0.1, 'suspect grossRange'],
    ['airTemperature', -40, 'suspect grossRange'],
    ['airTemperature', -40.1, 'fail grossRange'],
    ['airTemperature', 85, 'suspect grossRange'],
    ['airTemperature', 85.1, 'fail grossRange'],
    ['rootZoneTemperature', 45.1, 'suspect grossRange'],
    ['relativeHumidity', 100, 'pass'],
    ['relativeHumidity', 100.1, 'suspect grossRange'],
    ['relativeHumidity', 105.1, 'fail grossRange'],
    ['relativeHumidity', -0.1, 'fail grossRange'],
    ['ppfd', 0, 'pass'],
    ['ppfd', -1, 'fail grossRange'],
    ['illuminance', 130_000, 'suspect grossRange'],
    ['airTemperature', Number.NaN, 'fail grossRange'],
  ])('of %s %d is: %s', (quantity, value, expected) => {
    expect(flagsOf([{ at: 0, value }], qualityLimits[quantity]).map(verdict)).toEqual([expected]);
  });
});

describe('rate of change', () => {
  it('passes the fastest plausible change and suspects a faster one', () => {
    expect(flagsOf(everyMinutes(1, [20, 25, 30.1]), temperature).map(verdict)).toEqual([
      'pass',
      'pass',
      'suspect rateOfChange',
    ]);
  });

  it('allows more over a longer interval, and a whole minute for a shorter one', () => {
    expect(flagsOf(everyMinutes(2, [20, 30]), temperature).map(verdict)).toEqual(['pass', 'pass']);
    expect(flagsOf(everyMinutes(0.1, [20, 24]), temperature).map(verdict)).toEqual(['pass', 'pass']);
  });

  it('does not blame the reading after a failed one', () => {
    expect(flagsOf(everyMinutes(1, [20, 999.9, 20.1]), temperature).map(verdict)).toEqual([
      'pass',
      'fail grossRange',
      'pass',
    ]);
  });

  it('does not apply to light, which jumps when lamps switch', () => {
    expect(flagsOf(everyMinutes(1, [0, 800, 0]), qualityLimits.ppfd)).toEqual([0, 0, 0]);
  });
});

describe('flat line', () => {
  const level = (minutes: number): Sample[] => everyMinutes(10, Array<number>(minutes / 10 + 1).fill(20));

  it('suspects a level signal once it has been level for all of the duration', () => {
    const verdicts = flagsOf(level(12 * 60), temperature).map(verdict);

    expect(verdicts.at(-1)).toBe('suspect flatLine');
    expect(verdicts.slice(0, -1).every((each) => each === 'pass')).toBe(true);
  });

  it('passes a signal that spreads by the tolerance, and suspects one just below', () => {
    const swinging = (swing: number): Sample[] =>
      level(13 * 60).map(({ at }, index) => ({ at, value: index % 2 === 0 ? 0.5 : 0.5 + swing }));

    expect(
      flagsOf(swinging(0.0625), {
        ...temperature,
        flatLine: { tolerance: 0.0625, durationMs: 12 * HOUR_MS },
      }).at(-1),
    ).toBe(0);
    expect(verdict(flagsOf(swinging(0.04), temperature).at(-1)!)).toBe('suspect flatLine');
  });

  it('starts afresh after an interruption', () => {
    const first = level(11 * 60);
    const second = first.map(({ at, value }) => ({ at: at + 15 * HOUR_MS, value }));

    expect(flagsOf([...first, ...second], temperature).every((flags) => flags === 0)).toBe(true);
  });

  it('forgets an excursion once it lies further back than the duration', () => {
    const series = level(14 * 60).map((sample, index) => (index === 6 ? { ...sample, value: 22 } : sample));
    const verdicts = flagsOf(series, temperature).map(verdict);

    // The excursion at 60 minutes leaves the window after 12 h, with the reading at 13 h 10 min.
    expect(verdicts.indexOf('suspect flatLine')).toBe((13 * 60 + 10) / 10);
  });

  it('finds what a search through every window finds', () => {
    fc.assert(
      fc.property(temperatures, (series) => {
        const limits: QualityLimits = {
          ...temperature,
          flatLine: { tolerance: 0.05, durationMs: 6 * HOUR_MS },
        };
        const good = series.filter(({ value }) => value >= -40 && value <= 85);
        const flat = flagsOf(good, limits).map((flags) => objectingTests(flags).includes('flatLine'));

        const searched = good.map(({ at }, index) => {
          let since = index;
          while (since > 0 && good[since]!.at - good[since - 1]!.at <= 3 * HOUR_MS) {
            since -= 1;
          }
          const values = good
            .slice(0, index + 1)
            .filter((sample) => sample.at >= at - 6 * HOUR_MS)
            .map(({ value }) => value);
          const isMeasured = at - good[since]!.at >= 6 * HOUR_MS;
          return isMeasured && Math.max(...values) - Math.min(...values) < 0.05;
        });
        expect(flat).toEqual(searched);
      }),
    );
  });
});

describe('createQualityCheck', () => {
  it('gives the same flags in one go and in pieces that start with enough history', () => {
    fc.assert(
      fc.property(temperatures, fc.nat(60), (series, cut) => {
        const rest = series.slice(cut);
        const since = (rest[0]?.at ?? 0) - qualityHistoryMs(temperature);
        const good = series.slice(0, cut).filter(({ at }) => at >= since);

        expect(flagsOf(rest, temperature, good)).toEqual(flagsOf(series, temperature).slice(cut));
      }),
    );
  });

  it('fails a reading for its own value only, whatever came before', () => {
    fc.assert(
      fc.property(temperatures, (series) => {
        const alone = series.map((sample) => flagsOf([sample], temperature)[0]! >= FIRST_FAILED_FLAGS);

        expect(flagsOf(series, temperature).map((flags) => flags >= FIRST_FAILED_FLAGS)).toEqual(alone);
      }),
    );
  });

  it('refuses a reading at or before the previous one', () => {
    const check = createQualityCheck(temperature, [{ at: 5, value: 20 }]);

    expect(() => check.check({ at: 5, value: 20 })).toThrow(
      expect.objectContaining({ code: 'UNORDERED_SERIES' }),
    );
  });
});

describe('flags', () => {
  it('name several objecting tests at once and order levels as numbers', () => {
    const [, flags = 0] = flagsOf(everyMinutes(1, [20, 60]), temperature);

    expect(verdict(flags)).toBe('suspect grossRange rateOfChange');
    expect(flags).toBeLessThan(FIRST_FAILED_FLAGS);
    expect(verdict(0)).toBe('pass');
  });
});
