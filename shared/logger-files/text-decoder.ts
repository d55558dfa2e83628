import iconv from 'iconv-lite';
import type { LoggerFileEncoding } from './logger-file-shape';
import { bufferOf, mixedEncoding, nulByte, REPLACEMENT_CHARACTER } from './recognise-encoding';

/** Decodes a file that arrives in pieces. */
export interface LoggerTextDecoder {
  /**
   * @param bytes - The next piece of the file.
   * @param linesBefore - Lines that were handed on before this text, for the place in an error.
   * @returns Its text; a character cut at the end of the piece comes with the next.
   */
  write(bytes: Uint8Array, linesBefore: number): string;
  /** The text of what is left at the end of the file. */
  end(linesBefore: number): string;
}

/**
 * Makes the decoder of one file. A byte-order mark is taken off.
 *
 * @throws {@link LoggerFileError} from its methods: `MIXED_ENCODING`, `NUL_BYTE`; the column is the character within
 * the text since the last complete line.
 */
export function createTextDecoder(encoding: LoggerFileEncoding): LoggerTextDecoder {
  const decoder = iconv.getDecoder(encoding);
  const checked = (text: string, linesBefore: number): string => {
    const damage = text.indexOf(REPLACEMENT_CHARACTER);
    if (damage >= 0) throw mixedEncoding(text, damage, linesBefore);
    const nul = text.indexOf('\0');
    if (nul >= 0) throw nulByte(text, nul, linesBefore);
    return text;
  };
  return {
    write: (bytes, linesBefore) => checked(decoder.write(bufferOf(bytes)), linesBefore),
    end: (linesBefore) => checked(decoder.end() ?? '', linesBefore),
  };
}
