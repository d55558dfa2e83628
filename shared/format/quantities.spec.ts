import {
  formatBareQuantity,
  formatQuantity,
  formatQuantityDifference,
  formatQuantityRange,
  shownRange,
} from './quantities';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

describe('a quantity for its reader', () => {
  it.each([
    ['airTemperature', 28.34, '°C', '28.3 °C'],
    ['airTemperature', 28.34, '°F', '83.0 °F'],
    ['relativeHumidity', 57.6, '°F', '58 %'],
    ['vapourPressureDeficit', 0, '°C', '0.00 kPa'],
    ['dewPoint', null, '°C', '–'],
  ] as const)('%s of %s, read in %s, is %s', (quantity, value, unit, text) => {
    expect(plain(formatQuantity(quantity, value, unit))).toBe(text);
  });

  it('can stand without its unit', () => {
    expect(formatBareQuantity('rootZoneTemperature', 20, '°F')).toBe('68.0');
  });

  it('differs in °F by nine fifths, without the freezing point', () => {
    expect(plain(formatQuantityDifference('airTemperature', 2.3, '°F'))).toBe('4.1 °F');
    expect(plain(formatQuantityDifference('relativeHumidity', 11, '°F'))).toBe('11 %');
  });

  it('is wanted within a range that keeps its open ends and needless zeros away', () => {
    expect(shownRange('airTemperature', { low: null, high: 25 }, '°F')).toEqual({ low: null, high: 77 });
    expect(plain(formatQuantityRange('airTemperature', { low: 20, high: 26 }, '°C'))).toBe('20–26 °C');
    expect(plain(formatQuantityRange('airTemperature', { low: 18, high: 26 }, '°F'))).toBe('64.4–78.8 °F');
  });
});
