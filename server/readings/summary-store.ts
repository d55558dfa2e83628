import type { ComputedQuantity } from '@shared/climate/quantity';
import type { PeriodSums } from '@shared/series/period-summary';
import type { Tx } from '../database/transactions';

/** Which sums: of readings by hour or by the room's day. */
export type SummaryPeriod = 'hour' | 'day';

/** Sums of one sensor's period. */
export interface SensorSums {
  readonly sensorId: string;
  readonly sums: PeriodSums;
}

interface SumsRow {
  sensor_id: string;
  start_at: Date;
  end_at: Date;
  count: number;
  covered_ms: number;
  min: number | null;
  max: number | null;
  integral_ms: number;
  above_threshold_ms: number | null;
  first_at_ms: number | null;
  first_value: number | null;
  last_at_ms: number | null;
  last_value: number | null;
}

const sumColumns = `count, covered_ms, min, max, integral_ms, above_threshold_ms,
  first_at_ms, first_value, last_at_ms, last_value`;
const sumArrays = `$3::int[], $4::float8[], $5::float8[], $6::float8[], $7::float8[], $8::float8[],
  $9::float8[], $10::float8[], $11::float8[], $12::float8[]`;
const sumUpdates = sumColumns
  .split(',')
  .map((column) => `${column.trim()} = excluded.${column.trim()}`)
  .join(', ');

function columnsOf(entries: readonly SensorSums[]): unknown[] {
  const column = (pick: (sums: PeriodSums) => number | null) => entries.map(({ sums }) => pick(sums));
  return [
    entries.map(({ sensorId }) => sensorId),
    entries.map(({ sums }) => new Date(sums.start)),
    column((sums) => sums.count),
    column((sums) => sums.coveredMs),
    column((sums) => sums.min),
    column((sums) => sums.max),
    column((sums) => sums.integral),
    column((sums) => sums.aboveThresholdMs),
    column((sums) => sums.firstAt),
    column((sums) => sums.firstValue),
    column((sums) => sums.lastAt),
    column((sums) => sums.lastValue),
  ];
}

function sumsOf(row: SumsRow): PeriodSums {
  return {
    start: row.start_at.getTime(),
    end: row.end_at.getTime(),
    count: row.count,
    coveredMs: row.covered_ms,
    min: row.min,
    max: row.max,
    integral: row.integral_ms,
    aboveThresholdMs: row.above_threshold_ms,
    firstAt: row.first_at_ms,
    firstValue: row.first_value,
    lastAt: row.last_at_ms,
    lastValue: row.last_value,
  };
}

/** Keeps the sums beside the readings. */
export class SummaryStore {
  /** The last period of each sensor at or before an instant: the ones that in-order readings go on adding to. */
  async newest(tx: Tx, period: SummaryPeriod, sensorIds: readonly string[]): Promise<SensorSums[]> {
    const { table, endAt } = tableOf(period);
    const rows: SumsRow[] = await tx.query(
      `SELECT sensor_id, start_at, ${endAt} AS end_at, ${sumColumns}
       FROM unnest($1::uuid[]) AS wanted (id)
       CROSS JOIN LATERAL (
         SELECT * FROM ${table} WHERE sensor_id = wanted.id ORDER BY start_at DESC LIMIT 1
       ) AS newest`,
      [sensorIds],
    );
    return rows.map((row) => ({ sensorId: row.sensor_id, sums: sumsOf(row) }));
  }

  /** Writes sums over those held for the same periods. */
  async save(tx: Tx, period: SummaryPeriod, entries: readonly SensorSums[]): Promise<void> {
    if (entries.length === 0) return;
    const isDay = period === 'day';
    await tx.query(
      `INSERT INTO ${tableOf(period).table} (sensor_id, start_at, ${sumColumns}${isDay ? ', end_at' : ''})
       SELECT * FROM unnest($1::uuid[], $2::timestamptz[], ${sumArrays}${isDay ? ', $13::timestamptz[]' : ''})
       ON CONFLICT (sensor_id, start_at) DO UPDATE SET ${sumUpdates}`,
      isDay ? [...columnsOf(entries), entries.map(({ sums }) => new Date(sums.end))] : columnsOf(entries),
    );
  }

  /** Replaces all of a sensor's sums in [from, to) by these. */
  async replace(
    tx: Tx,
    period: SummaryPeriod,
    sensorId: string,
    window: { readonly from: number; readonly to: number },
    sums: readonly PeriodSums[],
  ): Promise<void> {
    await tx.query(
      `DELETE FROM ${tableOf(period).table} WHERE sensor_id = $1 AND start_at >= $2 AND start_at < $3`,
      [sensorId, new Date(window.from), new Date(window.to)],
    );
    await this.save(
      tx,
      period,
      sums.map((entry) => ({ sensorId, sums: entry })),
    );
  }

  /** The newest hour of each computed quantity of each humidity sensor. */
  async newestComputed(
    tx: Tx,
    sensorIds: readonly string[],
    quantities: readonly ComputedQuantity[],
  ): Promise<(SensorSums & { quantity: ComputedQuantity })[]> {
    const rows: (SumsRow & { quantity: ComputedQuantity })[] = await tx.query(
      `SELECT newest.*, newest.start_at + interval '1 hour' AS end_at
       FROM unnest($1::uuid[]) AS wanted (id)
       CROSS JOIN unnest($2::text[]) AS computed (name)
       CROSS JOIN LATERAL (
         SELECT * FROM computed_hourly_summary
         WHERE sensor_id = wanted.id AND quantity = computed.name ORDER BY start_at DESC LIMIT 1
       ) AS newest`,
      [sensorIds, quantities],
    );
    return rows.map((row) => ({ sensorId: row.sensor_id, quantity: row.quantity, sums: sumsOf(row) }));
  }

  /** Writes hours of computed quantities over those held. */
  async saveComputed(
    tx: Tx,
    entries: readonly (SensorSums & { quantity: ComputedQuantity })[],
  ): Promise<void> {
    if (entries.length === 0) return;
    await tx.query(
      `INSERT INTO computed_hourly_summary (sensor_id, start_at, ${sumColumns}, quantity)
       SELECT * FROM unnest($1::uuid[], $2::timestamptz[], ${sumArrays}, $13::text[])
       ON CONFLICT (sensor_id, quantity, start_at) DO UPDATE SET ${sumUpdates}`,
      [...columnsOf(entries), entries.map(({ quantity }) => quantity)],
    );
  }

  /** Replaces a humidity sensor's computed hours in [from, to). */
  async replaceComputed(
    tx: Tx,
    sensorId: string,
    window: { readonly from: number; readonly to: number },
    entries: readonly { quantity: ComputedQuantity; sums: PeriodSums }[],
  ): Promise<void> {
    await tx.query(
      'DELETE FROM computed_hourly_summary WHERE sensor_id = $1 AND start_at >= $2 AND start_at < $3',
      [sensorId, new Date(window.from), new Date(window.to)],
    );
    await this.saveComputed(
      tx,
      entries.map((entry) => ({ sensorId, ...entry })),
    );
  }
}

function tableOf(period: SummaryPeriod): { table: string; endAt: string } {
  return period === 'hour'
    ? { table: 'hourly_summary', endAt: "start_at + interval '1 hour'" }
    : { table: 'daily_summary', endAt: 'end_at' };
}
