import type { SenmlPack, SentReading } from './devices';

/** Times below this are relative to now (RFC 8428 §4.5.3). */
const RELATIVE_BELOW_S = 2 ** 28;

/** Resolved records, and those that carry nothing we can use. */
export interface ResolvedPack {
  readonly readings: readonly SentReading[];
  readonly problems: readonly { readonly index: number; readonly message: string }[];
  /** For each reading, the index of its record in the pack. */
  readonly indexes: readonly number[];
}

/**
 * Resolves a SenML pack: base name, time, unit and value are added to the records after them, and times relative to now
 * become instants. Source: RFC 8428 §4.1, §4.5.3, §4.6.
 *
 * @param pack - Checked against `senmlPack`.
 * @param nowMs - The present [ms since 1970 UTC].
 * @returns Readings in the pack's order, named by base name and name together.
 */
export function resolveSenml(pack: SenmlPack, nowMs: number): ResolvedPack {
  const base = { name: '', timeS: 0, value: 0 };
  const readings: SentReading[] = [];
  const indexes: number[] = [];
  const problems: { index: number; message: string }[] = [];
  pack.forEach((record, index) => {
    base.name = record.bn ?? base.name;
    base.timeS = record.bt ?? base.timeS;
    base.value = record.bv ?? base.value;
    const mustUnderstand = Object.keys(record).find((key) => key.endsWith('_'));
    if (mustUnderstand !== undefined) {
      problems.push({ index, message: `field ${mustUnderstand} is not understood here` });
      return;
    }
    if (record.v === undefined) {
      const isBaseOnly = record.n === undefined && record.bn !== undefined;
      if (!isBaseOnly) problems.push({ index, message: 'has no numeric value v' });
      return;
    }
    const timeS = base.timeS + (record.t ?? 0);
    const atMs = timeS < RELATIVE_BELOW_S ? nowMs + timeS * 1000 : timeS * 1000;
    if (!Number.isFinite(atMs) || Math.abs(atMs) > 8.64e15) {
      problems.push({ index, message: `time ${timeS} is no instant` });
      return;
    }
    readings.push({
      sensor: base.name + (record.n ?? ''),
      at: new Date(Math.round(atMs)).toISOString(),
      value: base.value + record.v,
    });
    indexes.push(index);
  });
  return { readings, problems, indexes };
}
