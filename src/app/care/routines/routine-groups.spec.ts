import { inventedId } from '../../core/testing/board-builder';
import { routine } from '../testing/routine-builder';
import { placeKey, placeOf, routineGroups } from './routine-groups';

const at = {
  room: { place: { at: 'room' }, placeLabel: null },
  rack: { place: { at: 'rack', rackId: inventedId(300) }, placeLabel: 'Rack A' },
  a2: { place: { at: 'shelf', shelfId: inventedId(2) }, placeLabel: 'A2' },
  a10: { place: { at: 'shelf', shelfId: inventedId(10) }, placeLabel: 'A10' },
  basil: { place: { at: 'planting', plantingId: inventedId(500) }, placeLabel: 'Basil Corvid' },
} as const;

describe('routines by place', () => {
  it('go from the room to the plant, shelves in their order', () => {
    const groups = routineGroups([
      routine({ ...at.basil, title: 'Pinch out' }),
      routine({ ...at.a10, title: 'Water' }),
      routine({ ...at.room, title: 'Wash flats' }),
      routine({ ...at.a2, title: 'Turn' }),
      routine({ ...at.rack, title: 'Look for leaks' }),
      routine({ ...at.a10, title: 'Inspect' }),
    ]);
    expect(groups.map(({ title, routines }) => [title, ...routines.map((one) => one.title)])).toEqual([
      ['The whole room', 'Wash flats'],
      ['Rack A', 'Look for leaks'],
      ['Shelf A2', 'Turn'],
      ['Shelf A10', 'Water', 'Inspect'],
      ['Basil Corvid', 'Pinch out'],
    ]);
    expect(groups.map(({ link }) => link)).toEqual([
      null,
      null,
      ['/shelf', inventedId(2)],
      ['/shelf', inventedId(10)],
      ['/plantings', inventedId(500)],
    ]);
  });

  it.each(Object.values(at))('$placeLabel is chosen by a word that finds it again', ({ place }) => {
    expect(placeOf(placeKey(place))).toEqual(place);
  });
});
