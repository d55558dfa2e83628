import * as z from 'zod';
import './endpoint';

/** An error answer, RFC 9457 (`application/problem+json`). */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string().optional(),
  /** Stable, for programs. */
  code: z.string(),
  /** What is wrong with which field, by JSON path. */
  errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  /** Facts behind it, as data; a `TASK_CLOSED` tells `byName`, `at` and `outcome`. */
  facts: z.record(z.string(), z.union([z.string(), z.number(), z.null()])).optional(),
});
/** An error answer, RFC 9457. */
export type Problem = z.infer<typeof problem>;
