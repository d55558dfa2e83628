import type { ObservationColumns } from './alert-state';
import { append, emptyColumns } from './observation-columns';

/**
 * Joins series as a clock would see them: at every reading of any of them, the latest of each that is young enough.
 *
 * @remarks
 * Nothing looks ahead, so a value never changes through readings taken after it, and a reading that comes late
 * changes none before it. Look-back: to fold from an instant, hand in readings from `withinMs` before it.
 *
 * @param sources - The series to join, in order of time.
 * @param withinMs - Longest age at which a reading still speaks for now [ms].
 * @param combine - Makes the value from one value of each series, null where none is young enough, and the instant;
 * null for no value.
 * @returns The joined series, as doubtful as the most doubtful reading in each value. Failed readings are left out.
 */
export function joinLatest(
  sources: readonly ObservationColumns[],
  withinMs: number,
  combine: (values: readonly (number | null)[], at: number) => number | null,
): ObservationColumns {
  const joined = emptyColumns();
  const passed = sources.map(() => 0);
  const latest = sources.map(() => ({ at: -Infinity, value: NaN, isPass: true }));
  for (let at = nextTime(sources, passed); at < Infinity; at = nextTime(sources, passed)) {
    sources.forEach((source, s) => {
      const i = passed[s] ?? 0;
      if (source.times[i] !== at) return;
      passed[s] = i + 1;
      if (source.qualities[i] === 'fail') return;
      latest[s] = { at, value: source.values[i] ?? NaN, isPass: source.qualities[i] === 'pass' };
    });
    const isYoung = (reading: { readonly at: number }): boolean => at - reading.at <= withinMs;
    const value = combine(
      latest.map((reading) => (isYoung(reading) ? reading.value : null)),
      at,
    );
    if (value === null) continue;
    const isPass = latest.every((reading) => reading.isPass || !isYoung(reading));
    append(joined, at, value, isPass ? 'pass' : 'suspect');
  }
  return joined;
}

/**
 * As {@link joinLatest}, with a value only where every series has a reading that is young enough.
 *
 * @param sources - As there.
 * @param withinMs - As there.
 * @param combine - Makes the value from one value of each series and the instant; null for none.
 * @returns As there.
 */
export function joinAsOf(
  sources: readonly ObservationColumns[],
  withinMs: number,
  combine: (values: readonly number[], at: number) => number | null,
): ObservationColumns {
  return joinLatest(sources, withinMs, (values, at) => {
    const known = values.filter((value) => value !== null);
    return known.length < values.length ? null : combine(known, at);
  });
}

/**
 * Readings of sensors that measure the same thing as one series, such as two thermometers of a shelf.
 *
 * @param sources - In order of time; of two readings at one instant that of the source named first counts.
 * @returns All of them in order.
 */
export function mergedReadings(sources: readonly ObservationColumns[]): ObservationColumns {
  const [only] = sources;
  if (sources.length === 1 && only !== undefined) return only;
  const merged = emptyColumns();
  const passed = sources.map(() => 0);
  for (let at = nextTime(sources, passed); at < Infinity; at = nextTime(sources, passed)) {
    const isThere = (source: ObservationColumns, s: number): boolean => source.times[passed[s] ?? 0] === at;
    const first = sources.findIndex(isThere);
    const i = passed[first] ?? 0;
    append(merged, at, sources[first]?.values[i] ?? NaN, sources[first]?.qualities[i] ?? 'fail');
    sources.forEach((source, s) => {
      if (isThere(source, s)) passed[s] = (passed[s] ?? 0) + 1;
    });
  }
  return merged;
}

function nextTime(sources: readonly ObservationColumns[], passed: readonly number[]): number {
  return Math.min(...sources.map(({ times }, s) => times[passed[s] ?? 0] ?? Infinity));
}
