import type { Alert, AlertTimeLine } from '@shared/contracts/alerts';
import { mailSteps } from './mail-steps';

/** Something that happened to an alert. */
export interface AlertStep {
  /** [ms since 1970 UTC] */
  readonly at: number;
  /** Name of a Material symbol. */
  readonly icon: string;
  readonly text: string;
  /** Whether the chart shows it too. */
  readonly isMark: boolean;
}

/** How the time line says what it is told. */
export interface StepWords {
  /** What the peak came to: "28.3 °C"; null where a peak says nothing, as of a silent sensor. */
  readonly peak: string | null;
  /** An instant as a person says it: "14:20", "yesterday 14:20". */
  readonly when: (at: string) => string;
  /** The present [ms since 1970 UTC]. */
  readonly now: number;
}

/**
 * What happened to an alert, in order of time.
 *
 * @param told - Who was written to, when it was quiet, who looked after it; null until that is known.
 */
export function alertTimeLine(alert: Alert, told: AlertTimeLine | null, words: StepWords): AlertStep[] {
  return [
    ...episodeSteps(alert, words),
    ...alert.deeds.map(({ at, personName, text }) =>
      step(at, 'handyman', `Done by ${personName ?? leaver}: “${text}”`, true),
    ),
    ...(told === null
      ? []
      : [
          ...mailSteps(told.mails, words),
          ...told.quiets.flatMap((quiet) => quietSteps(quiet, alert, words)),
          ...told.assignments.map(assignmentStep),
        ]),
  ].sort((a, b) => a.at - b.at);
}

const leaver = 'somebody who has left';

function step(at: string, icon: string, text: string, isMark = false): AlertStep {
  return { at: Date.parse(at), icon, text, isMark };
}

function episodeSteps(alert: Alert, { peak }: StepWords): AlertStep[] {
  const { acknowledgedAt, acknowledgedByName, acknowledgeNote, endedAt, clearedAt } = alert;
  const note = acknowledgeNote === '' ? '' : `: “${acknowledgeNote}”`;
  return [
    step(alert.beganAt, 'trending_up', 'Began'),
    step(
      alert.openedAt,
      'notifications',
      alert.foundLater ? 'Would have opened; found later, when readings were brought in' : 'Alert opened',
      true,
    ),
    ...(peak === null ? [] : [step(alert.peakAt, 'priority_high', `Farthest off: ${peak}`)]),
    ...(acknowledgedAt === null
      ? []
      : [step(acknowledgedAt, 'visibility', `Seen by ${acknowledgedByName ?? leaver}${note}`, true)]),
    ...(endedAt === null ? [] : [step(endedAt, 'trending_flat', 'Back where it should be')]),
    ...(clearedAt === null ? [] : [step(clearedAt, 'check_circle', 'Over', true)]),
  ];
}

function quietSteps(
  { setAt, until, setByName, endedAt, endedByName }: AlertTimeLine['quiets'][number],
  { openedAt, clearedAt }: Alert,
  { when, now }: StepWords,
): AlertStep[] {
  const before = Date.parse(setAt) < Date.parse(openedAt) ? ', for the alert before this one' : '';
  const set = step(
    setAt,
    'notifications_paused',
    `Quiet until ${when(until)}, set by ${setByName ?? leaver}${before}`,
  );
  if (endedAt !== null) {
    return [set, step(endedAt, 'notifications_active', `Quiet ended by ${endedByName ?? leaver}`)];
  }
  const isOver = Date.parse(until) <= Math.min(now, Date.parse(clearedAt ?? until));
  return isOver ? [set, step(until, 'notifications_active', 'Quiet no more')] : [set];
}

function assignmentStep({ at, personName, assignedByName }: AlertTimeLine['assignments'][number]): AlertStep {
  if (personName === null) {
    return step(at, 'person_off', `Nobody looks after it any more, says ${assignedByName ?? leaver}`);
  }
  const by = assignedByName === personName ? '' : `, says ${assignedByName ?? leaver}`;
  return step(at, 'person', `${personName} looks after it${by}`);
}
