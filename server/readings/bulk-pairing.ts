import { FIRST_FAILED_FLAGS } from '@shared/series/quality-tests';
import { BulkColumns } from './bulk-columns';

/** Takes a humidity reading with the temperature nearest to it in time. */
export type OnPair = (at: number, humidityPct: number, temperatureC: number) => void;

/** Part of a series' readings: those from one instant to another [ms], both included. */
export interface Excerpt {
  readonly columns: BulkColumns;
  readonly from: number;
  readonly to: number;
}

/**
 * Pairs as `pairNearest` of shared/series does, over columns and without an object for each reading; of two temperatures
 * equally near the earlier counts.
 *
 * @param humidity - Relative humidity [%], in order.
 * @param temperature - Air temperature [°C], in order.
 * @param withinMs - Longest distance in time of a pair [ms].
 * @param onPair - Called for each humidity reading that has a partner, in order.
 */
export function pairColumns(
  humidity: Excerpt,
  temperature: BulkColumns,
  withinMs: number,
  onPair: OnPair,
): void {
  const { ats, values } = humidity.columns;
  const others = temperature.ats;
  const distance = (index: number, at: number): number => Math.abs((others[index] ?? Infinity) - at);
  let nearest = 0;
  for (let index = 0; index < ats.length; index += 1) {
    const at = ats[index] ?? 0;
    if (at < humidity.from || at > humidity.to) continue;
    while (distance(nearest + 1, at) < distance(nearest, at)) nearest += 1;
    if (distance(nearest, at) <= withinMs) onPair(at, values[index] ?? 0, temperature.values[nearest] ?? 0);
  }
}

/**
 * Adds the good readings of some series, merged in order of time.
 *
 * @param into - Takes them.
 * @param excerpts - The series; of two readings at one instant that of the series named first counts.
 */
export function addGood(into: BulkColumns, excerpts: readonly Excerpt[]): void {
  const [only] = excerpts;
  if (excerpts.length === 1 && only !== undefined) {
    eachGood(only, (at, value) => into.push(at, value, 0));
    return;
  }
  const together: { at: number; value: number }[] = [];
  for (const excerpt of excerpts) eachGood(excerpt, (at, value) => together.push({ at, value }));
  together.sort((a, b) => a.at - b.at); // Stable: the first named stays first.
  let last = -Infinity;
  for (const { at, value } of together) {
    if (at !== last) into.push(at, value, 0);
    last = at;
  }
}

function eachGood({ columns, from, to }: Excerpt, take: (at: number, value: number) => void): void {
  const { ats, values, flags } = columns;
  for (let index = 0; index < ats.length; index += 1) {
    const at = ats[index] ?? 0;
    if ((flags[index] ?? 0) < FIRST_FAILED_FLAGS && at >= from && at <= to) take(at, values[index] ?? 0);
  }
}
