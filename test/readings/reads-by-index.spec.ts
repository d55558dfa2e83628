import { ComputedStore } from '../../server/readings/computed-store';
import { SecondLookStore } from '../../server/alerts/second-look-store';
import { SilenceStore } from '../../server/alerts/silence-store';
import { Transactions, type Tx } from '../../server/database/transactions';
import { createTestDatabase, type TestDatabase } from '../database/test-database';
import { sensorsOnAShelf, type ShelfSensors } from './intake-harness';

const minute = 60_000;
const hour = 60 * minute;
const year = { from: Date.UTC(2025, 0, 1), to: Date.UTC(2026, 0, 1) };
const asked = { from: Date.UTC(2025, 11, 31, 20), to: year.to };
const shelves = 2;

describe('readings of a few hours, after a year of them', () => {
  let database: TestDatabase;
  let sensors: ShelfSensors[];

  beforeAll(async () => {
    database = await createTestDatabase();
    const tx = database.dataSource.manager;
    sensors = await Promise.all(Array.from({ length: shelves }, () => sensorsOnAShelf(tx)));
    await tx.query('UPDATE placement SET from_at = $1', [new Date(year.from)]);
    await tx.query('SELECT ensure_reading_partitions($1, $2)', [new Date(year.from), new Date(year.to)]);
    await tx.query(
      `INSERT INTO reading (sensor_id, at, value, flags)
       SELECT sensor.id, at, 20, 0 FROM sensor, generate_series($1::timestamptz, $2, interval '5 minutes') AS at`,
      [new Date(year.from), new Date(year.to)],
    );
    await tx.query('ANALYZE');
  });
  afterAll(() => database.drop());

  const ids = (): string[] => sensors.flatMap(({ temperature, humidity }) => [temperature, humidity]);

  it.each<[string, (tx: Tx) => Promise<unknown>]>([
    [
      'the second look',
      (tx) =>
        new SecondLookStore().readings(
          tx,
          ids().map((sensorId) => ({ sensorId, ...asked, isDense: false })),
        ),
    ],
    [
      'computed quantities',
      (tx) =>
        new ComputedStore().airOf(
          tx,
          sensors.map(({ humidity }) => ({ sensorId: humidity, ...asked, withinMs: 10 * minute })),
        ),
    ],
    [
      'silences',
      (tx) =>
        new SilenceStore().gaps(
          tx,
          ids().map((sensorId) => ({ sensorIds: [sensorId], from: asked.from, longerThanMs: hour })),
        ),
    ],
  ])('are found by the index for %s', async (_, read) => {
    const scanned = await new Transactions(database.dataSource).run(async (tx) => {
      // A disk that is slow to seek tempts the planner most to read everything.
      await tx.query('SET LOCAL random_page_cost = 40');
      await read(tx);
      const rows: { scanned: number }[] = await tx.query(
        `SELECT coalesce(sum(seq_tup_read), 0)::int AS scanned FROM pg_stat_xact_user_tables
         WHERE relname LIKE 'reading\\_%' AND relname < 'reading_2025_12'`,
      );
      return rows[0]?.scanned;
    });

    expect(scanned).toBe(0);
  });
});
