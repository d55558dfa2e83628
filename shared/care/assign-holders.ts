import { dutyOn, isAway, type DutyRota } from './rota';

/** Whom a task falls to. */
export interface TaskWho {
  readonly how: 'person' | 'inTurn' | 'pair' | 'onDuty';
  /** In their order; nobody for whoever is on duty. */
  readonly personIds: readonly string[];
}

/** An open task, and who holds it so far. */
export interface TaskToAssign {
  readonly id: string;
  /** On which it is to be done: when it is due, or today when it is late. */
  readonly day: string;
  readonly minutes: number;
  readonly who: TaskWho;
  readonly holders: readonly string[];
  /** Somebody chose the holders. */
  readonly isByHand: boolean;
}

/** Who holds a task. */
export interface Assignment {
  readonly taskId: string;
  readonly holders: readonly string[];
  readonly isByHand: boolean;
  /** Fewer than it needs: nobody, or one of a pair. */
  readonly isUncovered: boolean;
}

/**
 * Gives every task to those who do it, as the rota and the routines say.
 *
 * @param tasks - Open tasks.
 * @param rota - Who is there when.
 * @param loads - Minutes that each person did lately; they count as if they were still to do.
 * @returns An assignment of each task, in the order of the tasks.
 *
 * @remarks
 * Whoever holds a task keeps it while they are there and it may fall to them, so that nobody's week changes without a
 * reason; what somebody chose by hand stays as long as those people are there. Everything else goes, soonest first, to
 * whoever has the fewest minutes, which takes turns where all tasks last equally long, and evens out where they don't.
 */
export function assignHolders(
  tasks: readonly TaskToAssign[],
  rota: DutyRota,
  loads: ReadonlyMap<string, number>,
): Assignment[] {
  const minutes = new Map(loads);
  const give = (personIds: readonly string[], task: TaskToAssign): void => {
    for (const personId of personIds) minutes.set(personId, (minutes.get(personId) ?? 0) + task.minutes);
  };
  const kept = new Map(tasks.map((task) => [task.id, keptHolders(task, rota)]));
  for (const task of tasks) give(kept.get(task.id)?.holders ?? [], task);

  const assigned = new Map<string, Assignment>();
  for (const task of [...tasks].sort(bySoonest)) {
    const before = kept.get(task.id) ?? { holders: [], isByHand: false };
    const needed = before.isByHand ? before.holders.length : needs(task.who);
    const free = candidates(task, rota).filter((personId) => !before.holders.includes(personId));
    const added = leastLoaded(free, minutes, needed - before.holders.length);
    give(added, task);
    const holders = [...before.holders, ...added];
    assigned.set(task.id, {
      taskId: task.id,
      holders,
      isByHand: before.isByHand,
      isUncovered: holders.length < Math.max(1, needed),
    });
  }
  return tasks.flatMap(({ id }) => assigned.get(id) ?? []);
}

function keptHolders(task: TaskToAssign, rota: DutyRota): Pick<Assignment, 'holders' | 'isByHand'> {
  if (task.isByHand) {
    const there = task.holders.filter((personId) => isThere(personId, task, rota));
    if (there.length > 0) return { holders: there, isByHand: true };
  }
  const possible = candidates(task, rota);
  const holders = task.holders.filter((personId) => possible.includes(personId)).slice(0, needs(task.who));
  return { holders, isByHand: false };
}

function candidates(task: TaskToAssign, rota: DutyRota): readonly string[] {
  if (task.who.how === 'onDuty') return dutyOn(rota, task.day).onDuty;
  return task.who.personIds.filter((personId) => isThere(personId, task, rota));
}

function isThere(personId: string, { day }: TaskToAssign, rota: DutyRota): boolean {
  return rota.memberIds.has(personId) && !isAway(rota, personId, day);
}

function needs({ how }: TaskWho): number {
  return how === 'pair' ? 2 : 1;
}

/** Of equal loads, whoever comes first. */
function leastLoaded(
  personIds: readonly string[],
  minutes: ReadonlyMap<string, number>,
  count: number,
): readonly string[] {
  const loadOf = (personId: string): number => minutes.get(personId) ?? 0;
  return [...personIds].sort((one, other) => loadOf(one) - loadOf(other)).slice(0, Math.max(0, count));
}

function bySoonest(one: TaskToAssign, other: TaskToAssign): number {
  if (one.day !== other.day) return one.day < other.day ? -1 : 1;
  return one.id < other.id ? -1 : 1;
}
