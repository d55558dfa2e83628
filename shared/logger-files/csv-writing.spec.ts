import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { csvCell, csvLine } from './csv-writing';

describe('csvCell', () => {
  it.each(['=1+1', '+cmd', '-cmd', '@SUM(A1)', '\tx', '\rx', '  =1+1', '＝1+1'])(
    'with %j, is prefixed so that no spreadsheet runs it',
    (text) => {
      expect(csvCell(text).replace(/^"/, '')).toBe(`'${text}${/[\r]/.test(text) ? '"' : ''}`);
    },
  );

  it.each([
    ['-4.5', '-4.5'],
    [-4.5, '-4.5'],
    [0, '0'],
    [null, ''],
    ['a,b', '"a,b"'],
    ['5" shelf', '"5"" shelf"'],
    ['plain', 'plain'],
  ] as const)('with %j, is %j', (value, cell) => {
    expect(csvCell(value)).toBe(cell);
  });

  it('with any texts, is read by a CSV parser as the text, prefixed or not', () => {
    fc.assert(
      fc.property(fc.array(fc.string({ minLength: 1 }), { minLength: 2, maxLength: 6 }), (texts) => {
        const [cells = []] = parse(csvLine(texts), { record_delimiter: '\r\n' });
        expect(
          cells.map((cell, index) => cell === texts[index] || cell === `'${texts[index] ?? ''}`),
        ).toEqual(texts.map(() => true));
      }),
    );
  });
});
