/** Mark between whole and decimal places. */
export type DecimalMark = '.' | ',';

/** Mark between groups of three digits; a space stands for every kind of space. */
export type ThousandsMark = '' | ',' | '.' | ' ' | "'";

/** How a file writes numbers. */
export interface NumberMarks {
  readonly decimalMark: DecimalMark;
  readonly thousandsMark: ThousandsMark;
}

/** Reads a number; NaN where the text is not one. */
export type NumberParser = (text: string) => number;

/** A number in any of the supported spellings, for telling columns of numbers from columns of text. */
const anyNumber = /^[+\-−]?(\d+|\d{1,3}([.,'’\s]\d{3})+)?([.,]\d*)?(e[+-]?\d+)?$/i;

/** Tells whether a cell is a number in some spelling, leaving open which mark is which. */
export function looksLikeNumber(text: string): boolean {
  return text.length <= 40 && /\d/.test(text) && anyNumber.test(text);
}

/**
 * Finds out how a file writes numbers.
 *
 * @param cells - Numbers as they stand in the file, all from one file.
 * @returns The marks. Where `1,234` alone cannot tell (three digits after the only mark), a comma is taken as the
 * thousands mark only if every other number is whole and below 1000, or longer groups occur.
 */
export function recogniseNumberMarks(cells: readonly string[]): NumberMarks {
  const comma = evidenceFor(',', cells);
  const point = evidenceFor('.', cells);
  if (
    comma.asDecimal ||
    (comma.asEither && !point.asDecimal && !comma.asThousands && !areOthersSmall(',', cells))
  ) {
    return {
      decimalMark: ',',
      thousandsMark: otherThousandsMark(cells, point.asThousands || point.asEither),
    };
  }
  const isCommaThousands = comma.asThousands || comma.asEither;
  if (point.asThousands && !point.asDecimal && !isCommaThousands)
    return { decimalMark: ',', thousandsMark: '.' };
  const thousandsMark = isCommaThousands ? ',' : otherThousandsMark(cells, false);
  return { decimalMark: '.', thousandsMark };
}

interface MarkEvidence {
  /** Seen where only a decimal mark can stand. */
  asDecimal: boolean;
  /** Seen where only a thousands mark can stand. */
  asThousands: boolean;
  /** Seen before exactly three digits, where it can be both. */
  asEither: boolean;
}

function evidenceFor(mark: ',' | '.', cells: readonly string[]): MarkEvidence {
  const other = mark === ',' ? '.' : ',';
  const evidence: MarkEvidence = { asDecimal: false, asThousands: false, asEither: false };
  for (const cell of cells) {
    const last = cell.lastIndexOf(mark);
    if (last < 0) continue;
    if (cell.indexOf(mark) !== last || cell.lastIndexOf(other) > last) evidence.asThousands = true;
    else if (cell.includes(other) || !/^[+\-−]?[1-9]\d{0,2}.\d{3}$/.test(cell)) evidence.asDecimal = true;
    else evidence.asEither = true;
  }
  return evidence;
}

function areOthersSmall(mark: string, cells: readonly string[]): boolean {
  const others = cells.filter((cell) => !cell.includes(mark));
  return others.length > 0 && others.every((cell) => /^\d{1,3}$/.test(cell));
}

function otherThousandsMark(cells: readonly string[], isPoint: boolean): ThousandsMark {
  if (isPoint) return '.';
  if (cells.some((cell) => /\d['’]\d{3}/.test(cell))) return "'";
  return cells.some((cell) => /\d\s\d{3}/.test(cell)) ? ' ' : '';
}

const ZERO = 48;
const NINE = 57;
// Powers of ten up to 22 are exact as doubles, so one division of a whole number below 2^53 rounds correctly.
const exactPowers = Array.from({ length: 16 }, (_, exponent) => 10 ** exponent);

/**
 * Makes the function that reads the numbers of a file. Plain digits with one decimal mark, which is nearly every
 * cell, take a path without regular expressions; the rest is checked strictly.
 */
export function createNumberParser(marks: NumberMarks): NumberParser {
  const decimalCode = marks.decimalMark.charCodeAt(0);
  const parseRest = createStrictParser(marks);
  return (text) => {
    const length = text.length;
    const isNegative = text.charCodeAt(0) === 45;
    let digits = 0;
    let decimals = -1;
    let mantissa = 0;
    for (let index = isNegative ? 1 : 0; index < length; index += 1) {
      const code = text.charCodeAt(index);
      if (code >= ZERO && code <= NINE) {
        mantissa = mantissa * 10 + (code - ZERO);
        digits += 1;
        if (decimals >= 0) decimals += 1;
      } else if (code === decimalCode && decimals < 0) {
        decimals = 0;
      } else {
        return parseRest(text);
      }
    }
    if (digits === 0 || digits > 15) return parseRest(text);
    const value = decimals > 0 ? mantissa / (exactPowers[decimals] as number) : mantissa;
    return isNegative ? -value : value;
  };
}

function createStrictParser({ decimalMark, thousandsMark }: NumberMarks): NumberParser {
  const decimal = decimalMark === '.' ? '\\.' : ',';
  const group = { '': null, ',': ',', '.': '\\.', ' ': '\\s', "'": "['’]" }[thousandsMark];
  const whole = group === null ? '\\d+' : `(?:\\d+|\\d{1,3}(?:${group}\\d{3})+)`;
  const strict = new RegExp(`^[+\\-−]?(?:${whole}(?:${decimal}\\d*)?|${decimal}\\d+)(?:e[+-]?\\d+)?$`, 'i');
  const groups = group === null ? null : new RegExp(group, 'g');
  return (text) => {
    const trimmed = text.trim();
    if (trimmed.length > 400 || !strict.test(trimmed)) return Number.NaN;
    const plain = groups === null ? trimmed : trimmed.replace(groups, '');
    const value = Number(plain.replace('−', '-').replace(decimalMark, '.'));
    return Object.is(value, -0) ? 0 : value;
  };
}
