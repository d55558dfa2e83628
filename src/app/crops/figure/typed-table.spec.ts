import { libraryCrop } from '../testing/library-crop';
import { figuresOf } from './figure-slot';
import { emergenceSlot, seedlingsSlot, type TableSlot } from './table-slot';
import { savedRows, shownRows, tableProblem } from './typed-table';

const onion = libraryCrop('onion-long-day', { isOwn: true });

function there(slot: TableSlot | null): TableSlot {
  if (slot?.figure === null || slot === null) throw new Error('the library has none to try');
  return slot;
}
const emergence = there(emergenceSlot(onion));
const seedlings = there(seedlingsSlot(onion));

describe('a table by warmth', () => {
  it.each([
    ['days', emergence],
    ['shares', seedlings],
  ])('of %s goes through the fields unchanged, in either unit', (_name, slot) => {
    for (const reader of ['°C', '°F'] as const) {
      const rows = shownRows(slot, reader);
      expect(tableProblem(slot, rows, reader)).toBeNull();
      const figure = { rows: savedRows(slot, rows, reader), source: slot.figure?.source ?? '' };
      expect(slot.with(figure)).toEqual(figuresOf(onion));
    }
  });

  it('is saved from cold to warm, with none where the field is empty', () => {
    const typed = [
      { temperature: 22, value: 6 },
      { temperature: 4, value: null },
    ];
    const rows = savedRows(emergence, typed, '°C');
    expect(emergence.with({ rows, source: 'our log' }).seed?.emergence?.value).toEqual([
      { temperatureC: 4, days: null },
      { temperatureC: 22, days: 6 },
    ]);
  });

  it.each([
    ['no row', [], null, /Add a row/],
    ['no warmth', [{ temperature: null, value: 6 }], 0, /missing/],
    ['a warmth outside', [{ temperature: 70, value: 6 }], 0, /Between -20 and 60 °C/],
    ['no days to speak of', [{ temperature: 20, value: 0 }], 0, /Between 0.5 and 400/],
    [
      'a warmth twice',
      [
        { temperature: 20, value: 6 },
        { temperature: 20, value: 7 },
      ],
      1,
      /above already/,
    ],
  ])('with %s says so at the row', (_case, rows, index, words) => {
    const problem = tableProblem(emergence, rows, '°C');
    expect(problem?.index).toBe(index);
    expect(problem?.words).toMatch(words);
  });

  it('of shares needs every share', () => {
    expect(tableProblem(seedlings, [{ temperature: 20, value: null }], '°C')?.name).toBe('value');
    expect(tableProblem(seedlings, [{ temperature: 20, value: 0 }], '°C')).toBeNull();
  });

  it('can be taken away', () => {
    expect(emergence.with(null).seed?.emergence).toBeNull();
  });
});
