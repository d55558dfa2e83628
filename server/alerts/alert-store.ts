import { joinedKinds, type AlertKind } from '@shared/alerts/alert-rule';
import { idleState, type AlertState } from '@shared/alerts/alert-state';
import type { Episode } from '@shared/alerts/episode';
import type { Quantity } from '@shared/climate/quantity';
import type { Alert } from '@shared/contracts/alerts';
import type { Tx } from '../database/transactions';
import type { SensorOnRoad } from '../readings/reading-store';
import { alertOf, shownAlerts, type AlertRow, type EpisodeRow } from './alert-row';

/** A rule's standing over one series. */
export interface Watch {
  readonly id: string;
  readonly sensorId: string;
  readonly quantity: Quantity;
  readonly kind: AlertKind;
  readonly state: AlertState;
}

/** Which watch an episode belongs to, for writing it. */
export interface EpisodeOfWatch {
  readonly watch: Watch;
  readonly sensor: SensorOnRoad;
  readonly episode: Episode;
  readonly foundLater: boolean;
}

interface WatchRow {
  id: string;
  sensor_id: string;
  quantity: Quantity;
  kind: AlertKind;
  state: AlertState;
}

/** Queries over watches and episodes. */
export class AlertStore {
  /** The watches of sensors, made where a rule has none yet. */
  async watches(
    tx: Tx,
    wanted: readonly { sensor: SensorOnRoad; quantity: Quantity; kind: AlertKind }[],
  ): Promise<Watch[]> {
    const sensorIds = [...new Set(wanted.map(({ sensor }) => sensor.id))];
    const kinds = [...new Set(wanted.map(({ kind }) => kind))];
    const read = async (): Promise<WatchRow[]> =>
      tx.query(
        `SELECT id, sensor_id, quantity, kind, state FROM alert_watch
         WHERE sensor_id = ANY($1) AND kind = ANY($2) FOR NO KEY UPDATE`,
        [sensorIds, kinds],
      );
    let rows = await read();
    const held = new Set(rows.map(keyOf));
    const missing = wanted.filter(
      ({ sensor, quantity, kind }) => !held.has(keyOf({ sensor_id: sensor.id, quantity, kind })),
    );
    if (missing.length > 0) {
      await tx.query(
        `INSERT INTO alert_watch (shelf_id, sensor_id, quantity, kind, state)
         SELECT *, $5::jsonb FROM unnest($1::uuid[], $2::uuid[], $3::text[], $4::text[])
         ON CONFLICT DO NOTHING`,
        [
          missing.map(({ sensor }) => sensor.shelfId),
          missing.map(({ sensor }) => sensor.id),
          missing.map(({ quantity }) => quantity),
          missing.map(({ kind }) => kind),
          JSON.stringify(idleState),
        ],
      );
      rows = await read();
    }
    return rows.map((row) => ({
      id: row.id,
      sensorId: row.sensor_id,
      quantity: row.quantity,
      kind: row.kind,
      state: row.state,
    }));
  }

  /** Keeps where the folds stand. */
  async saveStates(tx: Tx, states: readonly { watchId: string; state: AlertState }[]): Promise<void> {
    if (states.length === 0) return;
    await tx.query(
      `UPDATE alert_watch SET state = new.state
       FROM unnest($1::uuid[], $2::jsonb[]) AS new (id, state) WHERE alert_watch.id = new.id`,
      [states.map(({ watchId }) => watchId), states.map(({ state }) => JSON.stringify(state))],
    );
  }

