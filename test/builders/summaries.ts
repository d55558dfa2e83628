import type { Tx } from '../../server/database/transactions';

/**
 * Hours of a sensor that measured the same all the time, as sums alone: for what reads sums and no readings.
 *
 * @param tx - The test's database.
 * @param sensorId - Whose.
 * @param span - First hour, the hour after the last, and the value in the stored unit.
 */
export async function steadyHours(
  tx: Tx,
  sensorId: string,
  { from, to, value }: { readonly from: string; readonly to: string; readonly value: number },
): Promise<void> {
  await tx.query(
    `INSERT INTO hourly_summary
       (sensor_id, start_at, count, covered_ms, min, max, integral_ms, first_at_ms, last_at_ms, last_value)
     SELECT $1, hour, 12, 3600000, $4::float8, $4, $4 * 3600000, extract(epoch FROM hour) * 1000,
       extract(epoch FROM hour) * 1000 + 3300000, $4
     FROM generate_series($2::timestamptz, $3::timestamptz - interval '1 hour', interval '1 hour') AS hour`,
    [sensorId, from, to, value],
  );
}
