import type { Task } from '@shared/contracts/care';
import { formatShortDay } from '@shared/format/room-time';
import type { TaskOutcome } from '@shared/care/task-outcome';

/** "Feed strawberries · B1", the place never alone on a line. */
export function taskTitle({ title, shelfLabel, rackName }: Task): string {
  const place = shelfLabel ?? rackName;
  return place === null ? title : `${title} ·\u00a0${place.replaceAll(' ', '\u00a0')}`;
}

/** A day of the calendar in words: "Thu 3 Dec". It has no time zone, so it is written as UTC counts it. */
export function dayWords(day: string): string {
  return formatShortDay(`${day}T00:00:00Z`, 'UTC');
}

/** Who has it in hand: "Jo Ashdown", "Nobody yet". */
export function holderWords({ cover, personName }: Task): string {
  switch (cover) {
    case 'uncovered':
      return 'Nobody yet';
    case 'anybody':
      return personName ?? 'Anybody';
    case 'short':
      return personName === null ? 'Two are missing' : `${personName}, one more is missing`;
    case 'held':
      return personName ?? 'Nobody yet';
  }
}

const outcomeWords: Readonly<Record<TaskOutcome, string>> = {
  done: 'Done',
  notNeeded: 'Not needed',
  couldNot: 'Could not be done',
  missed: 'Missed',
};

/** What became of a task: "Done", "Not needed". */
export function outcomeWord(outcome: TaskOutcome): string {
  return outcomeWords[outcome];
}

/** What was noted with it, as far as something was: "250 ml · 120 g · 14 pieces". */
export function amountWords({
  millilitres,
  grams,
  count,
}: Pick<Task, 'millilitres' | 'grams' | 'count'>): string {
  return [
    millilitres === null ? null : `${millilitres}\u00a0ml`,
    grams === null ? null : `${grams}\u00a0g`,
    count === null ? null : `${count}\u00a0${count === 1 ? 'piece' : 'pieces'}`,
  ]
    .filter((part) => part !== null)
    .join(' · ');
}
