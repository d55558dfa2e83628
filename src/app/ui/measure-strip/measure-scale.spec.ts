import { measureScale } from './measure-scale';

describe('the scale of a measure', () => {
  it('is the usual one while everything lies on it', () => {
    expect(measureScale('airTemperature', 22, { low: 20, high: 26 }, '°C')).toEqual({ low: 10, high: 34 });
    expect(measureScale('vapourPressureDeficit', null, null, '°C')).toEqual({ low: 0, high: 2.4 });
  });

  it('widens to a value or a wanted range beyond it', () => {
    expect(measureScale('airTemperature', 41, { low: 4, high: null }, '°C')).toEqual({ low: 4, high: 41 });
  });

  it('is in the reader’s unit', () => {
    expect(measureScale('airTemperature', 22, null, '°F')).toEqual({ low: 50, high: 93.2 });
  });
});
