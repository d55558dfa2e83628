import { guessUnit, isUsual, spanOf } from './guess-unit';
import type { LoggerColumn, LoggerFileShape, RecognitionQuestion } from './logger-file-shape';
import type { NumberParser } from './number-text';
import type { LoggerQuantity } from './quantities';
import { quantityRules } from './quantities';
import type { SampleTable } from './recognise-table';
import type { LoggerUnit } from './units';
import { unitOfText } from './units';

/**
 * Asks about every column, and every quantity of a long file, whose values cannot be in their unit: a humidity of 4 %, a
 * temperature of 294 °C.
 */
export function questionUnits(
  shape: Pick<LoggerFileShape, 'columns' | 'layout' | 'quantityNames'>,
  table: SampleTable,
  parseNumber: NumberParser,
): RecognitionQuestion[] {
  // A value with its own unit beside it is not in doubt.
  const numbers = (column: LoggerColumn, rows: SampleTable['rows']): number[] =>
    rows.map(({ cells }) => parseNumber(cells[column.index] ?? ''));
  if (shape.layout === 'wide') {
    return shape.columns.flatMap((column) => {
      const { quantity, unit, index, name } = column;
      return quantity === null || unit === null
        ? []
        : questionUnit({ quantity, unit, column: index, name }, numbers(column, table.rows));
    });
  }
  const nameColumn = shape.columns.find(({ role }) => role === 'quantityName');
  const valueColumn = shape.columns.find(({ role }) => role === 'value');
  const unitColumn = shape.columns.find(({ role }) => role === 'unit');
  if (nameColumn === undefined || valueColumn === undefined) return [];
  const isIn = (unit: LoggerUnit, cells: readonly string[]): boolean =>
    unitColumn === undefined || unitOfText(cells[unitColumn.index] ?? '') === unit;
  return Object.entries(shape.quantityNames).flatMap(([name, meaning]) => {
    if (meaning === null) return [];
    const rows = table.rows.filter(
      ({ cells }) => cells[nameColumn.index] === name && isIn(meaning.unit, cells),
    );
    const subject = { ...meaning, column: valueColumn.index, name };
    return questionUnit(subject, numbers(valueColumn, rows));
  });
}

interface UnitSubject {
  readonly quantity: LoggerQuantity;
  readonly unit: LoggerUnit;
  readonly column: number;
  readonly name: string;
}

function questionUnit(subject: UnitSubject, values: readonly number[]): RecognitionQuestion[] {
  const { quantity, unit, column, name } = subject;
  const span = spanOf(values);
  if (span === null) return [];
  if (isUsual(quantity, unit, span)) return [];
  const label = quantityRules[quantity].label;
  return [
    {
      code: 'UNIT_QUESTIONED',
      column,
      message: `“${name.slice(0, 60)}” is read as ${label} in ${unit}, with values from ${span.low} to ${span.high}. Is that right?`,
      evidence: { name, unit, suggestedUnit: guessUnit(quantity, values), ...span },
    },
  ];
}
