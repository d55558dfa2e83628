/**
 * Writes one cell of a CSV file that a person may open in a spreadsheet.
 *
 * @param value - Text, a number, or null for an empty cell.
 * @returns The cell, quoted where RFC 4180 (section 2) asks for it. Text that a spreadsheet would take for a formula
 * (it starts with `=`, `+`, `-`, `@`, a tab or a carriage return, also after spaces) is prefixed with an
 * apostrophe, as OWASP's "CSV Injection" page recommends (from memory); numbers are untouched.
 *
 * @example
 * csvCell('=1+1'); // "'=1+1"
 */
export function csvCell(value: string | number | null): string {
  if (value === null) return '';
  if (typeof value === 'number') return String(value);
  const harmless = /^\s*[=+\-@\t\r＝＋－＠]/.test(value) && !isPlainNumber(value) ? `'${value}` : value;
  return /[",\r\n]/.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless;
}

/** Writes one line of a CSV file, with the line end of RFC 4180. */
export function csvLine(values: readonly (string | number | null)[]): string {
  return `${values.map(csvCell).join(',')}\r\n`;
}

// A measured "-4.5" is a number even where it is kept as text.
function isPlainNumber(text: string): boolean {
  return /^[+-]?\d+(\.\d+)?$/.test(text);
}
