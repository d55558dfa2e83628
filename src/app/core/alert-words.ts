import type { Alert } from '@shared/contracts/alerts';
import { formatDuration } from '@shared/format/room-time';

/** An instant as a person says it: "14:20", "yesterday 14:20". */
type When = (at: string) => string;

/** How long an alert has lasted and whether somebody was written to: "Going on for 26 min. Mail written 14:06." */
export function lastingWords(alert: Alert, now: number, when: When): string {
  const { beganAt, endedAt, clearedAt, foundLater, toldAt } = alert;
  const lasted = formatDuration((endedAt === null ? now : Date.parse(endedAt)) - Date.parse(beganAt));
  const length =
    clearedAt !== null
      ? `Lasted ${lasted}.`
      : endedAt === null
        ? `Going on for ${lasted}.`
        : `Lasted ${lasted}; over once it stays right.`;
  if (foundLater) return `${length} Found later, when readings were brought in; nobody was written to.`;
  return `${length} ${toldAt === null ? 'Nobody was written to.' : `Mail written ${when(toldAt)}.`}`;
}

/** Who has seen an alert: "Seen by Jo Ashdown, 14:10: “Vent opened”"; null for nobody. */
export function seenWords(alert: Alert, when: When): string | null {
  const { acknowledgedAt, acknowledgedByName, acknowledgeNote } = alert;
  if (acknowledgedAt === null) return null;
  const note = acknowledgeNote === '' ? '' : `: “${acknowledgeNote}”`;
  return `Seen by ${acknowledgedByName ?? 'somebody who has left'}, ${when(acknowledgedAt)}${note}`;
}

/** Whether nobody is written to about an alert now. */
export function isQuiet({ quiet, clearedAt }: Alert, now: number): boolean {
  return clearedAt === null && quiet !== null && Date.parse(quiet.until) > now;
}

/** Until when an alert is quiet and who said so. Only for one that {@link isQuiet}. */
export function quietUntilWords({ quiet }: Alert, when: When): string {
  if (quiet === null) return '';
  return `Quiet until ${when(quiet.until)}, set by ${quiet.setByName ?? 'somebody who has left'}`;
}

/** The same with what follows from it. */
export function quietWords(alert: Alert, when: When): string {
  return `${quietUntilWords(alert, when)}. Nobody is written to about it until then.`;
}

/** Who is to look after an alert. */
export function assigneeWords({ name }: NonNullable<Alert['assignee']>): string {
  return `${name} looks after it`;
}
