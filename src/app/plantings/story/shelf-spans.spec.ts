import { inventedId } from '../../core/testing/board-builder';
import { joinedByShelf, spansOnShelves } from './shelf-spans';

const [a1, a3] = [inventedId(1), inventedId(3)];
const line = (at: number) => ({
  name: 'Air',
  unit: '°C',
  decimals: 1,
  points: [[at, 20, 20, 20] as [number, number, number, number]],
});

describe('where a planting stood', () => {
  it('is its shelves, without times on none and moves taken back at once', () => {
    const at = (hour: number): string => `2026-12-01T0${hour}:00:00Z`;
    const spans = spansOnShelves([
      { shelfId: a1, shelfLabel: 'A1', from: at(1), to: at(2) },
      { shelfId: null, shelfLabel: null, from: at(2), to: at(3) },
      { shelfId: a3, shelfLabel: 'A3', from: at(3), to: at(3) },
      { shelfId: a3, shelfLabel: 'A3', from: at(3), to: null },
    ]);
    expect(spans).toEqual([
      { shelfId: a1, shelfLabel: 'A1', from: at(1), to: at(2) },
      { shelfId: a3, shelfLabel: 'A3', from: at(3), to: null },
    ]);
  });

  it('is one line a shelf, with a gap between two stays there', () => {
    const lines = joinedByShelf([
      { shelfLabel: 'A1', lines: [line(10)] },
      { shelfLabel: 'A3', lines: [line(20)] },
      { shelfLabel: 'A1', lines: [line(30)] },
    ]);
    expect(lines.map(({ name, points }) => [name, points.map(([at, mean]) => [at, mean])])).toEqual([
      [
        'Shelf A1',
        [
          [10, 20],
          [29, null],
          [30, 20],
        ],
      ],
      ['Shelf A3', [[20, 20]]],
    ]);
  });

  it('is a line for each sensor where a shelf has two, and none where nothing was measured', () => {
    const other = { ...line(11), name: 'Spare' };
    const names = joinedByShelf([
      { shelfLabel: 'A1', lines: [line(10), other] },
      { shelfLabel: 'A3', lines: [{ ...line(1), points: [] }] },
    ]).map(({ name }) => name);
    expect(names).toEqual(['Shelf A1, Air', 'Shelf A1, Spare']);
  });
});
