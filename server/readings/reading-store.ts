import type { MeasuredQuantity } from '@shared/climate/quantity';
import { FIRST_FAILED_FLAGS } from '@shared/series/quality-tests';
import type { Sample } from '@shared/series/series';
import type { Tx } from '../database/transactions';

/** A sensor as the road of a reading needs it, with where its stream stands. */
export interface SensorOnRoad {
  readonly id: string;
  readonly roomId: string;
  readonly timeZone: string;
  readonly quantity: MeasuredQuantity;
  readonly expectedIntervalS: number;
  readonly lightThreshold: number | null;
  /** Where it is now. */
  readonly shelfId: string | null;
  /** Since when it is there [ms]. */
  readonly placedAt: number | null;
  /** Lux for one µmol m⁻² s⁻¹ under the lamp there; null without a lamp. */
  readonly luxPerUmol: number | null;
  readonly latestAt: number | null;
  readonly latestValue: number | null;
  readonly latestFlags: number;
  readonly revision: number;
  readonly computedTo: number | null;
  /** From where its readings wait for their second look [ms]; null when none do. */
  readonly unjudgedFrom: number | null;
}

/** A reading with its quality flags. */
export interface FlaggedSample extends Sample {
  readonly flags: number;
}

/** Where a stream has moved to. */
export interface MovedState {
  readonly sensorId: string;
  readonly latest: FlaggedSample;
  readonly computedTo: number | null;
  /** Where the sensor's readings first changed [ms]; null when they did not. */
  readonly changedFrom: number | null;
}

/** Readings of one sensor to be written. */
export interface SensorReadings {
  readonly sensorId: string;
  readonly samples: readonly FlaggedSample[];
}

interface SensorRow {
  id: string;
  room_id: string;
  time_zone: string;
  quantity: MeasuredQuantity;
  expected_interval_s: number;
  light_threshold: number | null;
  shelf_id: string | null;
  placed_at: Date | null;
  lux_per_umol: number | null;
  latest_at: Date | null;
  latest_value: number | null;
  latest_flags: number | null;
  revision: number | null;
  computed_to: Date | null;
  unjudged_from: Date | null;
}

/** Queries over readings and the state of their sensors. */
export class ReadingStore {
  /**
   * Sensors together with the humidity and air temperature sensors that share a shelf with one of them, because their
   * computed quantities hang together.
   */
  async withCompanions(tx: Tx, sensorIds: readonly string[]): Promise<string[]> {
    const rows: { sensor_id: string }[] = await tx.query(
      `SELECT DISTINCT beside.sensor_id
       FROM placement own
       JOIN sensor s ON s.id = own.sensor_id AND s.quantity IN ('relativeHumidity', 'airTemperature')
       JOIN placement beside ON beside.shelf_id = own.shelf_id AND beside.to_at IS NULL
       JOIN sensor b ON b.id = beside.sensor_id AND b.quantity IN ('relativeHumidity', 'airTemperature')
       WHERE own.to_at IS NULL AND own.sensor_id = ANY($1)`,
      [sensorIds],
    );
    return [...new Set([...sensorIds, ...rows.map((row) => row.sensor_id)])];
  }

  /**
   * Locks sensors against other changes of their readings, in one order everywhere so that nobody waits in a ring.
   *
   * @returns The sensors that exist, with their state.
   */
  async lockSensors(tx: Tx, sensorIds: readonly string[]): Promise<SensorOnRoad[]> {
    const rows: SensorRow[] = await tx.query(
      `SELECT s.id, s.room_id, r.time_zone, s.quantity, s.expected_interval_s, s.light_threshold, p.shelf_id,
              p.from_at AS placed_at,
              (SELECT lux_per_umol FROM lamp l WHERE l.shelf_id = p.shelf_id AND l.removed_on IS NULL
               ORDER BY l.fitted_on DESC, l.id LIMIT 1) AS lux_per_umol,
              st.latest_at, st.latest_value, st.latest_flags, st.revision, st.computed_to,
              st.unjudged_from
       FROM sensor s
       JOIN room r ON r.id = s.room_id
       LEFT JOIN placement p ON p.sensor_id = s.id AND p.to_at IS NULL
       LEFT JOIN sensor_state st ON st.sensor_id = s.id
       WHERE s.id = ANY($1) ORDER BY s.id FOR NO KEY UPDATE OF s`,
      [sensorIds],
    );
    return rows.map(sensorOnRoad);
  }

