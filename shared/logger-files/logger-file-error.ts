/** Stable codes of the reasons for which a whole file is refused. */
export type LoggerFileErrorCode =
  | 'EMPTY_FILE'
  | 'SPREADSHEET_FILE'
  | 'PDF_FILE'
  | 'IMAGE_FILE'
  | 'COMPRESSED_FILE'
  | 'MARKUP_FILE'
  | 'BINARY_FILE'
  | 'NUL_BYTE'
  | 'MIXED_ENCODING'
  | 'LINE_TOO_LONG'
  | 'UNCLOSED_QUOTE'
  | 'HEADER_ONLY'
  | 'ONE_COLUMN'
  | 'TOO_MANY_COLUMNS'
  | 'TOO_MANY_SERIES'
  | 'NO_TIME'
  | 'NO_VALUES'
  | 'START_REQUIRED';

/** A file, or the part of it from `line` on, cannot be read; nothing of it may be stored. */
export class LoggerFileError extends Error {
  override readonly name: string = 'LoggerFileError';

  /**
   * @param code - Stable code that callers and tests compare.
   * @param message - What is wrong and what to do about it, in a sentence for the person who chose the file.
   * @param line - Line of the file where it shows, from 1.
   * @param column - Column on that line, from 1: the cell where the file is a table, else the character.
   */
  constructor(
    readonly code: LoggerFileErrorCode,
    message: string,
    readonly line: number,
    readonly column: number,
  ) {
    super(message);
  }
}
