import { kindOfCell, splitMeasured } from './cell-kinds';
import { guessUnit } from './guess-unit';
import { foldHeader, headerSays, meaningOfHeader } from './header-words';
import type { ColumnRole, LoggerColumn, LoggerFileShape, QuantityMeaning } from './logger-file-shape';
import type { NumberParser } from './number-text';
import { quantityRules } from './quantities';
import type { RecognisedHeader } from './recognise-header';
import type { SampleTable } from './recognise-table';
import type { RecognisedTime } from './recognise-time';
import { storedUnitOf, unitOfText } from './units';

/** What the columns of a file hold. */
export interface RecognisedColumns {
  readonly columns: readonly LoggerColumn[];
  readonly layout: LoggerFileShape['layout'];
  readonly quantityNames: LoggerFileShape['quantityNames'];
}

/** What columns are judged with. */
interface ColumnContext {
  readonly table: SampleTable;
  readonly header: RecognisedHeader;
  readonly time: RecognisedTime;
  readonly parseNumber: NumberParser;
}

/**
 * Decides what each column holds. A file is long where a column of text names quantities and a single column holds the
 * values; a column of text that names sensors splits either kind into a series for each sensor.
 */
export function recogniseColumns(context: ColumnContext): RecognisedColumns {
  const quantityName = quantityNameColumn(context);
  const value = quantityName === null ? null : valueColumn(context);
  const isLong = quantityName !== null && value !== null;
  const sensorName = sensorNameColumn(context, isLong ? quantityName : null);
  const unit = isLong ? unitColumn(context) : null;
  const named = new Map<number, ColumnRole>(context.time.roles);
  if (sensorName !== null) named.set(sensorName, 'sensorName');
  if (isLong) {
    named.set(quantityName, 'quantityName').set(value, 'value');
    if (unit !== null) named.set(unit, 'unit');
  }
  const columns = context.table.kinds.map((_, index) =>
    columnOf(context, index, named.get(index) ?? null, isLong),
  );
  return {
    columns,
    layout: isLong ? 'long' : 'wide',
    quantityNames: isLong ? meaningsOf(context, quantityName, value, unit) : {},
  };
}

const roleReasons: Partial<Record<ColumnRole, string>> = {
  time: 'Its cells are times.',
  date: 'Its cells are dates.',
  timeOfDay: 'Its cells are times of day.',
  sensorName: 'Its cells name the sensor of each row.',
  quantityName: 'Its cells name what each row measures.',
  value: 'Its cells are the values.',
  unit: 'Its cells are units.',
  rowNumber: 'Its cells count the rows.',
};

function columnOf(
  context: ColumnContext,
  index: number,
  role: ColumnRole | null,
  isLong: boolean,
): LoggerColumn {
  const { name = '', unitLine = '' } = context.header.cells[index] ?? {};
  const plain = { index, name, unitText: unitLine, quantity: null, unit: null };
  if (role !== null) return { ...plain, role, reason: roleReasons[role] ?? '' };
  if (isRowNumber(context, index))
    return { ...plain, role: 'rowNumber', reason: roleReasons.rowNumber ?? '' };
  const kind = context.table.kinds[index];
  if (kind !== 'number' && kind !== 'missing')
    return { ...plain, role: 'ignore', reason: 'Its cells are not numbers.' };
  if (isLong)
    return { ...plain, role: 'ignore', reason: 'It is neither the value nor the name of a reading.' };
  return quantityColumn(context, index, plain);
}

function quantityColumn(
  context: ColumnContext,
  index: number,
  plain: Omit<LoggerColumn, 'role' | 'reason'>,
): LoggerColumn {
  const cells = filledCells(context, index);
  const measured = splitMeasured(cells[0] ?? '');
  const unitLine = plain.unitText === '' ? (measured?.unitText ?? '') : plain.unitText;
  const meaning =
    meaningOfHeader(plain.name, unitLine) ?? (unitLine === '' ? null : meaningOfHeader(plain.name));
  if (meaning === null) {
    const isUnnamed = plain.name === '' && cells.length > 0;
    return isUnnamed
      ? { ...plain, role: 'quantity', reason: 'Its cells are numbers, but the file does not say of what.' }
      : { ...plain, role: 'ignore', reason: 'Its header names nothing that is kept here.' };
  }
  const values = cells.map((cell) => context.parseNumber(splitMeasured(cell)?.number ?? cell));
  const guessed = meaning.unit === null ? guessUnit(meaning.quantity, values) : null;
  return {
    ...plain,
    role: 'quantity',
    unitText: meaning.unitText,
    quantity: meaning.quantity,
    unit: meaning.unit ?? guessed ?? storedUnitOf(meaning.quantity),
    reason:
      guessed === null || guessed === storedUnitOf(meaning.quantity)
        ? meaning.reason
        : `The header “${plain.name.slice(0, 60)}” reads as ${quantityRules[meaning.quantity].label}; its values fit ${guessed}.`,
  };
}

