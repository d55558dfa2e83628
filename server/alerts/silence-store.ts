import type { Silence } from '@shared/alerts/own-silence';
import type { Tx } from '../database/transactions';

/** A device that reports, with its sensors in use that are on shelves. */
export interface WatchedDevice {
  readonly id: string;
  /** When it last reported, whatever it sent [ms]; null for one that never did, such as a logger. */
  readonly seenAt: number | null;
  /** Sensors in use, by id. */
  readonly sensorIds: readonly string[];
}

/** Sensors whose readings are taken together, and from where. */
export interface GapSearch {
  readonly sensorIds: readonly string[];
  readonly from: number;
  /** Shorter times without a reading are none [ms]. */
  readonly longerThanMs: number;
}

/** What a {@link GapSearch} came to. */
export interface FoundGaps {
  /** The last reading before `from`, where the search began [ms]; null when there is none. */
  readonly since: number | null;
  readonly gaps: readonly Silence[];
}

/** Queries over what did not come. */
export class SilenceStore {
  /** Devices by id; revoked ones are left out. */
  async devices(tx: Tx, deviceIds: readonly string[]): Promise<WatchedDevice[]> {
    const rows: { id: string; last_seen_at: Date | null; sensor_ids: string[] }[] = await tx.query(
      `SELECT d.id, d.last_seen_at, array_agg(s.id ORDER BY s.id) AS sensor_ids
       FROM device d
       JOIN sensor s ON s.device_id = d.id AND s.retired_at IS NULL
       JOIN placement p ON p.sensor_id = s.id AND p.to_at IS NULL
       WHERE d.id = ANY($1) AND d.revoked_at IS NULL GROUP BY d.id ORDER BY d.id`,
      [deviceIds],
    );
    return rows.map((row) => ({
      id: row.id,
      seenAt: row.last_seen_at?.getTime() ?? null,
      sensorIds: row.sensor_ids,
    }));
  }

  /**
   * Devices with a sensor whose last reading is old, and whose silence is not known or not yet urgent.
   *
   * @param tx - Any.
   * @param before - What is old.
   */
  async quietDevices(tx: Tx, before: Date): Promise<string[]> {
    const rows: { id: string }[] = await tx.query(
      `SELECT DISTINCT d.id
       FROM sensor s
       JOIN sensor_state st ON st.sensor_id = s.id
       JOIN device d ON d.id = s.device_id AND d.revoked_at IS NULL AND d.last_seen_at IS NOT NULL
       JOIN placement p ON p.sensor_id = s.id AND p.to_at IS NULL
       WHERE s.retired_at IS NULL AND st.latest_at < $1
         AND NOT EXISTS (
           SELECT 1 FROM alert a
           JOIN sensor beside ON beside.id = a.sensor_id
           WHERE a.cleared_at IS NULL AND a.urgency = 'goNow'
             AND (a.kind = 'sensorSilent' AND a.sensor_id = s.id
               OR a.kind = 'deviceSilent' AND beside.device_id = d.id)
         )`,
      [before],
    );
    return rows.map(({ id }) => id);
  }

  /** Gaps in the readings of some sensors taken together, failed readings included, in order for each search. */
  async gaps(tx: Tx, searches: readonly GapSearch[]): Promise<FoundGaps[]> {
    const members = searches.flatMap(({ sensorIds, from }, search) =>
      sensorIds.map((sensorId) => ({ search, sensorId, from: new Date(from) })),
    );
    if (members.length === 0) return searches.map(() => ({ since: null, gaps: [] }));
    const rows: { search: number; since: Date | null; from_at: Date | null; to_at: Date | null }[] =
      await tx.query(
        `WITH member AS (
           SELECT * FROM unnest($1::int[], $2::uuid[], $3::timestamptz[]) AS member (search, sensor_id, from_at)
         ), begun AS (
           SELECT member.search, max(before.at) AS at FROM member
           LEFT JOIN LATERAL (
             SELECT at FROM reading WHERE sensor_id = member.sensor_id AND at < member.from_at
             ORDER BY at DESC LIMIT 1
           ) AS before ON true
           GROUP BY member.search
         ), seen AS (
           -- Sorted within, so that the index is asked for each sensor; joined, the whole table would be read.
           SELECT member.search, r.at FROM member
           CROSS JOIN LATERAL (
             SELECT at FROM reading WHERE sensor_id = member.sensor_id AND at >= member.from_at ORDER BY at
           ) AS r
           UNION SELECT search, at FROM begun WHERE at IS NOT NULL
         ), paired AS (
           SELECT search, lag(at) OVER (PARTITION BY search ORDER BY at) AS from_at, at AS to_at FROM seen
         )
         SELECT begun.search, begun.at AS since, paired.from_at, paired.to_at
         FROM begun
         LEFT JOIN unnest($4::float8[]) WITH ORDINALITY AS limits (ms, place) ON limits.place = begun.search + 1
         LEFT JOIN paired ON paired.search = begun.search
           AND paired.to_at - paired.from_at > limits.ms * interval '1 millisecond'
         ORDER BY begun.search, paired.from_at`,
        [
          members.map(({ search }) => search),
          members.map(({ sensorId }) => sensorId),
          members.map(({ from }) => from),
          searches.map(({ longerThanMs }) => longerThanMs),
        ],
      );
    return searches.map((_, search) => {
      const own = rows.filter((row) => row.search === search);
      return {
        since: own[0]?.since?.getTime() ?? null,
        gaps: own.flatMap(({ from_at: from, to_at: to }) =>
          from === null || to === null ? [] : [{ from: from.getTime(), to: to.getTime() }],
        ),
      };
    });
  }

  /** Removes episodes of watches that began from an instant on, all but some. */
  async removeAllBut(
    tx: Tx,
    removals: readonly {
      readonly watchId: string;
      readonly from: number;
      readonly kept: readonly number[];
    }[],
  ): Promise<void> {
    const kept = removals.flatMap((removal) =>
      removal.kept.map((beganAt) => ({ watchId: removal.watchId, beganAt: new Date(beganAt) })),
    );
    await tx.query(
      `DELETE FROM alert USING unnest($1::uuid[], $2::timestamptz[]) AS removal (watch_id, from_at)
       WHERE alert.watch_id = removal.watch_id AND alert.began_at >= removal.from_at
         AND NOT EXISTS (
           SELECT 1 FROM unnest($3::uuid[], $4::timestamptz[]) AS kept (watch_id, began_at)
           WHERE kept.watch_id = alert.watch_id AND kept.began_at = alert.began_at
         )`,
      [
        removals.map(({ watchId }) => watchId),
        removals.map(({ from }) => new Date(from)),
        kept.map(({ watchId }) => watchId),
        kept.map(({ beganAt }) => beganAt),
      ],
    );
  }
}
