import fc from 'fast-check';

import { dayBounds, hoursInDay, roomDayBoundsAt, utcHourBounds } from './room-days';

const invalid = expect.objectContaining({ code: 'INVALID_ARGUMENT' });

describe('dayBounds', () => {
  // Transitions as in the IANA time zone database.
  it.each([
    ['Europe/Dublin', '2024-01-15', 24, '2024-01-15T00:00Z'],
    ['Europe/Dublin', '2024-03-31', 23, '2024-03-31T00:00Z'],
    ['Europe/Dublin', '2024-10-27', 25, '2024-10-26T23:00Z'],
    ['America/New_York', '2024-03-10', 23, '2024-03-10T05:00Z'],
    ['America/New_York', '2024-11-03', 25, '2024-11-03T04:00Z'],
    ['Australia/Lord_Howe', '2024-10-06', 23.5, '2024-10-05T13:30Z'],
    ['Australia/Lord_Howe', '2024-04-07', 24.5, '2024-04-06T13:00Z'],
    // Clocks go forward at midnight: the day starts at 01:00.
    ['America/Sao_Paulo', '2018-11-04', 23, '2018-11-04T03:00Z'],
    // Clocks go back to 23:00 of the day before: that day is long.
    ['America/Sao_Paulo', '2018-02-17', 25, '2018-02-17T02:00Z'],
    // Clocks go back from 01:00 to midnight: midnight comes twice, the day starts at the earlier.
    ['America/Havana', '2024-11-03', 25, '2024-11-03T04:00Z'],
    ['America/Havana', '2024-03-10', 23, '2024-03-10T05:00Z'],
    ['Asia/Kathmandu', '2024-06-01', 24, '2024-05-31T18:15Z'],
    ['UTC', '2024-02-29', 24, '2024-02-29T00:00Z'],
  ])('in %s on %s lasts %d h from %s', (zone, date, hours, start) => {
    const day = dayBounds(date, zone);

    expect({ ...day, hours: hoursInDay(day) }).toEqual({
      date,
      start: Date.parse(start),
      end: Date.parse(start) + hours * 3_600_000,
      hours,
    });
  });

  it.each([
    ['Europe/Dublin', '2024-12-31', '2025-01-01'],
    ['America/Sao_Paulo', '2018-11-03', '2018-11-04'],
    ['America/Havana', '2024-11-02', '2024-11-03'],
    ['America/Havana', '2024-11-03', '2024-11-04'],
    ['Pacific/Apia', '2011-12-29', '2011-12-31'],
  ])('in %s the end of %s is the start of %s', (zone, date, next) => {
    expect(dayBounds(date, zone).end).toBe(dayBounds(next, zone).start);
  });

  it('of any instant holds the instant, and of its date is the same day', () => {
    const zones = fc.constantFrom(
      'Europe/Dublin',
      'America/New_York',
      'Australia/Lord_Howe',
      'America/Sao_Paulo',
      'America/Havana',
      'Pacific/Apia',
    );
    const instants = fc.integer({ min: Date.UTC(2000, 0), max: Date.UTC(2030, 0) });
    fc.assert(
      fc.property(zones, instants, (zone, at) => {
        const day = dayBounds(at, zone);
        expect(day.start).toBeLessThanOrEqual(at);
        expect(day.end).toBeGreaterThan(at);
        expect(dayBounds(day.date, zone)).toEqual(day);
        expect(dayBounds(day.end - 1, zone)).toEqual(day);
        expect(dayBounds(day.end, zone).start).toBe(day.end);
      }),
    );
  });

  it.each([
    ['2024-02-30', 'UTC'],
    ['2024-3-1', 'UTC'],
    ['2024-03-01T10:00', 'UTC'],
    ['2024-03-01', 'Nowhere/Land'],
    ['2011-12-30', 'Pacific/Apia'],
    [Number.NaN, 'UTC'],
  ])('refuses %s in %s', (day, zone) => {
    expect(() => dayBounds(day, zone)).toThrow(invalid);
  });
});

describe('roomDayBoundsAt', () => {
  it('answers as dayBounds does, in any order of asking', () => {
    const boundsAt = roomDayBoundsAt('Europe/Dublin');
    const instants = ['2024-10-26T23:00Z', '2024-10-27T23:59Z', '2024-10-26T22:59Z', '2024-10-28T00:00Z'];

    for (const at of instants.map((instant) => Date.parse(instant))) {
      expect(boundsAt(at)).toEqual(dayBounds(at, 'Europe/Dublin'));
    }
  });
});

describe('utcHourBounds', () => {
  it.each([
    [0, 0],
    [3_599_999, 0],
    [3_600_000, 3_600_000],
    [-1, -3_600_000],
  ])('of %d starts at %d', (at, start) => {
    expect(utcHourBounds(at)).toEqual({ start, end: start + 3_600_000 });
  });
});
