import fc from 'fast-check';

import { meanExcess, shareAtOrAbove, valueBetween } from './linear-segment';

const values = fc.double({ min: -100, max: 100, noNaN: true });

describe('valueBetween', () => {
  it('follows the straight line, and is exact at its start', () => {
    expect(valueBetween(10, 0.1, 20, 0.3, 10)).toBe(0.1);
    expect(valueBetween(10, 0, 20, 40, 15)).toBe(20);
  });
});

describe('shareAtOrAbove', () => {
  it.each([
    [0, 4, 1, 0.75],
    [4, 0, 1, 0.75],
    [2, 2, 2, 1],
    [0, 2, 2, 0],
    [2, 4, 2, 1],
    [0, 1, 2, 0],
  ])('of a line from %d to %d over %d is %d', (from, to, threshold, share) => {
    expect(shareAtOrAbove(from, to, threshold)).toBe(share);
  });
});

describe('meanExcess', () => {
  it.each([
    [0, 4, 2, 0.5],
    [4, 0, 2, 0.5],
    [3, 5, 2, 2],
    [2, 2, 2, 0],
    [0, 2, 2, 0],
  ])('of a line from %d to %d over %d is %d', (from, to, threshold, excess) => {
    expect(meanExcess(from, to, threshold)).toBe(excess);
  });

  it('over a threshold, less that of the mirrored line, is how far the mean lies above it', () => {
    fc.assert(
      fc.property(values, values, values, (from, to, threshold) => {
        const below = meanExcess(-from, -to, -threshold);
        expect(meanExcess(from, to, threshold) - below).toBeCloseTo((from + to) / 2 - threshold, 9);
      }),
    );
  });
});
