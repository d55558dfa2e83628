import { HttpErrorResponse } from '@angular/common/http';
import { problem, type Problem } from '@shared/contracts/problem';

/** Why a call failed, as far as a screen must tell the reasons apart. */
export type ApiFailureKind =
  'offline' | 'signedOut' | 'forbidden' | 'notFound' | 'conflict' | 'invalid' | 'tooMany' | 'server';

const kindByStatus: Readonly<Record<number, ApiFailureKind>> = {
  0: 'offline',
  400: 'invalid',
  401: 'signedOut',
  403: 'forbidden',
  404: 'notFound',
  409: 'conflict',
  413: 'invalid',
  415: 'invalid',
  422: 'invalid',
  429: 'tooMany',
  // What a proxy answers while nothing listens behind it.
  502: 'offline',
  503: 'offline',
  504: 'offline',
};

interface FailureFacts {
  readonly problem?: Problem | null;
  readonly retryAfterS?: number | null;
  readonly cause?: unknown;
}

/** A call that brought no usable answer. */
export class ApiFailure extends Error {
  override readonly name: string = 'ApiFailure';
  /** The server's own account of it; null when none arrived. */
  readonly problem: Problem | null;
  /** Seconds after which trying again may help; null when the server didn't say. */
  readonly retryAfterS: number | null;

  /**
   * @param kind - Why it failed.
   * @param facts - What is known about it.
   */
  constructor(
    readonly kind: ApiFailureKind,
    facts: FailureFacts = {},
  ) {
    super(facts.problem?.title ?? kind, { cause: facts.cause });
    this.problem = facts.problem ?? null;
    this.retryAfterS = facts.retryAfterS ?? null;
  }

  /** The server's stable code, null without one. */
  get code(): string | null {
    return this.problem?.code ?? null;
  }

  /** What is wrong with one field of the body, by its JSON path; null when nothing is. */
  fieldError(path: string): string | null {
    return this.problem?.errors?.find((error) => error.path === path)?.message ?? null;
  }
}

/**
 * Whatever a call threw, as a failure.
 *
 * @param error - An HTTP error, an error of parsing the answer, or a failure, which is returned as it is.
 */
export function asApiFailure(error: unknown): ApiFailure {
  if (error instanceof ApiFailure) return error;
  if (!(error instanceof HttpErrorResponse)) return new ApiFailure('server', { cause: error });
  return new ApiFailure(kindByStatus[error.status] ?? 'server', {
    problem: problem.safeParse(error.error).data ?? null,
    retryAfterS: retryAfterS(error.headers.get('Retry-After')),
    cause: error,
  });
}

/** The header's seconds; its other form, a date, is not what our server sends. */
function retryAfterS(header: string | null): number | null {
  return header !== null && /^\d+$/.test(header) ? Number(header) : null;
}
