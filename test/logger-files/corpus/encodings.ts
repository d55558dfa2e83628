import type { CorpusFile } from './corpus-file';
import { encoded, lines, twoRows } from './corpus-file';

const accented = [
  'Zeit;Temperatur (°C);Feuchte (%)',
  '2026-01-20T09:00:00+01:00;21.5;60.2',
  '2026-01-20T09:10:00+01:00;21.6;59.8',
];
const text = accented.map((line) => `${line}\n`).join('');
const mark = (bytes: readonly number[], content: Uint8Array): Uint8Array =>
  Buffer.concat([Buffer.from(bytes), content]);

/** Encodings and line ends. */
export const encodingFiles: readonly CorpusFile[] = [
  { says: 'UTF-8 without a byte-order mark', bytes: lines(...accented), readings: twoRows },
  {
    says: 'UTF-8 with a byte-order mark',
    bytes: mark([0xef, 0xbb, 0xbf], lines(...accented)),
    readings: twoRows,
  },
  {
    says: 'UTF-16 little-endian with a mark',
    bytes: mark([0xff, 0xfe], encoded('utf-16le', ...accented)),
    readings: twoRows,
  },
  {
    says: 'UTF-16 big-endian with a mark',
    bytes: mark([0xfe, 0xff], encoded('utf-16be', ...accented)),
    readings: twoRows,
  },
  { says: 'UTF-16 little-endian without a mark', bytes: encoded('utf-16le', ...accented), readings: twoRows },
  { says: 'UTF-16 big-endian without a mark', bytes: encoded('utf-16be', ...accented), readings: twoRows },
  {
    says: 'Windows-1252 with a euro sign in a note',
    bytes: encoded('windows-1252', 'Preis 12 €', ...accented),
    readings: twoRows,
  },
  {
    says: 'Latin-1 with a control character that Windows-1252 does not have',
    bytes: encoded('latin1', 'Anmerkung \u0081', ...accented),
    readings: twoRows,
  },
  { says: 'CRLF line ends', bytes: Buffer.from(text.replaceAll('\n', '\r\n')), readings: twoRows },
  { says: 'CR line ends', bytes: Buffer.from(text.replaceAll('\n', '\r')), readings: twoRows },
  {
    says: 'mixed line ends, none after the last line',
    bytes: Buffer.from(text.replace('\n', '\r\n').trimEnd()),
    readings: twoRows,
  },
];
