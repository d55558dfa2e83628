import { alert } from '../../core/testing/board-builder';
import { alertTimeLine, spanAround } from './time-line';

const texts = (changes: Parameters<typeof alert>[0], peak: string | null = '28.3 °C'): string[] =>
  alertTimeLine(alert(changes), peak).map(({ text }) => text);

describe('the time line of an alert', () => {
  it('is in order of time, with only what has happened', () => {
    expect(texts({})).toEqual(['Began', 'Alert opened', 'Mail sent', 'Farthest off: 28.3 °C']);
  });

  it('goes on to its end, with who has seen it and what they wrote', () => {
    const over = {
      acknowledgedAt: '2026-12-01T14:10:00Z',
      acknowledgedByName: 'Maren Oxley',
      acknowledgeNote: 'Vent opened',
      endedAt: '2026-12-01T14:16:00Z',
      clearedAt: '2026-12-01T14:21:00Z',
    };
    expect(texts(over).slice(3)).toEqual([
      'Seen by Maren Oxley: “Vent opened”',
      'Farthest off: 28.3 °C',
      'Back where it should be',
      'Over',
    ]);
  });

  it('has no peak where a peak says nothing', () => {
    expect(texts({ kind: 'sensorSilent' }, null)).not.toContain('Farthest off: ');
  });
});

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
