import type { ShelfAdviceView } from '@shared/contracts/advice';
import type { Alert } from '@shared/contracts/alerts';
import type { Board, BoardRack, BoardShelf, ShelfNow } from '@shared/contracts/board';
import type { Task } from '@shared/contracts/care';

/** What something that was told makes of the board. What it doesn't touch stays the same object. */
export type BoardChange = (board: Board) => Board;

/** New readings on a shelf. */
export function shelfMeasured(now: ShelfNow): BoardChange {
  return changedShelf(now.shelfId, (shelf) => ({ ...shelf, now }));
}

/** Other advice on a shelf. */
export function shelfAdvised(advice: ShelfAdviceView): BoardChange {
  return changedShelf(advice.shelfId, (shelf) => ({ ...shelf, advice }));
}

/** An alert that opened, got worse, was acknowledged or cleared. A new one comes first. */
export function alertChanged(alert: Alert): BoardChange {
  return (board) => {
    const others = board.openAlerts.filter(({ id }) => id !== alert.id);
    if (alert.clearedAt !== null) return { ...board, openAlerts: others };
    const isKnown = others.length < board.openAlerts.length;
    const openAlerts = isKnown
      ? board.openAlerts.map((known) => (known.id === alert.id ? alert : known))
      : [alert, ...others];
    return { ...board, openAlerts };
  };
}

/** A task that was ticked, reopened, moved or newly due; one due after today is not on the board. */
export function taskChanged(task: Task): BoardChange {
  return (board) => {
    const isKnown = board.tasks.some(({ id }) => id === task.id);
    if (task.dueOn > board.today) return { ...board, tasks: board.tasks.filter(({ id }) => id !== task.id) };
    const tasks = isKnown
      ? board.tasks.map((known) => (known.id === task.id ? task : known))
      : [...board.tasks, task];
    return { ...board, tasks };
  };
}

function changedShelf(shelfId: string, change: (shelf: BoardShelf) => BoardShelf): BoardChange {
  const within = (rack: BoardRack): BoardRack =>
    rack.shelves.some(({ id }) => id === shelfId)
      ? { ...rack, shelves: rack.shelves.map((shelf) => (shelf.id === shelfId ? change(shelf) : shelf)) }
      : rack;
  return (board) => ({ ...board, racks: board.racks.map(within) });
}
