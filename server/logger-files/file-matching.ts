import { isMeasured, type Quantity } from '@shared/climate/quantity';
import type { matchLoggerFile } from '@shared/contracts/logger-files';
import type { LoggerFileShape, LoggerSeries, QuantityMeaning } from '@shared/logger-files/logger-file-shape';
import type { MatchableSensor } from '@shared/logger-files/propose-matches';
import { storedUnitOf, unitsOf, type LoggerUnit } from '@shared/logger-files/units';
import type { z } from 'zod';
import { invalidField } from '../http/request-problem';
import type { SeriesMatch, SeriesMatches } from './series-matches';

/** What a person says about a file. */
export type MatchRequest = z.output<(typeof matchLoggerFile)['body']>;

/**
 * A file's shape as a person corrects it.
 *
 * @param shape - As recognised, or corrected before.
 * @param request - What the person says.
 * @returns The corrected shape.
 * @throws RequestProblem 422 where the shape has no such column or question, or a unit does not fit.
 */
export function correctedShape(shape: LoggerFileShape, request: MatchRequest): LoggerFileShape {
  const { timeFormat } = shape;
  const isAmbiguous = timeFormat.kind === 'dayFirst' || timeFormat.kind === 'monthFirst';
  if (request.dateOrder !== undefined && !isAmbiguous) {
    throw invalidField('body.dateOrder', 'is not in doubt: the file writes its dates in another way');
  }
  const columns = new Map(request.columns?.map((column) => [column.index, column]));
  const names = request.names?.map(
    ({ name, quantity, unit }, place) => [name, meaningOf(quantity, unit, `body.names.${place}`)] as const,
  );
  for (const index of columns.keys()) {
    const role = shape.columns[index]?.role;
    const isValue = role === 'quantity' || role === 'ignore';
    if (shape.layout === 'long' || !isValue) {
      throw invalidField('body.columns', `column ${index + 1} holds no values of its own`);
    }
  }
  return {
    ...shape,
    timeFormat: {
      ...timeFormat,
      kind: request.dateOrder ?? timeFormat.kind,
      zone: request.zone ?? timeFormat.zone,
    },
    columns: shape.columns.map((column) => {
      const said = columns.get(column.index);
      if (said === undefined) return column;
      const meaning = meaningOf(said.quantity, said.unit, `body.columns.${column.index}`);
      const role = meaning === null ? 'ignore' : 'quantity';
      return { ...column, role, quantity: meaning?.quantity ?? null, unit: meaning?.unit ?? null };
    }),
    quantityNames: { ...shape.quantityNames, ...Object.fromEntries(names ?? []) },
  };
}

/**
 * Where the series of a file go as a person changes it.
 *
 * @param before - As it was.
 * @param request - What the person says.
 * @param series - The file's series.
 * @param room - What the room has.
 * @returns The matches; series that are no longer in the file are left out.
 * @throws RequestProblem 422 for another quantity's sensor, one sensor twice, or what the room does not have.
 */
export function changedMatches(
  before: SeriesMatches,
  request: MatchRequest,
  series: readonly LoggerSeries[],
  room: { readonly sensors: readonly MatchableSensor[]; readonly shelfIds: ReadonlySet<string> },
): SeriesMatches {
  const matches = new Map<string, SeriesMatch>(Object.entries(before));
  for (const [place, { key, sensorId, newSensor }] of request.series?.entries() ?? []) {
    const path = `body.series.${place}`;
    if (!series.some((one) => one.key === key)) throw invalidField(path, 'is no series of this file');
    if (sensorId !== null) matches.set(key, { sensorId });
    else if (newSensor !== null) matches.set(key, { newSensor });
    else matches.delete(key);
    const shelfId = newSensor?.shelfId ?? null;
    if (shelfId !== null && !room.shelfIds.has(shelfId))
      throw invalidField(path, 'names no shelf of this room');
  }
  const kept = [...matches].filter(([key]) => series.some((one) => one.key === key));
  const taken = new Set<string>();
  for (const [key, match] of kept) {
    const quantity = series.find((one) => one.key === key)?.quantity;
    if (quantity === undefined || !isMeasured(quantity)) {
      throw invalidField('body.series', 'a computed quantity goes to no sensor');
    }
    if (!('sensorId' in match)) continue;
    const sensor = room.sensors.find(({ id }) => id === match.sensorId);
    if (sensor === undefined) throw invalidField('body.series', 'names no sensor of this room');
    if (sensor.quantity !== quantity) throw invalidField('body.series', 'names a sensor of another quantity');
    if (taken.has(sensor.id)) throw invalidField('body.series', 'names one sensor for two series');
    taken.add(sensor.id);
  }
  return Object.fromEntries(kept);
}

/**
 * A kept shape for another file of the same layout: meanings come from the profile, the look from the file.
 *
 * @param kept - The profile's shape.
 * @param own - The file's, as recognised.
 */
export function shapeByProfile(kept: LoggerFileShape, own: LoggerFileShape): LoggerFileShape {
  const { encoding, lineEnd, quote, headerLines, firstDataLine, order, thousandsMark } = own;
  return { ...kept, encoding, lineEnd, quote, headerLines, firstDataLine, order, thousandsMark };
}

function meaningOf(quantity: Quantity | null, unit: string | null, path: string): QuantityMeaning {
  if (quantity === null) return null;
  const units: readonly string[] = unitsOf(quantity);
  if (unit !== null && !units.includes(unit)) throw invalidField(path, 'has a unit of another quantity');
  return { quantity, unit: (unit as LoggerUnit | null) ?? storedUnitOf(quantity) };
}
