import { spanAround } from './span-around';

describe('the time around an alert', () => {
  const now = Date.parse('2026-12-02T00:00:00Z');
  const hours = (iso: string, endedAt: string | null): number[] => {
    const { from, to } = spanAround({ beganAt: iso, endedAt }, now);
    return [from, to].map((at) => (at - Date.parse(iso)) / 3_600_000);
  };

  it('is half its length on either side, an hour at least, never the future', () => {
    expect(hours('2026-12-01T04:00:00Z', '2026-12-01T08:00:00Z')).toEqual([-2, 6]);
    expect(hours('2026-12-01T04:00:00Z', '2026-12-01T04:30:00Z')).toEqual([-1, 1.5]);
    expect(hours('2026-12-01T22:00:00Z', null)).toEqual([-1, 2]);
  });
});
