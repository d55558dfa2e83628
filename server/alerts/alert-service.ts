import type { Alert, AlertCounts, AlertTimeLine } from '@shared/contracts/alerts';
import type { PeriodBounds } from '@shared/series/period-summary';
import { monthBounds } from '@shared/series/room-months';
import type { Transactions } from '../database/transactions';
import { decodeCursor, encodeCursor } from '../http/cursor';
import { notFound } from '../http/request-problem';
import type { LiveFeed } from '../live/live-feed';
import { alertCounts, type AlertFacets } from './alert-counts';
import type { AlertHistoryStore } from './alert-history-store';
import type { AlertStore } from './alert-store';

/** A file of years may change thousands of alerts; screens that show history ask for it when they are opened. */
const MOST_PUBLISHED = 200;

/** Which alerts of a room to list. */
export interface AlertFilter extends AlertFacets {
  readonly open?: 'true' | 'false' | undefined;
  readonly limit: number;
  readonly cursor?: string | undefined;
}

/** A room, as far as its alerts need it. */
export interface RoomOfAlerts {
  readonly id: string;
  /** IANA name. */
  readonly timeZone: string;
}

/** What {@link AlertService} works with. */
export interface AlertParts {
  readonly transactions: Transactions;
  readonly alerts: AlertStore;
  readonly history: AlertHistoryStore;
  readonly feed: LiveFeed;
}

/** Lists and counts alerts, and tells what happened to each. */
export class AlertService {
  constructor(private readonly parts: AlertParts) {}

  /**
   * A page of alerts, newest first.
   *
   * @param room - Whose; its time zone says what a month is.
   * @param filter - Which.
   * @returns The page, and a cursor where there are more.
   */
  async list(
    room: RoomOfAlerts,
    filter: AlertFilter,
  ): Promise<{ alerts: Alert[]; nextCursor: string | null }> {
    const month = filter.month === undefined ? null : monthBounds(filter.month, room.timeZone);
    return this.page(room.id, filter, month);
  }

  /** Every open alert of a room, newest first. */
  async open(roomId: string): Promise<Alert[]> {
    return (await this.page(roomId, { open: 'true', limit: 200 })).alerts;
  }

  /** The newest alerts of a room, open or not. */
  async newest(roomId: string): Promise<Alert[]> {
    return (await this.page(roomId, { limit: 200 })).alerts;
  }

  /** How many alerts a room had by shelf, kind and month. */
  async counts(room: RoomOfAlerts, chosen: AlertFacets): Promise<AlertCounts> {
    const { transactions, history } = this.parts;
    return alertCounts(await history.groups(transactions.plain, room.id, room.timeZone), chosen);
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
    const [found] = await this.parts.alerts.byIds(this.parts.transactions.plain, [alertId]);
    if (found?.roomId !== roomId) throw notFound('alert');
    const { roomId: _room, ...alert } = found;
    return alert;
  }

  /** What happened to an alert beside the readings; 404 when the room has no such alert. */
  async timeLine(roomId: string, alertId: string): Promise<AlertTimeLine> {
    const { transactions, history } = this.parts;
    await this.one(roomId, alertId);
    return {
      mails: await history.mailsAbout(transactions.plain, alertId),
      quiets: await history.quietsAround(transactions.plain, alertId),
      assignments: await history.assignmentsOf(transactions.plain, alertId),
    };
  }

  /** Tells dashboards about alerts that changed, of very many about the foremost; to be called after the commit. */
  async publishChanged(alertIds: readonly string[]): Promise<void> {
    const { alerts, feed, transactions } = this.parts;
    const told = await alerts.foremostAmong(transactions.plain, alertIds, MOST_PUBLISHED);
    for (const { roomId, ...alert } of await alerts.byIds(transactions.plain, told)) {
      feed.publish(roomId, 'alert:changed', alert);
    }
  }

  private async page(
    roomId: string,
    filter: AlertFilter,
    month: PeriodBounds | null = null,
  ): Promise<{ alerts: Alert[]; nextCursor: string | null }> {
    const before = decodeCursor(filter.cursor);
    const found = await this.parts.history.page(this.parts.transactions.plain, roomId, {
      isOpen: filter.open === undefined ? null : filter.open === 'true',
      shelfId: filter.shelfId ?? null,
      kind: filter.kind ?? null,
      opened: month === null ? null : { from: new Date(month.start), to: new Date(month.end) },
      before: before === null ? null : { openedAt: before.at, id: before.id },
      limit: filter.limit + 1,
    });
    const alerts = found.slice(0, filter.limit);
    const last = found.length > filter.limit ? alerts.at(-1) : undefined;
    return { alerts, nextCursor: last === undefined ? null : encodeCursor(last.openedAt, last.id) };
  }
}
