import { isTime } from './cell-kinds';
import { headerSays, meaningOfHeader } from './header-words';
import type { SampleRow, SampleTable } from './recognise-table';
import { unitOfText } from './units';

/** The header cell of one column. */
export interface HeaderCell {
  /** Text of the header, '' where there is none. */
  readonly name: string;
  /** Text of the line of units, '' where there is none. */
  readonly unitLine: string;
}

/** Where the header is and what it says. */
export interface RecognisedHeader {
  /** Line numbers, from 1. */
  readonly lines: readonly number[];
  /** One for each column of the rows. */
  readonly cells: readonly HeaderCell[];
  /** True where rows begin with a number that the header has no cell for. */
  readonly rowNumberOffset: boolean;
  /** One sentence on what was found. */
  readonly reason: string;
}

/**
 * Finds the header among the lines above the first row of readings: one line of names; names with a line of units below;
 * or names that repeat, with a line of groups (sensors) above.
 */
export function recogniseHeader(table: SampleTable): RecognisedHeader {
  const above = table.head.toReversed().slice(0, 2);
  const [last, before] = above;
  const offset = rowNumberOffsetOf(table, last);
  const hasWidth = (row: SampleRow | undefined): row is SampleRow =>
    row !== undefined && isHeaderWide(table, row, offset);
  if (!hasWidth(last) || !isNames(last)) return noHeader(table);
  const align = (row: SampleRow): string[] => [...(offset ? [''] : []), ...row.cells];
  if (isUnits(last) && hasWidth(before) && isNames(before)) {
    return header(table, [before.line, last.line], align(before), align(last), offset);
  }
  const names = align(last);
  if (hasWidth(before) && isGroups(before, last)) {
    return header(table, [before.line, last.line], joinGroups(align(before), names, table), [], offset);
  }
  return header(table, [last.line], names, [], offset);
}

function header(
  table: SampleTable,
  lines: readonly number[],
  names: readonly string[],
  units: readonly string[],
  rowNumberOffset: boolean,
): RecognisedHeader {
  const cells = table.kinds.map((_, index) => ({ name: names[index] ?? '', unitLine: units[index] ?? '' }));
  const where = lines.length === 2 ? `lines ${lines.join(' and ')}` : `line ${lines.join('')}`;
  const offset = rowNumberOffset ? '; rows begin with a number that it has no name for' : '';
  return { lines, cells, rowNumberOffset, reason: `The header is on ${where}${offset}.` };
}

function noHeader(table: SampleTable): RecognisedHeader {
  const cells = table.kinds.map(() => ({ name: '', unitLine: '' }));
  return {
    lines: [],
    cells,
    rowNumberOffset: false,
    reason: 'The file has no header: readings begin at once.',
  };
}

/** One cell less than the rows, whose first column counts: by ones, or upwards where another column is surely the time. */
function rowNumberOffsetOf(table: SampleTable, headerRow: SampleRow | undefined): boolean {
  if (headerRow?.cells.length !== table.kinds.length - 1) return false;
  const cells = table.rows.slice(0, 50).map((row) => row.cells[0] ?? '');
  const steps = cells.slice(1).map((cell, index) => Number(cell) - Number(cells[index]));
  const isTimed = table.kinds.slice(1).some(isTime);
  return (
    cells.every((cell) => /^\d+$/.test(cell)) && steps.every((step) => (isTimed ? step > 0 : step === 1))
  );
}

// Trailing delimiters make a header a cell longer or shorter than its rows.
function isHeaderWide(table: SampleTable, row: SampleRow, offset: boolean): boolean {
  const wanted = table.kinds.length - (offset ? 1 : 0);
  const named = row.cells.findLastIndex((cell) => cell !== '') + 1;
  const used = table.kinds.findLastIndex((kind) => kind !== 'missing') + 1 - (offset ? 1 : 0);
  return named > 0 && named <= wanted && (row.cells.length >= used || named >= used);
}

/** Names hold letters, and none of them is a number or a time. */
function isNames(row: SampleRow): boolean {
  const filled = row.cells.filter((cell) => cell !== '');
  const plain = filled.filter((cell) => !/^[+\-−]?[\d.,]+$/.test(cell));
  return plain.length > 0 && plain.length >= filled.length / 2;
}

function isUnits(row: SampleRow): boolean {
  const filled = row.cells.filter((cell) => cell !== '');
  const units = filled.filter((cell) => unitOfText(cell) !== null);
  const others = filled.filter((cell) => unitOfText(cell) === null);
  const isFormat = (cell: string): boolean => /^[[(]?[ymdhst:./\-\s]+[\])]?$/i.test(cell) || cell.length <= 6;
  return units.length > 0 && others.every(isFormat) && !others.some((cell) => meaningOfHeader(cell) !== null);
}

function isGroups(groups: SampleRow, names: SampleRow): boolean {
  const meant = names.cells
    .filter((cell) => meaningOfHeader(cell) !== null)
    .map((cell) => cell.toLowerCase());
  const hasRepeats = new Set(meant).size < meant.length;
  return hasRepeats && isNames(groups) && groups.cells.filter((cell) => cell !== '').length >= 2;
}

/** Puts each group before the names below it; a group goes on over the empty cells to its right. */
function joinGroups(groups: readonly string[], names: readonly string[], table: SampleTable): string[] {
  let group = '';
  return names.map((name, index) => {
    const own = groups[index] ?? '';
    if (own !== '') group = own;
    const isReading = table.kinds[index] === 'number' && !headerSays(name, 'time');
    return isReading && group !== '' ? `${group} / ${name}` : name;
  });
}
