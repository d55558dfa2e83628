import { cropById } from './crops/crop-library';
import { ageOfLot, compareUrgency, expectationOfLot, isToUseFirst } from './seed-stock';

const seedOf = (id: string) => cropById(id)?.seed ?? null;

describe('the age of a lot', () => {
  // Seed life of onion: 1 year by Knott's Handbook, 2 by common practice (domain table of seed life; sources disagree).
  it('is judged by the shortest and the longest life that sources give', () => {
    const { lifeYears } = ageOfLot(2025, seedOf('onion-long-day'), '2026-04-15');
    expect(lifeYears).toEqual({ low: 1, high: 2 });
  });

  it.each([
    [2026, 0, 'withinLife', false],
    [2025, 1, 'withinLife', true],
    [2024, 2, 'doubtful', true],
    [2023, 3, 'pastLife', true],
  ] as const)('of onion packed in %d is %d years in 2026: %s', (packed, years, standing, useFirst) => {
    const age = ageOfLot(packed, seedOf('onion-long-day'), '2026-12-31');

    expect(age).toMatchObject({ years, standing });
    expect(isToUseFirst(age, 10)).toBe(useFirst);
  });

  it('is unknown without a year, or without a figure, and then nothing presses', () => {
    expect(ageOfLot(null, seedOf('leek'), '2026-04-15')).toMatchObject({ years: null, standing: null });
    const noFigures = ageOfLot(1990, null, '2026-04-15');
    expect(noFigures).toMatchObject({ years: 36, lifeYears: null, standing: null, sources: [] });
    expect(isToUseFirst(noFigures, 10)).toBe(false);
  });

  it('of a packet for next year is none, not less than none', () => {
    expect(ageOfLot(2027, seedOf('leek'), '2026-12-01').years).toBe(0);
  });

  it('presses no more once nothing is left', () => {
    expect(isToUseFirst(ageOfLot(2020, seedOf('leek'), '2026-04-15'), 0)).toBe(false);
  });

  it('orders lots by the seasons left to them, unjudged ones last', () => {
    const ages = [
      ageOfLot(null, seedOf('leek'), '2026-04-15'),
      ageOfLot(2026, seedOf('leek'), '2026-04-15'),
      ageOfLot(2023, seedOf('leek'), '2026-04-15'),
      ageOfLot(null, null, '2026-04-15'),
    ];
    expect([...ages].sort(compareUrgency).map(({ years }) => years)).toEqual([3, 0, null, null]);
  });
});

describe('the germination to expect of a lot', () => {
  const seed = seedOf('onion-long-day');

  // Wilson interval of 8 of 10: 49.0 to 94.3 % (Newcombe 1998, Statistics in Medicine 17:857, method 3).
  it('is that of its own test, with the interval of so few seeds', () => {
    const expected = expectationOfLot({ test: { seeds: 10, up: 8 }, sowings: [{ seeds: 90, up: 10 }], seed });

    expect(expected).toMatchObject({ percent: 80, basis: 'test', source: 'own test: 8 of 10' });
    expect(expected?.lowPct).toBeCloseTo(49.0, 1);
    expect(expected?.highPct).toBeCloseTo(94.3, 1);
  });

  it('is that of its sowings taken together where it was never tested', () => {
    const sowings = [
      { seeds: 30, up: 15 },
      { seeds: 10, up: 9 },
    ];
    expect(expectationOfLot({ test: null, sowings, seed })).toMatchObject({ percent: 60, basis: 'sowings' });
  });

  it('of none that came up is none per cent, not unknown', () => {
    expect(expectationOfLot({ test: { seeds: 20, up: 0 }, sowings: [], seed })?.percent).toBe(0);
  });

  // 7 CFR 201.31: onion 70 %.
  it('is the standard for seed on sale else, and unknown without one', () => {
    expect(expectationOfLot({ test: null, sowings: [], seed })).toMatchObject({
      percent: 70,
      lowPct: 70,
      highPct: 70,
      basis: 'standard',
    });
    expect(expectationOfLot({ test: null, sowings: [], seed: null })).toBeNull();
  });
});
