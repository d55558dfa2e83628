import type { Task } from '@shared/contracts/care';
import type { CareHolder } from '@shared/contracts/care-place';
import type { DutyDay } from '@shared/contracts/care-rota';

/** A person's day, or nobody's. */
export interface RotaCell {
  readonly day: string;
  readonly tasks: readonly Task[];
  readonly isOnDuty: boolean;
  readonly isAway: boolean;
}

/** A line of the week: of a person, of what is short of hands, or of what is anybody's. */
export interface RotaRow {
  readonly kind: 'uncovered' | 'anybody' | 'person';
  /** Null for lines of no person. */
  readonly person: CareHolder | null;
  readonly cells: readonly RotaCell[];
}

/**
 * A week as people by days.
 *
 * @param days - Of the rota, in order.
 * @param tasks - Due in these days, and what is open from before.
 * @param people - Whose lines are shown, in this order; who else holds a task follows.
 * @param today - The room's day.
 * @returns First what is short of hands, then what is anybody's, where there is any; then the people.
 *
 * @remarks
 * What is late is to be done today, so it stands there and not on a day that is over; in weeks without today, where it
 * was due. What is done stands with who did it. A pair of which one is missing stands with the one and with what is short.
 */
export function rotaWeek(
  days: readonly DutyDay[],
  tasks: readonly Task[],
  people: readonly CareHolder[],
  today: string,
): RotaRow[] {
  const hasToday = days.some(({ day }) => day === today);
  const dayOf = (task: Task): string =>
    hasToday && task.outcome === null && task.dueOn < today ? today : task.dueOn;
  const cellsOf = (isIn: (task: Task) => boolean, personId: string | null): RotaCell[] =>
    days.map((one) => ({
      day: one.day,
      tasks: tasks.filter((task) => dayOf(task) === one.day && isIn(task)).sort(openFirst),
      isOnDuty: has(one.onDuty, personId),
      isAway: has(one.absent, personId),
    }));
  const nobodys = [
    { kind: 'uncovered' as const, person: null, cells: cellsOf(isShort, null) },
    { kind: 'anybody' as const, person: null, cells: cellsOf(isAnybodys, null) },
  ].filter(({ cells }) => cells.some((cell) => cell.tasks.length > 0));
  const rows = withOthers(people, tasks).map((person) => ({
    kind: 'person' as const,
    person,
    cells: cellsOf((task) => has(peopleOf(task), person.personId), person.personId),
  }));
  return [...nobodys, ...rows];
}

/** Who it stands with: whoever did it, else whoever holds it. */
export function peopleOf({ holders, outcome, doneById, doneByName }: Task): readonly CareHolder[] {
  if (outcome === null || doneById === null) return holders;
  return [{ personId: doneById, name: doneByName ?? '' }];
}

/** Whether an open task is short of hands. */
export function isShort({ outcome, cover }: Task): boolean {
  return outcome === null && (cover === 'uncovered' || cover === 'short');
}

function isAnybodys({ outcome, cover, holders }: Task): boolean {
  return outcome === null && cover === 'anybody' && holders.length === 0;
}

/** Those who left the room may still stand with what they did. */
function withOthers(people: readonly CareHolder[], tasks: readonly Task[]): readonly CareHolder[] {
  const known = new Map(people.map((person) => [person.personId, person]));
  for (const person of tasks.flatMap(peopleOf)) {
    if (!known.has(person.personId)) known.set(person.personId, person);
  }
  return [...known.values()];
}

function has(people: readonly CareHolder[], personId: string | null): boolean {
  return people.some((person) => person.personId === personId);
}

function openFirst(one: Task, other: Task): number {
  const isClosed = Number(one.outcome !== null) - Number(other.outcome !== null);
  if (isClosed !== 0) return isClosed;
  return one.dueOn === other.dueOn
    ? one.title.localeCompare(other.title, 'en-GB')
    : one.dueOn < other.dueOn
      ? -1
      : 1;
}
