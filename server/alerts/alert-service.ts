import type { Alert } from '@shared/contracts/alerts';
import type { Transactions } from '../database/transactions';
import { decodeCursor, encodeCursor } from '../http/cursor';
import { notFound } from '../http/request-problem';
import type { SignedInPerson } from '../http/route';
import type { LiveFeed } from '../live/live-feed';
import type { AlertStore } from './alert-store';

/** Which alerts of a room to list. */
export interface AlertFilter {
  readonly open?: 'true' | 'false' | undefined;
  readonly shelfId?: string | undefined;
  readonly limit: number;
  readonly cursor?: string | undefined;
}

/** Lists alerts and takes acknowledgements. */
export class AlertService {
  constructor(
    private readonly transactions: Transactions,
    private readonly store: AlertStore,
    private readonly live: LiveFeed,
  ) {}

  /**
   * A page of alerts, newest first.
   *
   * @param roomId - Whose.
   * @param filter - Which.
   * @returns The page, and a cursor where there are more.
   */
  async list(roomId: string, filter: AlertFilter): Promise<{ alerts: Alert[]; nextCursor: string | null }> {
    const before = decodeCursor(filter.cursor);
    const found = await this.store.page(this.transactions.plain, roomId, {
      isOpen: filter.open === undefined ? null : filter.open === 'true',
      shelfId: filter.shelfId ?? null,
      before: before === null ? null : { openedAt: before.at, id: before.id },
      limit: filter.limit + 1,
    });
    const alerts = found.slice(0, filter.limit);
    const last = found.length > filter.limit ? alerts.at(-1) : undefined;
    return { alerts, nextCursor: last === undefined ? null : encodeCursor(last.openedAt, last.id) };
  }

  /** Every open alert of a room, newest first. */
  async open(roomId: string): Promise<Alert[]> {
    return (await this.list(roomId, { open: 'true', limit: 200 })).alerts;
  }

  /**
   * One alert.
   *
   * @param roomId - Whose.
   * @param alertId - Which.
   * @returns The alert as it is now.
   * @throws RequestProblem 404 when the room has no such alert.
   */
  async one(roomId: string, alertId: string): Promise<Alert> {
    const [found] = await this.store.byIds(this.transactions.plain, [alertId]);
    if (found?.roomId !== roomId) throw notFound('alert');
    const { roomId: _room, ...alert } = found;
    return alert;
  }

  /**
   * Notes that somebody has seen an alert; the first one stays.
   *
   * @param roomId - Whose.
   * @param alertId - Which.
   * @param person - Who.
   * @param note - What they say of it, may be empty.
   * @returns The alert as it is now.
   * @throws RequestProblem 404 when the room has no such alert.
   */
  async acknowledge(roomId: string, alertId: string, person: SignedInPerson, note: string): Promise<Alert> {
    const plain = this.transactions.plain;
    if (!(await this.store.acknowledge(plain, roomId, alertId, person.id, note))) throw notFound('alert');
    const [alert] = await this.store.byIds(plain, [alertId]);
    if (alert === undefined) throw notFound('alert');
    const { roomId: _room, ...shown } = alert;
    this.live.publish(roomId, 'alert:changed', shown);
    return shown;
  }

  /** Tells dashboards about alerts that changed; to be called after the commit. */
  async publishChanged(alertIds: readonly string[]): Promise<void> {
    for (const { roomId, ...alert } of await this.store.byIds(this.transactions.plain, alertIds)) {
      this.live.publish(roomId, 'alert:changed', alert);
    }
  }
}
