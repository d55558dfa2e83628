import { storedUnitOf, storedValue, unitOfText, unitsOf, valueInUnit } from './units';

describe('storedValue', () => {
  // Fixed points of the scales: BIPM SI brochure (2019) for the kelvin; water freezes at 32 °F and boils at 212 °F.
  it.each([
    ['°F', 32, 0],
    ['°F', 212, 100],
    ['°F', -40, -40],
    ['K', 273.15, 0],
    ['fraction', 0.602, 60.2],
    ['klx', 1.25, 1250],
    ['hPa', 10, 1],
    ['mbar', 10, 1],
    ['Pa', 1000, 1],
  ] as const)('of %s %d, is %d', (unit, value, stored) => {
    expect(storedValue(unit, value)).toBe(stored);
  });

  // NIST Special Publication 811 (2008), appendix B.8: 1 footcandle = 10.76391 lux.
  it('of a foot-candle, agrees with NIST SP 811', () => {
    expect(storedValue('fc', 1)).toBeCloseTo(10.76391, 5);
  });

  it('of a value in the stored unit, leaves every digit', () => {
    expect(storedValue('°C', 21.123456789)).toBe(21.123456789);
  });

  it.each([...unitsOf('airTemperature'), ...unitsOf('illuminance'), ...unitsOf('vapourPressureDeficit')])(
    'of %s, is undone by valueInUnit',
    (unit) => {
      expect(valueInUnit(unit, storedValue(unit, 12.5))).toBeCloseTo(12.5, 3);
    },
  );
});

describe('unitOfText', () => {
  it.each([
    ['°C', '°C'],
    ['deg C', '°C'],
    ['℃', '°C'],
    ['º C', '°C'],
    ['Celsius', '°C'],
    ['degF', '°F'],
    ['Kelvin', 'K'],
    ['%RH', '%'],
    ['% r.H.', '%'],
    ['pct', '%'],
    ['Lux', 'lx'],
    ['ft-c', 'fc'],
    ['foot candles', 'fc'],
    ['µmol m⁻² s⁻¹', 'µmol m⁻² s⁻¹'],
    ['μmol/m2/s', 'µmol m⁻² s⁻¹'],
    ['umol·m-2·s-1', 'µmol m⁻² s⁻¹'],
    ['µmol/m²s', 'µmol m⁻² s⁻¹'],
    ['g/m³', 'g m⁻³'],
  ])('of “%s”, is %s', (text, unit) => {
    expect(unitOfText(text)).toBe(unit);
  });

  it.each(['', 'ppm', 'V', 'shelf', 'mol', 'x'.repeat(1000)])('of “%s”, is null', (text) => {
    expect(unitOfText(text)).toBeNull();
  });
});

describe('storedUnitOf', () => {
  it('of every quantity, is the unit that the product stores', () => {
    expect([storedUnitOf('airTemperature'), storedUnitOf('relativeHumidity'), storedUnitOf('ppfd')]).toEqual([
      '°C',
      '%',
      'µmol m⁻² s⁻¹',
    ]);
  });
});
