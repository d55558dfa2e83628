import { storedUnit } from '@shared/climate/quantity';
import type {
  FileSeries,
  LoggerFile,
  LoggerFileDetail,
  LoggerFileStatus,
} from '@shared/contracts/logger-files';
import type { TimeKind } from '@shared/logger-files/logger-file-shape';
import { formatNumber, formatValue } from '@shared/format/numbers';
import { quantityName } from '@shared/format/quantities';
import { formatDayAndYear } from '@shared/format/room-time';

const bytesOfMegabyte = 1_000_000;

/** The size of a file: "1.9 MB". */
export function sizeWords(bytes: number): string {
  if (bytes < 1000) return formatValue(bytes, 'bytes', 0);
  return bytes < bytesOfMegabyte
    ? formatValue(bytes / 1000, 'kB', 0)
    : formatValue(bytes / bytesOfMegabyte, 'MB', 1);
}

/** Where a file stands, in the list. */
export const statusWords: Readonly<Record<LoggerFileStatus, string>> = {
  uploaded: 'Columns to match',
  checking: 'Being checked',
  checked: 'Checked, not brought in yet',
  bringingIn: 'Being brought in',
  broughtIn: 'Brought in',
  takingOut: 'Being taken out',
  takenOut: 'Taken out again',
  failed: 'Not brought in',
  cancelled: 'Stopped, nothing stored',
};

/** How the last work on a file ended where it left nothing to show; null where it did not end so. */
export function endingWords({ status, failure }: Pick<LoggerFile, 'status' | 'failure'>): string | null {
  if (status === 'cancelled') return 'It was stopped. Nothing was stored; check it again when you like.';
  if (status === 'takenOut') {
    return 'It was taken out again. None of its readings is stored; the file is still here.';
  }
  if (failure === null) return null;
  const { message, line, column } = failure;
  const place = line === null ? '' : ` (line ${line}${column === null ? '' : `, column ${column}`})`;
  return `${message}${place} Nothing was ${status === 'failed' ? 'stored' : 'changed'}.`;
}

/** Whether the server is at work on a file. */
export function isAtWork({ status }: Pick<LoggerFile, 'status'>): boolean {
  return status === 'checking' || status === 'bringingIn' || status === 'takingOut';
}

/** A number of readings: "120 214 readings". */
export function readingWords(count: number): string {
  return count === 1 ? '1 reading' : `${formatNumber(count, 0)} readings`;
}

/** The days that a file's readings lie on: "1 Nov 2026 to 28 Nov 2026"; null without any. */
export function spanWords(from: string | null, to: string | null, zone: string): string | null {
  if (from === null || to === null) return null;
  const [first, last] = [formatDayAndYear(from, zone), formatDayAndYear(to, zone)];
  return first === last ? first : `${first} to ${last}`;
}

/** What taking a file out, or removing it, does to the readings, and what stays. */
export function removalWords({ status, result, differing }: LoggerFile): string {
  if (status !== 'broughtIn') return 'Only the file goes. None of its readings is stored.';
  const replaced = differing === 'replace' ? (result?.different ?? 0) : 0;
  const back =
    replaced === 0 ? '' : ` The ${readingWords(replaced)} that it replaced come back as they were.`;
  const gone = `The ${readingWords(result?.fresh ?? 0)} that it brought in go.`;
  return `${gone}${back} Sums, charts and alerts of that time are counted again. Readings from devices and from other files stay.`;
}

const encodingNames: Readonly<Record<string, string>> = {
  'utf-8': 'UTF-8',
  'utf-16le': 'UTF-16',
  'utf-16be': 'UTF-16',
  'windows-1252': 'Windows-1252',
  latin1: 'Latin-1',
};
const delimiterNames: Readonly<Record<string, string>> = {
  ',': 'comma',
  ';': 'semicolon',
  '\t': 'tab',
  '|': 'bar',
  spaces: 'spaces',
};
const timeFormatNames: Readonly<Record<string, string>> = {
  iso: 'year first',
  yearFirst: 'year first',
  dayFirst: 'day first',
  monthFirst: 'month first',
  monthName: 'month by its name',
  unixSeconds: 'Unix seconds',
  unixMilliseconds: 'Unix milliseconds',
  spreadsheetDays: 'spreadsheet days',
  elapsed: 'time since the start',
} satisfies Record<TimeKind, string>;

/** How the file was read, line by line. */
export function shapeWords(file: LoggerFileDetail): readonly (readonly [name: string, value: string])[] {
  const encoding = encodingNames[file.encoding] ?? file.encoding;
  return [
    ['Encoding', `${encoding}, ${delimiterNames[file.delimiter] ?? file.delimiter}`],
    ['Header', file.headerLine === null ? 'none' : `line ${file.headerLine}`],
    ['Decimal mark', file.decimalMark === ',' ? 'comma' : 'point'],
    ['Dates', timeFormatNames[file.timeFormat] ?? file.timeFormat],
  ];
}

const roleNames: Readonly<Record<string, string>> = {
  time: 'Time',
  date: 'Date',
  timeOfDay: 'Time of day',
  sensorName: 'Name of the sensor',
  quantityName: 'Name of the quantity',
  unit: 'Unit',
  rowNumber: 'Row number',
};

/** What a column that holds no readings was taken for. */
export function roleWords(role: string): string {
  return roleNames[role] ?? 'Left out';
}

/** What becomes of a series' values: "°F → °C", or the unit alone when it stays. */
export function unitWords({ quantity, unit }: Pick<FileSeries, 'quantity' | 'unit'>): string {
  return unit === storedUnit[quantity] ? unit : `${unit} → ${storedUnit[quantity]}`;
}

/** A sensor as it is told apart from others: "A3 root zone". */
export function sensorWords(shelfLabel: string | null, quantity: keyof typeof quantityName): string {
  return `${shelfLabel ?? 'No shelf'} ${quantityName[quantity]}`;
}
