import { shownTemperature, typedTemperatureC, type TemperatureUnit } from '@shared/format/numbers';
import type { FieldProblem, FieldsSlot, FigureField, NumberField, TypedFields } from './fields-slot';

/** The fields as the reader types them. */
export function shownFields(slot: FieldsSlot, reader: TemperatureUnit): TypedFields {
  return Object.fromEntries(
    slot.fields.map((field) => {
      const value = slot.figure?.values[field.name] ?? null;
      return [
        field.name,
        field.kind === 'number' && typeof value === 'number' ? shown(value, field, reader) : value,
      ];
    }),
  );
}

/** The fields in stored units. What nobody touched stays as it was stored, not as it was rounded for the field. */
export function storedFields(slot: FieldsSlot, typed: TypedFields, reader: TemperatureUnit): TypedFields {
  const before = shownFields(slot, reader);
  return Object.fromEntries(
    slot.fields.map((field) => {
      const value = typed[field.name] ?? null;
      if (!isWanted(field, typed)) return [field.name, null];
      if (slot.figure !== null && value === before[field.name])
        return [field.name, slot.figure.values[field.name] ?? null];
      if (typeof value === 'string') return [field.name, value.trim() === '' ? null : value.trim()];
      return [field.name, value === null ? null : stored(value, field, reader)];
    }),
  );
}

/** Whether the other fields ask for a field. */
export function isWanted(field: FigureField, typed: TypedFields): boolean {
  return field.isWanted?.(typed) ?? true;
}

/** The first that is wrong with stored fields; null when they can be saved. */
export function fieldsProblem(
  slot: FieldsSlot,
  values: TypedFields,
  reader: TemperatureUnit,
): FieldProblem | null {
  for (const field of slot.fields) {
    const value = values[field.name] ?? null;
    const words = isWanted(field, values) ? fieldProblem(field, value, reader) : null;
    if (words !== null) return { name: field.name, words };
  }
  return slot.problemOf(values);
}

/** The unit in which a number is typed. */
export function shownUnit(unit: string, reader: TemperatureUnit): string {
  return unit === '°C' ? reader : unit;
}

function fieldProblem(
  field: FigureField,
  value: string | number | null,
  reader: TemperatureUnit,
): string | null {
  if (value === null) {
    if (field.kind === 'number' && field.mayBeEmpty) return null;
    return field.kind === 'choice' ? 'Choose one.' : 'It is missing.';
  }
  if (field.kind !== 'number' || typeof value === 'string') return null;
  const [least, most] = field.bounds;
  if (value >= least && value <= most) return null;
  const [from, to] = field.bounds.map((bound) => shown(bound, field, reader));
  return `Between ${from} and ${to} ${shownUnit(field.unit, reader)}.`;
}

function shown(value: number, { unit }: NumberField, reader: TemperatureUnit): number {
  return unit === '°C' ? Number(shownTemperature(value, reader).toFixed(1)) : value;
}

function stored(value: number, field: FigureField, reader: TemperatureUnit): number {
  return field.kind === 'number' && field.unit === '°C' ? typedTemperatureC(value, reader) : value;
}
