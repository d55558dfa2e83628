import type { FileFailure } from '@shared/contracts/logger-files';
import type { LoggerFileShape } from '@shared/logger-files/logger-file-shape';
import { conflict, invalidField, RequestProblem } from '../http/request-problem';
import type { LoggerFileEntity } from './logger-file-entity';
import { runningStatuses } from './logger-file-store';

/**
 * A file that can't be brought in, as the answer to a request.
 *
 * @param failure - Why, and where it shows.
 * @returns A 422 problem whose errors name `line` and `column`, both from 1.
 */
export function fileProblem({ code, message, line, column }: FileFailure): RequestProblem {
  const place = { line, column };
  const errors = Object.entries(place).flatMap(([path, value]) =>
    value === null ? [] : [{ path, message: String(value) }],
  );
  return new RequestProblem(422, code, message, errors);
}

/**
 * Refuses to change a file while somebody is at work on it, or after its readings were stored.
 *
 * @throws RequestProblem 409.
 */
export function requireAtRest({ status }: Pick<LoggerFileEntity, 'status'>): void {
  if ((runningStatuses as readonly string[]).includes(status)) {
    throw conflict('AT_WORK', 'This file is being worked on; stop that first.');
  }
  if (status === 'broughtIn') {
    throw conflict('BROUGHT_IN', 'This file is brought in; take it out first.');
  }
}

/**
 * Refuses to read a file of which nothing would go anywhere, or whose time has no beginning.
 *
 * @throws RequestProblem 422.
 */
export function requireMatched({
  matches,
  shape,
  startsAt,
}: Pick<LoggerFileEntity, 'matches' | 'shape' | 'startsAt'>): void {
  if (Object.keys(matches).length === 0) {
    throw new RequestProblem(422, 'NOTHING_MATCHED', 'Say first which sensor the file’s readings belong to.');
  }
  requireStart(shape, startsAt);
}

/**
 * Refuses a start for a file that has instants of its own: one of the two would be wrong.
 *
 * @param path - Of the field.
 * @throws RequestProblem 422.
 */
export function refuseNeedlessStart({ timeFormat }: LoggerFileShape, path: string): void {
  if (timeFormat.kind === 'elapsed') return;
  throw invalidField(path, 'is only for files that count time from a start; this one tells its own times');
}

/**
 * Refuses to read a file whose time has no beginning.
 *
 * @param path - Of the field that may say it in this request, where there is one.
 * @throws RequestProblem 422.
 */
export function requireStart({ timeFormat }: LoggerFileShape, startsAt: Date | null, path?: string): void {
  if (timeFormat.kind !== 'elapsed' || startsAt !== null) return;
  throw new RequestProblem(
    422,
    'START_REQUIRED',
    'The file counts time from its start: say when that was.',
    path === undefined ? [] : [{ path, message: 'is needed for this file' }],
  );
}
