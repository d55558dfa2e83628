import type { ObservationColumns, Quality } from './alert-state';

/** A series being built. */
export interface Columns extends ObservationColumns {
  readonly times: number[];
  readonly values: number[];
  readonly qualities: Quality[];
}

/** A series to be built. */
export function emptyColumns(): Columns {
  return { times: [], values: [], qualities: [] };
}

/** Adds a value, later than all before it. */
export function append(columns: Columns, at: number, value: number, quality: Quality): void {
  columns.times.push(at);
  columns.values.push(value);
  columns.qualities.push(quality);
}
