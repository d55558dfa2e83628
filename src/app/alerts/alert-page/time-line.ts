import type { Alert } from '@shared/contracts/alerts';

/** Something that happened to an alert. */
export interface AlertStep {
  /** [ms since 1970 UTC] */
  readonly at: number;
  /** Name of a Material symbol. */
  readonly icon: string;
  readonly text: string;
}

/**
 * What happened to an alert, in order of time.
 *
 * @param peakText - What the peak came to: "28.3 °C"; null where a peak says nothing, as of a silent sensor.
 */
export function alertTimeLine(alert: Alert, peakText: string | null): AlertStep[] {
  const { acknowledgedByName, acknowledgeNote } = alert;
  const seenBy = `Seen by ${acknowledgedByName ?? 'somebody who has left'}`;
  const steps: (readonly [at: string | null, icon: string, text: string])[] = [
    [alert.beganAt, 'trending_up', 'Began'],
    [alert.openedAt, 'notifications', alert.foundLater ? 'Would have opened; found later' : 'Alert opened'],
    [alert.toldAt, 'mail', 'Mail sent'],
    [peakText === null ? null : alert.peakAt, 'priority_high', `Farthest off: ${peakText ?? ''}`],
    [alert.acknowledgedAt, 'visibility', acknowledgeNote === '' ? seenBy : `${seenBy}: “${acknowledgeNote}”`],
    [alert.endedAt, 'trending_flat', 'Back where it should be'],
    [alert.clearedAt, 'check_circle', 'Over'],
  ];
  return steps
    .flatMap(([at, icon, text]) => (at === null ? [] : [{ at: Date.parse(at), icon, text }]))
    .sort((a, b) => a.at - b.at);
}

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
