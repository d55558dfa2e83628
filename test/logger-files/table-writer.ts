import type { Delimiter } from '@shared/logger-files/logger-file-shape';
import iconv from 'iconv-lite';
import { DateTime } from 'luxon';

/** One row of a table of readings; null is a missing value. */
export interface TableRow {
  readonly atMs: number;
  /** °C, in hundredths. */
  readonly temperatureC: number | null;
  /** %, in tenths. */
  readonly relativeHumidityPct: number | null;
}

/** One of the supported ways to write a table. */
export interface TableStyle {
  readonly encoding: 'utf-8' | 'utf-8-bom' | 'utf-16le' | 'utf-16be' | 'windows-1252';
  readonly lineEnd: '\n' | '\r\n' | '\r';
  readonly delimiter: Delimiter;
  readonly decimalMark: '.' | ',';
  readonly temperatureUnit: '°C' | '°F' | 'K';
  readonly humidityUnit: '%' | 'fraction';
  /** Luxon format, `seconds` or `milliseconds` since 1970. */
  readonly time: string;
  readonly isLong: boolean;
  readonly isQuoted: boolean;
  readonly isUnitLine: boolean;
  readonly hasRowNumber: boolean;
  readonly missing: '' | 'NaN' | '--' | 'ERR';
  readonly notes: readonly string[];
}

/** Writes a table in a style, in the zone of the room. */
export function writeTable(rows: readonly TableRow[], style: TableStyle, zone: string): Uint8Array {
  const body = style.isLong ? longLines(rows, style, zone) : wideLines(rows, style, zone);
  const separator = style.delimiter === 'spaces' ? '   ' : style.delimiter;
  const quoted = (cell: string): string => {
    const mustQuote = style.isQuoted || cell.includes(separator);
    return mustQuote ? `"${cell}"` : cell;
  };
  const text = [...style.notes, ...body.map((cells) => cells.map(quoted).join(separator))]
    .map((line) => line + style.lineEnd)
    .join('');
  return style.encoding === 'utf-8-bom'
    ? iconv.encode(text, 'utf-8', { addBOM: true })
    : iconv.encode(text, style.encoding, { addBOM: false });
}

function wideLines(rows: readonly TableRow[], style: TableStyle, zone: string): string[][] {
  const temperature = `Temperature${style.isUnitLine ? '' : ` (${style.temperatureUnit})`}`;
  const humidity = `Humidity${style.isUnitLine ? '' : ` (${style.humidityUnit})`}`;
  return [
    ['Time', temperature, humidity].map((name) =>
      style.delimiter === 'spaces' ? name.replace(' ', '_') : name,
    ),
    ...(style.isUnitLine ? [['-', style.temperatureUnit, style.humidityUnit]] : []),
    ...rows.map((row, index) => [
      ...(style.hasRowNumber ? [String(index + 1)] : []),
      timeText(row.atMs, style, zone),
      temperatureText(row.temperatureC, style),
      humidityText(row.relativeHumidityPct, style),
    ]),
  ];
}

function longLines(rows: readonly TableRow[], style: TableStyle, zone: string): string[][] {
  return [
    ['Time', 'Quantity', 'Value', 'Unit'],
    ...rows.flatMap((row) => {
      const time = timeText(row.atMs, style, zone);
      return [
        [time, 'temperature', temperatureText(row.temperatureC, style), style.temperatureUnit],
        [time, 'humidity', humidityText(row.relativeHumidityPct, style), style.humidityUnit],
      ];
    }),
  ];
}

function timeText(atMs: number, { time }: TableStyle, zone: string): string {
  if (time === 'seconds') return String(atMs / 1000);
  if (time === 'milliseconds') return String(atMs);
  return DateTime.fromMillis(atMs, { zone, locale: 'en' }).toFormat(time);
}

function temperatureText(temperatureC: number | null, style: TableStyle): string {
  if (temperatureC === null) return style.missing;
  const values = { '°C': temperatureC, '°F': temperatureC * 1.8 + 32, K: temperatureC + 273.15 };
  return numberText(values[style.temperatureUnit], style);
}

function humidityText(relativeHumidityPct: number | null, style: TableStyle): string {
  if (relativeHumidityPct === null) return style.missing;
  return numberText(style.humidityUnit === '%' ? relativeHumidityPct : relativeHumidityPct / 100, style);
}

// Ten decimals are enough for a value to come back within the rounding of a conversion.
function numberText(value: number, { decimalMark }: TableStyle): string {
  return String(Number(value.toFixed(10))).replace('.', decimalMark);
}
