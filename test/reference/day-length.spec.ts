import { dayLengthHours } from '@shared/growing/day-length';

import { monthlyDayLengths, polarDays, specialDayLengths } from './day-length-tables';

/** What dayLengthHours claims against almanac algorithms [h]. */
const claimH = (latitudeDeg: number): number => (Math.abs(latitudeDeg) <= 52 ? 0.07 : 0.12);

describe('dayLengthHours', () => {
  it.each(monthlyDayLengths)(
    'at %d° stays within its claim of suncalc all year',
    (latitudeDeg, hoursByMonth) => {
      hoursByMonth.forEach((hours, month) => {
        const day = `2023-${String(month + 1).padStart(2, '0')}-15`;

        expect(Math.abs(dayLengthHours(latitudeDeg, day) - hours)).toBeLessThan(claimH(latitudeDeg));
      });
    },
  );

  it.each(specialDayLengths)(
    'at %d° on %s agrees with suncalc (%d h)',
    (latitudeDeg, day, almanacH, formulaH) => {
      expect(Math.abs(dayLengthHours(latitudeDeg, day) - almanacH)).toBeLessThan(claimH(latitudeDeg));
      // The same formula evaluated elsewhere, printed to four decimals.
      expect(dayLengthHours(latitudeDeg, day)).toBeCloseTo(formulaH, 4);
    },
  );

  it.each(polarDays)('at %d° on %s, where suncalc finds no sunrise, is %d h', (latitudeDeg, day, hours) => {
    expect(dayLengthHours(latitudeDeg, day)).toBe(hours);
  });
});
