import { createWriteStream } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { once } from 'node:events';
import { finished } from 'node:stream/promises';
import { historyRows, type HistoryRequest } from './history-rows';

const ROWS_AT_ONCE = 500;

/** A logger file that was written. */
export interface WrittenLoggerFile {
  readonly deviceId: string;
  readonly path: string;
  readonly readings: number;
}

/**
 * Writes the room's history as one logger file a device: comma-separated, ISO times in UTC, one column a sensor headed
 * by its key, an empty field where nothing came.
 *
 * @param request - Which history.
 * @param folder - Where to; it is made when it is not there.
 * @throws The file system's error when a file cannot be written.
 */
export async function writeLoggerFiles(
  request: HistoryRequest,
  folder: string,
): Promise<WrittenLoggerFile[]> {
  await mkdir(folder, { recursive: true });
  let column = 0;
  const files = request.room.devices.map(({ id, sensors }, index) => {
    const path = join(folder, `device-${index + 1}.csv`);
    const firstColumn = column;
    column += sensors.length;
    const stream = createWriteStream(path, { mode: 0o600 });
    const header = ['time', ...sensors.map(({ key }) => quoted(key))].join(',');
    return { id, path, stream, firstColumn, columns: sensors.length, readings: 0, lines: [header] };
  });
  // Errors are thrown by the waits below; a listener keeps them from ending the process before.
  for (const { stream } of files) stream.on('error', () => undefined);

  let rows = 0;
  for (const { at, values } of historyRows(request)) {
    const time = new Date(at).toISOString();
    for (const file of files) {
      const own = values.slice(file.firstColumn, file.firstColumn + file.columns);
      file.lines.push([time, ...own.map((value) => value ?? '')].join(','));
      file.readings += own.filter((value) => value !== null).length;
    }
    rows += 1;
    if (rows % ROWS_AT_ONCE === 0) await Promise.all(files.map(flush));
  }
  await Promise.all(files.map(flush));
  await Promise.all(files.map(({ stream }) => finished(stream.end())));
  return files.map(({ id, path, readings }) => ({ deviceId: id, path, readings }));
}

async function flush(file: { stream: NodeJS.WritableStream; lines: string[] }): Promise<void> {
  if (file.lines.length === 0) return;
  const text = `${file.lines.join('\r\n')}\r\n`;
  file.lines = [];
  if (!file.stream.write(text)) await once(file.stream, 'drain');
}

/** A field as RFC 4180 wants it. */
function quoted(field: string): string {
  return /[",\r\n]/.test(field) ? `"${field.replaceAll('"', '""')}"` : field;
}
