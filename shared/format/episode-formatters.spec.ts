import { episodeFormatters } from './episode-formatters';

const now = Date.parse('2026-12-01T14:20:00Z');
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('an alert’s numbers for their reader', () => {
  it('are in the reader’s unit', () => {
    const { value, bareValue, difference } = episodeFormatters('°F', 'Europe/Dublin', now);
    expect(plain(value(28.3, 'airTemperature'))).toBe('82.9 °F');
    expect(bareValue(26, 'airTemperature')).toBe('78.8');
    expect(plain(difference(2.3, 'airTemperature'))).toBe('4.1 °F');
  });

  it('name the unit of a day’s light, which has no series', () => {
    const { value, bareValue, difference } = episodeFormatters('°C', 'Europe/Dublin', now);
    expect(plain(value(9.2, 'lightHours'))).toBe('9.2 h');
    expect(bareValue(16, 'lightHours')).toBe('16');
    expect(plain(difference(3, 'dailyLightIntegral'))).toBe('3.0 mol/m²');
  });

  it('are timed by the room’s clock', () => {
    const { time, duration } = episodeFormatters('°C', 'America/Halifax', now);
    expect(time(Date.parse('2026-12-01T13:54:00Z'))).toBe('09:54');
    expect(time(Date.parse('2026-12-01T03:54:00Z'))).toBe('yesterday 23:54');
    expect(plain(duration(26 * 60_000))).toBe('26 min');
  });
});
