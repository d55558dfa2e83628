import {
  dayLengthText,
  eatenText,
  frostOffsetText,
  rangeText,
  temperatureText,
  weeksText,
} from './crop-words';

const plain = (text: string): string => text.replaceAll('\u2060', '').replaceAll('\u00a0', ' ');

describe('figures of a crop in words', () => {
  it.each([
    [{ low: 18, high: 21 }, '18–21 °C'],
    [{ low: 18.3, high: 21 }, '18.3–21.0 °C'],
    [{ low: 8, high: null }, 'at least 8 °C'],
    [{ low: null, high: 0 }, 'up to 0 °C'],
    [{ low: 6, high: 6 }, '6 °C'],
  ])('%j is %s', (range, words) => {
    expect(plain(rangeText(range, '°C'))).toBe(words);
  });

  it('are in the reader’s unit where they are warmth', () => {
    expect(plain(temperatureText({ low: 18.333, high: 21.111 }, '°F'))).toBe('65–70 °F');
    expect(plain(temperatureText({ low: null, high: 21 }, '°C'))).toBe('up to 21 °C');
  });

  it.each([
    [{ low: -6, high: -2 }, '2 to 6 weeks before the last frost'],
    [{ low: 0, high: 2 }, '0 to 2 weeks after the last frost'],
    [{ low: -1, high: 2 }, 'from 1 week before to 2 weeks after the last frost'],
    [{ low: -1, high: -1 }, '1 week before the last frost'],
    [{ low: 0, high: 0 }, 'at the last frost'],
  ])('weeks %j are %s', (span, words) => {
    expect(frostOffsetText(span)).toBe(words);
  });

  it('count weeks as a person does', () => {
    expect([weeksText(1), weeksText(6, 8), weeksText(0), weeksText(1.5, 2)]).toEqual([
      '1 week',
      '6 to 8 weeks',
      '0 weeks',
      '1.5 to 2 weeks',
    ]);
  });

  it('say how a crop answers to the day', () => {
    expect(plain(dayLengthText({ kind: 'bulbs', fromHours: 14, onion: 'long' }))).toBe(
      'forms bulbs from 14 h of light a day',
    );
    expect(plain(dayLengthText({ kind: 'flowersUnder', toHours: 12 }))).toContain('at most 12 h');
    expect(dayLengthText({ kind: 'indifferent' })).toBe('makes no difference');
  });

  it('say honestly what is not food', () => {
    expect(eatenText({ eaten: null })).toBe('not for eating');
    expect(eatenText({ eaten: 'bulb' })).toBe('eaten: bulb');
  });
});
