import type { MailChoice } from './mail-choice';

/**
 * What one click on a mail's own link stops: alerts that can wait a day, all alerts, mails that one is over, letters, care.
 * New ones come last: links in mails that were sent count them.
 */
export const mailStops = ['lookToday', 'alerts', 'cleared', 'letter', 'care'] as const;
/** One of {@link mailStops}. */
export type MailStop = (typeof mailStops)[number];

/**
 * A choice without a kind of mail.
 *
 * @param choice - As it is.
 * @param stop - What is not wanted any more.
 * @returns The choice as it should be; the same where nothing of the kind was sent. Without a letter, alerts that were
 *   left to it are not told at all: whoever stops mails must not get more of them.
 */
export function withoutMails(choice: MailChoice, stop: MailStop): MailChoice {
  switch (stop) {
    case 'lookToday':
      return { ...choice, lookToday: 'never' };
    case 'alerts':
      return { ...choice, lookToday: 'never', goNow: 'never' };
    case 'cleared':
      return { ...choice, cleared: false };
    case 'care':
      return { ...choice, care: false };
    case 'letter': {
      const { lookToday, goNow } = choice;
      return {
        ...choice,
        letterAt: null,
        lookToday: lookToday === 'morningLetter' ? 'never' : lookToday,
        goNow: goNow === 'morningLetter' ? 'never' : goNow,
      };
    }
  }
}

/**
 * Whether a kind of mail is sent no more.
 *
 * @param choice - The person's.
 * @param stop - The kind.
 */
export function isStopped(choice: MailChoice, stop: MailStop): boolean {
  const without = withoutMails(choice, stop);
  return (
    without.lookToday === choice.lookToday &&
    without.goNow === choice.goNow &&
    without.cleared === choice.cleared &&
    without.care === choice.care &&
    without.letterAt === choice.letterAt
  );
}
