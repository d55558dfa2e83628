import { isGoodSeedStore, seedLifeRatio } from './seed-age';

const outOfRange = expect.objectContaining({ code: 'OUT_OF_RANGE' });

describe('seedLifeRatio', () => {
  // Harrington's rules by arithmetic: two doublings by moisture; 10 °C is 1.8 steps of 10 °F (with steps of 5 °C the
  // same example would give 16).
  it.each([
    [10, 15, 12, 25, 4 * 2 ** 1.8],
    [8, 20, 8, 20, 1],
    [9, 20, 8, 20, 0.5],
    [8, 20, 8, 20 + 10 / 1.8, 2],
  ])('of %d %% and %d °C over %d %% and %d °C is %d', (moisturePct, temperatureC, toPct, toC, ratio) => {
    const reference = { moisturePct: toPct, temperatureC: toC };

    expect(seedLifeRatio({ moisturePct, temperatureC }, reference)).toBeCloseTo(ratio, 9);
  });

  it.each([
    [4.9, 20],
    [14.1, 20],
    [8, -0.1],
    [8, 50.1],
    [NaN, 20],
  ])('refuses %d %% and %d °C, where the rules do not hold', (moisturePct, temperatureC) => {
    const reference = { moisturePct: 8, temperatureC: 20 };

    expect(() => seedLifeRatio({ moisturePct, temperatureC }, reference)).toThrow(outOfRange);
  });
});

describe('isGoodSeedStore', () => {
  // 10 °C is 50 °F.
  it.each([
    [10, 50, true],
    [10, 50.1, false],
    [25, 50, false],
    [5, 55, true],
  ])('at %d °C and %d %% is %s', (temperatureC, humidityPct, expected) => {
    expect(isGoodSeedStore(temperatureC, humidityPct)).toBe(expected);
  });
});
