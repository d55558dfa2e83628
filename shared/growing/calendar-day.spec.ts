import { dayAfter, dayOfYear, daysBetween } from './calendar-day';

describe('dayAfter', () => {
  // By the calendar.
  it.each([
    ['2025-05-15', -70, '2025-03-06'],
    ['2024-05-01', -70, '2024-02-21'],
    ['2024-02-28', 1, '2024-02-29'],
    ['2025-02-28', 1, '2025-03-01'],
    ['2025-12-31', 1, '2026-01-01'],
    ['2025-03-29', 2, '2025-03-31'],
    ['2025-01-01', 3.4, '2025-01-04'],
  ])('of %s and %d days is %s, whatever the clocks do', (day, days, expected) => {
    expect(dayAfter(day, days)).toBe(expected);
  });

  it.each(['2025-02-29', '2025-13-01', '2025-1-1', 'soon', '2025-01-01T00:00'])('refuses %s', (day) => {
    expect(() => dayAfter(day, 1)).toThrow(expect.objectContaining({ code: 'INVALID_ARGUMENT' }));
  });
});

describe('daysBetween', () => {
  it('undoes dayAfter over a leap day and a change of clocks', () => {
    expect(daysBetween('2024-02-21', '2024-05-01')).toBe(70);
    expect(daysBetween('2024-05-01', '2024-02-21')).toBe(-70);
  });
});

describe('dayOfYear', () => {
  it.each([
    ['2023-01-01', 1],
    ['2023-09-03', 246],
    ['2023-12-31', 365],
    ['2024-12-31', 366],
  ])('of %s is %d', (day, expected) => {
    expect(dayOfYear(day)).toBe(expected);
  });
});
