import type * as z from 'zod';
import { Problem } from './run-process';

/**
 * Reads a program's settings from its environment; an empty variable counts as not set.
 *
 * @throws {@link Problem} that names every variable that is wrong and why.
 */
export function readSettings<Schema extends z.ZodType>(
  schema: Schema,
  environment: Readonly<Record<string, string | undefined>>,
): z.infer<Schema> {
  const given = Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== ''));
  const parsed = schema.safeParse(given);
  if (parsed.success) return parsed.data;
  const reasons = parsed.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`);
  throw new Problem(`These settings are not usable: ${reasons.join('; ')}.`);
}
