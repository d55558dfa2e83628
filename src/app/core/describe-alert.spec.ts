import { describeAlert } from './describe-alert';
import { alert, boardAt } from './testing/board-builder';

const formatters = {
  value: (value: number) => `${value} °C`,
  bareValue: (value: number) => `${value}`,
  difference: (difference: number) => `${difference} °C`,
  duration: (ms: number) => `${ms / 60_000} min`,
  time: (at: number) => new Date(at).toISOString().slice(11, 16),
};
const now = Date.parse(boardAt);

describe('an alert in words', () => {
  it('while open says what, since when, how far off and what was wanted', () => {
    const words = describeAlert(alert(), formatters, now);
    expect(words.title).toBe('A1 air is 2.3 °C too warm');
    expect(words.sentence).toBe('Too warm since 13:54: 28.3 °C, wanted up to 26.');
  });

  it('once ended is told in the past', () => {
    const words = describeAlert(alert({ endedAt: '2026-12-01T14:18:00Z' }), formatters, now);
    expect(words.sentence).toContain('from 13:54 to 14:18');
  });

  it('about silence counts in milliseconds', () => {
    const silent = alert({
      kind: 'sensorSilent',
      peakValue: 1_560_000,
      peakExcess: 1_380_000,
      peakLimit: 180_000,
    });
    expect(describeAlert(silent, formatters, now).sentence).toBe(
      'No reading since 13:54: 26 min, expected every 3 min at least.',
    );
  });
});
