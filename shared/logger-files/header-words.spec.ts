import { meaningOfHeader, unitInHeader } from './header-words';

describe('meaningOfHeader', () => {
  it.each([
    ['Temperature (°C)', 'airTemperature', '°C'],
    ['temp_f', 'airTemperature', '°F'],
    ['temperatureC', 'airTemperature', '°C'],
    ['T1', 'airTemperature', null],
    ['Soil temp', 'rootZoneTemperature', null],
    ['Substrattemperatur [°C]', 'rootZoneTemperature', '°C'],
    ['RH %', 'relativeHumidity', '%'],
    ['Rel. humidity, %', 'relativeHumidity', '%'],
    ['HR (%)', 'relativeHumidity', '%'],
    ['PPFD', 'ppfd', null],
    ['Light (µmol/m²/s)', 'ppfd', 'µmol m⁻² s⁻¹'],
    ['Light (lx)', 'illuminance', 'lx'],
    ['VPD (kPa)', 'vapourPressureDeficit', 'kPa'],
    ['Taupunkt °C', 'dewPoint', '°C'],
    ['Absolute humidity', 'absoluteHumidity', null],
  ])('of “%s”, is %s in %p', (header, quantity, unit) => {
    expect(meaningOfHeader(header)).toMatchObject({ quantity, unit });
  });

  it.each([
    '',
    'Battery (%)',
    'Soil moisture (%)',
    'CO2 (ppm)',
    'Shelf C',
    'Humidity (°C)',
    'Pressure (hPa)',
    'Notes',
    'pH',
  ])('of “%s”, is null', (header) => {
    expect(meaningOfHeader(header)).toBeNull();
  });

  it('with a line of units, takes the unit from there', () => {
    expect(meaningOfHeader('Temperature', '°F')).toMatchObject({ quantity: 'airTemperature', unit: '°F' });
  });
});

describe('unitInHeader', () => {
  it.each([
    ['Light (µmol/(m² s))', 'µmol m⁻² s⁻¹'],
    ['Temp in °C', '°C'],
    ['°C', '°C'],
    ['Reading (shelf 2) [lux]', 'lx'],
  ])('of “%s”, is %s', (header, unit) => {
    expect(unitInHeader(header)?.unit).toBe(unit);
  });
});
