import type { Urgency } from '../alerts/alert-rule';
import { quietUntil, type QuietHours } from './quiet-hours';

/** How a person wants to hear of an alert: by a mail of its own, in the morning letter, or not at all. */
export const tellings = ['atOnce', 'morningLetter', 'never'] as const;
/** One of {@link tellings}. */
export type Telling = (typeof tellings)[number];

/** Which mails a person wants from a room. */
export interface MailChoice {
  readonly lookToday: Telling;
  readonly goNow: Telling;
  /** Whether to hear that an alert is over, after a mail that it had opened. */
  readonly cleared: boolean;
  /** Whether to hear of care: a task not done as its time ends, offers to hand one over. */
  readonly care: boolean;
  /** Only urgent alerts pass; null for no quiet hours. */
  readonly quietHours: QuietHours | null;
  /** When the morning letter is sent, `HH:MM` on the room's clock; null for no letter. */
  readonly letterAt: string | null;
  /** No letter on mornings that have nothing to tell. */
  readonly letterOnlyWithNews: boolean;
}

/** What a new member gets: alerts at once, and nothing that was not asked for. */
export const usualMailChoice: MailChoice = {
  lookToday: 'atOnce',
  goNow: 'atOnce',
  cleared: false,
  care: true,
  quietHours: null,
  letterAt: null,
  letterOnlyWithNews: true,
};

/** When a letter comes unless the person says otherwise. */
export const usualLetterTime = '07:00';

/**
 * When a mail about an alert may go out.
 *
 * @param choice - The recipient's.
 * @param urgency - The alert's.
 * @param at - When there is something to say [ms].
 * @param zone - IANA name of the room's time zone.
 * @returns The instant [ms], later than `at` where quiet hours hold it back; null where no mail of its own is wanted.
 */
export function mailDueAt(choice: MailChoice, urgency: Urgency, at: number, zone: string): number | null {
  if (choice[urgency] !== 'atOnce') return null;
  return pastQuietHours(choice, urgency, at, zone);
}

/**
 * When quiet hours let a mail through, whatever it is about.
 *
 * @param choice - The recipient's.
 * @param urgency - Of what the mail tells; `goNow` passes at any hour.
 * @param at - When there is something to say [ms].
 * @param zone - IANA name of the room's time zone.
 * @returns The instant [ms].
 */
export function pastQuietHours(
  { quietHours }: Pick<MailChoice, 'quietHours'>,
  urgency: Urgency,
  at: number,
  zone: string,
): number {
  if (quietHours === null || urgency === 'goNow') return at;
  return quietUntil(quietHours, at, zone) ?? at;
}

/**
 * Whether a choice leaves alerts to a letter that is never sent.
 *
 * @param choice - As it would be kept.
 * @returns True when an urgency waits for the morning letter and there is none.
 */
export function waitsForNoLetter(choice: MailChoice): boolean {
  return choice.letterAt === null && [choice.lookToday, choice.goNow].includes('morningLetter');
}
