import { lampDay } from './testing/board-builder';
import { wasLit } from './was-lit';

const dayStart = Date.parse('2026-12-01T00:00:00Z');

describe('whether lamps were lit', () => {
  const night = { lit: false, measured: [{ from: '2026-12-01T06:00:00Z', to: '2026-12-01T22:00:00Z' }] };

  it.each([
    ['before they came on', lampDay(), '2026-12-01T05:59:00Z', false],
    ['while they shone', lampDay(), '2026-12-01T13:00:00Z', true],
    ['after they went off', lampDay(night), '2026-12-01T22:30:00Z', false],
    ['while they shone, though they are off by now', lampDay(night), '2026-12-01T21:59:00Z', true],
    ['since the last light reading', lampDay(), '2026-12-01T14:20:30Z', true],
    ['yesterday, when only now is known', lampDay(night), '2026-11-30T23:00:00Z', false],
    ['yesterday, of which nothing is known', lampDay({ lit: null }), '2026-11-30T23:00:00Z', null],
    ['under no lamp', lampDay({ hasLamp: false, lit: null }), '2026-12-01T13:00:00Z', false],
  ])('%s', (_, day, at, expected) => {
    expect(wasLit(day, at, dayStart)).toBe(expected);
  });

  it('goes by the plan where no sensor measures light', () => {
    const unmeasured = lampDay({ lit: true, measured: [], measuredHours: null });
    expect(wasLit(unmeasured, '2026-12-01T13:00:00Z', dayStart)).toBe(true);
    expect(wasLit(unmeasured, '2026-12-01T22:30:00Z', dayStart)).toBe(false);
  });
});