  /**
   * Writes episodes over those that began at the same instant; who acknowledged and who was told stays.
   *
   * @returns Ids of the alerts.
   */
  async saveEpisodes(tx: Tx, episodes: readonly EpisodeOfWatch[]): Promise<string[]> {
    if (episodes.length === 0) return [];
    const instant = (pick: (episode: Episode) => number | null) =>
      episodes.map(({ episode }) => {
        const at = pick(episode);
        return at === null ? null : new Date(at);
      });
    const rows: { id: string }[] = await tx.query(
      `INSERT INTO alert AS held (watch_id, room_id, shelf_id, sensor_id, quantity, kind, urgency, began_at, opened_at,
         peak_at, peak_value, peak_excess, peak_limit, ended_at, cleared_at, found_later)
       SELECT * FROM unnest($1::uuid[], $2::uuid[], $3::uuid[], $4::uuid[], $5::text[], $6::text[], $7::text[],
         $8::timestamptz[], $9::timestamptz[], $10::timestamptz[], $11::float8[], $12::float8[], $13::float8[],
         $14::timestamptz[], $15::timestamptz[], $16::bool[])
       ON CONFLICT (watch_id, began_at) DO UPDATE SET urgency = excluded.urgency, opened_at = excluded.opened_at,
         peak_at = excluded.peak_at, peak_value = excluded.peak_value, peak_excess = excluded.peak_excess,
         peak_limit = excluded.peak_limit, ended_at = excluded.ended_at, cleared_at = excluded.cleared_at,
         found_later = held.found_later AND excluded.found_later
       RETURNING id`,
      [
        episodes.map(({ watch }) => watch.id),
        episodes.map(({ sensor }) => sensor.roomId),
        episodes.map(({ sensor }) => sensor.shelfId),
        episodes.map(({ sensor }) => sensor.id),
        episodes.map(({ watch }) => watch.quantity),
        episodes.map(({ watch }) => watch.kind),
        episodes.map(({ episode }) => episode.urgency),
        instant((episode) => episode.beganAt),
        instant((episode) => episode.openedAt),
        instant((episode) => episode.peakAt),
        episodes.map(({ episode }) => episode.peakValue),
        episodes.map(({ episode }) => episode.peakExcess),
        episodes.map(({ episode }) => episode.limit),
        instant((episode) => episode.endedAt),
        instant((episode) => episode.clearedAt),
        episodes.map(({ foundLater }) => foundLater),
      ],
    );
    return rows.map((row) => row.id);
  }

  /** Removes episodes of a watch that began in a span and turned out not to be. */
  async removeEpisodes(tx: Tx, watchId: string, from: number, except: readonly number[]): Promise<void> {
    await tx.query('DELETE FROM alert WHERE watch_id = $1 AND began_at >= $2 AND NOT (began_at = ANY($3))', [
      watchId,
      new Date(from),
      except.map((at) => new Date(at)),
    ]);
  }

  /** Removes the episodes of a watch that began at these instants. */
  async removeBegunAt(tx: Tx, watchId: string, ats: readonly number[]): Promise<void> {
    if (ats.length === 0) return;
    await tx.query('DELETE FROM alert WHERE watch_id = $1 AND began_at = ANY($2)', [
      watchId,
      ats.map((at) => new Date(at)),
    ]);
  }

  /** Ends the open range alerts of a shelf's quantity and has its watches begin anew. */
  async restartRangeWatches(tx: Tx, shelfId: string, quantity: Quantity, at: Date): Promise<void> {
    await restartThose(tx, `shelf_id = $3 AND quantity = $4 AND kind IN ('aboveRange', 'belowRange')`, at, [
      shelfId,
      quantity,
    ]);
  }

  /** Ends the open alerts about a shelf's light sums and has their watches begin anew. */
  async restartLightSumWatches(tx: Tx, shelfId: string, at: Date): Promise<void> {
    await restartThose(tx, `shelf_id = $3 AND kind = 'lightSumShort'`, at, [shelfId]);
  }

  /**
   * Ends the open alerts of a sensor that is elsewhere from an instant on, and those that rest on other sensors beside it
   * where it was until then and is now; has their watches begin anew, its own on the shelf where it is now.
   */
  async restartWatches(tx: Tx, sensorId: string, from: Date, at: Date): Promise<void> {
    await restartThose(
      tx,
      `(sensor_id = $3 OR kind = ANY($4) AND shelf_id IN (
        SELECT shelf_id FROM placement WHERE sensor_id = $3 AND coalesce(to_at, 'infinity') >= $5
      ))`,
      at,
      [sensorId, joinedKinds, from],
    );
    await tx.query(
      `UPDATE alert_watch SET shelf_id = placement.shelf_id FROM placement
       WHERE alert_watch.sensor_id = $1 AND placement.sensor_id = $1 AND placement.to_at IS NULL`,
      [sensorId],
    );
  }

  /** Removes what was found of sensors that have no reading left. */
  async forget(tx: Tx, sensorIds: readonly string[]): Promise<void> {
    await tx.query('DELETE FROM alert WHERE sensor_id = ANY($1)', [sensorIds]);
    await tx.query('UPDATE alert_watch SET state = $2::jsonb WHERE sensor_id = ANY($1)', [
      sensorIds,
      JSON.stringify(idleState),
    ]);
  }

