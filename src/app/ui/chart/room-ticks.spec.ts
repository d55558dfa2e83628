import { formatTime } from '@shared/format/room-time';
import { roomTicks, tickLabel } from './room-ticks';

const dublin = 'Europe/Dublin';
const hourMs = 3_600_000;

describe('the ticks of an axis', () => {
  it('of a week are the midnights of the room and not of the reader', () => {
    const span = { from: Date.UTC(2026, 10, 25, 3), to: Date.UTC(2026, 11, 2, 3) };
    const ticks = roomTicks(span, 8, 'Asia/Kathmandu');
    expect(ticks).toHaveLength(7);
    expect(ticks.map((at) => formatTime(at, 'Asia/Kathmandu'))).toEqual(Array(7).fill('00:00'));
  });

  it('stay on midnight when the clocks go back', () => {
    // Ireland leaves summer time on 25 October 2026 at 01:00 UTC.
    const span = { from: Date.UTC(2026, 9, 23), to: Date.UTC(2026, 9, 28) };
    const ticks = roomTicks(span, 6, dublin);
    expect(ticks.map((at) => tickLabel(at, span, dublin))).toEqual([
      'Sat 24 Oct',
      'Sun 25 Oct',
      'Mon 26 Oct',
      'Tue 27 Oct',
      'Wed 28 Oct',
    ]);
    expect((ticks[2] ?? 0) - (ticks[1] ?? 0)).toBe(25 * hourMs);
  });

  it('of a day name the hours, and the day at midnight', () => {
    const span = { from: Date.UTC(2026, 11, 1, 9), to: Date.UTC(2026, 11, 2, 9) };
    expect(roomTicks(span, 3, dublin).map((at) => tickLabel(at, span, dublin))).toEqual([
      '12:00',
      'Wed 2 Dec',
    ]);
    expect(roomTicks(span, 5, dublin).map((at) => tickLabel(at, span, dublin))).toEqual([
      '12:00',
      '18:00',
      'Wed 2 Dec',
      '06:00',
    ]);
  });

  it('of a season are dates, and of years dates with their year', () => {
    const season = { from: Date.UTC(2026, 5, 1), to: Date.UTC(2026, 8, 1) };
    expect(tickLabel(Date.UTC(2026, 5, 14, 23), season, dublin)).toBe('15 Jun');
    const years = { from: Date.UTC(2024, 5, 1), to: Date.UTC(2026, 8, 1) };
    expect(tickLabel(Date.UTC(2026, 5, 14, 23), years, dublin)).toBe('15 Jun 2026');
  });

  it.each([10 * 60_000, hourMs, 30 * hourMs, 90 * 24 * hourMs, 3000 * 24 * hourMs])(
    'of %d ms are no more than asked for, and inside the span',
    (length) => {
      const span = { from: Date.UTC(2026, 0, 31, 22, 13), to: Date.UTC(2026, 0, 31, 22, 13) + length };
      const ticks = roomTicks(span, 8, dublin);
      expect(ticks.length).toBeGreaterThan(0);
      expect(ticks.length).toBeLessThanOrEqual(9);
      ticks.forEach((at) => expect(at >= span.from && at <= span.to).toBe(true));
    },
  );
});
