import { lateness } from './lateness';

describe('how late care is', () => {
  it.each([
    ['2026-12-02', null],
    ['2026-12-01', null],
    ['2026-11-30', 'One day late'],
    ['2026-10-24', '38 days late'],
  ])('in time until %s, on 1 December, is %s', (inTimeUntil, words) => {
    expect(lateness(inTimeUntil, '2026-12-01')).toBe(words);
  });
});
