import type { Task } from '@shared/contracts/care';
import type { KeptDeed } from './care-deed';

/** A task as the person sees it: as the server has it, with what they did since. */
export interface ShownTask {
  readonly task: Task;
  /** Something about it is not with the server yet. */
  readonly isWaiting: boolean;
  /** How many photos of it are not with the server yet. */
  readonly waitingPhotos: number;
}

/** Who is looking. */
export interface Doer {
  readonly id: string;
  readonly name: string;
}

/**
 * Lays over tasks what waits to be sent.
 *
 * @param tasks - As the server has them.
 * @param waiting - The person's deeds, the oldest first; those of other tasks change nothing.
 * @param doer - Whose deeds they are.
 */
export function withWaiting(
  tasks: readonly Task[],
  waiting: readonly KeptDeed[],
  doer: Doer,
): readonly ShownTask[] {
  return tasks.map((task) => {
    const own = waiting.filter((deed) => deed.kind !== 'add' && deed.taskId === task.id);
    return {
      task: own.reduce((known, deed) => afterDeed(known, deed, doer), task),
      isWaiting: own.length > 0,
      waitingPhotos: own.filter(({ kind }) => kind === 'photo').length,
    };
  });
}

function afterDeed(task: Task, deed: KeptDeed, doer: Doer): Task {
  if (deed.kind === 'reopen') {
    return {
      ...task,
      outcome: null,
      doneAt: null,
      doneById: null,
      doneByName: null,
      note: '',
      millilitres: null,
      grams: null,
      count: null,
      tookMinutes: null,
    };
  }
  if (deed.kind !== 'close') return task;
  const { outcome, note, millilitres, grams, count, tookMinutes } = deed.completion;
  return {
    ...task,
    outcome: outcome ?? 'done',
    doneAt: deed.at,
    doneById: doer.id,
    doneByName: doer.name,
    note: note ?? '',
    millilitres: millilitres ?? null,
    grams: grams ?? null,
    count: count ?? null,
    tookMinutes: tookMinutes ?? null,
  };
}
