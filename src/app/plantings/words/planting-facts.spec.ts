import { listedPlanting } from '../testing/planting-builder';
import { countWords, harvestWords, placeWords, plantingTitle, standingWords } from './planting-facts';

describe('a planting in words', () => {
  it('is its crop, with its variety where it has one', () => {
    expect(plantingTitle(listedPlanting())).toBe('Leek Winter Piper');
    expect(plantingTitle(listedPlanting({ variety: null }))).toBe('Leek');
  });

  it.each([
    ['before any is up, as seeds', { stage: 'sown' as const, up: 0, count: 40 }, '40 seeds'],
    ['while they come up, as those up of those sown', { stage: 'emerging' as const, up: 12 }, '12 of 40 up'],
    ['later, as plants', { stage: 'seedling' as const, up: 31, count: 1 }, '1 plant'],
    ['with none left, as none', { stage: 'growingOn' as const, count: 0 }, '0 plants'],
    ['brought in, as plants', { stage: 'emerging' as const, sown: null, up: null, count: 3 }, '3 plants'],
  ])('is counted %s', (_, changes, words) => {
    expect(countWords(listedPlanting(changes))).toBe(words);
  });

  it.each([
    [{ stage: 'sown' as const }, 'Sown 21 Nov'],
    [{ stage: 'emerging' as const, stageSince: '2026-12-01' }, 'First up today'],
    [{ stage: 'seedling' as const }, 'Seedlings · day 10'],
    [{ stage: 'ended' as const, stageSince: '2026-11-30' }, 'Ended since 30 Nov'],
    [{ stage: 'out' as const, stageSince: '2026-11-30' }, 'Planted out since 30 Nov'],
  ])('%j says how far it is: %s', (changes, words) => {
    expect(standingWords(listedPlanting(changes), '2026-12-01')).toBe(words);
  });

  it('stands on a shelf, outdoors or on none', () => {
    expect(placeWords(listedPlanting())).toBe('shelf A3');
    expect(placeWords(listedPlanting({ shelfLabel: null, stage: 'out' }))).toBe('outdoors');
    expect(placeWords(listedPlanting({ shelfLabel: null }))).toBe('on no shelf');
  });

  it.each([
    [0, 0, null],
    [85, 0, '85\u00a0g'],
    [1240, 30, '1.24\u00a0kg and 30 pieces'],
    [0, 1, '1 piece'],
  ])('of %d g and %d pieces gave %s', (harvestedGrams, harvestedCount, words) => {
    expect(harvestWords({ harvestedGrams, harvestedCount })).toBe(words);
  });
});
