import type { CorpusFile } from './corpus-file';
import { lines, temperatures, twoRows } from './corpus-file';

const at = ['2026-01-20T08:00:00Z', '2026-01-20T08:10:00Z', '2026-01-20T08:20:00Z'] as const;
const iso = at.map((time) => new Date(time).toISOString());

function light(...cells: string[]): Uint8Array {
  return lines('Time;Light (lx)', ...cells.map((cell, index) => `${at[index] ?? ''};${cell}`));
}

function lux(...values: number[]): CorpusFile['readings'] {
  return values.map((value, index) => ['illuminance', iso[index] ?? '', value]);
}

/** Marks in numbers, and what stands for no number. */
export const numberFiles: readonly CorpusFile[] = [
  {
    says: 'decimal commas between semicolons',
    bytes: lines('Time;Temperature (°C);Humidity (%)', `${at[0]};21,5;60,2`, `${at[1]};21,6;59,8`),
    readings: twoRows,
  },
  {
    says: 'points for thousands and decimal commas',
    bytes: light('1.234,5', '980,25', '12.000,0'),
    readings: lux(1234.5, 980.25, 12000),
  },
  {
    says: 'commas for thousands and decimal points',
    bytes: light('1,234.5', '980.25', '12,000.0'),
    readings: lux(1234.5, 980.25, 12000),
  },
  {
    says: 'commas for thousands of whole numbers',
    bytes: light('1,234', '980', '12,000'),
    readings: lux(1234, 980, 12000),
  },
  {
    says: 'three decimals after a comma throughout',
    bytes: light('21,375', '0,125', '20,000'),
    readings: lux(21.375, 0.125, 20),
  },
  {
    says: 'narrow spaces for thousands',
    bytes: light('1\u202f234,5', '980,5', '12\u202f000,0'),
    readings: lux(1234.5, 980.5, 12000),
  },
  {
    says: 'apostrophes for thousands',
    bytes: light("1'234.5", '980.5', "12'000.0"),
    readings: lux(1234.5, 980.5, 12000),
  },
  { says: 'exponents', bytes: light('1.5e3', '2E2', '1e-1'), readings: lux(1500, 200, 0.1) },
  {
    says: 'missing values as NaN, dashes, ERR and nothing',
    bytes: lines(
      'Time,Temperature (°C),Humidity (%)',
      `${at[0]},NaN,--`,
      `${at[1]},21.6,ERR`,
      `${at[2]},,58`,
    ),
    readings: [
      ['airTemperature', iso[1] ?? '', 21.6],
      ['relativeHumidity', iso[2] ?? '', 58],
    ],
  },
  {
    says: 'temperatures below zero, with hyphen and with minus sign, and zero itself',
    bytes: lines('Time,Temperature (°C)', `${at[0]},-4.5`, `${at[1]},−3.25`, `${at[2]},0`),
    readings: temperatures([at[0], -4.5], [at[1], -3.25], [at[2], 0]),
  },
  {
    says: 'a value of 1e308, a sentinel of -9999 and words',
    bytes: lines(
      'Time,Temperature (°C)',
      `${at[0]},21.5`,
      `${at[1]},1e308`,
      `${at[1]},-9999`,
      `${at[2]},warm`,
    ),
    readings: temperatures([at[0], 21.5]),
    rejected: [
      ['VALUE_OUT_OF_RANGE', 3, 2],
      ['VALUE_OUT_OF_RANGE', 4, 2],
      ['NOT_A_NUMBER', 5, 2],
    ],
  },
];
