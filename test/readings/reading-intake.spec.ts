import fc from 'fast-check';
import type { DataSource } from 'typeorm';
import { createTestDatabase, type TestDatabase } from '../database/test-database';
import { arranged, keptOf, roadOver, send, sensorsOnAShelf, type Sent } from './intake-harness';

const start = Date.UTC(2026, 2, 28, 20); // The night in which Dublin's clocks go forward.
const step = 5 * 60_000;
const count = 96;
const now = start + count * step;

// Invented: a night with a warm and a dry spell, a spike and a gap, so that every kind of rule has something to do.
const readings: Sent[] = Array.from({ length: count }, (_, index): Sent[] => {
  if (index >= 60 && index < 66) return [];
  const at = start + index * step;
  const warm = index > 20 && index < 45 ? 6 : 0;
  const temperature = index === 50 ? 999 : 20 + 2 * Math.sin(index / 7) + warm;
  const humidity = 65 + 5 * Math.cos(index / 5) - (index > 70 ? 25 : 0);
  return [
    { of: 'temperature', at, value: Number(temperature.toFixed(2)) },
    // The hygrometer is a little late each time, so that pairs are found by nearness.
    { of: 'humidity', at: at + (index % 3) * 20_000, value: Number(humidity.toFixed(2)) },
  ];
}).flat();

describe('readings on their road', () => {
  let database: TestDatabase;
  let dataSource: DataSource;

  beforeAll(async () => {
    database = await createTestDatabase();
    dataSource = database.dataSource;
  });
  afterAll(() => database.drop());

  async function keptAfter(batches: readonly (readonly Sent[])[]): Promise<unknown> {
    const road = roadOver(dataSource);
    const sensors = await sensorsOnAShelf(dataSource.manager);
    await send(road, sensors, batches, now);
    return keptOf(dataSource.manager, sensors);
  }

  it('open and clear alerts, fail what no thermometer shows, and leave gaps as gaps', async () => {
    const kept = (await keptAfter([readings])) as Record<
      string,
      {
        alerts: { kind: string; quantity: string }[];
        readings: { value: number; flags: number }[];
        days: unknown[];
      }
    >;
    const alerts = Object.values(kept).flatMap((sensor) => sensor.alerts);
    expect(alerts.map(({ quantity, kind }) => `${quantity} ${kind}`)).toEqual(
      expect.arrayContaining(['airTemperature aboveRange', 'vapourPressureDeficit aboveRange']),
    );
    const spike = kept['temperature']?.readings.find(({ value }) => value === 999);
    expect(spike?.flags).toBeGreaterThanOrEqual(32);
    expect(kept['temperature']?.days).toHaveLength(2);
  });

  it('come to the same sums and the same alerts one by one, in batches, in any order, once or twice', async () => {
    const reference = await keptAfter([readings]);
    const inAnyOrder = fc.record({
      order: fc.constantFrom('kept', 'shuffled', 'nearly'),
      size: fc.constantFrom(1, 7, 40, 500),
      isRepeated: fc.boolean(),
      seed: fc.integer(),
    });
    await fc.assert(
      fc.asyncProperty(inAnyOrder, async ({ order, size, isRepeated, seed }) => {
        const ordered = arranged(readings, order, seed);
        const sent = isRepeated ? [...ordered, ...ordered.slice(0, 50)] : ordered;
        const batches = Array.from({ length: Math.ceil(sent.length / size) }, (_, index) =>
          sent.slice(index * size, (index + 1) * size),
        );
        expect(await keptAfter(batches)).toEqual(reference);
      }),
      { numRuns: 14, seed: 20260328 },
    );
  });
});
