import type { NumberParser } from './number-text';
import type { ElapsedUnit } from './logger-file-shape';

const unitMs: Readonly<Record<Exclude<ElapsedUnit, 'clock'>, number>> = {
  s: 1000,
  min: 60_000,
  h: 3_600_000,
  d: 86_400_000,
};

const elapsedClock = /^(?:(\d{1,5})(?:d|days?)?[.\s]\s?)?(\d{1,6}):(\d{2})(?::(\d{2}(?:[.,]\d+)?))?$/;

/**
 * Reads elapsed time: hours with minutes (`0:15`), with seconds (`26:00:30`), with days (`1.02:00:30`), or a number in a
 * stated unit.
 *
 * @returns Milliseconds, or NaN.
 */
export function elapsedMs(text: string, unit: ElapsedUnit, parseNumber: NumberParser): number {
  if (unit !== 'clock') return Math.round(parseNumber(text) * unitMs[unit]);
  const parts = elapsedClock.exec(text);
  if (parts === null || Number(parts[3]) > 59) return Number.NaN;
  const [, days, hours, minutes, seconds] = parts;
  const whole = (Number(days ?? 0) * 24 + Number(hours)) * 60 + Number(minutes);
  return whole * 60_000 + Math.round(Number((seconds ?? '0').replace(',', '.')) * 1000);
}

/** The unit of elapsed time that a header states, or null. */
export function elapsedUnitOfHeader(header: string): Exclude<ElapsedUnit, 'clock'> | null {
  const text = header.trim().toLowerCase();
  const stated =
    /(?:^|[([,_/\s-])\s*(s|sec|secs|seconds?|sek(?:unden)?|min|mins|minutes?|minuten|h|hrs?|hours?|stunden|d|days?|tage)\s*[)\]]?$/;
  const word = stated.exec(text)?.[1];
  if (word === undefined) return null;
  if (/^se?[ck]?/.test(word) && !word.startsWith('stund')) return 's';
  if (word.startsWith('min')) return 'min';
  return word.startsWith('h') || word.startsWith('stund') ? 'h' : 'd';
}

/** Tells whether a header is nothing but a unit of time in words, such as `Minutes`. */
export function isElapsedUnit(header: string): boolean {
  return /^\p{L}{3,}$/u.test(header.trim()) && elapsedUnitOfHeader(header) !== null;
}
