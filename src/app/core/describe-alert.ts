import { silenceKinds, type AlertKind } from '@shared/alerts/alert-rule';
import {
  describeEpisode,
  type EpisodeDescription,
  type EpisodeFormatters,
} from '@shared/alerts/describe-episode';
import type { Alert } from '@shared/contracts/alerts';

/**
 * An alert in words.
 *
 * @param alert - As the server sent it.
 * @param formatters - How its numbers and instants are written for this reader.
 * @param now - The present [ms since 1970 UTC].
 * @param isLit - Whether the shelf's lamps shone at its peak; null where that is not known.
 */
export function describeAlert(
  alert: Alert,
  formatters: EpisodeFormatters,
  now: number,
  isLit: boolean | null = null,
): EpisodeDescription {
  return describeEpisode({
    episode: {
      beganAt: Date.parse(alert.beganAt),
      openedAt: Date.parse(alert.openedAt),
      peakAt: Date.parse(alert.peakAt),
      peakValue: alert.peakValue,
      peakExcess: alert.peakExcess,
      limit: alert.peakLimit,
      endedAt: instantOrNull(alert.endedAt),
      clearedAt: instantOrNull(alert.clearedAt),
      urgency: alert.urgency,
    },
    kind: alert.kind,
    quantity: alert.quantity,
    shelfLabel: alert.shelfLabel,
    isLit,
    formatters,
    now,
  });
}

function instantOrNull(at: string | null): number | null {
  return at === null ? null : Date.parse(at);
}

/** Whether an alert is about readings that don't come, and so has no value. */
export function isSilenceKind(kind: AlertKind): boolean {
  return (silenceKinds as readonly AlertKind[]).includes(kind);
}
