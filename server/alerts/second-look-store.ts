import { qualityLevel } from '@shared/series/quality-tests';
import type { Tx } from '../database/transactions';
import type { ReadColumns } from './second-look';

/** A finished day of a light sensor. */
export interface DayOfLight {
  /** The room's day [ms], half-open. */
  readonly startAt: number;
  readonly endAt: number;
  readonly lightHours: number;
  /** Of its readings over time [µmol m⁻² s⁻¹ · ms, or lx · ms]. */
  readonly integralMs: number;
  /** Share of the day that readings speak for, 0 to 1. */
  readonly coverage: number;
}

/** A sensor whose readings have not had their second look. */
export interface UnjudgedSensor {
  readonly id: string;
  readonly shelfId: string | null;
  readonly deviceId: string | null;
  /** Whether more than a day of readings waits, as after a file. */
  readonly isLong: boolean;
}

/** A shelf, as far as looks at its sensors need it. */
export interface LookedAtShelf {
  /** How much warmer than the air its leaves are [°C]. */
  readonly leafOffsetC: number;
  /** When a sensor was last taken away from it [ms]; 0 for never. */
  readonly leftAt: number;
}

/** Where sensors are that somebody else holds. */
export interface HeldPlaces {
  readonly shelfIds: ReadonlySet<string | null>;
  readonly deviceIds: ReadonlySet<string | null>;
}

/** Readings of a sensor in [from, to) [ms]; `from` is a whole minute. */
export interface ReadingSpan {
  readonly sensorId: string;
  readonly from: number;
  readonly to: number;
  /** Whether it has many readings a minute. */
  readonly isDense: boolean;
}

interface ReadingRow {
  sensor_id: string;
  at: number;
  value: number;
  flags: number;
}

/** Sorted within, so that PostgreSQL asks the index for each span; joined, it would read the whole table. */
const everyReading = `
  SELECT span.sensor_id, (extract(epoch FROM first.at) * 1000)::float8 AS at, first.value, first.flags
  FROM unnest($1::uuid[], $2::timestamptz[], $3::timestamptz[]) AS span (sensor_id, from_at, to_at)
  CROSS JOIN LATERAL (
    SELECT DISTINCT ON (date_bin('1 minute', r.at, 'epoch')) r.at, r.value, r.flags FROM reading r
    WHERE r.sensor_id = span.sensor_id AND r.at >= span.from_at AND r.at < span.to_at
    ORDER BY date_bin('1 minute', r.at, 'epoch'), r.at
  ) AS first
  ORDER BY span.sensor_id, first.at`;
/** Asks the index once a minute rather than read all that lies between. */
const minuteByMinute = `
  SELECT span.sensor_id, (extract(epoch FROM first.at) * 1000)::float8 AS at, first.value, first.flags
  FROM unnest($1::uuid[], $2::timestamptz[], $3::timestamptz[]) AS span (sensor_id, from_at, to_at)
  CROSS JOIN LATERAL generate_series(span.from_at, span.to_at, interval '1 minute') AS minute
  CROSS JOIN LATERAL (
    SELECT r.at, r.value, r.flags FROM reading r
    WHERE r.sensor_id = span.sensor_id AND r.at >= minute
      AND r.at < least(minute + interval '1 minute', span.to_at)
    ORDER BY r.at LIMIT 1
  ) AS first
  ORDER BY span.sensor_id, minute`;
const DAY_MS = 86_400_000;

/** Queries for the second look at readings. */
export class SecondLookStore {
  /** Some sensors that wait for their second look, room by room. */
  async unjudged(tx: Tx, most: number): Promise<UnjudgedSensor[]> {
    return tx.query(
      `SELECT s.id, p.shelf_id AS "shelfId", s.device_id AS "deviceId",
              st.latest_at - st.unjudged_from > interval '1 day' AS "isLong"
       FROM sensor_state st
       JOIN sensor s ON s.id = st.sensor_id
       LEFT JOIN placement p ON p.sensor_id = s.id AND p.to_at IS NULL
       WHERE st.unjudged_from IS NOT NULL ORDER BY s.room_id, p.shelf_id, s.id LIMIT $1`,
      [most],
    );
  }

  /** The sensors on shelves and those of devices. */
  async sensorsOf(tx: Tx, shelfIds: readonly string[], deviceIds: readonly string[]): Promise<string[]> {
    const rows: { id: string }[] = await tx.query(
      `SELECT sensor_id AS id FROM placement WHERE shelf_id = ANY($1) AND to_at IS NULL
       UNION SELECT id FROM sensor WHERE device_id = ANY($2)`,
      [shelfIds, deviceIds],
    );
    return rows.map(({ id }) => id);
  }

