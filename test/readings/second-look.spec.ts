import fc from 'fast-check';
import type { AlertKind } from '@shared/alerts/alert-rule';
import type { MeasuredQuantity } from '@shared/climate/quantity';
import type { Tx } from '../../server/database/transactions';
import { aDevice, aPlacement, aSensor } from '../builders/devices';
import { aShelf } from '../builders/rooms';
import { createTestDatabase, type TestDatabase } from '../database/test-database';
import {
  arranged,
  bringIn,
  lookAgain,
  roadOver,
  send,
  type NamedSensors,
  type Plans,
  type Sent as SentReading,
} from './intake-harness';

type Name = 'air' | 'humidity' | 'rootZone' | 'otherAir' | 'light';
type Sent = SentReading<Name>;

const minute = 60_000;
const hour = 60 * minute;
const day = 24 * hour;
const step = 10 * minute;
// Dublin's midnight, two days before its clocks go forward; the third day is cut off in the morning.
const start = Date.UTC(2026, 2, 26);
const end = start + 2.4 * day;
const now = end;

/** Lamps from 6 to 22 h by a clock that keeps UTC. */
const litByDay: Plans = {
  wantedRangesOf: async () => new Map(),
  plannedLamps: async (_tx, shelfIds) => {
    const lit = [0, 1, 2].map((days) => ({
      onAt: start + days * day + 6 * hour,
      offAt: start + days * day + 22 * hour,
    }));
    return new Map(shelfIds.map((id) => [id, lit]));
  },
};

/** Whether an instant lies within some hours of the test. */
function isWithin(at: number, fromHour: number, toHour: number): boolean {
  return at >= start + fromHour * hour && at < start + toHour * hour;
}

/** What each sensor would read; null where it sends nothing. Invented, so that every kind has something to find. */
const measured: Readonly<Record<Name, (at: number) => number | null>> = {
  air: (at) => {
    if (isWithin(at, 40, 41.5)) return null; // The whole device is silent.
    return isWithin(at, 2, 4) ? 12 : 20; // A door stands open, and is shut.
  },
  humidity: (at) => {
    if (isWithin(at, 40, 41.5)) return null;
    return isWithin(at, 20, 30) ? 95 : 60; // Wet leaves.
  },
  rootZone: (at) => {
    if (isWithin(at, 40, 41.5)) return null;
    if (isWithin(at, 10, 14)) return 26; // A forgotten mat.
    return isWithin(at, 15, 17) ? 8 : 20; // Cold water.
  },
  otherAir: (at) => {
    if (isWithin(at, 34, 36)) return null; // Alone, while its device goes on.
    if (isWithin(at, 44, 46)) return 999; // Wet inside.
    if (isWithin(at, 2, 4)) return 12;
    return isWithin(at, 50, 53) ? 23 : 20; // Drifted.
  },
  light: (at) => {
    const hourOfDay = ((at - start) % day) / hour;
    // The lamp failed on the second afternoon.
    return hourOfDay >= 6 && hourOfDay < 22 && !isWithin(at, 37, 46) ? 200 : 0;
  },
};

const names = Object.keys(measured) as Name[];
const readings: Sent[] = [];
for (let at = start; at < end; at += step) {
  names.forEach((of, place) => {
    const value = measured[of](at);
    // Not all at the same instant, as sensors of one device are read one after the other.
    const isAir = of !== 'light';
    // A living signal wavers; one that does not is suspect.
    const wavering = isAir ? Math.sin(at / (17 * minute)) / 5 : 0;
    if (value !== null) readings.push({ of, at: at + place * 1_000, value: value + wavering });
  });
}

