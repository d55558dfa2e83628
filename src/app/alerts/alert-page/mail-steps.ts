import type { AlertTimeLine } from '@shared/contracts/alerts';
import type { AlertStep, StepWords } from './time-line';

type Mail = AlertTimeLine['mails'][number];

const minuteMs = 60_000;
const reasons: Readonly<Record<Mail['reason'], string>> = {
  opened: 'Mail that it opened',
  urgent: 'Mail that it became urgent',
  escalated: 'Mail that nobody has seen it',
  assigned: 'Mail that it is theirs to look after',
  cleared: 'Mail that it is over',
};

/**
 * The mails about an alert: sent, waiting, refused. What went out for one reason within a minute is one step.
 *
 * @returns In no order.
 */
export function mailSteps(mails: readonly Mail[], words: Pick<StepWords, 'when'>): AlertStep[] {
  const together = new Map<string, Mail[]>();
  for (const mail of mails) {
    const key = [mail.reason, standingOf(mail, words), Math.floor(instantOf(mail) / minuteMs)].join();
    together.set(key, [...(together.get(key) ?? []), mail]);
  }
  return [...together.values()].flatMap((group) => {
    const [first] = group;
    if (first === undefined) return [];
    const names = listed(group.map(({ personName }) => personName));
    return {
      at: instantOf(first),
      icon: first.refusedAt === null ? (first.sentAt === null ? 'schedule_send' : 'mail') : 'unsubscribe',
      text: `${reasons[first.reason]}, to ${names}${standingOf(first, words)}`,
      isMark: false,
    };
  });
}

/** When it happened; a mail that waits has happened when it was written. */
function instantOf({ sentAt, refusedAt, writtenAt }: Mail): number {
  return Date.parse(sentAt ?? refusedAt ?? writtenAt);
}

/** Ends the sentence; empty for what was sent. */
function standingOf({ sentAt, refusedAt, dueAt, attempts }: Mail, { when }: Pick<StepWords, 'when'>): string {
  if (sentAt !== null) return '';
  if (refusedAt !== null) return ': refused by the mail server, so it is not tried again';
  const next = dueAt === null ? 'soon' : `at ${when(dueAt)}`;
  if (attempts === 0) return `: goes out ${next}`;
  return `: not sent yet after ${attempts === 1 ? 'one try' : `${attempts} tries`}; tried again ${next}`;
}

/** "Ana, Ben and Cem" */
function listed(names: readonly string[]): string {
  const last = names.at(-1) ?? '';
  return names.length < 2 ? last : `${names.slice(0, -1).join(', ')} and ${last}`;
}
