import type { LoggerFileErrorCode } from '@shared/logger-files/logger-file-error';
import type { CorpusFile } from './corpus-file';
import { encoded, lines } from './corpus-file';

const names = 'Time,Temperature (°C)';
const row = '2026-01-20T08:00:00Z,21.5';

function refused(code: LoggerFileErrorCode, line = 1, column = 1): CorpusFile['error'] {
  return { code, line, column };
}

function bytes(...values: number[]): Uint8Array {
  return Uint8Array.from(values);
}

const manyRows = Array.from({ length: 20_000 }, (_, index) => {
  const at = new Date(Date.UTC(2026, 0, 20) + index * 60_000).toISOString();
  return `${at},${20 + (index % 50) / 10}`;
});

/** Files that end in a clear refusal. */
export const badFiles: readonly CorpusFile[] = [
  { says: 'an empty file', bytes: bytes(), error: refused('EMPTY_FILE') },
  { says: 'only blank lines', bytes: lines('', '  ', ''), error: refused('EMPTY_FILE') },
  {
    says: 'a zipped spreadsheet',
    bytes: bytes(0x50, 0x4b, 3, 4, 20, 0, 6, 0),
    error: refused('SPREADSHEET_FILE'),
  },
  {
    says: 'an older binary spreadsheet',
    bytes: bytes(0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1, 0),
    error: refused('SPREADSHEET_FILE'),
  },
  { says: 'a PDF', bytes: lines('%PDF-1.7', '1 0 obj'), error: refused('PDF_FILE') },
  {
    says: 'a PNG picture',
    bytes: bytes(0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10),
    error: refused('IMAGE_FILE'),
  },
  { says: 'a JPEG picture', bytes: bytes(0xff, 0xd8, 0xff, 0xe0, 0, 16), error: refused('IMAGE_FILE') },
  { says: 'a compressed file', bytes: bytes(0x1f, 0x8b, 8, 0), error: refused('COMPRESSED_FILE') },
  {
    says: 'other binary data',
    bytes: Uint8Array.from({ length: 4096 }, (_, index) => (index * 7919) % 251),
    error: refused('BINARY_FILE'),
  },
  {
    says: 'a web page',
    bytes: lines('<!DOCTYPE html>', '<table><tr><td>21.5</td></tr></table>'),
    error: refused('MARKUP_FILE'),
  },
  {
    says: 'a JSON document',
    bytes: lines('[{"time": "2026-01-20T08:00:00Z", "temperature": 21.5}]'),
    error: refused('MARKUP_FILE'),
  },
  {
    says: 'a NUL byte near the start',
    bytes: lines(names, row, `2026-01-20T08:10:00Z,2\u0000.5`),
    error: refused('NUL_BYTE', 3, 23),
  },
  {
    says: 'a NUL byte far into the file',
    bytes: lines(names, ...manyRows, `2026-02-20T08:10:00Z,2\u0000.5`),
    error: refused('NUL_BYTE', 20_002, 23),
  },
  {
    says: 'UTF-8 that turns into Windows-1252 at once',
    bytes: Buffer.concat([lines(names, row), encoded('windows-1252', '2026-01-20T08:10:00Z,21 °C')]),
    error: refused('MIXED_ENCODING', 3, 25),
  },
  {
    says: 'UTF-8 that turns into Windows-1252 far into the file',
    bytes: Buffer.concat([lines(names, ...manyRows), encoded('windows-1252', '2026-02-20T08:10:00Z,21 °C')]),
    error: refused('MIXED_ENCODING', 20_002, 25),
  },
  { says: 'only a header', bytes: lines(names), error: refused('HEADER_ONLY') },
  {
    says: 'only notes and a header',
    bytes: lines('Export of readings', names),
    error: refused('HEADER_ONLY', 2),
  },
  { says: 'one column', bytes: lines('Temperature', '21.5', '21.6', '21.7'), error: refused('ONE_COLUMN') },
  {
    says: 'prose',
    bytes: lines('The readings are on the other disk.', 'Please ask the keeper.'),
    error: refused('NO_VALUES'),
  },
  {
    says: '10,000 columns',
    bytes: lines(
      ['Time', ...Array.from({ length: 9999 }, (_, index) => `T${index}`)].join(','),
      ['2026-01-20T08:00:00Z', ...Array.from({ length: 9999 }, () => '2')].join(','),
    ),
    error: refused('TOO_MANY_COLUMNS', 1, 513),
  },
  {
    says: 'a first line without end',
    bytes: lines('x'.repeat(400_000)),
    error: refused('LINE_TOO_LONG', 1, 262_145),
  },
  {
    says: 'a line of two million characters far into the file',
    bytes: lines(names, ...manyRows, '1'.repeat(2_000_000)),
    error: refused('LINE_TOO_LONG', 20_002, 1_000_001),
  },
  {
    says: 'a quotation mark that is never closed',
    bytes: lines(names, row, '2026-01-20T08:10:00Z,"21.6', '2026-01-20T08:20:00Z,21.7'),
    error: refused('UNCLOSED_QUOTE', 3, 2),
  },
  {
    says: 'a quotation mark that is never closed, far into the file',
    bytes: lines(names, ...manyRows, '2026-02-20T08:10:00Z,"21.6', ...manyRows),
    error: refused('UNCLOSED_QUOTE', 20_002, 2),
  },
  {
    says: 'numbers without any time',
    bytes: lines('Temperature (°C),Humidity (%)', '21.5,60.2', '21.4,60.3', '21.6,60.1'),
    error: refused('NO_TIME', 2),
  },
  {
    says: 'minutes that do not count from a start',
    bytes: lines('Minutes,Temperature (°C)', '14,21.5', '15,21.4', '21,21.6'),
    error: refused('NO_TIME', 2),
  },
  {
    says: 'times without any quantity that is kept',
    bytes: lines('Time,Battery (V)', '2026-01-20T08:00:00Z,2.9'),
    error: refused('NO_VALUES', 2),
  },
  {
    says: 'more sensors than a room has',
    bytes: lines(
      'Time,Sensor,Temperature (°C)',
      ...Array.from({ length: 600 }, (_, index) => `2026-01-20T08:00:00Z,S${index},21.5`),
    ),
    error: refused('TOO_MANY_SERIES', 514, 2),
  },
];
