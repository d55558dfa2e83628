import { matchingCrops } from './matching-crops';

const crops = [
  { id: 'celery', name: 'Celery', botanicalName: 'Apium graveolens', varieties: [] },
  { id: 'leek', name: 'Leek', botanicalName: 'Allium ampeloprasum', varieties: ['Winter Piper'] },
  { id: 'onion-long-day', name: 'Onion, long-day', botanicalName: 'Allium cepa', varieties: [] },
  { id: 'spring-onion', name: 'Bunching onion', botanicalName: 'Allium fistulosum', varieties: [] },
];
const found = (typed: string): string[] => matchingCrops(crops, typed).map(({ id }) => id);

describe('crops that may be meant', () => {
  it.each([
    ['by a part of the name, those that begin with it first', 'onion', ['onion-long-day', 'spring-onion']],
    ['by the botanical name', 'allium AMP', ['leek']],
    ['by a variety of the room', 'piper', ['leek']],
    ['only where every word is found', 'onion long', ['onion-long-day']],
    ['none for a name that nobody has', 'quince', []],
  ])('are found %s', (_, typed, ids) => {
    expect(found(typed)).toEqual(ids);
  });

  it('are all of them before anything is typed', () => {
    expect(found('  ')).toHaveLength(4);
  });
});
