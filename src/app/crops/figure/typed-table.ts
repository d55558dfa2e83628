import { shownTemperature, typedTemperatureC, type TemperatureUnit } from '@shared/format/numbers';
import type { TableRow, TableSlot } from './table-slot';

/** A row as it is typed, in the reader's unit; null where a field is empty. */
export interface TypedRow {
  readonly temperature: number | null;
  readonly value: number | null;
}

/** A problem and the row's field it stands at; without an index it is the table's. */
export interface RowProblem {
  readonly index: number | null;
  readonly name: 'temperature' | 'value';
  readonly words: string;
}

/** As many rows as the API takes. */
export const mostRows = 20;
const boundsC = [-20, 60] as const;

/** The rows of a table as they are typed, from cold to warm. */
export function shownRows({ figure }: TableSlot, reader: TemperatureUnit): TypedRow[] {
  return [...(figure?.rows ?? [])]
    .sort((one, other) => one.temperatureC - other.temperatureC)
    .map(({ temperatureC, value }) => ({ temperature: shown(temperatureC, reader), value }));
}

/** The first that is wrong with typed rows; null when they can be saved. */
export function tableProblem(
  slot: TableSlot,
  rows: readonly TypedRow[],
  reader: TemperatureUnit,
): RowProblem | null {
  if (rows.length === 0)
    return { index: null, name: 'temperature', words: 'Add a row, or take the table away.' };
  for (const [index, { temperature, value }] of rows.entries()) {
    const warmth = temperatureProblem(rows, index, temperature, reader);
    if (warmth !== null) return { index, name: 'temperature', words: warmth };
    const cell = valueProblem(slot, value);
    if (cell !== null) return { index, name: 'value', words: cell };
  }
  return null;
}

/** Rows as they are saved, from cold to warm. What nobody touched stays as it was stored, not as it was rounded. */
export function savedRows(
  { figure }: TableSlot,
  rows: readonly TypedRow[],
  reader: TemperatureUnit,
): TableRow[] {
  const storedC = (temperature: number): number =>
    figure?.rows.find(({ temperatureC }) => shown(temperatureC, reader) === temperature)?.temperatureC ??
    typedTemperatureC(temperature, reader);
  return rows
    .map(({ temperature, value }) => ({ temperatureC: storedC(temperature ?? 0), value }))
    .sort((one, other) => one.temperatureC - other.temperatureC);
}

function temperatureProblem(
  rows: readonly TypedRow[],
  index: number,
  temperature: number | null,
  reader: TemperatureUnit,
): string | null {
  if (temperature === null) return 'It is missing.';
  const [least, most] = boundsC.map((bound) => shown(bound, reader));
  if (temperature < (least ?? 0) || temperature > (most ?? 0))
    return `Between ${least} and ${most} ${reader}.`;
  const isTwice = rows.slice(0, index).some((other) => other.temperature === temperature);
  return isTwice ? 'It stands above already.' : null;
}

function valueProblem({ bounds: [least, most], mayBeEmpty }: TableSlot, value: number | null): string | null {
  if (value === null) return mayBeEmpty ? null : 'It is missing.';
  return value < least || value > most ? `Between ${least} and ${most}.` : null;
}

function shown(temperatureC: number, reader: TemperatureUnit): number {
  return Number(shownTemperature(temperatureC, reader).toFixed(1));
}
