import fc from 'fast-check';
import { settle } from './exchange';

describe('settling towards what a store exchanges with', () => {
  it('after a long time ends at the weighted mean', () => {
    expect(
      settle(5, 1, 1e6, [
        [1, 10],
        [3, 20],
      ]),
    ).toBeCloseTo(17.5, 9);
  });

  it('with an inflow ends above it by inflow over conductance', () => {
    expect(settle(5, 1, 1e6, [[2, 10]], 6)).toBeCloseTo(13, 9);
  });

  it('after one time constant has covered 1 − 1/e of the way', () => {
    expect(settle(0, 100, 100, [[1, 1]])).toBeCloseTo(1 - 1 / Math.E, 12);
  });

  it('in two half steps comes to the same as in one', () => {
    const level = fc.double({ min: -50, max: 50, noNaN: true });
    fc.assert(
      fc.property(level, level, fc.double({ min: 0.1, max: 600, noNaN: true }), (value, towards, seconds) => {
        const exchanges = [[2, towards] as const];
        const half = settle(value, 100, seconds / 2, exchanges);
        expect(settle(half, 100, seconds / 2, exchanges)).toBeCloseTo(
          settle(value, 100, seconds, exchanges),
          9,
        );
      }),
    );
  });
});
