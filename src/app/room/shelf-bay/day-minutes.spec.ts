import { dayParts, minuteOfDay } from './day-minutes';

// The day on which Dublin's clocks go back: 25 hours.
const day = { startAt: Date.parse('2026-10-24T23:00:00Z'), endAt: Date.parse('2026-10-26T00:00:00Z') };

describe('minutes of a room’s day', () => {
  it('count through the change of the clocks', () => {
    expect(minuteOfDay(Date.parse('2026-10-25T01:30:00Z'), day)).toBe(150);
    expect(minuteOfDay(day.endAt, day)).toBe(1500);
  });

  it('end with the day, and leave out what lies outside it', () => {
    const parts = [
      { from: '2026-10-24T20:00:00Z', to: '2026-10-25T05:00:00Z' },
      { from: '2026-10-25T22:00:00Z', to: '2026-10-26T06:00:00Z' },
      { from: '2026-10-26T08:00:00Z', to: '2026-10-26T10:00:00Z' },
    ];
    expect(dayParts(parts, day)).toEqual([
      [0, 360],
      [1380, 1500],
    ]);
  });
});
