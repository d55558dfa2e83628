import fc from 'fast-check';
import { createTestDatabase, type TestDatabase } from '../database/test-database';
import { bringIn, keptOf, roadOver, send, sensorsOnAShelf, type Plans, type Sent } from './intake-harness';

const start = Date.UTC(2026, 2, 28, 20); // The night in which Dublin's clocks go forward.
const step = 5 * 60_000;
const count = 96;
const now = start + count * step;

// Invented: a night with a warm and a dry spell, a spike and a gap, so that every kind of rule has something to do.
const readings: Sent[] = Array.from({ length: count }, (_, index): Sent[] => {
  const at = start + index * step;
  if (index >= 60 && index < 66) return [];
  const isWarm = index > 20 && index < 40;
  return [
    { of: 'temperature', at, value: index === 50 ? 999 : (isWarm ? 26 : 21) + (index % 7) / 10 },
    { of: 'humidity', at: at + 1_000, value: index > 70 ? 35 : 62 + (index % 5) },
  ];
}).flat();

describe('readings of a file', () => {
  let database: TestDatabase;

  beforeAll(async () => {
    database = await createTestDatabase();
  });
  afterAll(() => database.drop());

  async function keptAfterLive(batches: readonly (readonly Sent[])[]): Promise<unknown> {
    const sensors = await sensorsOnAShelf(database.dataSource.manager);
    await send(roadOver(database.dataSource), sensors, batches, now);
    return keptOf(database.dataSource.manager, sensors);
  }

  it('bring what live readings bring, whatever was held before and whatever comes after', async () => {
    const reference = await keptAfterLive([readings]);
    const ways = fc.record({
      // Which readings come live before the file, which live after it; the file holds all of them or the rest.
      before: fc.constantFrom('none', 'first', 'middle', 'last', 'even', 'humidity'),
      after: fc.constantFrom('none', 'last', 'middle', 'temperature'),
      isWhole: fc.boolean(),
      size: fc.constantFrom(1, 9, 1_000),
      // Held readings fill columns and stretches too, also in the middle of a batch.
      pace: fc.record({
        columnRows: fc.constantFrom(1, 7, 1_500),
        stretchRows: fc.constantFrom(1, 20, 250_000),
      }),
    });
    await fc.assert(
      fc.asyncProperty(ways, async ({ before, after, isWhole, size, pace }) => {
        const sensors = await sensorsOnAShelf(database.dataSource.manager);
        const road = roadOver(database.dataSource);
        const early = pick(before);
        const late = pick(after).filter((reading) => !early.includes(reading));
        await send(road, sensors, [early], now);
        const file = readings.filter(
          (reading) => !late.includes(reading) && (isWhole || !early.includes(reading)),
        );
        const counts = await bringIn(database.dataSource, sensors, file, { size, pace, now });
        expect(counts.fresh).toBe(readings.length - early.length - late.length);
        expect(counts.fresh + counts.alreadyHeld).toBe(file.length);
        await send(road, sensors, [late], now);
        expect(await keptOf(database.dataSource.manager, sensors)).toEqual(reference);
      }),
      { numRuns: 40, seed: 20260328 },
    );
  });

  it('older than the sensor’s time on the shelf leave what was judged there as it was', async () => {
    const tx = database.dataSource.manager;
    const sensors = await sensorsOnAShelf(tx);
    await tx.query('UPDATE placement SET from_at = $2 WHERE sensor_id = $1', [
      sensors.temperature,
      new Date(firstDay + 5 * 86_400_000),
    ]);
    const days = (from: number, to: number): Sent[] =>
      Array.from({ length: ((to - from) * 86_400_000) / step }, (_, index): Sent[] => {
        const at = firstDay + from * 86_400_000 + index * step;
        return [
          { of: 'temperature', at, value: isLit(at) ? 24 : 17 },
          { of: 'humidity', at, value: 60 },
        ];
      }).flat();
    await send(roadOver(database.dataSource, litByDay), sensors, [days(8, 16)], firstDay + 16 * 86_400_000);
    await bringIn(database.dataSource, sensors, days(0, 4), { size: 1_000, now, plans: litByDay });
    const kept = (await keptOf(database.dataSource.manager, sensors)) as {
      temperature: { alerts: unknown[] };
    };
    expect(kept.temperature.alerts).toEqual([]);
  });
});

const firstDay = Date.UTC(2026, 1, 1);
const hourMs = 3_600_000;

function isLit(at: number): boolean {
  const hour = Math.floor((at % 86_400_000) / hourMs);
  return hour >= 6 && hour < 22;
}

/** Lamps from 6 to 22 h, and ranges so that each value is right only with its lamps. */
const litByDay: Plans = {
  wantedRangesOf: async (_tx, shelfIds) =>
    new Map(
      shelfIds.map((id) => [
        id,
        [
          {
            quantity: 'airTemperature',
            lampsOn: { low: 20, high: 26 },
            lampsOff: { low: 15, high: 21 },
            holdMinutes: 15,
            clearingMargin: 0.5,
            urgency: { by: 4, afterMinutes: 360 },
            source: 'shelf',
            reason: 'for the test',
            since: '2026-01-01T00:00:00Z',
          },
        ],
      ]),
    ),
  plannedLamps: async (_tx, shelfIds, from, to) => {
    const lit: { onAt: number; offAt: number }[] = [];
    for (let day = Math.floor(from.getTime() / 86_400_000); day * 86_400_000 < to.getTime(); day += 1) {
      lit.push({ onAt: day * 86_400_000 + 6 * hourMs, offAt: day * 86_400_000 + 22 * hourMs });
    }
    return new Map(shelfIds.map((id) => [id, lit]));
  },
};

function pick(which: string): Sent[] {
  return readings.filter(({ of }, index) => {
    const share = index / readings.length;
    switch (which) {
      case 'first':
        return share < 0.4;
      case 'middle':
        return share > 0.3 && share < 0.6;
      case 'last':
        return share > 0.7;
      case 'even':
        return index % 4 < 2;
      default:
        return of === which;
    }
  });
}
