import { dayWords } from './day-words';

describe('a day in words', () => {
  it.each([
    ['2026-12-01', 'today'],
    ['2026-12-02', 'tomorrow'],
    ['2026-11-30', 'yesterday'],
    ['2026-12-03', 'Thu 3 Dec'],
    ['2027-01-04', 'Mon 4 Jan'],
    ['2027-07-04', '4 Jul 2027'],
  ])('%s on 1 December 2026 is %s', (day, words) => {
    expect(dayWords(day, '2026-12-01')).toBe(words);
  });
});
