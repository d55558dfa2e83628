import type { MeasuredQuantity, Quantity } from '@shared/climate/quantity';
import { isMeasured } from '@shared/climate/quantity';
import type { PeriodSums } from '@shared/series/period-summary';
import type { Tx } from '../database/transactions';

/** A sensor's time on a shelf, cut to the span asked for [ms]. */
export interface SensorSpan {
  readonly sensorId: string;
  readonly deviceName: string;
  readonly quantity: MeasuredQuantity;
  readonly expectedIntervalS: number;
  readonly lightThreshold: number | null;
  readonly from: number;
  readonly to: number;
  /** Readings in its hours, as summed. */
  readonly count: number;
}

/** Sums of several hours taken together. */
export interface Bucket {
  readonly start: number;
  readonly min: number | null;
  readonly max: number | null;
  readonly integral: number;
  readonly coveredMs: number;
}

/** An hour as statistics over long spans need it. */
export type HourSums = Pick<PeriodSums, 'start' | 'min' | 'max' | 'integral' | 'coveredMs'>;

interface BucketRow {
  start_at: Date;
  min: number | null;
  max: number | null;
  integral_ms: number;
  covered_ms: number;
}

/** Queries for charts and tables. */
export class SeriesStore {
  /**
   * The sensors that measured a quantity on a shelf in a span; for a computed quantity, its humidity sensors.
   *
   * @returns In order of their time there.
   */
  async sensorsOn(
    tx: Tx,
    shelfId: string,
    quantity: Quantity,
    from: number,
    to: number,
  ): Promise<SensorSpan[]> {
    const measured = isMeasured(quantity) ? quantity : 'relativeHumidity';
    const rows: (Omit<SensorSpan, 'from' | 'to' | 'count'> & { from: Date; to: Date; count: string })[] =
      await tx.query(
        `SELECT s.id AS "sensorId", d.name AS "deviceName", s.quantity,
                s.expected_interval_s AS "expectedIntervalS", s.light_threshold AS "lightThreshold",
                greatest(p.from_at, $3) AS "from", least(p.to_at, $4) AS "to",
                (SELECT coalesce(sum(h.count), 0) FROM hourly_summary h
                 WHERE h.sensor_id = s.id AND h.start_at >= greatest(p.from_at, $3) - interval '1 hour'
                   AND h.start_at < least(p.to_at, $4)) AS count
         FROM placement p
         JOIN sensor s ON s.id = p.sensor_id AND s.quantity = $2
         JOIN device d ON d.id = s.device_id
         WHERE p.shelf_id = $1 AND tstzrange(p.from_at, p.to_at) && tstzrange($3, $4)
         ORDER BY p.from_at, s.id`,
        [shelfId, measured, new Date(from), new Date(to)],
      );
    return rows.map((row) => ({
      ...row,
      from: row.from.getTime(),
      to: row.to.getTime(),
      count: Number(row.count),
    }));
  }

  /**
   * Sums of a series in equal buckets of whole hours.
   *
   * @param span - The sensor's time on the shelf.
   * @param hours - Width of a bucket [h], 1 or more.
   */
  async buckets(tx: Tx, span: SensorSpan, quantity: Quantity, hours: number): Promise<Bucket[]> {
    const isOwn = isMeasured(quantity);
    const rows: BucketRow[] = await tx.query(
      `SELECT date_bin(make_interval(hours => $4), start_at, date_trunc('hour', $2::timestamptz)) AS start_at,
              min(min) AS min, max(max) AS max, sum(integral_ms) AS integral_ms, sum(covered_ms) AS covered_ms
       FROM ${isOwn ? 'hourly_summary' : 'computed_hourly_summary'}
       WHERE sensor_id = $1 AND start_at >= date_trunc('hour', $2::timestamptz) AND start_at < $3
         ${isOwn ? '' : 'AND quantity = $5'}
       GROUP BY 1 ORDER BY 1`,
      [span.sensorId, new Date(span.from), new Date(span.to), hours, ...(isOwn ? [] : [quantity])],
    );
    return rows.map((row) => ({
      start: row.start_at.getTime(),
      min: row.min,
      max: row.max,
      integral: row.integral_ms,
      coveredMs: row.covered_ms,
    }));
  }

  /** Sums of a light sensor by the room's day. */
  async days(
    tx: Tx,
    span: SensorSpan,
  ): Promise<
    { start: number; end: number; integral: number; coveredMs: number; aboveThresholdMs: number }[]
  > {
    const rows: {
      start_at: Date;
      end_at: Date;
      integral_ms: number;
      covered_ms: number;
      above_threshold_ms: number | null;
    }[] = await tx.query(
      `SELECT start_at, end_at, integral_ms, covered_ms, above_threshold_ms FROM daily_summary
       WHERE sensor_id = $1 AND end_at > $2 AND start_at < $3 ORDER BY start_at`,
      [span.sensorId, new Date(span.from), new Date(span.to)],
    );
    return rows.map((row) => ({
      start: row.start_at.getTime(),
      end: row.end_at.getTime(),
      integral: row.integral_ms,
      coveredMs: row.covered_ms,
      aboveThresholdMs: row.above_threshold_ms ?? 0,
    }));
  }

  /** Lux for one µmol m⁻² s⁻¹ under the newest lamp of a shelf; null without a lamp. */
  async luxPerUmolOf(tx: Tx, shelfId: string): Promise<number | null> {
    const rows: { lux_per_umol: number }[] = await tx.query(
      `SELECT lux_per_umol FROM lamp WHERE shelf_id = $1 AND removed_on IS NULL
       ORDER BY fitted_on DESC, id LIMIT 1`,
      [shelfId],
    );
    return rows[0]?.lux_per_umol ?? null;
  }

  /** What was ever measured on a shelf, and since when. */
  async everMeasured(
    tx: Tx,
    shelfId: string,
  ): Promise<{ quantities: MeasuredQuantity[]; firstAt: Date | null }> {
    const rows: { quantity: MeasuredQuantity; first_at: Date | null }[] = await tx.query(
      `SELECT s.quantity, min((
          SELECT min(h.start_at) FROM hourly_summary h
          WHERE h.sensor_id = s.id AND h.start_at >= p.from_at - interval '1 hour'
       )) AS first_at
       FROM placement p JOIN sensor s ON s.id = p.sensor_id
       WHERE p.shelf_id = $1 GROUP BY s.quantity ORDER BY s.quantity`,
      [shelfId],
    );
    const firsts = rows.flatMap((row) => (row.first_at === null ? [] : [row.first_at]));
    return {
      quantities: rows.map((row) => row.quantity),
      firstAt: firsts.length === 0 ? null : new Date(Math.min(...firsts.map((at) => at.getTime()))),
    };
  }
}