  /** Episodes of a watch that began before an instant, the last one only, and all from then on. */
  async episodesAround(tx: Tx, watchId: string, at: number): Promise<Episode[]> {
    const rows: EpisodeRow[] = await tx.query(
      `(SELECT * FROM alert WHERE watch_id = $1 AND began_at < $2 ORDER BY began_at DESC LIMIT 1)
       UNION ALL
       (SELECT * FROM alert WHERE watch_id = $1 AND began_at >= $2)
       ORDER BY began_at`,
      [watchId, new Date(at)],
    );
    return rows.map((row) => ({
      beganAt: row.began_at.getTime(),
      openedAt: row.opened_at.getTime(),
      peakAt: row.peak_at.getTime(),
      peakValue: row.peak_value,
      peakExcess: row.peak_excess,
      limit: row.peak_limit,
      endedAt: row.ended_at?.getTime() ?? null,
      clearedAt: row.cleared_at?.getTime() ?? null,
      urgency: row.urgency,
    }));
  }

  /** Open alerts of watches that nobody has been told of. */
  async untold(tx: Tx, watchIds: readonly string[]): Promise<string[]> {
    if (watchIds.length === 0) return [];
    const rows: { id: string }[] = await tx.query(
      'SELECT id FROM alert WHERE watch_id = ANY($1) AND cleared_at IS NULL AND told_at IS NULL',
      [watchIds],
    );
    return rows.map((row) => row.id);
  }

  /** Notes that alerts have gone into the outbox; they are live ones, whatever found them first. */
  async markTold(tx: Tx, alertIds: readonly string[], at: number): Promise<void> {
    await tx.query('UPDATE alert SET told_at = $2, found_later = false WHERE id = ANY($1)', [
      alertIds,
      new Date(at),
    ]);
  }

  /** Alerts as people see them. */
  async byIds(tx: Tx, alertIds: readonly string[]): Promise<(Alert & { roomId: string })[]> {
    if (alertIds.length === 0) return [];
    const rows: AlertRow[] = await tx.query(`${shownAlerts} WHERE a.id = ANY($1) ORDER BY a.opened_at`, [
      alertIds,
    ]);
    return rows.map((row) => ({ ...alertOf(row), roomId: row.room_id }));
  }

  /** The ones of some alerts that people look at: open ones first, then the newest, so many at most. */
  async foremostAmong(tx: Tx, alertIds: readonly string[], most: number): Promise<string[]> {
    if (alertIds.length <= most) return [...alertIds];
    const rows: { id: string }[] = await tx.query(
      `SELECT id FROM alert WHERE id = ANY($1) ORDER BY cleared_at IS NOT NULL, opened_at DESC LIMIT $2`,
      [alertIds, most],
    );
    return rows.map(({ id }) => id);
  }

  /** Which of some alerts nobody is to be written to about now. */
  async quietAmong(tx: Tx, alertIds: readonly string[], now: number): Promise<ReadonlySet<string>> {
    if (alertIds.length === 0) return new Set();
    const rows: { id: string }[] = await tx.query(
      `SELECT a.id FROM alert a
       WHERE a.id = ANY($1) AND EXISTS (
         SELECT 1 FROM alert_quiet AS q
         WHERE q.shelf_id = a.shelf_id AND q.quantity = a.quantity AND q.kind = a.kind
           AND q.ended_at IS NULL AND q.set_at <= $2 AND q.until > $2
       )`,
      [alertIds, new Date(now)],
    );
    return new Set(rows.map(({ id }) => id));
  }
}

/**
 * Ends open alerts and has their watches begin anew.
 *
 * @param concerned - Which, as a condition on columns that alerts and watches share; its parameters begin at $3.
 */
async function restartThose(
  tx: Tx,
  concerned: string,
  at: Date,
  parameters: readonly unknown[],
): Promise<void> {
  await tx.query(
    `WITH ended AS (
       UPDATE alert SET ended_at = coalesce(ended_at, $1), cleared_at = $1
       WHERE cleared_at IS NULL AND ${concerned}
     )
     UPDATE alert_watch SET state = $2::jsonb WHERE ${concerned}`,
    [at, JSON.stringify(idleState), ...parameters],
  );
}

function keyOf({ sensor_id: sensorId, quantity, kind }: Omit<WatchRow, 'id' | 'state'>): string {
  return `${sensorId} ${quantity} ${kind}`;
}
