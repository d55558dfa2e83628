import type { AlertKind } from '@shared/alerts/alert-rule';
import type { Alert, AlertTimeLine } from '@shared/contracts/alerts';
import type { Tx } from '../database/transactions';
import type { AlertGroup } from './alert-counts';
import { alertOf, shownAlerts, type AlertRow } from './alert-row';

/** Which alerts of a room. */
export interface AlertSelection {
  readonly isOpen: boolean | null;
  readonly shelfId: string | null;
  readonly kind: AlertKind | null;
  /** When they opened, half-open. */
  readonly opened: { readonly from: Date; readonly to: Date } | null;
  /** Only those before the last one of the page before. */
  readonly before: { readonly openedAt: Date; readonly id: string } | null;
  readonly limit: number;
}

type Mail = AlertTimeLine['mails'][number];
type Quiet = AlertTimeLine['quiets'][number];
type Assignment = AlertTimeLine['assignments'][number];
/** A row whose instants have not been written out yet. */
type Dated<T> = {
  readonly [K in keyof T]: K extends `${string}At` | 'at' | 'until'
    ? Date | (null extends T[K] ? null : never)
    : T[K];
};

/** Queries over the alerts of a room, the open and the past ones. */
export class AlertHistoryStore {
  /** A page of a room's alerts, newest first. */
  async page(tx: Tx, roomId: string, selection: AlertSelection): Promise<Alert[]> {
    const { isOpen, shelfId, kind, opened, before, limit } = selection;
    const rows: AlertRow[] = await tx.query(
      `${shownAlerts}
       WHERE a.room_id = $1
         AND ($2::bool IS NULL OR (a.cleared_at IS NULL) = $2)
         AND ($3::uuid IS NULL OR a.shelf_id = $3)
         AND ($4::text IS NULL OR a.kind = $4)
         AND ($5::timestamptz IS NULL OR (a.opened_at >= $5 AND a.opened_at < $6))
         AND ($7::timestamptz IS NULL OR (a.opened_at, a.id) < ($7, $8::uuid))
       ORDER BY a.opened_at DESC, a.id DESC LIMIT $9`,
      [
        roomId,
        isOpen,
        shelfId,
        kind,
        opened?.from ?? null,
        opened?.to ?? null,
        before?.openedAt ?? null,
        before?.id ?? null,
        limit,
      ],
    );
    return rows.map(alertOf);
  }

  /**
   * How many alerts a room had of each shelf, kind and month.
   *
   * @param zone - IANA name of the room's time zone, which says what a month is.
   */
  groups(tx: Tx, roomId: string, zone: string): Promise<AlertGroup[]> {
    return tx.query(
      `SELECT a.shelf_id AS "shelfId", sh.label AS "shelfLabel", a.kind,
              to_char(a.opened_at AT TIME ZONE $2, 'YYYY-MM') AS month, count(*)::int AS count
       FROM alert a JOIN shelf sh ON sh.id = a.shelf_id
       WHERE a.room_id = $1 GROUP BY 1, 2, 3, 4`,
      [roomId, zone],
    );
  }

  /** Who was written to about an alert, in order. */
  async mailsAbout(tx: Tx, alertId: string): Promise<Mail[]> {
    const rows: Dated<Mail>[] = await tx.query(
      `SELECT person.name AS "personName", told.reason, mail.created_at AS "writtenAt", mail.sent_at AS "sentAt",
              mail.failed_at AS "refusedAt", mail.attempts,
              CASE WHEN mail.sent_at IS NULL AND mail.failed_at IS NULL THEN mail.not_before END AS "dueAt"
       FROM told_alert AS told
       JOIN mail ON mail.message_id = told.message_id
       JOIN person ON person.id = told.person_id
       WHERE told.alert_id = $1 ORDER BY mail.created_at, person.name`,
      [alertId],
    );
    return rows.map((row) => ({
      ...row,
      writtenAt: row.writtenAt.toISOString(),
      sentAt: row.sentAt?.toISOString() ?? null,
      refusedAt: row.refusedAt?.toISOString() ?? null,
      dueAt: row.dueAt?.toISOString() ?? null,
    }));
  }

  /** When nobody was to be written to while an alert was open, in order. */
  async quietsAround(tx: Tx, alertId: string): Promise<Quiet[]> {
    const rows: Dated<Quiet>[] = await tx.query(
      `SELECT q.set_at AS "setAt", q.until, setter.name AS "setByName", q.ended_at AS "endedAt",
              ender.name AS "endedByName"
       FROM alert a
       JOIN alert_quiet AS q ON q.shelf_id = a.shelf_id AND q.quantity = a.quantity AND q.kind = a.kind
         AND coalesce(q.ended_at, q.until) > a.opened_at AND q.set_at < coalesce(a.cleared_at, 'infinity')
       LEFT JOIN person AS setter ON setter.id = q.set_by
       LEFT JOIN person AS ender ON ender.id = q.ended_by
       WHERE a.id = $1 ORDER BY q.set_at`,
      [alertId],
    );
    return rows.map((row) => ({
      ...row,
      setAt: row.setAt.toISOString(),
      until: row.until.toISOString(),
      endedAt: row.endedAt?.toISOString() ?? null,
    }));
  }

  /** Who was to look after an alert, in order. */
  async assignmentsOf(tx: Tx, alertId: string): Promise<Assignment[]> {
    const rows: Dated<Assignment>[] = await tx.query(
      `SELECT assigned.at, person.name AS "personName", assigner.name AS "assignedByName"
       FROM alert_assignment AS assigned
       LEFT JOIN person ON person.id = assigned.person_id
       LEFT JOIN person AS assigner ON assigner.id = assigned.assigned_by
       WHERE assigned.alert_id = $1 ORDER BY assigned.at`,
      [alertId],
    );
    return rows.map((row) => ({ ...row, at: row.at.toISOString() }));
  }
}
