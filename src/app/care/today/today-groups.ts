import type { ShownTask } from '../../core/care/with-waiting';

/** The day's tasks as they stand on the page. Done ones stay where they were, so that nothing jumps under a thumb. */
export interface TodayGroups {
  readonly mine: readonly ShownTask[];
  /** Nobody has them in hand, or one of two is missing. */
  readonly uncovered: readonly ShownTask[];
  /** Whoever comes first, in a room that keeps no rota. */
  readonly anybodys: readonly ShownTask[];
  readonly others: readonly ShownTask[];
  readonly tomorrow: readonly ShownTask[];
  readonly dueCount: number;
  readonly closedCount: number;
}

/**
 * Sorts the day's tasks: late ones first, then by day and title.
 *
 * @param shown - Of today and tomorrow, and what is late.
 * @param today - The room's day, `YYYY-MM-DD`.
 * @param personId - Who is looking.
 */
export function todayGroups(shown: readonly ShownTask[], today: string, personId: string): TodayGroups {
  const sorted = shown
    .filter(({ task }) => task.outcome !== 'missed')
    .toSorted((one, other) => placeOf(one).localeCompare(placeOf(other)));
  const due = sorted.filter(({ task }) => task.dueOn <= today);
  const isMine = ({ task }: ShownTask): boolean =>
    task.holders.some((holder) => holder.personId === personId) ||
    (task.holders.length === 0 && task.doneById === personId);
  const others = due.filter((one) => !isMine(one));
  const covered = (...covers: readonly string[]): readonly ShownTask[] =>
    others.filter(({ task }) => covers.includes(task.cover));
  return {
    mine: due.filter(isMine),
    uncovered: covered('uncovered', 'short'),
    anybodys: covered('anybody'),
    others: covered('held'),
    tomorrow: sorted.filter(({ task }) => task.dueOn > today),
    dueCount: due.length,
    closedCount: due.filter(({ task }) => task.outcome !== null).length,
  };
}

function placeOf({ task }: ShownTask): string {
  return [task.inTimeUntil, task.dueOn, task.title, task.id].join(' ');
}
