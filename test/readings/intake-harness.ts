import type { Sample } from '@shared/series/series';
import type { WantedRange } from '@shared/contracts/rooms';
import type { AlertSources } from '../../server/alerts/alert-evaluation-service';
import { secondLookJob } from '../../server/alerts/second-look-parts';
import { AlertStore } from '../../server/alerts/alert-store';
import { Transactions, type Tx } from '../../server/database/transactions';
import { BulkBatch } from '../../server/readings/bulk-columns';
import { BulkIntakeService, type BulkPace } from '../../server/readings/bulk-intake-service';
import { BulkStore } from '../../server/readings/bulk-store';
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
    urgency: { by: 4, afterMinutes: 360 },
    source: 'shelf',
    reason: 'for the test',
    since: '2026-01-01T00:00:00Z',
  },
  {
    quantity: 'vapourPressureDeficit',
    lampsOn: { low: 0.4, high: 1.2 },
    lampsOff: { low: 0.4, high: 1.2 },
    holdMinutes: 10,
    clearingMargin: 0.05,
    urgency: { by: 0.8, afterMinutes: 360 },
    source: 'shelf',
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

/** Nobody to write to. */
const nobody = { tellOpened: async () => undefined, tellCleared: async () => undefined };

/** The road with nobody to write to. */
export function roadOver(
  dataSource: DataSource,
  plans: Plans = unlitAndTight,
): IntakeParts & { transactions: Transactions } {
  const transactions = new Transactions(dataSource);
  return { ...intakeParts(transactions, plans, nobody), transactions };
}

/** Lets the alerts have their second look at everything new. */
export async function lookAgain(
  { transactions, readings }: ReturnType<typeof roadOver>,
  plans: Plans,
  now: number,
): Promise<void> {
  const job = secondLookJob({
    transactions,
    readings,
    teller: nobody,
    plannedLamps: (...of) => plans.plannedLamps(...of),
    germinatingOn: async () => new Map(),
    wantedLightOf: async () => new Map(),
    alerts: { publishChanged: async () => undefined },
    now: () => new Date(now),
  });
  await job.run();
}

/** Ids of sensors, by what the test calls them. */
export type NamedSensors<Name extends string = string> = Readonly<Record<Name, string>>;
/** A shelf's thermometer and hygrometer. */
export type ShelfSensors = NamedSensors<'temperature' | 'humidity'>;

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
export interface Sent<Name extends string = keyof ShelfSensors> extends Sample {
  readonly of: Name;
}

/** Sends batches in the order given; each may hold readings of several sensors. */
export async function send<Name extends string>(
  { intake }: IntakeParts,
  sensors: NamedSensors<Name>,
  batches: readonly (readonly Sent<Name>[])[],
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

/** Orders readings: as they are, at random, or each at most a few places off, as retries and slow radios do. */
export function arranged<Name extends string>(
  sent: readonly Sent<Name>[],
  order: string,
  seed: number,
): Sent<Name>[] {
  if (order === 'kept') return [...sent];
  let state = seed >>> 0;
  const random = (): number => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 2 ** 32;
  };
  const reach = order === 'nearly' ? 5 : sent.length;
  return sent
    .map((reading, index) => ({ reading, key: index + random() * reach }))
    .sort((a, b) => a.key - b.key)
    .map(({ reading }) => reading);
}

/** How a file is brought in. */
export interface BringIn {
  /** Readings in a batch. */
  readonly size: number;
  /** The present [ms]. */
  readonly now: number;
  readonly plans?: Plans;
  readonly pace?: BulkPace;
}

/** Brings readings in order of time in as a file does. */
export async function bringIn<Name extends string>(
  dataSource: DataSource,
  sensors: NamedSensors<Name>,
  file: readonly Sent<Name>[],
  { size, now, plans = unlitAndTight, pace }: BringIn,
): Promise<{ fresh: number; alreadyHeld: number }> {
  const { transactions, readings, computed } = roadOver(dataSource, plans);
  const service = new BulkIntakeService(
    transactions,
    new BulkStore(),
    readings,
    computed,
    new AlertStore(),
    plans,
    pace,
  );
  const sensorIds = [...new Set(file.map(({ of }) => sensors[of]))];
  const reader = dataSource.createQueryRunner();
  const fileId = '00000000-0000-4000-8000-000000000001';
  try {
    return await transactions.run(async (tx) => {
      const locked = await service.lock(tx, sensorIds);
      const order = { fileId, sensorIds, replacesDiffering: false, now };
      const { intake } = await service.open(tx, reader.manager, locked, order);
      const batch = new BulkBatch();
      for (let from = 0; from < file.length; from += size) {
        batch.clear();
        for (const { of, at, value } of file.slice(from, from + size)) {
          batch.push(sensorIds.indexOf(sensors[of]), at, value);
        }
        await intake.take(batch);
      }
      await intake.finish();
      return intake.counts;
    });
  } finally {
    await reader.release();
  }
}

/** All that is kept of a shelf's readings, without the ids that differ from shelf to shelf. */
export async function keptOf(tx: Tx, sensors: NamedSensors): Promise<unknown> {
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
