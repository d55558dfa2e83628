import type { DateTime } from 'luxon';

/**
 * Minutes since midnight of a clock's time.
 *
 * @param clockTime - `HH:MM`.
 */
export function minuteOf(clockTime: string): number {
  const [hour = 0, minute = 0] = clockTime.split(':').map(Number);
  return hour * 60 + minute;
}

/**
 * The instant at which a day's clock shows a time.
 *
 * @param day - Any instant of the day, in the room's zone.
 * @param clockTime - `HH:MM`.
 * @returns The instant; as much later as the clock skips where that time is skipped.
 */
export function onClock(day: DateTime, clockTime: string): DateTime {
  const minutes = minuteOf(clockTime);
  return day.startOf('day').set({ hour: Math.floor(minutes / 60), minute: minutes % 60 });
}
