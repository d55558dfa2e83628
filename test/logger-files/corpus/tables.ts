import type { CorpusFile } from './corpus-file';
import { lines, twoRows } from './corpus-file';

const header = ['Time', 'Temperature (°C)', 'Humidity (%)'];
const rows = [
  ['2026-01-20T08:00:00Z', '21.5', '60.2'],
  ['2026-01-20T08:10:00Z', '21.6', '59.8'],
];
const joined = (delimiter: string): Uint8Array =>
  lines(...[header, ...rows].map((cells) => cells.join(delimiter)));
const [first = '', second = ''] = rows.map((cells) => cells.join(','));
const names = header.join(',');

/** Delimiters, quotes, headers and what stands around the readings. */
export const tableFiles: readonly CorpusFile[] = [
  { says: 'commas', bytes: joined(','), readings: twoRows },
  { says: 'semicolons', bytes: joined(';'), readings: twoRows },
  { says: 'tabs', bytes: joined('\t'), readings: twoRows },
  { says: 'vertical bars with spaces around them', bytes: joined(' | '), readings: twoRows },
  {
    says: 'columns aligned with runs of spaces',
    bytes: lines(
      'Time                   Temp_C   RH_%',
      '2026-01-20T08:00:00Z   21.5     60.2',
      ' 2026-01-20T08:10:00Z  21.6     59.8',
    ),
    readings: twoRows,
  },
  {
    says: 'every cell in quotation marks',
    bytes: lines(...[header, ...rows].map((cells) => cells.map((cell) => `"${cell}"`).join(','))),
    readings: twoRows,
  },
  {
    says: 'every cell in apostrophes',
    bytes: lines(...[header, ...rows].map((cells) => cells.map((cell) => `'${cell}'`).join(','))),
    readings: twoRows,
  },
  {
    says: 'quoted decimal commas between commas',
    bytes: lines(names, '2026-01-20T08:00:00Z,"21,5","60,2"', '2026-01-20T08:10:00Z,"21,6","59,8"'),
    readings: twoRows,
  },
  {
    says: 'a quoted header over two lines with doubled quotation marks',
    bytes: lines('Time,"Temperature ""top""', '(°C)",Humidity (%)', first, second),
    readings: twoRows,
  },
  {
    says: 'notes, a blank line and settings before the header',
    bytes: lines('Export of readings', 'Interval,600', 'Note: 5" above the tray', '', names, first, second),
    readings: twoRows,
  },
  {
    says: 'names and units on two lines',
    bytes: lines('Time,Temperature,Humidity', 'yyyy-mm-dd,°C,%', first, second),
    readings: twoRows,
  },
  {
    says: 'no header, so that nothing can be read before the person names the columns',
    bytes: lines(first, second),
    readings: [],
    rejected: [
      ['QUANTITY_UNKNOWN', 1, 1],
      ['QUANTITY_UNKNOWN', 2, 1],
    ],
    questions: ['NO_HEADER_NAMES'],
  },
  {
    says: 'a row number that the header lacks',
    bytes: lines(names, `1,${first}`, `2,${second}`),
    readings: twoRows,
  },
  {
    says: 'a row number that the header has',
    bytes: lines(`#,${names}`, `1,${first}`, `2,${second}`),
    readings: twoRows,
  },
  {
    says: 'a delimiter at the end of every row',
    bytes: lines(names, `${first},`, `${second},`),
    readings: twoRows,
  },
  { says: 'the header again in the middle', bytes: lines(names, first, names, second), readings: twoRows },
  {
    says: 'a footer of words, a blank line and a count',
    bytes: lines(names, first, second, '', 'End of data', 'Records: 2'),
    readings: twoRows,
  },
  {
    says: 'newest row first',
    bytes: lines(names, second, first),
    readings: [...twoRows.slice(2), ...twoRows.slice(0, 2)],
  },
  {
    says: 'a row cut off and a row with a cell too many',
    bytes: lines(names, first, '2026-01-20T08:05:0', '2026-01-20T08:06:00Z,21,5,60,1', second),
    readings: twoRows,
    rejected: [
      ['TOO_FEW_COLUMNS', 3, 1],
      ['TOO_MANY_COLUMNS', 4, 4],
    ],
  },
  {
    says: 'formula text in a cell, which stays text',
    bytes: lines(names, first, '2026-01-20T08:05:00Z,=1+1,60.2', second),
    readings: [
      ...twoRows.slice(0, 2),
      ['relativeHumidity', '2026-01-20T08:05:00.000Z', 60.2],
      ...twoRows.slice(2),
    ],
    rejected: [['NOT_A_NUMBER', 3, 2]],
  },
];
