import type { Sample } from '@shared/series/series';
import { AlertStore } from '../../server/alerts/alert-store';
import { secondLookJob } from '../../server/alerts/second-look-parts';
import { Transactions, type Tx } from '../../server/database/transactions';
import { MailAlertTeller } from '../../server/mail/alert-teller';
import { TellingStore } from '../../server/mail/telling-store';
import { intakeParts } from '../../server/readings/intake-parts';
import { ReadingIntakeService } from '../../server/readings/reading-intake-service';
import { StreamMemory } from '../../server/readings/stream-memory';
import { ShelfPlansService } from '../../server/rooms/shelf-plans-service';
import { ShelfPlansStore } from '../../server/rooms/shelf-plans-store';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aMember } from '../builders/people';
import { aRoom, aShelf, aWantedRange } from '../builders/rooms';
import { createTestDatabase } from '../database/test-database';
import { interleaved, timed, type Benchmark, type Side } from './benchmark';

const DEVICES = 100;
const SHELVES_OF_DEVICE = 5;
const RULES = 50;
const RUNS = 11;
/** A device reports every so many seconds, and the second look follows every other time, as often as it runs. */
const BATCH_S = 15;
const BATCHES_A_RUN = 2;
/** Every rule is broken for three minutes in twelve, each at its own time. */
const CYCLE_S = 720;
const BROKEN_S = 180;

const judgedSince = new Date('2026-01-01T00:00:00Z');

/** A sensor with what it measures. */
interface Measured {
  readonly id: string;
  readonly valueAt: (second: number) => number;
}

/** Live readings judged and told, against the same readings only stored and summed. */
export const alertsVsStore: Benchmark = {
  name: 'alerts-vs-store',
  meaning: '1,000 sensors at a reading a second with 50 rules opening and closing, over storing alone',
  async run() {
    const database = await createTestDatabase();
    // Apart, so that nobody looks again at what is only stored.
    const plainDatabase = await createTestDatabase();
    const { dataSource } = database;
    const transactions = new Transactions(dataSource);
    const plans = new ShelfPlansService(new ShelfPlansStore());
    const alerts = new AlertStore();
    const teller = new MailAlertTeller({ alerts, tellings: new TellingStore(), mailDomain: 'localhost' });
    const judged = intakeParts(transactions, plans, teller);
    const { readings, summaries, lateReadings, computed } = judged;
    const alone = new ReadingIntakeService(
      new Transactions(plainDatabase.dataSource),
      readings,
      summaries,
      lateReadings,
      computed,
      { observe: async () => [] },
      new StreamMemory(),
    );
    const begun = Math.floor(Date.now() / 1_000) * 1_000 - 3_600_000;
    let now = begun;
    const looks = secondLookJob({
      transactions,
      readings,
      teller,
      plannedLamps: (...of) => plans.plannedLamps(...of),
      germinatingOn: async () => new Map(),
      wantedLightOf: async () => new Map(),
      alerts: { publishChanged: async () => undefined },
      now: () => new Date(now),
    });
    const devices = await someDevices(dataSource.manager);
    const others = await someDevices(plainDatabase.dataSource.manager);
    for (const { dataSource: filled } of [database, plainDatabase]) await filled.query('ANALYZE');
    try {
      const result = await interleaved(
        sideOf(begun, devices, judged.intake, async (at) => {
          now = at;
          await looks.run();
        }),
        sideOf(begun, others, alone, async () => undefined),
        RUNS,
      );
      const rows: { opened: number; cleared: number }[] = await dataSource.query(
        'SELECT count(*)::int AS opened, count(cleared_at)::int AS cleared FROM alert',
      );
      const { opened, cleared } = rows[0] ?? { opened: 0, cleared: 0 };
      return { ...result, detail: `${result.detail}, ${opened} alerts opened, ${cleared} of them cleared` };
    } finally {
      await database.drop();
      await plainDatabase.drop();
    }
  },
};

/** Devices, each with the air and humidity of some shelves; one of these in ten has a range that its air leaves. */
async function someDevices(tx: Tx): Promise<Measured[][]> {
  const devices: Measured[][] = [];
  const room = await aRoom(tx);
  await aMember(tx, { roomId: room.id });
  for (let index = 0; index < DEVICES; index += 1) {
    const { device } = await aDevice(tx, { roomId: room.id });
    const sensors: Measured[] = [];
    for (let place = 0; place < SHELVES_OF_DEVICE; place += 1) {
      const shelf = await aShelf(tx, { roomId: room.id });
      const number = index * SHELVES_OF_DEVICE + place;
      const isRuled = number % ((DEVICES * SHELVES_OF_DEVICE) / RULES) === 0;
      if (isRuled)
        await aWantedRange(tx, { shelfId: shelf.id, lampsOffHigh: 24, holdMinutes: 1, since: judgedSince });
      for (const quantity of ['airTemperature', 'relativeHumidity'] as const) {
        const sensor = await aSensor(tx, { deviceId: device.id, quantity, expectedIntervalS: 1 });
        await aPlacement(tx, { sensorId: sensor.id, shelfId: shelf.id });
        const isBroken = (second: number): boolean =>
          isRuled && (second + (number * CYCLE_S) / (DEVICES * SHELVES_OF_DEVICE)) % CYCLE_S < BROKEN_S;
        sensors.push({
          id: sensor.id,
          valueAt: (second) =>
            quantity === 'airTemperature'
              ? (isBroken(second) ? 26 : 20) + Math.sin(second / 60 + number)
              : 60 + Math.cos(second / 60 + number),
        });
      }
    }
    devices.push(sensors);
  }
  return devices;
}

/** Stores a run of every device's readings, batch by batch, with something afterwards. */
function sideOf(
  begun: number,
  devices: readonly (readonly Measured[])[],
  intake: ReadingIntakeService,
  afterwards: (now: number) => Promise<void>,
): Side {
  let passed = 0;
  return () =>
    timed(async () => {
      for (let batch = 0; batch < BATCHES_A_RUN; batch += 1) {
        const now = begun + (passed + BATCH_S) * 1_000;
        for (const sensors of devices) {
          const bySensor = new Map(
            sensors.map(({ id, valueAt }) => [
              id,
              Array.from({ length: BATCH_S }, (_, second): Sample => {
                return { at: begun + (passed + second) * 1_000, value: valueAt(passed + second) };
              }),
            ]),
          );
          await intake.store(bySensor, { isLive: true, now });
        }
        passed += BATCH_S;
      }
      await afterwards(begun + passed * 1_000);
    });
}