function filledCells({ table }: ColumnContext, index: number): string[] {
  return table.rows.map(({ cells }) => cells[index] ?? '').filter((cell) => kindOfCell(cell) !== 'missing');
}

function isRowNumber({ table, header, parseNumber }: ColumnContext, index: number): boolean {
  if (table.kinds[index] !== 'number') return false;
  const name = header.cells[index]?.name ?? '';
  const isNamedSo = headerSays(name, 'rowNumber') || (index === 0 && (header.rowNumberOffset || name === ''));
  const numbers = table.rows.map(({ cells }) => parseNumber(cells[index] ?? ''));
  const step = (numbers[1] ?? 0) - (numbers[0] ?? 0);
  const counts = numbers.every((value, row) => row === 0 || value - (numbers[row - 1] as number) === step);
  return isNamedSo && (header.rowNumberOffset || (Math.abs(step) === 1 && counts) || numbers.length === 1);
}

function textColumns({ table, time }: ColumnContext): number[] {
  return table.kinds.flatMap((kind, index) => (kind === 'text' && !time.roles.has(index) ? [index] : []));
}

function headerOf({ header }: ColumnContext, index: number): string {
  return header.cells[index]?.name ?? '';
}

function distinct(context: ColumnContext, index: number): string[] {
  return [...new Set(filledCells(context, index))].slice(0, 200);
}

/** Names of quantities: most of the different texts in the column mean one. */
function quantityNameColumn(context: ColumnContext): number | null {
  const isQuantity = (index: number): boolean => {
    const names = distinct(context, index);
    const meant = names.filter((name) => meaningOfHeader(name) !== null && unitOfText(name) === null);
    return (
      meant.length > 0 &&
      (meant.length * 2 >= names.length || headerSays(headerOf(context, index), 'quantity'))
    );
  };
  return textColumns(context).find(isQuantity) ?? null;
}

function valueColumn(context: ColumnContext): number | null {
  const numbers = context.table.kinds.flatMap((kind, index) =>
    kind === 'number' && !context.time.roles.has(index) && !isRowNumber(context, index) ? [index] : [],
  );
  const named = numbers.find((index) => headerSays(headerOf(context, index), 'value'));
  return named ?? (numbers.length === 1 ? (numbers[0] ?? null) : null);
}

function sensorNameColumn(context: ColumnContext, quantityName: number | null): number | null {
  const names = textColumns(context).filter(
    (index) => index !== quantityName && !isUnitColumn(context, index),
  );
  const named = names.find((index) => headerSays(headerOf(context, index), 'sensor'));
  if (named !== undefined || quantityName === null) return named ?? null;
  // Without a header, the other column of text in a long file is taken for the sensor.
  return names.find((index) => headerOf(context, index) === '') ?? null;
}

function isUnitColumn(context: ColumnContext, index: number): boolean {
  const texts = distinct(context, index);
  return texts.length > 0 && texts.every((text) => unitOfText(text) !== null);
}

function unitColumn(context: ColumnContext): number | null {
  const isUnit = (index: number): boolean =>
    isUnitColumn(context, index) ||
    /^(unit|einheit|unite|unidad|eenheid|unita)/.test(foldHeader(headerOf(context, index)));
  return textColumns(context).find(isUnit) ?? null;
}

function meaningsOf(
  context: ColumnContext,
  quantityName: number,
  value: number,
  unit: number | null,
): LoggerFileShape['quantityNames'] {
  const entries = distinct(context, quantityName).map((name): [string, QuantityMeaning] => {
    const rows = context.table.rows.filter(({ cells }) => cells[quantityName] === name);
    const cells = rows.map((row) => row.cells[value] ?? '');
    const measured = splitMeasured(cells[0] ?? '');
    const unitText = unit === null ? (measured?.unitText ?? '') : (rows[0]?.cells[unit] ?? '');
    const values = cells.map((cell) => context.parseNumber(splitMeasured(cell)?.number ?? cell));
    return [name, quantityMeaning(name, unitText, values)];
  });
  // Defines own properties, so that a name such as "__proto__" stays a name.
  return Object.fromEntries(entries);
}

/**
 * What a name in a long file's quantity column stands for.
 *
 * @param values - Values seen under the name, which tell the unit where none is stated.
 */
export function quantityMeaning(name: string, unitText: string, values: readonly number[]): QuantityMeaning {
  const meaning = meaningOfHeader(name, unitText);
  if (meaning === null) return null;
  const { quantity } = meaning;
  return { quantity, unit: meaning.unit ?? guessUnit(quantity, values) ?? storedUnitOf(quantity) };
}
