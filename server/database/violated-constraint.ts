import { QueryFailedError } from 'typeorm';

/**
 * Which constraint of the database a statement broke.
 *
 * @param error - Anything thrown.
 * @returns The constraint's name, or null when it was something else.
 */
export function violatedConstraint(error: unknown): string | null {
  if (!(error instanceof QueryFailedError)) return null;
  const { constraint } = error.driverError as { constraint?: unknown };
  return typeof constraint === 'string' ? constraint : null;
}