async function sensorsOfTwoDevices(tx: Tx): Promise<NamedSensors<Name>> {
  const shelf = await aShelf(tx);
  const devices = [
    await aDevice(tx, { roomId: shelf.roomId, lastSeenAt: new Date(now) }),
    await aDevice(tx, { roomId: shelf.roomId, lastSeenAt: new Date(now) }),
  ];
  const place = async (device: number, quantity: MeasuredQuantity): Promise<string> => {
    const sensor = await aSensor(tx, {
      deviceId: devices[device]?.device.id ?? '',
      quantity,
      expectedIntervalS: step / 1_000,
      lightThreshold: quantity === 'ppfd' ? 5 : null,
    });
    await aPlacement(tx, { sensorId: sensor.id, shelfId: shelf.id });
    return sensor.id;
  };
  return {
    air: await place(0, 'airTemperature'),
    humidity: await place(0, 'relativeHumidity'),
    rootZone: await place(0, 'rootZoneTemperature'),
    otherAir: await place(1, 'airTemperature'),
    light: await place(1, 'ppfd'),
  };
}

interface Found {
  readonly kind: AlertKind;
  readonly began_at: Date;
  readonly cleared_at: Date | null;
}

/** Alerts without what differs from shelf to shelf: of two thermometers or five sensors, either may hold them. */
async function alertsOf(tx: Tx, sensors: NamedSensors): Promise<Found[]> {
  return tx.query(
    `SELECT kind, urgency, began_at, opened_at, peak_at, peak_value, peak_excess, peak_limit, ended_at, cleared_at
     FROM alert WHERE sensor_id = ANY($1) AND kind NOT IN ('lampDark', 'lampLit')
     ORDER BY kind, began_at, peak_value`,
    [Object.values(sensors)],
  );
}

