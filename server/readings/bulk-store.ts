import type { PeriodSums } from '@shared/series/period-summary';
import type { Tx } from '../database/transactions';
import { BulkCopy, uuidBytes } from './bulk-copy';
import type { ComputedBulkSums } from './bulk-computed';
import type { BulkSums } from './bulk-track';
import type { TouchedSpan } from './late-readings';
import type { FlaggedSample, SensorOnRoad } from './reading-store';
import { settledUpTo, temperaturesBeside } from './settling';

const sumColumns = [
  'count',
  'covered_ms',
  'min',
  'max',
  'integral_ms',
  'above_threshold_ms',
  'first_at_ms',
  'first_value',
  'last_at_ms',
  'last_value',
] as const;

/** A hygrometer's time on a shelf beside a thermometer's time there. */
export interface StayRow {
  readonly hygrometerId: string;
  readonly from: number;
  readonly to: number;
  readonly leafOffsetC: number;
  readonly thermometerId: string;
  readonly thermometerFrom: number;
  readonly thermometerTo: number;
}

/** Statements over many readings at a time. */
export class BulkStore {
  /** The room's sensors that were ever on a shelf together with one of these, as far as computed quantities hang together. */
  async companions(tx: Tx, sensorIds: readonly string[]): Promise<string[]> {
    const rows: { id: string }[] = await tx.query(
      `SELECT DISTINCT b.id
       FROM placement own
       JOIN sensor s ON s.id = own.sensor_id AND s.quantity IN ('relativeHumidity', 'airTemperature')
       JOIN placement beside ON beside.shelf_id = own.shelf_id
         AND tstzrange(beside.from_at, beside.to_at) && tstzrange(own.from_at, own.to_at)
       JOIN sensor b ON b.id = beside.sensor_id AND b.quantity IN ('relativeHumidity', 'airTemperature')
       WHERE own.sensor_id = ANY($1)`,
      [sensorIds],
    );
    return [...new Set([...sensorIds, ...rows.map(({ id }) => id)])];
  }

  /** Where hygrometers were, with the thermometers that were on the same shelf at any time. */
  async stays(tx: Tx, hygrometerIds: readonly string[]): Promise<StayRow[]> {
    const rows: {
      hygrometer_id: string;
      from_at: Date;
      to_at: Date | null;
      leaf_offset_c: number;
      thermometer_id: string;
      thermometer_from_at: Date;
      thermometer_to_at: Date | null;
    }[] = await tx.query(
      `SELECT p.sensor_id AS hygrometer_id, p.from_at, p.to_at, sh.leaf_offset_c, t.sensor_id AS thermometer_id,
              t.from_at AS thermometer_from_at, t.to_at AS thermometer_to_at
       FROM placement p
       JOIN shelf sh ON sh.id = p.shelf_id
       JOIN placement t ON t.shelf_id = p.shelf_id
       JOIN sensor s ON s.id = t.sensor_id AND s.quantity = 'airTemperature'
       WHERE p.sensor_id = ANY($1) ORDER BY p.sensor_id, p.from_at, t.sensor_id, t.from_at`,
      [hygrometerIds],
    );
    return rows.map((row) => ({
      hygrometerId: row.hygrometer_id,
      from: row.from_at.getTime(),
      to: row.to_at?.getTime() ?? Infinity,
      leafOffsetC: row.leaf_offset_c,
      thermometerId: row.thermometer_id,
      thermometerFrom: row.thermometer_from_at.getTime(),
      thermometerTo: row.thermometer_to_at?.getTime() ?? Infinity,
    }));
  }

  /**
   * Sensors as they stand after some of their readings were removed.
   *
   * @param tx - Of the removal.
   * @param before - As they stood.
   */
  async standing(tx: Tx, before: readonly SensorOnRoad[]): Promise<SensorOnRoad[]> {
    const rows: { id: string; at: Date; value: number; flags: number }[] = await tx.query(
      `SELECT wanted.id, newest.at, newest.value, newest.flags FROM unnest($1::uuid[]) AS wanted (id)
       CROSS JOIN LATERAL (
         SELECT at, value, flags FROM reading WHERE sensor_id = wanted.id ORDER BY at DESC LIMIT 1
       ) AS newest`,
      [before.map(({ id }) => id)],
    );
    const now = before.map((sensor): SensorOnRoad => {
      const newest = rows.find(({ id }) => id === sensor.id);
      const latestAt = newest?.at.getTime() ?? null;
      return {
        ...sensor,
        latestAt,
        latestValue: newest?.value ?? null,
        latestFlags: newest?.flags ?? 0,
      };
    });
    return now.map((sensor) => {
      if (sensor.computedTo === null) return sensor;
      const beside = temperaturesBeside(sensor, now);
      const settledTo = settledUpTo(sensor, beside, ({ latestAt }) => latestAt ?? -Infinity);
      const computedTo = Math.min(sensor.computedTo, settledTo);
      return { ...sensor, computedTo: Number.isFinite(computedTo) ? computedTo : null };
    });
  }

