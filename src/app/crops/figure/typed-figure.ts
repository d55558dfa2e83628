import { shownTemperature, typedTemperatureC, type TemperatureUnit } from '@shared/format/numbers';
import type { Figure } from '@shared/growing/crops/figure';
import type { ValueRange } from '@shared/series/time-weighted-statistics';
import type { FigureSlot } from './figure-slot';
import { savedSource } from './saved-source';
import { shownUnit } from './typed-fields';

/** A figure as it is typed: numbers in the reader's unit, null where a field is empty. */
export interface TypedFigure {
  readonly low: number | null;
  readonly high: number | null;
  readonly source: string;
}

/** The fields of a figure. */
export function typedFigure({ figure, unit }: FigureSlot, reader: TemperatureUnit): TypedFigure {
  const shown = (end: number | null): number | null =>
    end === null || unit !== '°C' ? end : Number(shownTemperature(end, reader).toFixed(1));
  return {
    low: figure === null ? null : shown(figure.value.low),
    high: figure === null ? null : shown(figure.value.high),
    source: figure?.source ?? '',
  };
}

/** What is wrong with the fields, in a sentence; null when they can be saved. */
export function figureProblem(slot: FigureSlot, typed: TypedFigure, reader: TemperatureUnit): string | null {
  const [lowName, highName] = slot.ends;
  const { low, high } = typed;
  if (low === null && high === null) return 'Give a number, or take the figure away.';
  if (slot.open !== 'either' && low === null) return `${lowName}: a number is missing.`;
  if (slot.open === 'none' && high === null) return `${highName}: a number is missing.`;
  if (low !== null && high !== null && low > high)
    return `${lowName} must not be above ${highName.toLowerCase()}.`;
  const [least, most] = slot.bounds;
  const stored = storedEnds(slot, typed, reader);
  const isOutside = [stored.low, stored.high].some((end) => end !== null && (end < least || end > most));
  if (!isOutside) return null;
  const [from, to] = slot.bounds.map((bound) =>
    slot.unit === '°C' ? shownTemperature(bound, reader) : bound,
  );
  return `Between ${from} and ${to} ${shownUnit(slot.unit, reader)}.`;
}

/** The figure as it is saved. Only for fields without a {@link figureProblem}. */
export function savedFigure(
  slot: FigureSlot,
  typed: TypedFigure,
  reader: TemperatureUnit,
): Figure<ValueRange> {
  return { value: storedEnds(slot, typed, reader), source: savedSource(typed.source) };
}

function storedEnds(slot: FigureSlot, typed: TypedFigure, reader: TemperatureUnit): ValueRange {
  const before = typedFigure(slot, reader);
  const stored = (side: 'low' | 'high'): number | null => {
    const end = typed[side];
    // What nobody touched stays as it was stored, not as it was rounded for the field.
    if (slot.figure !== null && end === before[side]) return slot.figure.value[side];
    return end === null || slot.unit !== '°C' ? end : typedTemperatureC(end, reader);
  };
  return { low: stored('low'), high: stored('high') };
}
