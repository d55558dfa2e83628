import type { Interval } from '@shared/contracts/board';
import type { DayMinutes } from '../../ui/lamp-day/lamp-day';

/** The room's day as instants [ms since 1970 UTC]; 23 to 25 hours long. */
export interface DaySpan {
  readonly startAt: number;
  readonly endAt: number;
}

const minuteMs = 60_000;

/** Minutes since the day began, never outside the day. */
export function minuteOfDay(at: number, { startAt, endAt }: DaySpan): number {
  return (Math.min(endAt, Math.max(startAt, at)) - startAt) / minuteMs;
}

/** Parts of the day in minutes; what lies outside it is cut off. */
export function dayParts(intervals: readonly Interval[], day: DaySpan): readonly DayMinutes[] {
  return intervals
    .map(({ from, to }) => [minuteOfDay(Date.parse(from), day), minuteOfDay(Date.parse(to), day)] as const)
    .filter(([from, to]) => from < to);
}
