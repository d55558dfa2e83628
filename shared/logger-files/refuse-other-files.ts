import { LoggerFileError } from './logger-file-error';
import type { LoggerFileErrorCode } from './logger-file-error';

interface Signature {
  readonly bytes: readonly number[];
  readonly code: LoggerFileErrorCode;
  readonly message: string;
}

const saveAsCsv =
  'This is a spreadsheet. Open it there, choose “Save as” or “Download”, and bring in the CSV file.';
const image = 'This is a picture, not a table of readings.';
const unpack = 'This file is compressed. Unpack it and bring in the text file inside.';

// First bytes of well-known formats, from memory; each is published in the format's own specification.
const signatures: readonly Signature[] = [
  { bytes: [0x50, 0x4b, 0x03, 0x04], code: 'SPREADSHEET_FILE', message: saveAsCsv },
  { bytes: [0x50, 0x4b, 0x05, 0x06], code: 'SPREADSHEET_FILE', message: saveAsCsv },
  { bytes: [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1], code: 'SPREADSHEET_FILE', message: saveAsCsv },
  {
    bytes: [0x25, 0x50, 0x44, 0x46, 0x2d],
    code: 'PDF_FILE',
    message: 'This is a PDF document. Export the readings as CSV from the program that made it.',
  },
  { bytes: [0x89, 0x50, 0x4e, 0x47], code: 'IMAGE_FILE', message: image },
  { bytes: [0xff, 0xd8, 0xff], code: 'IMAGE_FILE', message: image },
  { bytes: [0x47, 0x49, 0x46, 0x38], code: 'IMAGE_FILE', message: image },
  { bytes: [0x52, 0x49, 0x46, 0x46], code: 'IMAGE_FILE', message: image },
  { bytes: [0x1f, 0x8b], code: 'COMPRESSED_FILE', message: unpack },
  { bytes: [0x37, 0x7a, 0xbc, 0xaf], code: 'COMPRESSED_FILE', message: unpack },
  { bytes: [0x28, 0xb5, 0x2f, 0xfd], code: 'COMPRESSED_FILE', message: unpack },
];

/**
 * Refuses files that are not text at all, each with what to do instead.
 *
 * @param sample - The first bytes of the file.
 * @throws {@link LoggerFileError} `EMPTY_FILE`, `SPREADSHEET_FILE`, `PDF_FILE`, `IMAGE_FILE` or `COMPRESSED_FILE`.
 */
export function refuseOtherFiles(sample: Uint8Array): void {
  if (sample.length === 0) throw new LoggerFileError('EMPTY_FILE', 'The file is empty.', 1, 1);
  const signature = signatures.find(({ bytes }) => bytes.every((byte, index) => sample[index] === byte));
  if (signature !== undefined) throw new LoggerFileError(signature.code, signature.message, 1, 1);
}

/**
 * Refuses text that is marked up instead of laid out in lines and columns.
 *
 * @throws {@link LoggerFileError} `EMPTY_FILE` where there is only blank space, `MARKUP_FILE` for HTML, XML and JSON.
 */
export function refuseMarkup(text: string): void {
  const start = text.slice(0, 2000).trimStart();
  if (text.trim() === '') throw new LoggerFileError('EMPTY_FILE', 'The file holds only blank lines.', 1, 1);
  const isMarkup =
    /^<(\?xml|!doctype|html|table|svg|[a-z]+[\s>])/i.test(start) || /^[[{]\s*["{[]/.test(start);
  if (isMarkup) {
    throw new LoggerFileError(
      'MARKUP_FILE',
      'This is a web page or a data document (HTML, XML or JSON), not a table of lines. Export the readings as CSV.',
      1,
      1,
    );
  }
}
