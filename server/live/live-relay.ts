import type { LiveEvents } from '@shared/contracts/live-events';
import type { LiveFeed } from './live-feed';

/**
 * A feed that services can hold before the sockets are there: what is published earlier has nobody to hear it.
 */
export class LiveRelay implements LiveFeed {
  private feed: LiveFeed | null = null;

  /** Passes everything on from now on. */
  attach(feed: LiveFeed): void {
    this.feed = feed;
  }

  publish<E extends keyof LiveEvents>(roomId: string, event: E, payload: Parameters<LiveEvents[E]>[0]): void {
    this.feed?.publish(roomId, event, payload);
  }
}
