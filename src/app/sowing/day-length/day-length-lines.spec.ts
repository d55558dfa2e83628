import type { DayLengthYear } from '@shared/contracts/sowing';
import { dayLengthLines, extremesText, onionText } from './day-length-lines';

const year: DayLengthYear = {
  latitudeDeg: 53.3,
  year: 2026,
  days: [
    { day: '2026-06-21', hours: 17 },
    { day: '2026-12-21', hours: 7.5 },
  ],
  longest: { day: '2026-06-21', hours: 17 },
  shortest: { day: '2026-12-21', hours: 7.5 },
  onionClasses: ['long'],
  bulbing: [
    { onion: 'short', fromHours: 10 },
    { onion: 'long', fromHours: 14 },
  ],
};

describe('the length of the day', () => {
  it('is drawn with the onions that suit the place alone', () => {
    const lines = dayLengthLines(year);
    expect(lines.map(({ name }) => name)).toEqual(['Length of the day', 'long-day onions bulb from 14 h']);
    expect(lines[0]?.points[0]).toEqual([Date.parse('2026-06-21T12:00:00Z'), 17, 17, 17]);
    expect(lines[1]?.points.map(([, hours]) => hours)).toEqual([14, 14]);
  });

  it('says when it is longest and shortest', () => {
    expect(extremesText(year, (day) => day.slice(5)).replaceAll('\u00a0', ' ')).toBe(
      '17.0 h on 06-21, 7.5 h on 12-21',
    );
  });

  it('decides the onions, or says that growers disagree', () => {
    expect(onionText(year)).toBe('Onions for here: long-day.');
    expect(onionText({ onionClasses: ['intermediate', 'long'] })).toContain('intermediate-day or long-day;');
  });
});
