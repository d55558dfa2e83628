import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parse } from 'csv-parse/sync';
import { simulatedRoom } from '@shared/contracts/simulation';
import { kestrelLane } from '@shared/demonstration/kestrel-lane';
import { historyRows, type HistoryRequest } from './history-rows';
import { writeLoggerFiles } from './logger-csv';

const DAY = 86_400_000;
const NOW = Date.parse('2025-12-01T12:00:00Z');

function request(overrides: Partial<HistoryRequest> = {}): HistoryRequest {
  const { devices, ...room } = kestrelLane(NOW);
  return {
    room: simulatedRoom.parse({
      ...room,
      roomId: 'room',
      devices: devices.map((device, index) => ({
        ...device,
        id: `device ${index}`,
        token: `token ${index}`,
      })),
    }),
    seed: 1,
    fromMs: NOW - DAY,
    toMs: NOW,
    stepSeconds: 300,
    ...overrides,
  };
}

describe('the room’s history', () => {
  it('has a row every step, half-open, with a value for almost every sensor', () => {
    const rows = [...historyRows(request())];
    expect(rows).toHaveLength(288);
    expect(rows[0]?.at).toBe(NOW - DAY);
    const values = rows.flatMap((row) => row.values);
    expect(values).toHaveLength(288 * 25);
    expect(values.filter((value) => value === null).length / values.length).toBeLessThan(0.05);
  });

  it('made again, or as part of a longer one, is the same', () => {
    const once = [...historyRows(request())];
    expect([...historyRows(request())]).toEqual(once);
    const longer = [...historyRows(request({ fromMs: NOW - 2 * DAY }))].slice(288);
    const differences = longer.flatMap((row, index) =>
      row.values.map((value, column) => Math.abs((value ?? 0) - (once[index]?.values[column] ?? 0))),
    );
    // One step of the coarsest sensor at most, where the first guess of the shorter run still shows.
    expect(Math.max(...differences)).toBeLessThanOrEqual(1);
  });

  it('written as logger files is read back value for value', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'history-'));
    try {
      const written = await writeLoggerFiles(request(), folder);
      const rows = [...historyRows(request())];
      let column = 0;
      for (const [index, device] of request().room.devices.entries()) {
        const file = written[index];
        expect(file?.deviceId).toBe(device.id);
        const lines = parse(await readFile(file?.path ?? '', 'utf8'));
        expect(lines[0]).toEqual(['time', ...device.sensors.map(({ key }) => key)]);
        const first = column;
        const expected = rows.map(({ at, values }) => [
          new Date(at).toISOString(),
          ...values.slice(first, first + device.sensors.length).map((value) => String(value ?? '')),
        ]);
        expect(lines.slice(1)).toEqual(expected);
        column += device.sensors.length;
      }
    } finally {
      await rm(folder, { recursive: true });
    }
  });
});
