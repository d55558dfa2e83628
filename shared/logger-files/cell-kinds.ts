import { createClockParser, splitTime } from './clock-text';
import { dateFormsOf } from './date-text';
import { usualMissingMarks } from './logger-file-shape';
import { looksLikeNumber } from './number-text';
import { unitOfText } from './units';

/** What a cell looks like by itself. */
export type CellKind = 'missing' | 'number' | 'dateTime' | 'date' | 'clock' | 'text';

const missing = new Set(usualMissingMarks);
const parseClock = createClockParser();

/**
 * Tells what a cell looks like, in any of the supported spellings.
 *
 * @example
 * kindOfCell('31.01.2026'); // 'date'
 */
export function kindOfCell(cell: string): CellKind {
  const text = cell.trim();
  if (missing.has(text.toLowerCase())) return 'missing';
  if (looksLikeNumber(text)) return isCompactDate(text) ? 'date' : 'number';
  if (text.length > 60) return 'text';
  const { date, clock } = splitTime(text);
  if (clock !== '') return kindOfClock(date, clock);
  if (dateFormsOf(text).length > 0) return 'date';
  return splitMeasured(text) === null ? 'text' : 'number';
}

function kindOfClock(date: string, clock: string): CellKind {
  const isElapsed = /^(\d{1,5}(d|days?)?[.\s]\s?)?\d{1,6}:\d{2}(:\d{2}([.,]\d+)?)?$/.test(
    `${date} ${clock}`.trim(),
  );
  if (date === '') return isElapsed || !Number.isNaN(parseClock(clock).clockMs) ? 'clock' : 'text';
  if (!Number.isNaN(parseClock(clock).clockMs) && dateFormsOf(date).length > 0) return 'dateTime';
  return isElapsed || /^\d{3,6}:\d{2}(:\d{2})?$/.test(date + clock) ? 'clock' : 'text';
}

// 20260131 and 20260131083000 are whole numbers too; no quantity here reaches them.
function isCompactDate(text: string): boolean {
  return /^(19|20)\d{6}$/.test(text) && dateFormsOf(text).length > 0;
}

/** Tells whether cells of a kind say when. */
export function isTime(kind: CellKind): boolean {
  return kind === 'dateTime' || kind === 'date' || kind === 'clock';
}

/** A number with its unit in one cell, as in `21.5 °C`; null where the cell is not that. */
export function splitMeasured(cell: string): { readonly number: string; readonly unitText: string } | null {
  const parts = /^([+\-−]?[\d.,'’\s]*\d)\s*([^\d\s].*)$/.exec(cell);
  const number = parts?.[1];
  const unitText = parts?.[2];
  if (number === undefined || unitText === undefined) return null;
  return looksLikeNumber(number) && unitOfText(unitText) !== null ? { number, unitText } : null;
}
