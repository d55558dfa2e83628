import { FIRST_FAILED_FLAGS } from '@shared/series/quality-tests';
import type { Tx } from '../database/transactions';

/** A stretch in which a light sensor saw light [ms]. */
export interface LitSpan {
  readonly sensorId: string;
  readonly from: number;
  readonly to: number;
}

/** A light sensor with its threshold. */
export interface LightSensor {
  readonly sensorId: string;
  readonly threshold: number;
  readonly maxGapMs: number;
}

/** Finds when it was light. */
export class LightStore {
  /**
   * Stretches of light, found in the database so that only changes travel.
   *
   * @param tx - Any.
   * @param sensors - Which, each with its own threshold.
   * @param from - Start [ms], inclusive.
   * @param to - End [ms], exclusive.
   * @returns Stretches in order for each sensor; a gap in the readings ends one.
   */
  async litSpans(tx: Tx, sensors: readonly LightSensor[], from: number, to: number): Promise<LitSpan[]> {
    if (sensors.length === 0) return [];
    const rows: { sensor_id: string; from_at: Date; to_at: Date }[] = await tx.query(
      `WITH seen AS (
         SELECT r.sensor_id, r.at, r.value >= s.threshold AS lit,
                lead(r.at) OVER own AS next_at, s.max_gap_ms
         FROM unnest($1::uuid[], $2::float8[], $3::float8[]) AS s (sensor_id, threshold, max_gap_ms)
         JOIN reading r ON r.sensor_id = s.sensor_id
         WHERE r.at >= $4 AND r.at < $5 AND r.flags < $6
         WINDOW own AS (PARTITION BY r.sensor_id ORDER BY r.at)
       ), marked AS (
         SELECT *, lag(lit) OVER own AS was_lit,
                lag(next_at - at > max_gap_ms * interval '1 millisecond') OVER own AS after_gap
         FROM seen WINDOW own AS (PARTITION BY sensor_id ORDER BY at)
       ), stretches AS (
         SELECT *, count(*) FILTER (WHERE was_lit IS DISTINCT FROM lit OR after_gap) OVER (
                     PARTITION BY sensor_id ORDER BY at) AS stretch
         FROM marked
       )
       SELECT sensor_id, min(at) AS from_at,
              max(CASE WHEN next_at - at <= max_gap_ms * interval '1 millisecond' THEN next_at ELSE at END) AS to_at
       FROM stretches WHERE lit
       GROUP BY sensor_id, stretch ORDER BY sensor_id, from_at`,
      [
        sensors.map(({ sensorId }) => sensorId),
        sensors.map(({ threshold }) => threshold),
        sensors.map(({ maxGapMs }) => maxGapMs),
        new Date(from),
        new Date(to),
        FIRST_FAILED_FLAGS,
      ],
    );
    return rows
      .map((row) => ({ sensorId: row.sensor_id, from: row.from_at.getTime(), to: row.to_at.getTime() }))
      .filter((span) => span.from < span.to);
  }
}
