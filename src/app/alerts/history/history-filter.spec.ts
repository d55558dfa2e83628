import { inventedId } from '../../core/testing/board-builder';
import { filterOf } from './history-filter';

describe('the filter in the address', () => {
  it('is read', () => {
    expect(filterOf({ shelf: inventedId(1), kind: 'lampDark', month: '2026-11' })).toEqual({
      shelfId: inventedId(1),
      kind: 'lampDark',
      month: '2026-11',
    });
  });

  it.each([{}, { shelf: 'A3' }, { kind: 'tooPurple' }, { month: '2026-13' }, { month: 'November' }])(
    '%j is none',
    (query) => {
      expect(filterOf(query)).toEqual({ shelfId: undefined, kind: undefined, month: undefined });
    },
  );
});