  /** Writes readings that are known not to be held. */
  async insert(tx: Tx, readings: readonly SensorReadings[], fileId: string | null): Promise<void> {
    const columns = {
      sensors: [] as string[],
      ats: [] as Date[],
      values: [] as number[],
      flags: [] as number[],
    };
    for (const { sensorId, samples } of readings) {
      for (const { at, value, flags } of samples) {
        columns.sensors.push(sensorId);
        columns.ats.push(new Date(at));
        columns.values.push(value);
        columns.flags.push(flags);
      }
    }
    if (columns.sensors.length === 0) return;
    await tx.query(
      `INSERT INTO reading (sensor_id, at, value, flags, file_id)
       SELECT sensor_id, at, value, flags, $5
       FROM unnest($1::uuid[], $2::timestamptz[], $3::float8[], $4::smallint[]) AS new (sensor_id, at, value, flags)`,
      [columns.sensors, columns.ats, columns.values, columns.flags, fileId],
    );
  }

  /**
   * Which of these instants a sensor holds a value for.
   *
   * @returns Value by instant [ms].
   */
  async heldAt(tx: Tx, sensorId: string, ats: readonly number[]): Promise<Map<number, number>> {
    const rows: { at: Date; value: number }[] = await tx.query(
      'SELECT at, value FROM reading WHERE sensor_id = $1 AND at = ANY($2)',
      [sensorId, ats.map((at) => new Date(at))],
    );
    return new Map(rows.map((row) => [row.at.getTime(), row.value]));
  }

  /** Readings of a sensor in [from, to), in order; with `includeFailed` those that failed their tests too. */
  async between(
    tx: Tx,
    sensorId: string,
    from: number,
    to: number,
    includeFailed = false,
  ): Promise<FlaggedSample[]> {
    const rows: { at: Date; value: number; flags: number }[] = await tx.query(
      `SELECT at, value, flags FROM reading
       WHERE sensor_id = $1 AND at >= $2 AND at < $3 AND flags < $4 ORDER BY at`,
      [sensorId, new Date(from), instantOrInfinity(to), includeFailed ? 32_767 : FIRST_FAILED_FLAGS],
    );
    return rows.map((row) => ({ at: row.at.getTime(), value: row.value, flags: row.flags }));
  }

  /** The last good reading before an instant, and the first one at or after another. */
  async neighbours(
    tx: Tx,
    sensorId: string,
    before: number,
    after: number,
  ): Promise<{ previous: Sample | null; next: Sample | null }> {
    const rows: { side: string; at: Date; value: number }[] = await tx.query(
      `(SELECT 'previous' AS side, at, value FROM reading
        WHERE sensor_id = $1 AND at < $2 AND flags < $4 ORDER BY at DESC LIMIT 1)
       UNION ALL
       (SELECT 'next', at, value FROM reading
        WHERE sensor_id = $1 AND at >= $3 AND flags < $4 ORDER BY at LIMIT 1)`,
      [sensorId, new Date(before), instantOrInfinity(after), FIRST_FAILED_FLAGS],
    );
    const find = (side: string): Sample | null => {
      const row = rows.find((candidate) => candidate.side === side);
      return row === undefined ? null : { at: row.at.getTime(), value: row.value };
    };
    return { previous: find('previous'), next: find('next') };
  }

