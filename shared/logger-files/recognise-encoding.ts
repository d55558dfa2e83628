import iconv from 'iconv-lite';
import { LoggerFileError } from './logger-file-error';
import type { LoggerFileEncoding } from './logger-file-shape';
import { positionAt } from './text-position';

/** The text of a sample, with how it was encoded. */
export interface DecodedSample {
  readonly encoding: LoggerFileEncoding;
  readonly text: string;
  /** One sentence on how the encoding was told. */
  readonly reason: string;
}

/** A character that is not allowed to appear in decoded text: bytes that the encoding does not have. */
export const REPLACEMENT_CHARACTER = '\uFFFD';

/**
 * Tells the encoding of a sample and decodes it.
 *
 * @param sample - First bytes of the file.
 * @param isTruncated - True where the file goes on, so that the last character may be cut.
 * @remarks
 * Windows-1252 and Latin-1 differ only in the bytes 0x80 to 0x9F, so a file without those is read as Windows-1252;
 * Latin-1 is told by bytes that Windows-1252 does not have.
 * @throws {@link LoggerFileError} `BINARY_FILE`, `NUL_BYTE` or `MIXED_ENCODING`, with the place.
 */
export function recogniseEncoding(sample: Uint8Array, isTruncated: boolean): DecodedSample {
  const utf16 = utf16Of(sample);
  if (utf16 !== null) return { ...utf16, text: decodeSample(sample, utf16.encoding, isTruncated) };
  refuseBinary(sample);
  const text = decodeSample(sample, 'utf-8', isTruncated);
  const hasMark = sample[0] === 0xef && sample[1] === 0xbb && sample[2] === 0xbf;
  const damage = text.indexOf(REPLACEMENT_CHARACTER);
  if (damage < 0) {
    const reason = hasMark ? 'UTF-8, told by its byte-order mark.' : 'UTF-8: every byte fits it.';
    return { encoding: 'utf-8', text, reason };
  }
  if (hasMark || /[\u0080-\uFFFC]/.test(text)) throw mixedEncoding(text, damage);
  return singleByteSample(sample, isTruncated);
}

/** The refusal of text in which some bytes do not fit the encoding of the rest. */
export function mixedEncoding(text: string, index: number, linesBefore = 0): LoggerFileError {
  const { line, column } = positionAt(text, index);
  return new LoggerFileError(
    'MIXED_ENCODING',
    'The file mixes two text encodings: from here on the letters do not fit the ones before. Save it again as UTF-8.',
    line + linesBefore,
    column,
  );
}

/** The refusal of text that holds a NUL byte. */
export function nulByte(text: string, index: number, linesBefore = 0): LoggerFileError {
  const { line, column } = positionAt(text, index);
  return new LoggerFileError(
    'NUL_BYTE',
    'The file is damaged here: it holds a NUL byte, which no text file does. It may have been cut off while it was written.',
    line + linesBefore,
    column,
  );
}

function utf16Of(sample: Uint8Array): Pick<DecodedSample, 'encoding' | 'reason'> | null {
  const [first, second] = sample;
  if (first === 0xff && second === 0xfe) {
    return { encoding: 'utf-16le', reason: 'UTF-16 (little-endian), told by its byte-order mark.' };
  }
  if (first === 0xfe && second === 0xff) {
    return { encoding: 'utf-16be', reason: 'UTF-16 (big-endian), told by its byte-order mark.' };
  }
  // Western text in UTF-16 has a zero in every second byte and hardly any in the others.
  const zeros = [0, 0];
  const pairs = Math.floor(Math.min(sample.length, 4096) / 2);
  for (let index = 0; index < pairs * 2; index += 1) {
    if (sample[index] === 0) zeros[index % 2] = (zeros[index % 2] ?? 0) + 1;
  }
  const [even = 0, odd = 0] = zeros;
  if (pairs > 0 && odd > pairs * 0.7 && even < pairs * 0.1) {
    return { encoding: 'utf-16le', reason: 'UTF-16 (little-endian), told by its zero bytes.' };
  }
  if (pairs > 0 && even > pairs * 0.7 && odd < pairs * 0.1) {
    return { encoding: 'utf-16be', reason: 'UTF-16 (big-endian), told by its zero bytes.' };
  }
  return null;
}

function refuseBinary(sample: Uint8Array): void {
  let controls = 0;
  for (const byte of sample) {
    if (byte < 0x20 && byte !== 0x09 && byte !== 0x0a && byte !== 0x0d && byte !== 0x0c) controls += 1;
  }
  if (controls > 8 && controls > sample.length * 0.01) {
    throw new LoggerFileError('BINARY_FILE', 'This is not a text file. Export the readings as CSV.', 1, 1);
  }
  const nul = sample.indexOf(0);
  if (nul >= 0) throw nulByte(decodeSample(sample.subarray(0, nul), 'windows-1252', true), nul);
}

function singleByteSample(sample: Uint8Array, isTruncated: boolean): DecodedSample {
  const text = decodeSample(sample, 'windows-1252', isTruncated);
  if (!text.includes(REPLACEMENT_CHARACTER)) {
    return {
      encoding: 'windows-1252',
      text,
      reason: 'Windows-1252: the letters above ASCII do not fit UTF-8.',
    };
  }
  return {
    encoding: 'latin1',
    text: decodeSample(sample, 'latin1', isTruncated),
    reason: 'Latin-1: the letters above ASCII fit neither UTF-8 nor Windows-1252.',
  };
}

function decodeSample(sample: Uint8Array, encoding: LoggerFileEncoding, isTruncated: boolean): string {
  const decoder = iconv.getDecoder(encoding);
  const text = decoder.write(bufferOf(sample));
  return isTruncated ? text : text + (decoder.end() ?? '');
}

/** The same bytes as a Buffer, without copying. */
export function bufferOf(bytes: Uint8Array): Buffer {
  return Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}
