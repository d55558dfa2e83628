import fc from 'fast-check';
import { createNumberParser, looksLikeNumber, recogniseNumberMarks } from './number-text';

describe('createNumberParser', () => {
  const parse = createNumberParser({ decimalMark: '.', thousandsMark: ',' });

  it('with any finite number as JavaScript writes it, gives the same number', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(parse(String(value))).toBe(value === 0 ? 0 : value);
      }),
    );
  });

  it('with any number of few decimals, rounds as JavaScript does', () => {
    fc.assert(
      fc.property(fc.integer({ min: -1e9, max: 1e9 }), fc.integer({ min: 0, max: 6 }), (whole, decimals) => {
        const text = (whole / 10 ** decimals).toFixed(decimals);
        expect(parse(text) + 0).toBe(Number(text) + 0);
      }),
    );
  });

  it.each([
    ['1,234.5', 1234.5],
    ['12,000', 12000],
    ['+3', 3],
    ['−3.5', -3.5],
    ['.5', 0.5],
    ['5.', 5],
    ['1e3', 1000],
    ['123456789012345678', 123456789012345680],
  ])('with “%s”, gives %d', (text, value) => {
    expect(parse(text)).toBe(value);
  });

  it.each([
    '',
    ' ',
    '-',
    '.',
    '1,23',
    '1,2345',
    '12,34,567',
    '0x10',
    'Infinity',
    'NaN',
    '1.2.3',
    '1 2',
    '=1',
    '١',
  ])('with “%s”, gives NaN', (text) => {
    expect(parse(text)).toBeNaN();
  });
});

describe('recogniseNumberMarks', () => {
  it.each([
    ['decimal points', ['21.5', '3'], '.', ''],
    ['decimal commas', ['21,5', '3'], ',', ''],
    ['both, comma last', ['1.234,5'], ',', '.'],
    ['both, point last', ['1,234.5'], '.', ','],
    ['points for thousands twice over', ['1.234.567'], ',', '.'],
    ['commas before three digits beside small whole numbers', ['1,234', '980'], '.', ','],
    ['commas before three digits only', ['1,234', '2,345'], ',', ''],
    ['spaces for thousands', ['12 000,5'], ',', ' '],
    ['no number at all', [], '.', ''],
  ] as const)('with %s, tells the marks', (_says, cells, decimalMark, thousandsMark) => {
    expect(recogniseNumberMarks(cells)).toEqual({ decimalMark, thousandsMark });
  });
});

describe('looksLikeNumber', () => {
  it.each(['21.5', '-4', '1 234,5', '1e-3', '.5'])('with “%s”, is true', (text) => {
    expect(looksLikeNumber(text)).toBe(true);
  });

  it.each(['', '-', 'A1', '2026-01-20', '10:00', '1'.repeat(50)])('with “%s”, is false', (text) => {
    expect(looksLikeNumber(text)).toBe(false);
  });
});
