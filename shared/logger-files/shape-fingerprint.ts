import { foldHeader } from './header-words';
import type { LoggerFileShape } from './logger-file-shape';

/**
 * A text that is the same for files of one layout, for offering the profile that was kept for it. Time zone, line numbers and
 * the person's choices about units are left out, so that they do not keep a profile from being found.
 *
 * @returns At most a few kilobytes of readable text; compare or hash it.
 */
export function shapeFingerprint(shape: LoggerFileShape): string {
  const columns = shape.columns.map(({ name, unitText }) => `${foldHeader(name)}~${unitText.toLowerCase()}`);
  const { delimiter, layout, decimalMark, headerLines, rowNumberOffset } = shape;
  return JSON.stringify([delimiter, layout, decimalMark, headerLines.length, rowNumberOffset, columns]);
}
