import type { LoggerFileShape } from '@shared/logger-files/logger-file-shape';
import { createRecordSplitter } from '@shared/logger-files/record-splitter';
import { createTextDecoder } from '@shared/logger-files/text-decoder';

/** A line of a file, cut into cells. */
export interface FileRow {
  /** From 1. */
  readonly line: number;
  readonly cells: readonly string[];
}

/**
 * The lines of a part of a file.
 *
 * @param bytes - The part.
 * @param shape - How the file is laid out.
 * @param isToEnd - The part reaches to the end of the file; without, a last line that may be cut off is left out.
 * @returns Lines in order, as far as they can be read.
 */
export function rowsOf(bytes: Buffer, shape: LoggerFileShape, isToEnd: boolean): FileRow[] {
  const rows: FileRow[] = [];
  try {
    const splitter = createRecordSplitter(shape, (cells, line) => rows.push({ line, cells }));
    splitter.write(createTextDecoder(shape.encoding).write(bytes, 0));
    if (isToEnd) splitter.end();
  } catch {
    // What makes the file unreadable from here on is said, with its place, when it is checked.
  }
  return rows;
}
