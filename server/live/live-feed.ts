import type { LiveEvents } from '@shared/contracts/live-events';

/** Tells a room's dashboards what has happened; called after the commit, in whatever process. */
export interface LiveFeed {
  /**
   * Publishes an event.
   *
   * @param roomId - Whose dashboards.
   * @param event - One of {@link LiveEvents}.
   * @param payload - As the contract says.
   */
  publish<E extends keyof LiveEvents>(roomId: string, event: E, payload: Parameters<LiveEvents[E]>[0]): void;
}
