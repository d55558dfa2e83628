import type { FileFailure } from '@shared/contracts/logger-files';
import { conflict, RequestProblem } from '../http/request-problem';
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
  if (shape.timeFormat.kind === 'elapsed' && startsAt === null) {
    throw new RequestProblem(
      422,
      'START_REQUIRED',
      'The file counts time from its start: say when that was.',
    );
  }
}
