import { inventedId } from '../../core/testing/board-builder';
import { listedPlanting } from '../testing/planting-builder';
import { labelCount, labelSheet, withCount } from './label-sheet';

const leek = listedPlanting();
const bay = listedPlanting({
  id: inventedId(501),
  crop: 'Bay',
  variety: null,
  origin: 'broughtIn',
  startedOn: '2023-04-02',
});
const day = (text: string): string => `the ${text}`;

describe('a sheet of labels', () => {
  it('has as many of each planting as are wanted, and none of the others', () => {
    const sheet = labelSheet([leek, bay], { [leek.id]: 2 }, day);
    expect(sheet.map(({ crop, variety, date }) => [crop, variety, date])).toEqual([
      ['Leek', 'Winter Piper', 'sown the 2026-11-21'],
      ['Leek', 'Winter Piper', 'sown the 2026-11-21'],
    ]);
    expect(new Set(sheet.map(({ key }) => key)).size).toBe(2);
  });

  it('of a plant that was not sown says since when it is here', () => {
    expect(labelSheet([bay], { [bay.id]: 1 }, day)[0]?.date).toBe('here since the 2023-04-02');
  });

  it.each([
    [3, 3],
    [2.7, 2],
    [-1, 0],
    [1000, 60],
    [NaN, 0],
  ])('asked for %d of one prints %d', (typed, printed) => {
    expect(labelCount(withCount({}, leek.id, typed), leek.id)).toBe(printed);
  });
});
