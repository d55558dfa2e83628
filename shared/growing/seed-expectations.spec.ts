import { expectedSeedlings, germinationShare, seedsNeeded } from './seed-expectations';

const invalid = expect.objectContaining({ code: 'INVALID_ARGUMENT' });
const outOfRange = expect.objectContaining({ code: 'OUT_OF_RANGE' });

describe('germinationShare', () => {
  // By hand: with none up of n the Wilson interval reduces to 0 … z²/(n + z²), with all up to its mirror.
  it.each([
    [0, 10, 0, 27.753],
    [10, 10, 72.247, 100],
    [0, 100, 0, 3.6995],
    // By hand from the two roots of (p̂ − p)² = z² p (1 − p)/n.
    [8, 10, 49.016, 94.332],
  ])('of %d of %d seeds has the interval %d to %d %%', (up, tested, lowPct, highPct) => {
    const share = germinationShare(up, tested);

    expect(share.percent).toBeCloseTo((100 * up) / tested, 12);
    expect(share.lowPct).toBeCloseTo(lowPct, 2);
    expect(share.highPct).toBeCloseTo(highPct, 2);
  });

  it('solves the equation that defines the interval', () => {
    const { percent, lowPct, highPct } = germinationShare(33, 40);
    for (const limit of [lowPct / 100, highPct / 100]) {
      const z = Math.abs(percent / 100 - limit) / Math.sqrt((limit * (1 - limit)) / 40);
      expect(z).toBeCloseTo(1.96, 3);
    }
  });

  it.each([
    [3, 2],
    [-1, 5],
    [0, 0],
    [0.5, 5],
    [NaN, 5],
  ])('refuses %d of %d', (up, tested) => {
    expect(() => germinationShare(up, tested)).toThrow(invalid);
  });
});

describe('expectedSeedlings', () => {
  // Binomial quantiles by hand: Bin(10, 0.5) has P(X ≤ 1) = 11/1024 and P(X ≤ 2) = 56/1024 around 2.5 %.
  it('of ten seeds at 50 % is five, two to eight', () => {
    expect(expectedSeedlings(10, 50)).toEqual({ expected: 5, low: 2, high: 8 });
  });

  it('is certain at 0 and 100 %', () => {
    expect(expectedSeedlings(12, 0)).toEqual({ expected: 0, low: 0, high: 0 });
    expect(expectedSeedlings(12, 100)).toEqual({ expected: 12, low: 12, high: 12 });
  });

  it('refuses seeds and percentages that are none', () => {
    expect(() => expectedSeedlings(0, 50)).toThrow(invalid);
    expect(() => expectedSeedlings(2.5, 50)).toThrow(invalid);
    expect(() => expectedSeedlings(10, 101)).toThrow(outOfRange);
  });
});

describe('seedsNeeded', () => {
  // By hand: 1 − 0.5ⁿ reaches 0.9 at n = 4 and 0.99 at n = 7.
  it.each([
    [1, 50, 0.9, 4],
    [1, 50, 0.99, 7],
    [5, 100, 0.9, 5],
    // 1 − 0.8ⁿ reaches 0.9 at n = 11 (0.9141).
    [1, 20, 0.9, 11],
  ])('for %d plants at %d %% and a certainty of %d are %d', (plants, percent, certainty, expected) => {
    expect(seedsNeeded(plants, percent, certainty)).toBe(expected);
  });

  it('is null for seed that does not germinate', () => {
    expect(seedsNeeded(1, 0)).toBeNull();
  });
});
