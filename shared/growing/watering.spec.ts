import fc from 'fast-check';

import { hoursUntilDue, learnedInterval, thirstSince, waterLeft, wateringStanding } from './watering';

const HOUR_MS = 3_600_000;
const GAP_MS = HOUR_MS;
const outOfRange = expect.objectContaining({ code: 'OUT_OF_RANGE' });

/** Deficit every half hour: high by day, low by night, as under lamps. */
function airOf(days: number, meanKPa: number, swingKPa: number): { at: number; value: number }[] {
  return Array.from({ length: days * 48 + 1 }, (_, half) => ({
    at: (half * HOUR_MS) / 2,
    value: meanKPa + swingKPa * Math.sin((2 * Math.PI * half) / 48),
  }));
}

describe('thirstSince', () => {
  it('of a steady 0.8 kPa over 30 h is 24 kPa·h', () => {
    const steady = airOf(2, 0.8, 0);

    expect(thirstSince(steady, { from: 0, to: 30 * HOUR_MS, maxGapMs: GAP_MS })).toEqual({
      integralKPaH: expect.closeTo(24, 9) as number,
      coverage: 1,
    });
  });

  it('counts measured time only and says how much that was', () => {
    const half = airOf(1, 1, 0).filter(({ at }) => at <= 12 * HOUR_MS);
    const thirst = thirstSince(half, { from: 0, to: 24 * HOUR_MS, maxGapMs: GAP_MS });

    expect(thirst.integralKPaH).toBeCloseTo(12, 9);
    expect(thirst.coverage).toBe(0.5);
  });

  it('without readings is null, not 0', () => {
    expect(thirstSince([], { from: 0, to: HOUR_MS, maxGapMs: GAP_MS })).toEqual({
      integralKPaH: null,
      coverage: 0,
    });
  });
});

describe('learnedInterval', () => {
  it('waits for five waterings', () => {
    expect(learnedInterval([20, 21, 22, 23])).toBeNull();
  });

  it('is the median with its quartiles, which one forgotten pot does not move', () => {
    expect(learnedInterval([20, 21, 22, 23, 90])).toEqual({
      medianKPaH: 22,
      lowKPaH: 21,
      highKPaH: 23,
      count: 5,
    });
  });

  it('refuses a negative integral', () => {
    expect(() => learnedInterval([20, 21, 22, 23, -1])).toThrow(outOfRange);
  });

  it('is within 10 % of the truth after eight waterings of a pot that dries by the deficit', () => {
    // A pot loses `gPerKPaH` for each kPa·h and is watered when a hand finds it `dryAtG` lighter, give or take 5 %.
    const aPot = fc.record({
      gPerKPaH: fc.double({ min: 2, max: 6, noNaN: true }),
      dryAtG: fc.double({ min: 120, max: 240, noNaN: true }),
      meanKPa: fc.double({ min: 0.5, max: 1.2, noNaN: true }),
      hands: fc.array(fc.double({ min: -0.05, max: 0.05, noNaN: true }), { minLength: 8, maxLength: 8 }),
    });
    fc.assert(
      fc.property(aPot, ({ gPerKPaH, dryAtG, meanKPa, hands }) => {
        const air = airOf(90, meanKPa, 0.3);
        const past = integralsBetweenWaterings(
          air,
          gPerKPaH,
          hands.map((error) => dryAtG * (1 + error)),
        );
        const truthKPaH = dryAtG / gPerKPaH;

        expect(past).toHaveLength(8);
        expect(Math.abs((learnedInterval(past)?.medianKPaH ?? 0) / truthKPaH - 1)).toBeLessThan(0.1);
      }),
      { numRuns: 60 },
    );
  });
});

/** Plays a pot over the air: waters it whenever it has lost the next weight, and integrates between. */
function integralsBetweenWaterings(
  air: readonly { at: number; value: number }[],
  gPerKPaH: number,
  lossesG: readonly number[],
): number[] {
  const past: number[] = [];
  let wateredAt = 0;
  let lostG = 0;
  for (const { at, value } of air) {
    lostG += value * 0.5 * gPerKPaH;
    if (lostG < (lossesG[past.length] ?? Infinity)) continue;
    past.push(thirstSince(air, { from: wateredAt, to: at, maxGapMs: GAP_MS }).integralKPaH ?? 0);
    wateredAt = at;
    lostG = 0;
  }
  return past;
}

describe('wateringStanding', () => {
  const interval = { medianKPaH: 22, lowKPaH: 20, highKPaH: 25, count: 6 };

  it.each([
    [0, 'notYet'],
    [19.9, 'notYet'],
    [20, 'soon'],
    [22, 'due'],
    [60, 'due'],
  ])('after %d kPa·h is %s', (since, standing) => {
    expect(wateringStanding(since, interval)).toBe(standing);
  });

  it('comes due in the time the air takes for the rest', () => {
    expect(hoursUntilDue(12, interval, 0.8)).toBeCloseTo(12.5, 12);
    expect(hoursUntilDue(22, interval, 0.8)).toBe(0);
    expect(hoursUntilDue(12, interval, 0)).toBeNull();
  });
});

describe('waterLeft', () => {
  it('of 640 g between 420 and 820 g is 55 %', () => {
    expect(waterLeft({ nowG: 640, dryG: 420, capacityG: 820 })).toBeCloseTo(0.55, 12);
  });

  it('refuses a pot that holds nothing', () => {
    expect(() => waterLeft({ nowG: 400, dryG: 420, capacityG: 420 })).toThrow(outOfRange);
  });
});
