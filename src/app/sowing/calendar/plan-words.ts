import type { SowingPlan } from '@shared/contracts/sowing';
import { daysBetween } from '@shared/growing/calendar-day';

/** A day as a person writes it: "3 Feb 2027", "today". */
export type DayWords = (day: string) => string;

/** When to sow, in a few words: "sow by 17 Mar 2027", "from 3 Feb 2027, in 9 weeks". */
export function windowWords(
  { window, standing }: Pick<SowingPlan, 'window' | 'standing'>,
  today: string,
  dayWords: DayWords,
): string {
  if (window === null || standing === null) return 'no window';
  switch (standing) {
    case 'open':
      return window.closes === today ? 'last day today' : `sow by ${dayWords(window.closes)}`;
    case 'notYet':
      return `from ${dayWords(window.opens)}, ${inWords(daysBetween(today, window.opens))}`;
    case 'past':
      return `was until ${dayWords(window.closes)}`;
  }
}

/** "tomorrow", "in 5 days", "in 9 weeks" */
export function inWords(days: number): string {
  if (days === 1) return 'tomorrow';
  return days < 14 ? `in ${days} days` : `in ${Math.round(days / 7)} weeks`;
}

/** When a sowing would be ready to go out; null where no source says. */
export function transplantWords(
  { transplantFrom, transplantTo }: SowingPlan['sowings'][number],
  dayWords: DayWords,
): string | null {
  if (transplantFrom === null || transplantTo === null) return null;
  if (transplantFrom === transplantTo) return `ready to go out about ${dayWords(transplantFrom)}`;
  return `ready to go out ${dayWords(transplantFrom)} to ${dayWords(transplantTo)}`;
}
