import type { LoggerFileShape, LoggerSeries } from '@shared/logger-files/logger-file-shape';
import { SAMPLE_BYTES } from '@shared/logger-files/recognise-logger-file';
import { seriesInRow } from '@shared/logger-files/row-series';
import type { Tx } from '../database/transactions';
import type { LoggerFileEntity } from './logger-file-entity';
import { headOf } from './logger-file-content';
import { rowsOf } from './file-rows';

/**
 * The series that the first part of a file shows.
 *
 * @param head - First bytes of the file.
 * @param shape - How it is laid out.
 * @returns Series in the order in which they first appear.
 */
export function seriesOf(head: Buffer, shape: LoggerFileShape): LoggerSeries[] {
  const series = new Map<string, LoggerSeries>();
  for (const { line, cells } of rowsOf(head, shape, head.length < SAMPLE_BYTES)) {
    if (line < shape.firstDataLine) continue;
    for (const found of seriesInRow(shape, cells)) {
      if (!series.has(found.key)) series.set(found.key, { ...found, index: series.size });
    }
    if (shape.layout === 'wide' && !shape.columns.some(({ role }) => role === 'sensorName')) break;
  }
  return [...series.values()];
}

/**
 * As {@link seriesOf}, for a file that is kept.
 *
 * @param tx - Any.
 * @param file - The file.
 */
export async function seriesOfFile(
  tx: Tx,
  file: Pick<LoggerFileEntity, 'id' | 'shape'>,
): Promise<LoggerSeries[]> {
  return seriesOf(await headOf(tx, file.id, SAMPLE_BYTES), file.shape);
}
