/** What is wrong with which field. */
export interface FieldProblem {
  /** Dotted path into params, query or body. */
  readonly path: string;
  readonly message: string;
}

/** Facts behind a problem, as data. */
export type ProblemFacts = Readonly<Record<string, string | number | null>>;

/** A request that can't be granted, with all that its RFC 9457 answer says. */
export class RequestProblem extends Error {
  override readonly name = 'RequestProblem';

  constructor(
    readonly status: number,
    /** Stable, for programs. */
    readonly code: string,
    /** For people: what happened, that nothing was lost, what to do. */
    message: string,
    readonly errors: readonly FieldProblem[] = [],
    readonly headers: Readonly<Record<string, string>> = {},
    /** What a program needs to say it in its own way, such as who was first and when. */
    readonly facts: ProblemFacts = {},
  ) {
    super(message);
  }
}

/**
 * Nothing of that name exists for the caller; the same answer whether it exists for others.
 *
 * @param what - Such as `shelf`.
 * @returns A 404 problem.
 */
export function notFound(what: string): RequestProblem {
  return new RequestProblem(404, 'NOT_FOUND', `There is no such ${what}.`);
}

/**
 * The request contradicts what is stored.
 *
 * @param code - Stable code.
 * @param message - What contradicts what.
 * @param facts - Behind it, as data.
 * @returns A 409 problem.
 */
export function conflict(code: string, message: string, facts: ProblemFacts = {}): RequestProblem {
  return new RequestProblem(409, code, message, [], {}, facts);
}

/**
 * One field is wrong in a way that only the stored data shows.
 *
 * @param path - Of the field.
 * @param message - What is wrong with it.
 * @returns A 422 problem.
 */
export function invalidField(path: string, message: string): RequestProblem {
  return new RequestProblem(422, 'INVALID', 'Some fields can’t be used as they are. Nothing was changed.', [
    { path, message },
  ]);
}