  /**
   * Locks those of some sensors that nobody else holds.
   *
   * @returns Shelves and devices of the others, which are held by live batches for moments and by files for as long as
   *   those come in.
   */
  async lockFree(tx: Tx, sensorIds: readonly string[]): Promise<HeldPlaces> {
    const locked: { id: string }[] = await tx.query(
      'SELECT id FROM sensor WHERE id = ANY($1) ORDER BY id FOR NO KEY UPDATE SKIP LOCKED',
      [sensorIds],
    );
    const free = new Set(locked.map(({ id }) => id));
    const held = sensorIds.filter((id) => !free.has(id));
    if (held.length === 0) return { shelfIds: new Set(), deviceIds: new Set() };
    const rows: { shelf_id: string | null; device_id: string }[] = await tx.query(
      `SELECT p.shelf_id, s.device_id FROM sensor s
       LEFT JOIN placement p ON p.sensor_id = s.id AND p.to_at IS NULL WHERE s.id = ANY($1)`,
      [held],
    );
    return {
      shelfIds: new Set(rows.map((row) => row.shelf_id)),
      deviceIds: new Set(rows.map((row) => row.device_id)),
    };
  }

  /** Notes that sensors have had their second look. */
  async noteJudged(tx: Tx, sensorIds: readonly string[]): Promise<void> {
    await tx.query('UPDATE sensor_state SET unjudged_from = NULL WHERE sensor_id = ANY($1)', [sensorIds]);
  }

  /** What is to be known of shelves beside the sensors that are on them. */
  async shelves(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, LookedAtShelf>> {
    const rows: { id: string; leaf_offset_c: number; left_at: Date | null }[] = await tx.query(
      `SELECT id, leaf_offset_c, (SELECT max(to_at) FROM placement WHERE shelf_id = shelf.id) AS left_at
       FROM shelf WHERE id = ANY($1)`,
      [shelfIds],
    );
    return new Map(
      rows.map((row) => [row.id, { leafOffsetC: row.leaf_offset_c, leftAt: row.left_at?.getTime() ?? 0 }]),
    );
  }

  /**
   * Readings in order, failed ones included, the first of each minute: what has a second look takes longer than that.
   *
   * @returns Columns by sensor; a sensor without any has none.
   */
  async readings(tx: Tx, spans: readonly ReadingSpan[]): Promise<Map<string, ReadColumns>> {
    const dense = spans.filter(({ isDense }) => isDense);
    const sparse = spans.filter(({ isDense }) => !isDense);
    const rows = [
      ...(await this.read(tx, dense, minuteByMinute)),
      ...(await this.read(tx, sparse, everyReading)),
    ];
    const bySensor = new Map<string, ColumnsInWork>();
    for (const { sensor_id: sensorId, at, value, flags } of rows) {
      let columns = bySensor.get(sensorId);
      if (columns === undefined) {
        columns = { times: [], values: [], flags: [], qualities: [] };
        bySensor.set(sensorId, columns);
      }
      columns.times.push(at);
      columns.values.push(value);
      columns.flags.push(flags);
      columns.qualities.push(qualityLevel(flags));
    }
    return bySensor;
  }

  private async read(tx: Tx, spans: readonly ReadingSpan[], sql: string): Promise<ReadingRow[]> {
    if (spans.length === 0) return [];
    return tx.query(sql, [
      spans.map(({ sensorId }) => sensorId),
      spans.map(({ from }) => new Date(from)),
      spans.map(({ to }) => new Date(to)),
    ]);
  }

  /** Which sensors reached a value in an hour of their span. */
  async reached(tx: Tx, spans: readonly ReadingSpan[], value: number): Promise<ReadonlySet<string>> {
    if (spans.length === 0) return new Set();
    const rows: { id: string }[] = await tx.query(
      `SELECT DISTINCT span.id FROM unnest($1::uuid[], $2::timestamptz[], $3::timestamptz[]) AS span (id, from_at, to_at)
       JOIN hourly_summary h ON h.sensor_id = span.id
         AND h.start_at >= date_trunc('hour', span.from_at, 'UTC') AND h.start_at < span.to_at AND h.max >= $4`,
      [
        spans.map(({ sensorId }) => sensorId),
        spans.map(({ from }) => new Date(from)),
        spans.map(({ to }) => new Date(to)),
        value,
      ],
    );
    return new Set(rows.map(({ id }) => id));
  }

  /** Finished days of a light sensor that end in [from, to]. */
  async lightDays(tx: Tx, sensorId: string, from: number, to: number): Promise<DayOfLight[]> {
    const rows: {
      start_at: Date;
      end_at: Date;
      covered_ms: number;
      above_threshold_ms: number;
      integral_ms: number;
    }[] = await tx.query(
      `SELECT start_at, end_at, covered_ms, above_threshold_ms, integral_ms FROM daily_summary
       WHERE sensor_id = $1 AND above_threshold_ms IS NOT NULL
         AND start_at >= $4 AND end_at >= $2 AND end_at <= $3 ORDER BY start_at`,
      // The key begins with the start; no day is longer than two.
      [sensorId, new Date(from), new Date(to), new Date(from - 2 * DAY_MS)],
    );
    return rows.map((row) => ({
      startAt: row.start_at.getTime(),
      endAt: row.end_at.getTime(),
      lightHours: row.above_threshold_ms / 3_600_000,
      integralMs: row.integral_ms,
      coverage: row.covered_ms / (row.end_at.getTime() - row.start_at.getTime()),
    }));
  }
}

type ColumnsInWork = { [Column in keyof ReadColumns]: ReadColumns[Column][number][] };
