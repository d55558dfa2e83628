import { planting } from './testing/board-builder';
import { plantingSize, plantingWords } from './planting-words';

const today = '2026-12-01';

describe('the words on a plant label', () => {
  it.each([
    [{ stage: 'sown', startedOn: '2026-11-21' }, 'sown 21 Nov'],
    [{ stage: 'sown', startedOn: today }, 'sown today'],
    [{ stage: 'emerging', stageSince: today }, 'first up today'],
    [{ stage: 'seedling', startedOn: '2026-11-21' }, 'day 10'],
    [{ stage: 'fruiting', startedOn: '2026-03-02' }, 'day 274'],
    [{ stage: 'growingOn', startedOn: '2025-12-02' }, 'day 364'],
    [{ stage: 'growingOn', startedOn: '2025-12-01' }, 'year 2'],
    [{ stage: 'resting', stageSince: '2026-11-12' }, 'resting since 12 Nov'],
  ] as const)('%j are "%s"', (changes, words) => {
    expect(plantingWords(planting(changes), today)).toBe(words);
  });
});

describe('the size of a drawn planting', () => {
  it('grows from its start to four months and no further', () => {
    expect(plantingSize(planting({ startedOn: today }), today)).toBe(0.55);
    expect(plantingSize(planting({ startedOn: '2026-10-02' }), today)).toBeCloseTo(0.775, 10);
    expect(plantingSize(planting({ startedOn: '2020-01-01' }), today)).toBe(1);
  });
});
