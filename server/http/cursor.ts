import { z } from 'zod';
import { RequestProblem } from './request-problem';

const position = z.tuple([z.iso.datetime({ offset: true }), z.uuid()]);

/** Where a page ended: the instant and id of its last row. */
export interface Cursor {
  readonly at: Date;
  readonly id: string;
}

/**
 * Writes a cursor.
 *
 * @param at - Instant of the last row, ISO 8601.
 * @param id - Its id.
 * @returns Opaque text for the next request.
 */
export function encodeCursor(at: string, id: string): string {
  return Buffer.from(JSON.stringify([at, id])).toString('base64url');
}

/**
 * Reads a cursor.
 *
 * @param text - As {@link encodeCursor} wrote it; undefined for the first page.
 * @returns Where to go on, null for the first page.
 * @throws {@link RequestProblem} 422 for anything else.
 */
export function decodeCursor(text: string | undefined): Cursor | null {
  if (text === undefined) return null;
  try {
    const [at, id] = position.parse(JSON.parse(Buffer.from(text, 'base64url').toString('utf8')));
    return { at: new Date(at), id };
  } catch {
    // Neither JSON nor a position: not a cursor of ours.
    throw new RequestProblem(422, 'BAD_CURSOR', 'This cursor is none of ours; begin at the first page.');
  }
}
