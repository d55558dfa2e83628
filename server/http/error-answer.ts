import type { ErrorRequestHandler, Response } from 'express';
import type { Problem } from '@shared/contracts/problem';
import { DomainError } from '@shared/errors/domain-error';
import { RequestProblem } from './request-problem';

const titles: Readonly<Record<number, string>> = {
  400: 'Bad request',
  401: 'Not signed in',
  403: 'Not allowed',
  404: 'Not found',
  409: 'Conflict',
  413: 'Too large',
  415: 'Not understood',
  422: 'Not usable',
  429: 'Too many attempts',
  500: 'Our fault',
  503: 'Not available just now',
};

/** What pg and the operating system say when the database can't be reached. */
const databaseAway = new Set(['ECONNREFUSED', 'ECONNRESET', 'ETIMEDOUT', 'EPIPE', '57P01', '57P02', '57P03']);
/** PostgreSQL's lock_not_available: somebody held a lock for longer than this transaction was to wait. */
const lockNotAvailable = '55P03';
/** What TypeORM throws once it has put away a connection that broke in the middle of a transaction. */
const connectionPutAway = new Set([
  'QueryRunnerAlreadyReleasedError',
  'QueryRunnerProviderAlreadyReleasedError',
]);

/**
 * Whether an error means that the database is away rather than that the request is wrong.
 *
 * @param error - Anything thrown.
 * @returns True for refused, cut or shutting-down connections.
 */
export function isDatabaseAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const code = (error as { code?: unknown }).code;
  if (typeof code === 'string' && databaseAway.has(code)) return true;
  if (connectionPutAway.has(error.name)) return true;
  return /Connection terminated|timeout exceeded when trying to connect|Client has encountered/.test(
    error.message,
  );
}

function asProblem(error: unknown): RequestProblem {
  if (error instanceof RequestProblem) return error;
  if (error instanceof DomainError) return new RequestProblem(422, error.code, error.message);
  if (isDatabaseAway(error)) {
    return new RequestProblem(
      503,
      'DATABASE_AWAY',
      'The database can’t be reached just now. Nothing was changed; try again in a moment.',
      [],
      { 'Retry-After': '5' },
    );
  }
  if ((error as { code?: unknown } | null)?.code === lockNotAvailable) {
    return new RequestProblem(
      503,
      'BUSY',
      'Something else is changing this just now. Nothing was changed; try again in a moment.',
      [],
      { 'Retry-After': '5' },
    );
  }
  // body-parser, multer and Express itself carry a status for what the client did wrong.
  const status = (error as { status?: unknown } | null)?.status;
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return new RequestProblem(status, 'BAD_REQUEST', 'The request could not be read.');
  }
  return new RequestProblem(
    500,
    'INTERNAL',
    'Something went wrong on our side. Nothing was changed; try again.',
  );
}

/**
 * Answers with an RFC 9457 problem.
 *
 * @param res - The answer, not yet begun.
 * @param problem - What to say.
 */
export function sendProblem(res: Response, problem: RequestProblem): void {
  const body: Problem = {
    type: 'about:blank',
    title: titles[problem.status] ?? 'Error',
    status: problem.status,
    detail: problem.message,
    code: problem.code,
    ...(problem.errors.length > 0 ? { errors: [...problem.errors] } : {}),
    ...(Object.keys(problem.facts).length > 0 ? { facts: { ...problem.facts } } : {}),
  };
  res.status(problem.status).set(problem.headers).type('application/problem+json').send(JSON.stringify(body));
}

/** The last middleware: every error becomes a problem; only our own faults are logged as errors. */
export const errorAnswer: ErrorRequestHandler = (error: unknown, req, res, next) => {
  if (res.headersSent) {
    next(error);
    return;
  }
  const problem = asProblem(error);
  // Whoever is told to wait a moment met no fault.
  if (problem.status >= 500)
    req.log[problem.code === 'BUSY' ? 'warn' : 'error']({ err: error }, 'request failed');
  sendProblem(res, problem);
};
