import type { Logger } from 'pino';
import type { AlertService } from '../alerts/alert-service';
import type { IntakeListener } from '../devices/device-intake-service';
import type { LiveFeed } from '../live/live-feed';
import type { BoardService } from './board-service';

/**
 * Tells dashboards what stored readings changed. Many batches within a moment become one message a shelf: a page needs
 * no more, and a room of quick sensors would drown it.
 */
export class BoardPublisher implements IntakeListener {
  private readonly waiting = new Map<string, Set<string>>();
  private timer: NodeJS.Timeout | null = null;

  constructor(
    private readonly boards: BoardService,
    private readonly alerts: AlertService,
    private readonly live: LiveFeed,
    private readonly log: Pick<Logger, 'warn'>,
    private readonly delayMs = 250,
  ) {}

  readingsStored(stored: Parameters<IntakeListener['readingsStored']>[0]): void {
    if (stored.alertIds.length > 0) {
      this.alerts.publishChanged(stored.alertIds).catch((error: unknown) => this.warn(error));
    }
    // A device belongs to one room, and so do the shelves of its readings.
    const [roomId] = stored.roomIds;
    if (roomId === undefined || stored.shelfIds.size === 0) return;
    const shelfIds = this.waiting.get(roomId) ?? new Set<string>();
    for (const shelfId of stored.shelfIds) shelfIds.add(shelfId);
    this.waiting.set(roomId, shelfIds);
    this.timer ??= setTimeout(() => {
      this.timer = null;
      this.flush().catch((error: unknown) => this.warn(error));
    }, this.delayMs);
  }

  /** Publishes what waits, and waits for nothing more. */
  async stop(): Promise<void> {
    if (this.timer !== null) clearTimeout(this.timer);
    this.timer = null;
    await this.flush().catch((error: unknown) => this.warn(error));
  }

  private async flush(): Promise<void> {
    const rooms = [...this.waiting];
    this.waiting.clear();
    for (const [roomId, shelfIds] of rooms) {
      for (const shelf of await this.boards.changedShelves(roomId, shelfIds)) {
        this.live.publish(roomId, 'shelf:measured', shelf);
      }
    }
  }

  /** The readings are stored all the same; a page catches up with its next event or its next look. */
  private warn(error: unknown): void {
    this.log.warn({ err: error }, 'dashboards not told');
  }
}