describe('the second look at readings', () => {
  let database: TestDatabase;
  let tx: Tx;

  beforeAll(async () => {
    database = await createTestDatabase();
    tx = database.dataSource.manager;
  });
  afterAll(() => database.drop());

  async function afterOneBatch(): Promise<Found[]> {
    const sensors = await sensorsOfTwoDevices(tx);
    const road = roadOver(database.dataSource, litByDay);
    await send(road, sensors, [readings], now);
    await lookAgain(road, litByDay, now);
    return alertsOf(tx, sensors);
  }

  it('finds every kind that needs more than a reading, when it began and when it was over', async () => {
    const found = (await afterOneBatch()).map(({ kind, began_at: beganAt, cleared_at: clearedAt }) => [
      kind,
      hoursIn(beganAt),
      clearedAt && hoursIn(clearedAt),
    ]);
    // By hand from what was measured, to ten minutes: holds, clearing holds and looks back are the defaults'.
    expect(found).toEqual([
      ['condensation', 15, 17.17],
      ['deviceSilent', 39.83, 41.5],
      ['fastFall', 2, 2.5],
      ['fastFall', 2, 2.5],
      ['fastRise', 4, 4.5],
      ['fastRise', 4, 4.5],
      ['lightShort', 48, null],
      ['matStuckOn', 10, 14.17],
      ['sensorFailed', 44.5, 46.5],
      ['sensorSilent', 33.83, 36],
      ['sensorsDisagree', 50, 53.17],
      // More than eight hours of the ten, and two dry ones before they count as over.
      ['wetHours', 28, 32.17],
    ]);
  });

  it('waits for no sensor that somebody holds, and looks at its shelf later', async () => {
    const road = roadOver(database.dataSource, litByDay);
    const [held, other] = [await sensorsOfTwoDevices(tx), await sensorsOfTwoDevices(tx)];
    await send(road, held, [readings], now);
    await send(road, other, [readings], now);
    const holder = database.dataSource.createQueryRunner();
    await holder.startTransaction();
    await holder.query('SELECT FROM sensor WHERE id = $1 FOR UPDATE', [held.air]);
    await lookAgain(road, litByDay, now);
    const kinds = async (sensors: NamedSensors): Promise<Set<AlertKind>> =>
      new Set((await alertsOf(tx, sensors)).map(({ kind }) => kind));
    expect(await kinds(other)).toContain('matStuckOn');
    expect(await kinds(held)).not.toContain('matStuckOn');

    await holder.rollbackTransaction();
    await holder.release();
    await lookAgain(road, litByDay, now);
    expect(await alertsOf(tx, held)).toEqual(await alertsOf(tx, other));
  });

  it('holds only the sensors that hang together with a long past while it looks at that', async () => {
    const road = roadOver(database.dataSource, litByDay);
    const [past, recent] = [await sensorsOfTwoDevices(tx), await sensorsOfTwoDevices(tx)];
    await send(road, past, [readings], now);
    await send(road, recent, [readings.filter(({ at }) => at >= end - 2 * hour)], now);
    const [place]: { shelf_id: string }[] = await tx.query(
      'SELECT shelf_id FROM placement WHERE sensor_id = $1',
      [past.air],
    );
    const heldMeanwhile: boolean[] = [];
    const watching: Plans = {
      ...litByDay,
      plannedLamps: async (inLook, shelfIds, ...span) => {
        if (shelfIds.includes(place?.shelf_id ?? '')) heldMeanwhile.push(await isHeld(recent.air));
        return litByDay.plannedLamps(inLook, shelfIds, ...span);
      },
    };
    await lookAgain(road, watching, now);

    expect(heldMeanwhile).not.toHaveLength(0);
    expect(heldMeanwhile).not.toContain(true);
    const left: unknown[] = await tx.query(
      'SELECT FROM sensor_state WHERE unjudged_from IS NOT NULL AND sensor_id = ANY($1)',
      [[...Object.values(past), ...Object.values(recent)]],
    );
    expect(left).toEqual([]);
  });

  async function isHeld(sensorId: string): Promise<boolean> {
    const free: unknown[] = await tx.query('SELECT FROM sensor WHERE id = $1 FOR NO KEY UPDATE SKIP LOCKED', [
      sensorId,
    ]);
    return free.length === 0;
  }

  it('comes to the same whatever the order and the batches, live or from a file, looked at early or late', async () => {
    const reference = await afterOneBatch();
    const ways = fc.record({
      order: fc.constantFrom('kept', 'shuffled', 'nearly'),
      size: fc.constantFrom(90, 300, 5_000),
      looksEvery: fc.constantFrom(1, 3, 1_000),
      // What a file brings in the end rather than the devices.
      inFile: fc.constantFrom('nothing', 'air', 'humidity', 'otherAir', 'rootZone', 'light', 'first', 'last'),
      seed: fc.integer(),
    });
    await fc.assert(
      fc.asyncProperty(ways, async ({ order, size, looksEvery, inFile, seed }) => {
        const sensors = await sensorsOfTwoDevices(tx);
        const road = roadOver(database.dataSource, litByDay);
        const file = readings.filter((reading) => isInFile(reading, inFile));
        const live = arranged(
          readings.filter((reading) => !file.includes(reading)),
          order,
          seed,
        );
        for (let from = 0; from < live.length; from += size) {
          await send(road, sensors, [live.slice(from, from + size)], now);
          if ((from / size) % looksEvery === 0) await lookAgain(road, litByDay, now);
        }
        if (file.length > 0) {
          await bringIn(database.dataSource, sensors, file, { size: 1_000, now, plans: litByDay });
        }
        await lookAgain(road, litByDay, now);
        expect(await alertsOf(tx, sensors)).toEqual(reference);
      }),
      { numRuns: 12, seed: 20260326 },
    );
  });
});

/** Hours since the start, to ten minutes, written with two digits. */
function hoursIn(at: Date): number {
  const tens = Math.floor((at.getTime() - start) / step);
  return Number((tens / 6).toFixed(2));
}

function isInFile({ of, at }: Sent, inFile: string): boolean {
  if (inFile === 'first') return at < start + 0.8 * day;
  if (inFile === 'last') return at >= start + 1.5 * day;
  return of === inFile;
}
