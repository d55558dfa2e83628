import fc from 'fast-check';

import { pairNearest } from './pair-nearest';
import type { Sample } from './series';

function samples(...pairs: [at: number, value: number][]): Sample[] {
  return pairs.map(([at, value]) => ({ at, value }));
}

const series = fc
  .uniqueArray(fc.integer({ min: 0, max: 500 }), { maxLength: 40 })
  .map((instants) => instants.sort((a, b) => a - b).map((at) => ({ at, value: at * 10 })));

describe('pairNearest', () => {
  it('pairs each sample with the nearest in time', () => {
    const humidity = samples([10, 60], [20, 61]);
    const temperature = samples([8, 20], [13, 21], [19, 22]);

    expect(pairNearest(humidity, temperature, 5)).toEqual([
      { at: 10, value: 60, other: 20 },
      { at: 20, value: 61, other: 22 },
    ]);
  });

  it('takes the earlier of two equally near', () => {
    expect(pairNearest(samples([10, 60]), samples([8, 20], [12, 21]), 5)).toEqual([
      { at: 10, value: 60, other: 20 },
    ]);
  });

  it('leaves out a sample with none near enough, and keeps one at just the limit', () => {
    const humidity = samples([10, 60], [11, 61]);

    expect(pairNearest(humidity, samples([16, 20]), 5)).toEqual([{ at: 11, value: 61, other: 20 }]);
  });

  it('of nothing on either side is nothing', () => {
    expect(pairNearest([], samples([1, 1]), 5)).toEqual([]);
    expect(pairNearest(samples([1, 1]), [], 5)).toEqual([]);
  });

  it('refuses a series out of order', () => {
    const unordered = expect.objectContaining({ code: 'UNORDERED_SERIES' });

    expect(() => pairNearest(samples([2, 1], [1, 1]), [], 5)).toThrow(unordered);
    expect(() => pairNearest([], samples([2, 1], [2, 1]), 5)).toThrow(unordered);
  });

  it('finds what a search through all samples finds', () => {
    fc.assert(
      fc.property(series, series, fc.integer({ min: 0, max: 100 }), (some, others, withinMs) => {
        const searched = some.flatMap(({ at, value }) => {
          // The sort is stable, so of two equally near the earlier stays first.
          const nearest = others
            .filter((other) => Math.abs(other.at - at) <= withinMs)
            .sort((a, b) => Math.abs(a.at - at) - Math.abs(b.at - at))[0];
          return nearest === undefined ? [] : [{ at, value, other: nearest.value }];
        });
        expect(pairNearest(some, others, withinMs)).toEqual(searched);
      }),
    );
  });
});
