import {
  formatAge,
  formatDay,
  formatDayAndTime,
  formatDuration,
  formatMonth,
  formatTime,
  sayMonth,
  sayWhen,
} from './room-time';

const dublin = 'Europe/Dublin';
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('the time in a room', () => {
  it('follows the room and not the reader', () => {
    const at = '2026-07-01T13:20:00Z';
    expect(formatTime(at, dublin)).toBe('14:20');
    expect(formatTime(at, 'Asia/Kathmandu')).toBe('19:05');
  });

  it('at midnight reads 00:00 on the new day', () => {
    const at = '2026-12-01T00:00:00Z';
    expect(formatTime(at, dublin)).toBe('00:00');
    expect(formatDay(at, dublin)).toBe('Tuesday 1 December');
  });

  it('reads the same twice in the hour that the clocks go through twice', () => {
    expect(formatTime('2026-10-25T00:30:00Z', dublin)).toBe('01:30');
    expect(formatTime('2026-10-25T01:30:00Z', dublin)).toBe('01:30');
  });

  it('with its day says the day first', () => {
    expect(formatDayAndTime(Date.UTC(2026, 11, 1, 14, 20), dublin)).toBe('Tue 1 Dec, 14:20');
  });
});

describe('saying when', () => {
  const now = '2026-12-01T14:20:00Z';
  it.each([
    ['2026-12-01T13:54:00Z', '13:54'],
    ['2026-11-30T23:59:00Z', 'yesterday 23:59'],
    ['2026-12-01T20:00:00Z', '20:00'],
    ['2026-12-02T08:00:00Z', 'tomorrow 08:00'],
    ['2026-12-03T08:00:00Z', 'Thu 3 Dec, 08:00'],
    ['2026-11-21T08:00:00Z', 'Sat 21 Nov, 08:00'],
    ['2025-11-21T08:00:00Z', '21 Nov 2025, 08:00'],
  ])('%s reads %s', (at, text) => {
    expect(sayWhen(at, now, dublin)).toBe(text);
  });
});

describe('a month', () => {
  it('is the room’s, and is said in full', () => {
    expect(formatMonth('2026-11-30T23:30:00Z', dublin)).toBe('2026-11');
    expect(formatMonth('2026-11-30T23:30:00Z', 'Asia/Kathmandu')).toBe('2026-12');
    expect(sayMonth('2026-12')).toBe('December 2026');
  });
});

describe('a length of time', () => {
  it.each([
    [0, '0 s'],
    [59_999, '59 s'],
    [26 * 60_000, '26 min'],
    [11_400_000, '3 h 10 min'],
    [3_600_000, '1 h'],
    [86_400_000, '1 day'],
    [187_200_000, '2 days 4 h'],
  ])('of %d ms reads %s', (ms, text) => {
    expect(plain(formatDuration(ms))).toBe(text);
  });
});

describe('an age', () => {
  const now = Date.UTC(2026, 11, 1);
  it('counts back from now', () => {
    expect(plain(formatAge(now - 4000, now))).toBe('4 s ago');
  });

  it('of something that a fast clock dates ahead reads "just now"', () => {
    expect(formatAge(now + 90_000, now)).toBe('just now');
  });
});
