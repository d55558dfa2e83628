import { inventedId } from '../../core/testing/board-builder';
import { listedPlanting } from '../testing/planting-builder';
import { plantingGroups, plantingsFound } from './planting-groups';

const [a1, a3] = [inventedId(1), inventedId(3)];
const leeks = listedPlanting();
const tomato = listedPlanting({
  id: inventedId(501),
  crop: 'Dwarf tomato',
  variety: null,
  stage: 'fruiting',
  shelfId: a1,
  shelfLabel: 'A1',
  container: '4 L pot',
});
const bay = listedPlanting({
  id: inventedId(502),
  crop: 'Bay',
  variety: null,
  shelfId: null,
  shelfLabel: null,
});
const kale = listedPlanting({
  id: inventedId(503),
  crop: 'Kale',
  variety: null,
  stage: 'out',
  shelfId: null,
  shelfLabel: null,
});
const all = [leeks, tomato, bay, kale];

describe('the list of plantings', () => {
  it('by shelf follows the room from the top, then what stands on none and outdoors', () => {
    const groups = plantingGroups(all, 'shelf', [a1, inventedId(2), a3]);
    expect(groups.map(({ title, plantings }) => [title, plantings.map(({ crop }) => crop)])).toEqual([
      ['Shelf A1', ['Dwarf tomato']],
      ['Shelf A3', ['Leek']],
      ['On no shelf', ['Bay']],
      ['Outdoors', ['Kale']],
    ]);
  });

  it('keeps what stands on a shelf that the room has no more', () => {
    expect(plantingGroups([leeks], 'shelf', [a1]).map(({ title }) => title)).toEqual(['Shelf A3']);
  });

  it('by stage follows the life of a plant', () => {
    expect(plantingGroups(all, 'stage', []).map(({ title }) => title)).toEqual([
      'Sown',
      'Flowering or fruiting',
      'Planted out',
    ]);
  });

  it.each([
    ['piper', ['Leek']],
    ['4 l TOMATO', ['Dwarf tomato']],
    ['a3', ['Leek']],
    ['', ['Leek', 'Dwarf tomato', 'Bay', 'Kale']],
    ['quince', []],
  ])('finds “%s” by crop, variety, shelf and container', (typed, crops) => {
    expect(plantingsFound(all, typed).map(({ crop }) => crop)).toEqual(crops);
  });
});
