import { frostMeaning } from './frost-words';

// NOAA's 10 % date is late and safe, MRCC's 10th percentile early and risky; in autumn both run alike.
describe('a stated frost date in words', () => {
  it.each([
    [{ kind: 'probability', percent: 10 }, 'spring', 'In 10 of 100 springs frost still comes after it.'],
    [{ kind: 'percentile', percent: 10 }, 'spring', 'In 90 of 100 springs frost still comes after it.'],
    [{ kind: 'probability', percent: 10 }, 'autumn', 'In 10 of 100 autumns frost has come before it.'],
    [{ kind: 'percentile', percent: 10 }, 'autumn', 'In 10 of 100 autumns frost has come before it.'],
  ] as const)('%j in %s', (wording, season, words) => {
    expect(frostMeaning(wording, season)).toBe(words);
  });

  it('of an average says about half and no more', () => {
    expect(frostMeaning({ kind: 'average' }, 'spring')).toContain('about half');
    expect(frostMeaning({ kind: 'average' }, 'autumn')).toContain('about half');
  });
});