  /** Writes how sensors stand after a removal; one without any reading left has no state. */
  async saveStanding(tx: Tx, sensors: readonly SensorOnRoad[], removedFrom: number): Promise<void> {
    const held = sensors.filter(({ latestAt }) => latestAt !== null);
    const empty = sensors.filter(({ latestAt }) => latestAt === null);
    const emptyIds = empty.map(({ id }) => id);
    // What rests on them and on others beside them has to be judged without them.
    await tx.query(
      `UPDATE sensor_state SET unjudged_from = least(unjudged_from, $2)
       FROM placement own JOIN placement beside ON beside.shelf_id = own.shelf_id AND beside.to_at IS NULL
       WHERE own.sensor_id = ANY($1) AND own.to_at IS NULL AND sensor_state.sensor_id = beside.sensor_id`,
      [emptyIds, new Date(removedFrom)],
    );
    await tx.query('DELETE FROM sensor_state WHERE sensor_id = ANY($1)', [emptyIds]);
    await tx.query(
      `UPDATE sensor_state AS held SET latest_at = new.at, latest_value = new.value, latest_flags = new.flags,
         computed_to = new.computed_to, revision = held.revision + 1
       FROM unnest($1::uuid[], $2::timestamptz[], $3::float8[], $4::smallint[], $5::timestamptz[])
         AS new (sensor_id, at, value, flags, computed_to)
       WHERE held.sensor_id = new.sensor_id`,
      [
        held.map(({ id }) => id),
        held.map(({ latestAt }) => new Date(latestAt ?? 0)),
        held.map(({ latestValue }) => latestValue),
        held.map(({ latestFlags }) => latestFlags),
        held.map(({ computedTo }) => (computedTo === null ? null : new Date(computedTo))),
      ],
    );
  }

  /** Replaces the hourly and daily sums of one sensor where they changed. */
  async replaceSums(tx: Tx, sensorId: string, hours: BulkSums, days: BulkSums): Promise<void> {
    await removeSums(tx, 'hourly_summary', sensorId, hours.stretches);
    await removeSums(tx, 'daily_summary', sensorId, days.stretches);
    const id = uuidBytes(sensorId);
    await copySums(tx, 'hourly_summary', [], hours.sums, (copy) => copy.uuid(id));
    await copySums(tx, 'daily_summary', ['end_at'], days.sums, (copy, { end }) => {
      copy.uuid(id);
      copy.instant(end);
    });
  }

  /** Replaces the hours of a hygrometer's computed quantities where they changed. */
  async replaceComputed(tx: Tx, sensorId: string, computed: readonly ComputedBulkSums[]): Promise<void> {
    const id = uuidBytes(sensorId);
    for (const { quantity, stretches, sums } of computed) {
      await removeSums(tx, 'computed_hourly_summary', sensorId, stretches, quantity);
      await copySums(tx, 'computed_hourly_summary', ['quantity'], sums, (copy) => {
        copy.uuid(id);
        copy.text(quantity);
      });
    }
  }

  /** Puts a file's values in the place of held ones, and remembers those. */
  async replaceReadings(
    tx: Tx,
    sensorId: string,
    fileId: string,
    replacements: readonly FlaggedSample[],
  ): Promise<void> {
    if (replacements.length === 0) return;
    const ats = replacements.map(({ at }) => new Date(at));
    await tx.query(
      `INSERT INTO logger_file_replaced (file_id, sensor_id, at, value, flags, old_file_id)
       SELECT $1, sensor_id, at, value, flags, file_id FROM reading WHERE sensor_id = $2 AND at = ANY($3)`,
      [fileId, sensorId, ats],
    );
    await tx.query(
      `UPDATE reading SET value = new.value, flags = new.flags, file_id = $5
       FROM unnest($2::timestamptz[], $3::float8[], $4::smallint[]) AS new (at, value, flags)
       WHERE reading.sensor_id = $1 AND reading.at = new.at`,
      [sensorId, ats, replacements.map(({ value }) => value), replacements.map(({ flags }) => flags), fileId],
    );
  }
}

async function removeSums(
  tx: Tx,
  table: string,
  sensorId: string,
  stretches: readonly TouchedSpan[],
  quantity: string | null = null,
): Promise<void> {
  if (stretches.length === 0) return;
  const parameters: unknown[] = [
    sensorId,
    stretches.map(({ from }) => instantOf(from)),
    stretches.map(({ to }) => instantOf(to)),
  ];
  if (quantity !== null) parameters.push(quantity);
  await tx.query(
    `DELETE FROM ${table} AS held USING unnest($2::timestamptz[], $3::timestamptz[]) AS touched (from_at, to_at)
     WHERE held.sensor_id = $1 AND held.start_at >= touched.from_at AND held.start_at < touched.to_at
     ${quantity === null ? '' : 'AND held.quantity = $4'}`,
    parameters,
  );
}

function instantOf(at: number): Date | string {
  if (Number.isFinite(at)) return new Date(at);
  return at > 0 ? 'infinity' : '-infinity';
}

async function copySums(
  tx: Tx,
  table: string,
  columns: readonly string[],
  sums: readonly PeriodSums[],
  writeKey: (copy: BulkCopy, sums: PeriodSums) => void,
): Promise<void> {
  if (sums.length === 0) return;
  const copy = await BulkCopy.into(tx, table, ['sensor_id', ...columns, 'start_at', ...sumColumns]);
  for (const one of sums) {
    copy.row(2 + columns.length + sumColumns.length);
    writeKey(copy, one);
    copy.instant(one.start);
    copy.integer(one.count);
    copy.double(one.coveredMs);
    copy.double(one.min);
    copy.double(one.max);
    copy.double(one.integral);
    copy.double(one.aboveThresholdMs);
    copy.double(one.firstAt);
    copy.double(one.firstValue);
    copy.double(one.lastAt);
    copy.double(one.lastValue);
  }
  await copy.end();
}
