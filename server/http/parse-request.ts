import type { z } from 'zod';
import { RequestProblem } from './request-problem';

/**
 * Checks one part of a request against its schema.
 *
 * @param schema - From shared/contracts.
 * @param input - Params, query or body as they came.
 * @param part - Named in the field errors' paths.
 * @returns The parsed value.
 * @throws {@link RequestProblem} 422 with every field that is wrong.
 */
export function parseRequest<T extends z.ZodType>(
  schema: T,
  input: unknown,
  part: 'params' | 'query' | 'body',
): z.output<T> {
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  throw new RequestProblem(
    422,
    'INVALID',
    'Some fields can’t be used as they are. Nothing was changed.',
    parsed.error.issues.map((issue) => ({
      path: [part, ...issue.path.map(String)].join('.'),
      message: issue.message,
    })),
  );
}
