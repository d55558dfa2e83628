import type { Alert } from '@shared/contracts/alerts';

const leastAroundMs = 3_600_000;

/** The time to draw around an alert: half its length before and after, an hour at least. */
export function spanAround(
  { beganAt, endedAt }: Pick<Alert, 'beganAt' | 'endedAt'>,
  now: number,
): { readonly from: number; readonly to: number } {
  const began = Date.parse(beganAt);
  const ended = endedAt === null ? now : Date.parse(endedAt);
  const around = Math.max(leastAroundMs, (ended - began) / 2);
  return { from: began - around, to: Math.max(began + 1, Math.min(now, ended + around)) };
}
