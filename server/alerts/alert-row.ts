import type { AlertKind } from '@shared/alerts/alert-rule';
import type { Episode } from '@shared/alerts/episode';
import type { Quantity } from '@shared/climate/quantity';
import type { Alert } from '@shared/contracts/alerts';

/** An episode as it is stored. */
export interface EpisodeRow {
  began_at: Date;
  opened_at: Date;
  peak_at: Date;
  peak_value: number;
  peak_excess: number;
  peak_limit: number;
  ended_at: Date | null;
  cleared_at: Date | null;
  urgency: Episode['urgency'];
}

/** An alert as {@link shownAlerts} selects it. */
export interface AlertRow extends EpisodeRow {
  id: string;
  room_id: string;
  shelf_id: string;
  shelf_label: string;
  sensor_id: string | null;
  quantity: Quantity;
  kind: AlertKind;
  found_later: boolean;
  written_at: Date | null;
  acknowledged_at: Date | null;
  acknowledged_by: string | null;
  acknowledged_by_name: string | null;
  acknowledge_note: string;
  quiet: Alert['quiet'];
  assignee: Alert['assignee'];
  deeds: Alert['deeds'];
}

/**
 * Alerts as people see them, `a` in what follows. Told is who a mail was written to: when all of them wait for the
 * morning letter, or the alert is quiet, nobody was. A quiet of the past that the alert never met is not its own.
 */
export const shownAlerts = `
  SELECT a.*, sh.label AS shelf_label, p.name AS acknowledged_by_name,
    CASE WHEN EXISTS (SELECT 1 FROM told_alert AS told WHERE told.alert_id = a.id) THEN a.told_at END AS written_at,
    (SELECT jsonb_build_object('until', q.until, 'setAt', q.set_at, 'setByName', setter.name)
     FROM alert_quiet AS q LEFT JOIN person AS setter ON setter.id = q.set_by
     WHERE q.shelf_id = a.shelf_id AND q.quantity = a.quantity AND q.kind = a.kind AND q.ended_at IS NULL
       AND q.until > a.opened_at AND q.set_at < coalesce(a.cleared_at, 'infinity')
     ORDER BY q.set_at DESC LIMIT 1) AS quiet,
    (SELECT CASE WHEN member.id IS NOT NULL THEN jsonb_build_object('personId', member.id, 'name', member.name) END
     FROM alert_assignment AS assigned LEFT JOIN person AS member ON member.id = assigned.person_id
     WHERE assigned.alert_id = a.id ORDER BY assigned.at DESC LIMIT 1) AS assignee,
    (SELECT coalesce(jsonb_agg(jsonb_build_object('id', deed.id, 'at', deed.at, 'personId', deed.person_id,
         'personName', doer.name, 'text', deed.text) ORDER BY deed.at, deed.id), '[]')
     FROM alert_deed AS deed LEFT JOIN person AS doer ON doer.id = deed.person_id
     WHERE deed.alert_id = a.id) AS deeds
  FROM alert a JOIN shelf sh ON sh.id = a.shelf_id LEFT JOIN person p ON p.id = a.acknowledged_by`;

/**
 * Reads an alert.
 *
 * @param row - As {@link shownAlerts} selects it.
 * @returns The alert as people see it.
 */
export function alertOf(row: AlertRow): Alert {
  return {
    id: row.id,
    shelfId: row.shelf_id,
    shelfLabel: row.shelf_label,
    sensorId: row.sensor_id,
    quantity: row.quantity,
    kind: row.kind,
    urgency: row.urgency,
    beganAt: row.began_at.toISOString(),
    openedAt: row.opened_at.toISOString(),
    peakAt: row.peak_at.toISOString(),
    peakValue: row.peak_value,
    peakExcess: row.peak_excess,
    peakLimit: row.peak_limit,
    endedAt: row.ended_at?.toISOString() ?? null,
    clearedAt: row.cleared_at?.toISOString() ?? null,
    foundLater: row.found_later,
    toldAt: row.written_at?.toISOString() ?? null,
    acknowledgedAt: row.acknowledged_at?.toISOString() ?? null,
    acknowledgedById: row.acknowledged_by,
    acknowledgedByName: row.acknowledged_by_name,
    acknowledgeNote: row.acknowledge_note,
    quiet: row.quiet && { ...row.quiet, until: inUtc(row.quiet.until), setAt: inUtc(row.quiet.setAt) },
    assignee: row.assignee,
    deeds: row.deeds.map((deed) => ({ ...deed, at: inUtc(deed.at) })),
  };
}

/** What PostgreSQL writes into JSON has the offset of its session. */
function inUtc(at: string): string {
  return new Date(at).toISOString();
}
