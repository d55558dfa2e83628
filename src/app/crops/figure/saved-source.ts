/** What stands for a source that nobody named. */
export const ownExperience = 'our own experience';

/** A source as it is saved. */
export function savedSource(typed: string): string {
  const source = typed.trim();
  return source === '' ? ownExperience : source;
}
