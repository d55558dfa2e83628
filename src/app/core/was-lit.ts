import type { LampDay } from '@shared/contracts/board';

/**
 * Whether the lamps of a shelf shone at an instant, as measured, else as planned.
 *
 * @param lampDay - The light of the shelf's day so far.
 * @param instant - ISO 8601.
 * @param dayStart - When that day began [ms since 1970 UTC]; of the days before, only how it is now is known.
 * @returns Null where neither sensor nor plan says.
 */
export function wasLit(
  { hasLamp, lit, planned, measured, measuredHours }: LampDay,
  instant: string,
  dayStart: number,
): boolean | null {
  if (!hasLamp) return false;
  const at = Date.parse(instant);
  const spans = measuredHours === null ? planned : measured;
  const lastSeen = Math.max(...measured.map(({ to }) => Date.parse(to)), -Infinity);
  const isNewerThanSeen = measuredHours !== null && at >= lastSeen && lit === true;
  if (at < dayStart || isNewerThanSeen) return lit;
  return spans.some(({ from, to }) => at >= Date.parse(from) && at < Date.parse(to));
}
