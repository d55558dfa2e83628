import type { Sample } from '@shared/series/series';
import type { WantedRange } from '@shared/contracts/rooms';
import type { AlertSources } from '../../server/alerts/alert-evaluation-service';
import { Transactions, type Tx } from '../../server/database/transactions';
import { intakeParts, type IntakeParts } from '../../server/readings/intake-parts';
import type { DataSource } from 'typeorm';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf } from '../builders/rooms';

/** A wanted range for air and VPD, tight enough that ordinary test series leave it. */
export const tightRanges: WantedRange[] = [
  {
    quantity: 'airTemperature',
    lampsOn: { low: 18, high: 24 },
    lampsOff: { low: 18, high: 24 },
    holdMinutes: 10,
    clearingMargin: 0.5,
    reason: 'for the test',
    since: '2026-01-01T00:00:00Z',
  },
  {
    quantity: 'vapourPressureDeficit',
    lampsOn: { low: 0.4, high: 1.2 },
    lampsOff: { low: 0.4, high: 1.2 },
    holdMinutes: 10,
    clearingMargin: 0.05,
    reason: 'for the test',
    since: '2026-01-01T00:00:00Z',
  },
];

/** What shelves are meant to have. */
export type Plans = Pick<AlertSources, 'wantedRangesOf' | 'plannedLamps'>;

/** Every shelf wants {@link tightRanges} and is never lit. */
export const unlitAndTight: Plans = {
  wantedRangesOf: async (_tx, shelfIds) => new Map(shelfIds.map((id) => [id, tightRanges])),
  plannedLamps: async () => new Map(),
};

/** The road with nobody to write to. */
export function roadOver(
  dataSource: DataSource,
  plans: Plans = unlitAndTight,
): IntakeParts & { transactions: Transactions } {
  const transactions = new Transactions(dataSource);
  const parts = intakeParts(transactions, plans, {
    tellOpened: async () => undefined,
    tellCleared: async () => undefined,
  });
  return { ...parts, transactions };
}

/** Ids of a shelf's thermometer and hygrometer. */
export interface ShelfSensors {
  readonly temperature: string;
  readonly humidity: string;
}

/** A shelf with a thermometer and a hygrometer of one device. */
export async function sensorsOnAShelf(tx: Tx): Promise<ShelfSensors> {
  const shelf = await aShelf(tx);
  const { device } = await aDevice(tx, { roomId: shelf.roomId });
  const temperature = await aSensor(tx, { deviceId: device.id, quantity: 'airTemperature' });
  const humidity = await aSensor(tx, { deviceId: device.id, quantity: 'relativeHumidity' });
  for (const sensor of [temperature, humidity]) {
    await aPlacement(tx, { sensorId: sensor.id, shelfId: shelf.id });
  }
  return { temperature: temperature.id, humidity: humidity.id };
}

/** One reading on its way. */
export interface Sent extends Sample {
  readonly of: keyof ShelfSensors;
}

/** Sends batches in the order given; each may hold readings of both sensors. */
export async function send(
  { intake }: IntakeParts,
  sensors: ShelfSensors,
  batches: readonly (readonly Sent[])[],
  now: number,
): Promise<void> {
  for (const batch of batches) {
    const bySensor = new Map<string, Sample[]>();
    for (const { of, at, value } of [...batch].sort((a, b) => a.at - b.at)) {
      const samples = bySensor.get(sensors[of]) ?? [];
      bySensor.set(sensors[of], samples);
      if (samples.at(-1)?.at !== at) samples.push({ at, value });
    }
    if (bySensor.size > 0) await intake.store(bySensor, { isLive: true, now });
  }
}

/** All that is kept of a shelf's readings, without the ids that differ from shelf to shelf. */
export async function keptOf(tx: Tx, sensors: ShelfSensors): Promise<unknown> {
  const kept: Record<string, unknown> = {};
  for (const [name, id] of Object.entries(sensors)) {
    const query = async (sql: string): Promise<unknown[]> => {
      const rows: unknown[] = await tx.query(sql, [id]);
      return rows;
    };
    kept[name] = {
      readings: await query('SELECT at, value, flags FROM reading WHERE sensor_id = $1 ORDER BY at'),
      hours: await query(
        `SELECT start_at, count, covered_ms, min, max, integral_ms, first_at_ms, last_at_ms, last_value
         FROM hourly_summary WHERE sensor_id = $1 ORDER BY start_at`,
      ),
      days: await query(
        `SELECT start_at, end_at, count, covered_ms, min, max, integral_ms
         FROM daily_summary WHERE sensor_id = $1 ORDER BY start_at`,
      ),
      computed: await query(
        `SELECT quantity, start_at, count, covered_ms, min, max, integral_ms
         FROM computed_hourly_summary WHERE sensor_id = $1 ORDER BY quantity, start_at`,
      ),
      alerts: await query(
        `SELECT quantity, kind, urgency, began_at, opened_at, peak_at, peak_value, peak_excess, ended_at, cleared_at
         FROM alert WHERE sensor_id = $1 ORDER BY quantity, kind, began_at`,
      ),
      state: await query(
        'SELECT latest_at, latest_value, latest_flags, computed_to FROM sensor_state WHERE sensor_id = $1',
      ),
    };
  }
  return kept;
}
