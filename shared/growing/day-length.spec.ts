import fc from 'fast-check';

import { dayAfter } from './calendar-day';
import { dayLengthHours, dayLengthsOfYear, longestDay } from './day-length';

const outOfRange = expect.objectContaining({ code: 'OUT_OF_RANGE' });

describe('dayLengthHours', () => {
  it('at latitude −20 on day 246 is FAO-56 Example 9 and what refraction and limb add to it', () => {
    // FAO-56 Ex. 9: sunset hour angle 1.527 rad for the sun's centre on the true horizon. Twice 0.8333° at 15° an hour,
    // over cos 20°, is 0.118 h. Our claim against other formulas is 0.07 h.
    const publishedH = (24 / Math.PI) * 1.527 + 0.118;

    expect(Math.abs(dayLengthHours(-20, '2023-09-03') - publishedH)).toBeLessThan(0.07);
  });

  it('of both hemispheres together is a full day and twice what refraction and limb add', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 60, noNaN: true }), fc.nat({ max: 364 }), (latitude, days) => {
        const day = dayAfter('2023-01-01', days);
        const extraH = dayLengthHours(latitude, day) + dayLengthHours(-latitude, day) - 24;

        expect(extraH).toBeGreaterThan(0.22);
        expect(extraH).toBeLessThan(0.8);
      }),
    );
  });

  it('at the poles is all or nothing', () => {
    expect(dayLengthHours(90, '2023-06-21')).toBe(24);
    expect(dayLengthHours(-90, '2023-06-21')).toBe(0);
  });

  it.each([-90.1, 90.1, NaN])('refuses latitude %d', (latitude) => {
    expect(() => dayLengthHours(latitude, '2023-06-21')).toThrow(outOfRange);
  });

  it('refuses a day that does not exist', () => {
    expect(() => dayLengthHours(50, '2023-02-29')).toThrow(
      expect.objectContaining({ code: 'INVALID_ARGUMENT' }),
    );
  });
});

describe('dayLengthsOfYear', () => {
  it.each([
    [2023, 365],
    [2024, 366],
  ])('of %d has %d days up to New Year’s Eve', (year, days) => {
    const lengths = dayLengthsOfYear(50, year);

    expect(lengths).toHaveLength(days);
    expect(lengths.at(-1)?.day).toBe(`${year}-12-31`);
  });
});

describe('longestDay', () => {
  it.each([
    [50, /^2023-06-2[0-3]$/],
    [-50, /^2023-12-2[0-3]$/],
  ])('at %d° falls on the solstice', (latitude, solstice) => {
    expect(longestDay(latitude, 2023).day).toMatch(solstice);
  });
});
