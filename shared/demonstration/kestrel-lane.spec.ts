import { HISTORY_DAYS, kestrelLane } from './kestrel-lane';

const DAY = 86_400_000;
const NOW = Date.parse('2025-12-01T14:00:00Z');

describe('the demonstration’s room', () => {
  const room = kestrelLane(NOW);

  it('has two racks of four shelves, each with lamps and air sensors', () => {
    expect(room.shelves.map(({ label }) => label)).toEqual(['A1', 'A2', 'A3', 'A4', 'B1', 'B2', 'B3', 'B4']);
    const sensors = room.devices.flatMap((device) => device.sensors);
    for (const { label } of room.shelves) {
      const measured = sensors.filter(({ shelf }) => shelf === label).map(({ quantity }) => quantity);
      expect(measured).toEqual(expect.arrayContaining(['airTemperature', 'relativeHumidity']));
    }
    expect(new Set(sensors.map(({ key }) => key)).size).toBe(sensors.length);
  });

  it('has every shelf arranged from before its history on, in order', () => {
    for (const { arrangements } of room.shelves) {
      const starts = arrangements.map(({ from }) => Date.parse(from));
      expect(starts[0]).toBeLessThan(NOW - HISTORY_DAYS * DAY);
      expect(starts).toEqual([...starts].sort((a, b) => a - b));
      expect(starts.at(-1)).toBeLessThan(NOW);
    }
  });

  it('has mishaps that begin and end within its history', () => {
    for (const { from, to } of room.story) {
      expect(Date.parse(from)).toBeGreaterThan(NOW - HISTORY_DAYS * DAY);
      expect(Date.parse(from)).toBeLessThan(Date.parse(to));
      expect(Date.parse(to)).toBeLessThan(NOW);
    }
  });

  it('places its days on the room’s clock on both sides of a clock change', () => {
    // 68 days before 1 December 2025 is 24 September, summer time: 11:00 in Dublin is 10:00 UTC.
    const a4 = room.shelves.find(({ label }) => label === 'A4');
    expect(a4?.arrangements[1]?.from).toBe('2025-09-24T10:00:00.000Z');
    expect(a4?.arrangements.at(-1)?.from).toBe('2025-11-24T11:00:00.000Z');
  });
});
