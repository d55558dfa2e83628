/**
 * Who a task is in good hands with: its `held` by as many as it needs; `short`, a pair of which one is missing;
 * `uncovered`, nobody; `anybody`, in a room that keeps no rota for it.
 */
export const taskCovers = ['held', 'short', 'uncovered', 'anybody'] as const;
/** One of {@link taskCovers}. */
export type TaskCover = (typeof taskCovers)[number];
