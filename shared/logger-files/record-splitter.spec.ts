import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { createRecordSplitter } from './record-splitter';

function split(
  text: string,
  piece: number,
  delimiter: ',' | 'spaces' = ',',
): { cells: string[]; line: number }[] {
  const records: { cells: string[]; line: number }[] = [];
  const splitter = createRecordSplitter({ delimiter, quote: '"' }, (cells, line) =>
    records.push({ cells, line }),
  );
  for (let start = 0; start < text.length; start += piece) splitter.write(text.slice(start, start + piece));
  splitter.end();
  return records;
}

const cell = fc.stringMatching(/^[a-z0-9 ."\n,]{0,8}$/);

describe('createRecordSplitter', () => {
  it('with any quoted and plain cells in any pieces, gives what csv-parse gives for the whole', () => {
    fc.assert(
      fc.property(
        fc.array(fc.array(cell, { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 12 }),
        fc.constantFrom('\n', '\r\n'),
        fc.integer({ min: 1, max: 40 }),
        (table, lineEnd, piece) => {
          const written = (text: string): string =>
            /[",\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
          const text = table.map((cells) => cells.map(written).join(',') + lineEnd).join('');
          const whole = parse(text, { relax_column_count: true, record_delimiter: lineEnd });
          expect(split(text, piece).map(({ cells }) => cells)).toEqual(whole);
        },
      ),
      { numRuns: 500 },
    );
  });

  it('with quoted line ends, counts the lines of the file', () => {
    const text = 'a,b\r\n"two\r\nlines",c\r\n\r\nd,e\r\n';
    expect(split(text, 3).map(({ line }) => line)).toEqual([1, 2, 4, 5]);
  });

  it('with a long legitimate quoted cell over many pieces, keeps it whole', () => {
    const note = 'n\n'.repeat(20_000);
    expect(split(`"${note}",x\na,b\n`, 65_536).map(({ line }) => line)).toEqual([1, 20_002]);
  });

  it('with runs of spaces, gives no empty cells', () => {
    expect(split('  a   b\n c "d  e"\n', 100, 'spaces').map(({ cells }) => cells)).toEqual([
      ['a', 'b'],
      ['c', 'd  e'],
    ]);
  });

  it('with a line beyond a million characters, throws at that line whatever the pieces', () => {
    const text = `a,b\n${'1'.repeat(1_000_001)}\n`;
    for (const piece of [65_536, 5_000_000]) {
      expect(() => split(text, piece)).toThrow(expect.objectContaining({ code: 'LINE_TOO_LONG', line: 2 }));
    }
  });
});
