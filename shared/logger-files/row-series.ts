import type { LoggerColumn, LoggerFileShape, LoggerSeries } from './logger-file-shape';
import type { LoggerQuantity } from './quantities';
import { quantityRules } from './quantities';
import { quantityMeaning } from './recognise-columns';
import type { LoggerUnit } from './units';
import { dimensionOf, unitOfText } from './units';

/** A series before it has its place among the others of the file. */
export type RowSeries = Omit<LoggerSeries, 'index'>;

/** The columns that tell which series a row belongs to. */
export interface SeriesColumns {
  readonly sensorName: number | null;
  readonly quantityName: number | null;
  readonly unit: number | null;
}

/** Finds the columns of a shape that tell which series a row belongs to. */
export function seriesColumnsOf(shape: LoggerFileShape): SeriesColumns {
  const indexOf = (role: LoggerColumn['role']): number | null =>
    shape.columns.find((column) => column.role === role)?.index ?? null;
  return { sensorName: indexOf('sensorName'), quantityName: indexOf('quantityName'), unit: indexOf('unit') };
}

/** What tells a row from rows of other series: its sensor and, in a long file, its quantity and unit. */
export function rowIdentity(
  { sensorName, quantityName, unit }: SeriesColumns,
  cells: readonly string[],
): string {
  if (sensorName === null && quantityName === null) return '';
  return [sensorName, quantityName, unit].map((column) => cellOf(cells, column)).join('|');
}

function cellOf(cells: readonly string[], column: number | null): string {
  return column === null ? '' : (cells[column] ?? '').trim();
}

/**
 * The series of which a row holds readings.
 *
 * @returns One for each measured column of a wide file; one, or none where the quantity is not kept, for a long file.
 */
export function seriesInRow(shape: LoggerFileShape, cells: readonly string[]): RowSeries[] {
  const columns = seriesColumnsOf(shape);
  const sensorName = cellOf(cells, columns.sensorName);
  const keyOf = (name: string): string => (sensorName === '' ? name : `${sensorName}|${name}`);
  if (shape.layout === 'wide') {
    return shape.columns.flatMap(({ role, index, name, quantity, unit }) => {
      if (role !== 'quantity' || quantity === null || unit === null) return [];
      return [{ key: keyOf(String(index)), sensorName, column: index, name, quantity, unit }];
    });
  }
  const value = shape.columns.find(({ role }) => role === 'value');
  const name = cellOf(cells, columns.quantityName);
  const unitText = cellOf(cells, columns.unit);
  const meaning = Object.hasOwn(shape.quantityNames, name)
    ? shape.quantityNames[name]
    : quantityMeaning(name, unitText, []);
  if (value === undefined || meaning === null || meaning === undefined) return [];
  const { quantity } = meaning;
  return [
    {
      key: keyOf(name),
      sensorName,
      column: value.index,
      name,
      quantity,
      unit: statedUnit(unitText, quantity) ?? meaning.unit,
    },
  ];
}

/** The unit that the row itself states, where it is one of the quantity. */
function statedUnit(unitText: string, quantity: LoggerQuantity): LoggerUnit | null {
  const unit = unitText === '' ? null : unitOfText(unitText);
  return unit !== null && dimensionOf(unit) === quantityRules[quantity].dimension ? unit : null;
}
