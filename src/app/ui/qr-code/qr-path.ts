import qrcode from 'qrcode-generator';

/** A QR code as a drawing: dark squares of one unit each. */
export interface QrPath {
  /** Squares to a side, without the quiet zone. */
  readonly size: number;
  /** SVG path of the dark ones. */
  readonly d: string;
}

/**
 * A text as a QR code (ISO/IEC 18004), as small as it goes.
 *
 * @param text - At most a few hundred characters, or it won't be read from a small label.
 *
 * @remarks
 * Error correction M: 15 % may be lost to soil and water.
 */
export function qrPath(text: string): QrPath {
  const code = qrcode(0, 'M');
  code.addData(text);
  code.make();
  const size = code.getModuleCount();
  const rows = Array.from({ length: size }, (_, row) =>
    runs(Array.from({ length: size }, (__, column) => code.isDark(row, column)))
      .map(({ from, length }) => `M${from} ${row}h${length}v1h-${length}z`)
      .join(''),
  );
  return { size, d: rows.join('') };
}

/** Stretches of dark squares in a row, so that a printer leaves no hairlines between them. */
function runs(row: readonly boolean[]): readonly { readonly from: number; readonly length: number }[] {
  return row.flatMap((isDark, from) => {
    if (!isDark || row[from - 1] === true) return [];
    const end = row.indexOf(false, from);
    return [{ from, length: (end === -1 ? row.length : end) - from }];
  });
}
