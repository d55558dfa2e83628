import { inventedId } from '../../core/testing/board-builder';
import { recordFilterOf, recordQuery, summedSpan } from './record-filter';

describe('the filter of the record', () => {
  it('is read from the address, and asks for the day after its last', () => {
    const filter = recordFilterOf({
      planting: inventedId(1),
      shelf: inventedId(2),
      person: inventedId(3),
      kind: 'water',
      from: '2026-11-01',
      to: '2026-11-30',
    });
    expect(recordQuery(filter)).toEqual({
      plantingId: inventedId(1),
      shelfId: inventedId(2),
      personId: inventedId(3),
      kind: 'water',
      from: '2026-11-01',
      to: '2026-12-01',
    });
  });

  it.each([{}, { planting: 'A3' }, { kind: 'sing' }, { from: '2026-13-01' }, { to: 'yesterday' }])(
    '%j is none',
    (query) => {
      expect(Object.values(recordFilterOf(query))).toEqual(Array(6).fill(undefined));
    },
  );

  it.each([
    [{}, { from: '2026-09-03', to: '2026-12-02' }],
    [{ from: '2026-11-01' }, { from: '2026-11-01', to: '2026-12-02' }],
    [{ to: '2026-10-31' }, { from: '2026-08-03', to: '2026-11-01' }],
    [
      { from: '2026-11-01', to: '2026-11-01' },
      { from: '2026-11-01', to: '2026-11-02' },
    ],
    [{ from: '2026-11-02', to: '2026-11-01' }, null],
  ])('%j on 1 December sums up %j', (filter, span) => {
    expect(summedSpan(filter, '2026-12-01')).toEqual(span);
  });
});
