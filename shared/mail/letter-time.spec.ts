import { letterDue } from './letter-time';

const zone = 'Europe/Dublin'; // Clocks go forward on 29 March and back on 25 October 2026, at 01:00 UTC.
const due = (letterAt: string, iso: string) => letterDue(letterAt, Date.parse(iso), zone);

describe('the morning letter', () => {
  it.each([
    ['a second before its time', '2026-01-10T06:59:59Z', null],
    ['at its time', '2026-01-10T07:00:00Z', '2026-01-10'],
    ['hours late, after the server was away', '2026-01-10T12:59:59Z', '2026-01-10'],
    ['six hours late', '2026-01-10T13:00:00Z', null],
    ['on the day the clocks go forward', '2026-03-29T06:00:00Z', '2026-03-29'],
    ['an hour early on that day, by the old clock', '2026-03-29T05:59:59Z', null],
    ['on the day the clocks go back', '2026-10-25T07:00:00Z', '2026-10-25'],
    ['an hour early on that day, by the old clock', '2026-10-25T06:59:59Z', null],
  ])('for 07:00, %s, is due for: %s → %s', (_title, when, day) => {
    expect(due('07:00', when)?.day ?? null).toBe(day);
  });

  it.each([
    ['an ordinary night', '2026-01-10T07:00:00Z', 11],
    ['the night when clocks go forward', '2026-03-29T06:00:00Z', 10],
    ['the night when clocks go back', '2026-10-25T07:00:00Z', 12],
  ])('tells of %s from eight in the evening', (_title, when, hours) => {
    const morning = due('07:00', when);
    expect(((morning?.nightTo ?? 0) - (morning?.nightFrom ?? 0)) / 3_600_000).toBe(hours);
  });

  it('whose time the clock skips comes as much later', () => {
    expect(due('01:30', '2026-03-29T01:29:59Z')).toBeNull();
    expect(due('01:30', '2026-03-29T01:30:00Z')?.day).toBe('2026-03-29');
  });

  it('whose time comes twice is for one day', () => {
    expect(due('01:30', '2026-10-25T00:30:00Z')?.day).toBe('2026-10-25');
    expect(due('01:30', '2026-10-25T01:30:00Z')?.day).toBe('2026-10-25');
  });

  it('never runs into the next day', () => {
    expect(due('23:30', '2026-01-10T23:45:00Z')?.day).toBe('2026-01-10');
    expect(due('23:30', '2026-01-11T00:15:00Z')).toBeNull();
  });
});
