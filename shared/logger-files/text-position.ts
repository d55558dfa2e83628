/** A place in a text, both from 1. */
export interface TextPosition {
  readonly line: number;
  readonly column: number;
}

/** The line and character at which an index of a text lies; CRLF, LF and CR each end a line. */
export function positionAt(text: string, index: number): TextPosition {
  const before = text.slice(0, index).split(/\r\n|\n|\r/);
  return { line: before.length, column: (before.at(-1) ?? '').length + 1 };
}