  /** Writes new flags where the tests judge anew. */
  async updateFlags(tx: Tx, sensorId: string, changed: readonly FlaggedSample[]): Promise<void> {
    if (changed.length === 0) return;
    await tx.query(
      `UPDATE reading SET flags = new.flags
       FROM unnest($2::timestamptz[], $3::smallint[]) AS new (at, flags)
       WHERE reading.sensor_id = $1 AND reading.at = new.at`,
      [sensorId, changed.map(({ at }) => new Date(at)), changed.map(({ flags }) => flags)],
    );
  }

  /**
   * Moves the streams on: newest reading, revision, how far computed quantities are summed, and what waits for the second
   * look of the alerts.
   */
  async saveStates(tx: Tx, states: readonly MovedState[]): Promise<void> {
    if (states.length === 0) return;
    await tx.query(
      `INSERT INTO sensor_state AS held
         (sensor_id, latest_at, latest_value, latest_flags, revision, computed_to, unjudged_from)
       SELECT sensor_id, at, value, flags, 1, computed_to, unjudged_from
       FROM unnest($1::uuid[], $2::timestamptz[], $3::float8[], $4::smallint[], $5::timestamptz[], $6::timestamptz[])
         AS new (sensor_id, at, value, flags, computed_to, unjudged_from)
       ON CONFLICT (sensor_id) DO UPDATE SET
         latest_at = excluded.latest_at, latest_value = excluded.latest_value,
         latest_flags = excluded.latest_flags, computed_to = excluded.computed_to,
         unjudged_from = least(held.unjudged_from, excluded.unjudged_from),
         revision = held.revision + 1`,
      [
        states.map(({ sensorId }) => sensorId),
        states.map(({ latest }) => new Date(latest.at)),
        states.map(({ latest }) => latest.value),
        states.map(({ latest }) => latest.flags),
        states.map(({ computedTo }) => dateOrNull(computedTo)),
        states.map(({ changedFrom }) => dateOrNull(changedFrom)),
      ],
    );
  }

  /** Every sensor of a room. */
  async sensorsOfRoom(tx: Tx, roomId: string): Promise<string[]> {
    const rows: { id: string }[] = await tx.query('SELECT id FROM sensor WHERE room_id = $1', [roomId]);
    return rows.map(({ id }) => id);
  }

  /** The sensors that are now on a shelf. */
  async sensorsOnShelf(tx: Tx, shelfId: string): Promise<string[]> {
    const rows: { sensor_id: string }[] = await tx.query(
      'SELECT sensor_id FROM placement WHERE shelf_id = $1 AND to_at IS NULL',
      [shelfId],
    );
    return rows.map((row) => row.sensor_id);
  }

  /** Makes every process read these streams anew. */
  async reviseStates(tx: Tx, sensorIds: readonly string[]): Promise<void> {
    await tx.query('UPDATE sensor_state SET revision = revision + 1 WHERE sensor_id = ANY($1)', [sensorIds]);
  }

  /** Makes sure that the months of a span have their partitions. */
  async ensurePartitions(tx: Tx, from: number, to: number): Promise<void> {
    await tx.query('SELECT ensure_reading_partitions($1, $2)', [new Date(from), new Date(to)]);
  }
}

function dateOrNull(at: number | null): Date | null {
  return at === null ? null : new Date(at);
}

function instantOrInfinity(at: number): Date | string {
  return Number.isFinite(at) ? new Date(at) : 'infinity';
}

function sensorOnRoad(row: SensorRow): SensorOnRoad {
  return {
    id: row.id,
    roomId: row.room_id,
    timeZone: row.time_zone,
    quantity: row.quantity,
    expectedIntervalS: row.expected_interval_s,
    lightThreshold: row.light_threshold,
    shelfId: row.shelf_id,
    placedAt: row.placed_at?.getTime() ?? null,
    luxPerUmol: row.lux_per_umol,
    latestAt: row.latest_at?.getTime() ?? null,
    latestValue: row.latest_value,
    latestFlags: row.latest_flags ?? 0,
    revision: row.revision ?? 0,
    computedTo: row.computed_to?.getTime() ?? null,
    unjudgedFrom: row.unjudged_from?.getTime() ?? null,
  };
}
