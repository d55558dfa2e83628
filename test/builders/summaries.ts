import type { Tx } from '../../server/database/transactions';
import { DailySummaryEntity } from '../../server/readings/daily-summary-entity';

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

const DAY_MS = 86_400_000;

/**
 * Days of light that a sensor measured whole, as sums alone.
 *
 * @param tx - The test's database.
 * @param sensorId - Of a sensor for PPFD.
 * @param light - End of the last day, daily light integrals in order [mol m⁻² d⁻¹], and hours of light a day.
 */
export async function litDays(
  tx: Tx,
  sensorId: string,
  {
    until,
    sums,
    hours = 14,
  }: { readonly until: string; readonly sums: readonly number[]; readonly hours?: number },
): Promise<void> {
  for (const [index, dliMolM2D] of sums.entries()) {
    const start = Date.parse(until) - (sums.length - index) * DAY_MS;
    await tx.insert(DailySummaryEntity, {
      sensorId,
      startAt: new Date(start),
      endAt: new Date(start + DAY_MS),
      count: 288,
      coveredMs: DAY_MS,
      min: 0,
      max: 200,
      integralMs: dliMolM2D * 1e9,
      aboveThresholdMs: hours * 3_600_000,
    });
  }
}
