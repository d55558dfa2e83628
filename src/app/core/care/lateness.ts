const dayMs = 24 * 3600_000;

/**
 * How late something is, in words: "One day late".
 *
 * @param inTimeUntil - The last day on which it was in time, `YYYY-MM-DD`.
 * @param today - The room's day, `YYYY-MM-DD`.
 * @returns Null when it isn't late.
 */
export function lateness(inTimeUntil: string, today: string): string | null {
  const days = (Date.parse(`${today}T00:00:00Z`) - Date.parse(`${inTimeUntil}T00:00:00Z`)) / dayMs;
  if (days <= 0) return null;
  return days === 1 ? 'One day late' : `${days} days late`;
}
