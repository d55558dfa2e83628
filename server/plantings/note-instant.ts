import { invalidField } from '../http/request-problem';

/** The clock of whoever notes something may be this far ahead. */
const CLOCK_TOLERANCE_MS = 120_000;

/**
 * When something that is noted happened.
 *
 * @param at - As the request says; undefined for now.
 * @param now - The present.
 * @returns The instant.
 * @throws {@link RequestProblem} 422 for a time to come.
 */
export function noteInstant(at: string | undefined, now: Date): Date {
  if (at === undefined) return now;
  const instant = new Date(at);
  if (instant.getTime() > now.getTime() + CLOCK_TOLERANCE_MS)
    throw invalidField('body.at', 'is still to come');
  return instant;
}
