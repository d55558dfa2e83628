import { statedRisk, wordingOf } from './frost-words';

describe('a frost date', () => {
  // NOAA: a spring 90 % date of 1 March means frost later in nine years of ten. MRCC: "late" is the 90th percentile.
  it.each([
    ['probability', 90, 'In 90 of 100 springs frost still comes after it.', true],
    ['probability', 10, 'In 10 of 100 springs frost still comes after it.', false],
    ['percentile', 90, 'In 10 of 100 springs frost still comes after it.', false],
    ['percentile', 10, 'In 90 of 100 springs frost still comes after it.', true],
    ['average', null, 'An average of years: in about half of all springs frost comes after it.', false],
  ] as const)('stated as %s %s means: %s', (kind, percent, words, isRisky) => {
    expect(statedRisk(kind, percent, 'spring')).toEqual({ words, isRisky });
  });

  it('in autumn runs one way by both conventions', () => {
    expect(statedRisk('probability', 10, 'autumn')).toEqual(statedRisk('percentile', 10, 'autumn'));
  });

  it.each([null, -1, 101])('with a percentage of %s says nothing', (percent) => {
    expect(wordingOf('probability', percent)).toBeNull();
    expect(statedRisk('percentile', percent, 'spring')).toBeNull();
  });

  it('takes zero for a percentage', () => {
    expect(wordingOf('probability', 0)).toEqual({ kind: 'probability', percent: 0 });
  });
});
