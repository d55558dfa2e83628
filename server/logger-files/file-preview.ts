import type { PreviewRow } from '@shared/contracts/logger-files';
import { createLoggerFileReader } from '@shared/logger-files/logger-file-reader';
import type { LoggerFileShape } from '@shared/logger-files/logger-file-shape';
import { SAMPLE_BYTES } from '@shared/logger-files/recognise-logger-file';
import { rowsOf, type FileRow } from './file-rows';
import type { LoggerFileEntity } from './logger-file-entity';

const FIRST_ROWS = 8;
const ODD_ROWS = 8;
const LAST_ROWS = 4;
/** Cells that are shown of a line, and characters of a cell. */
const SHOWN_CELLS = 60;
const SHOWN_CHARACTERS = 120;

/** What is shown of a file before anything is decided. */
export type PreviewedFile = Pick<LoggerFileEntity, 'shape' | 'startsAt' | 'lineCount' | 'tail'>;

type Reading = Pick<PreviewRow, 'at' | 'values' | 'problem'>;

/**
 * The first rows of a file, the odd ones near its start, and the last ones, with their values in the stored units.
 *
 * @param file - How it is read, and its last bytes.
 * @param head - Its first bytes.
 * @param now - The present [ms].
 */
export function previewOf(file: PreviewedFile, head: Buffer, now: number): PreviewRow[] {
  const { shape, tail, lineCount } = file;
  const isWhole = head.length < SAMPLE_BYTES;
  const rows = rowsOf(head, shape, isWhole).filter(({ line }) => line >= shape.firstDataLine);
  const readings = readingsOf(file, shape, head, now);
  const shown = (part: PreviewRow['part'], row: FileRow, line: number, reading?: Reading): PreviewRow => ({
    line,
    part,
    cells: row.cells.slice(0, SHOWN_CELLS).map((cell) => cell.slice(0, SHOWN_CHARACTERS)),
    ...(reading ?? { at: null, values: {}, problem: null }),
  });
  const first = rows.slice(0, FIRST_ROWS);
  const isOdd = ({ line }: FileRow): boolean => (readings.get(line)?.problem ?? null) !== null;
  const odd = rows.slice(FIRST_ROWS).filter(isOdd).slice(0, ODD_ROWS);
  const known = new Set([...first, ...odd].map(({ line }) => line));
  return [
    ...first.map((row) => shown('first', row, row.line, readings.get(row.line))),
    ...odd.map((row) => shown('odd', row, row.line, readings.get(row.line))),
    ...lastRows(file, shape, tail, lineCount, now)
      .filter(({ line }) => !known.has(line))
      .map(({ row, line, reading }) => shown('last', row, line, reading)),
  ];
}

function lastRows(
  file: PreviewedFile,
  shape: LoggerFileShape,
  tail: Buffer,
  lineCount: number,
  now: number,
): { row: FileRow; line: number; reading: Reading | undefined }[] {
  const rows = rowsOf(tail, shape, true);
  const lastLine = rows.at(-1)?.line ?? 0;
  const readings = readingsOf(file, { ...shape, firstDataLine: 1 }, tail, now);
  const isEnded = /[\r\n]\0?$/.test(tail.subarray(-2).toString('latin1'));
  const total = isEnded ? lineCount : lineCount + 1;
  // The tail begins somewhere within a line, so its first one is left out unless it is the whole file.
  return rows
    .slice(1)
    .slice(-LAST_ROWS)
    .map((row) => ({ row, line: total - lastLine + row.line, reading: readings.get(row.line) }))
    .filter(({ line }) => line >= shape.firstDataLine);
}

function readingsOf(
  { startsAt }: PreviewedFile,
  shape: LoggerFileShape,
  bytes: Buffer,
  now: number,
): Map<number, Reading> {
  const readings = new Map<number, Reading>();
  const hasInstants = shape.timeFormat.kind !== 'elapsed' || startsAt !== null;
  const change = (line: number, part: Partial<Reading>): void => {
    readings.set(line, { ...(readings.get(line) ?? { at: null, values: {}, problem: null }), ...part });
  };
  try {
    const reader = createLoggerFileReader(
      shape,
      {
        onReading: ({ column }, at, value, line) =>
          change(line, {
            at: hasInstants ? new Date(at).toISOString() : null,
            values: { ...readings.get(line)?.values, [column]: value },
          }),
        onRejected: ({ line, column, message }) => change(line, { problem: { column, message } }),
      },
      { startAtMs: startsAt?.getTime() ?? now, referenceMs: hasInstants ? now : Infinity },
    );
    reader.write(bytes);
    reader.end();
  } catch {
    // The part of the file may end within a quoted cell; what was read before that is shown.
  }
  return readings;
}
