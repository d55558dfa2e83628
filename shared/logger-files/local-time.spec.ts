import fc from 'fast-check';
import { DateTime } from 'luxon';
import { createLocalTime, zoneOfName } from './local-time';

// Oracle: luxon turns every instant into the wall-clock time of its zone; here the way back is checked against it.
const zones = [
  'Europe/Berlin',
  'America/New_York',
  'Australia/Lord_Howe',
  'America/Sao_Paulo',
  'Asia/Kathmandu',
  'Pacific/Apia',
];

function wallOf(atMs: number, zone: string): number {
  return atMs + DateTime.fromMillis(atMs, { zone }).offset * 60_000;
}

describe('createLocalTime', () => {
  it.each(zones)('in %s, finds every instant again from its wall-clock time', (zone) => {
    const local = createLocalTime(zone);
    const range = { min: Date.UTC(1990, 0, 2), max: Date.UTC(2030, 0, 1) };
    fc.assert(
      fc.property(fc.integer(range), (atMs) => {
        const found = local.resolve(wallOf(atMs, zone));
        expect(found).toBeGreaterThan(0);
        expect([local.earlier, local.later]).toContain(atMs);
        expect(local.later - local.earlier > 0).toBe(found === 2);
      }),
      { numRuns: 500 },
    );
  });

  // Directive 2000/84/EC: clocks change at 01:00 UTC on the last Sundays of March and October.
  it.each([
    ['before the gap', Date.UTC(2026, 2, 29, 1, 59, 59), 1],
    ['at the start of the gap', Date.UTC(2026, 2, 29, 2), 0],
    ['at the end of the gap', Date.UTC(2026, 2, 29, 2, 59, 59), 0],
    ['after the gap', Date.UTC(2026, 2, 29, 3), 1],
    ['before the repeated hour', Date.UTC(2026, 9, 25, 1, 59, 59), 1],
    ['at the start of the repeated hour', Date.UTC(2026, 9, 25, 2), 2],
    ['at the end of the repeated hour', Date.UTC(2026, 9, 25, 2, 59, 59), 2],
    ['after the repeated hour', Date.UTC(2026, 9, 25, 3), 1],
  ])('in Berlin %s, finds as many instants as there were', (_says, wallMs, count) => {
    expect(createLocalTime('Europe/Berlin').resolve(wallMs)).toBe(count);
  });

  it('with a name that is no zone, throws', () => {
    expect(() => createLocalTime('Nowhere/Land')).toThrow(RangeError);
    expect(zoneOfName('Nowhere/Land')).toBeNull();
  });
});
