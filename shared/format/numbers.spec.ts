import fc from 'fast-check';
import {
  formatNumber,
  formatRange,
  formatShare,
  formatValue,
  shownTemperature,
  shownTemperatureDifference,
  typedTemperatureC,
} from './numbers';

describe('a number', () => {
  it.each([
    [28.34, 1, '28.3'],
    [0, 1, '0.0'],
    [-0.04, 1, '0.0'],
    [-3.25, 1, '−3.3'],
    [120214, 0, '120\u202f214'],
  ])('of %d with %d decimals reads %s', (value, decimals, text) => {
    expect(formatNumber(value, decimals)).toBe(text);
  });

  it('that is missing reads as a dash, with no unit', () => {
    expect(formatValue(null, '°C', 1)).toBe('–');
  });

  it('stays on one line with its unit', () => {
    expect(formatValue(0, 'kPa', 2)).toBe('0.00\u00a0kPa');
  });
});

describe('a wanted range', () => {
  it.each([
    [{ low: 20, high: 26 }, '20–26\u00a0°C'],
    [{ low: null, high: 26 }, 'up to 26\u00a0°C'],
    [{ low: 0, high: null }, 'at least 0\u00a0°C'],
    [{ low: null, high: null }, '–'],
  ])('of %j reads %s', (range, text) => {
    expect(formatRange(range, '°C', 0)).toBe(text);
  });
});

describe('a share', () => {
  it.each([
    [0, '0\u00a0%'],
    [0.001, 'under 1\u00a0%'],
    [0.914, '91\u00a0%'],
    [0.999, '99\u00a0%'],
    [1, '100\u00a0%'],
    [null, '–'],
  ])('of %d reads %s', (share, text) => {
    expect(formatShare(share)).toBe(text);
  });
});

describe('a temperature in °F', () => {
  // The fixed points of the Fahrenheit scale as used since 1954: ice 32, steam 212, both scales meet at -40.
  it.each([
    [0, 32],
    [100, 212],
    [-40, -40],
  ])('of %d °C is %d', (celsius, fahrenheit) => {
    expect(shownTemperature(celsius, '°F')).toBeCloseTo(fahrenheit, 10);
  });

  it('comes back as it was when typed in again', () => {
    fc.assert(
      fc.property(fc.double({ min: -60, max: 120, noNaN: true }), (celsius) => {
        expect(typedTemperatureC(shownTemperature(celsius, '°F'), '°F')).toBeCloseTo(celsius, 9);
      }),
    );
  });

  it('differs by 1.8 for each degree Celsius', () => {
    expect(shownTemperatureDifference(2.5, '°F')).toBeCloseTo(4.5, 10);
    expect(shownTemperatureDifference(2.5, '°C')).toBe(2.5);
  });
});
