import { humidityRatioAtSaturationKgKg, relativeHumidityPct } from './moist-air';

describe('moist air', () => {
  // ASHRAE Fundamentals (2017), ch. 1, as the tests of psychrolib 1.1.1 quote it; the ideal gas lies 0.5 % below real air.
  it.each([
    [5, 0.005425, 0.006],
    [25, 0.020173, 0.006],
  ])('saturated at %d °C holds ASHRAE’s %d kg/kg', (temperatureC, published, tolerance) => {
    expect(Math.abs(humidityRatioAtSaturationKgKg(temperatureC) / published - 1)).toBeLessThan(tolerance);
  });

  it('warmed without losing water becomes drier', () => {
    const waterKgKg = humidityRatioAtSaturationKgKg(10);
    expect(relativeHumidityPct(10, waterKgKg)).toBeCloseTo(100, 9);
    // 10 °C and 20 °C: 1.228 over 2.338 kPa, FAO Irrigation and Drainage Paper 56, Annex 2, Table 2.3.
    expect(relativeHumidityPct(20, waterKgKg)).toBeCloseTo((100 * 1.228) / 2.338, 1);
  });

  it('cooled below its dew point stays at 100 %', () => {
    expect(relativeHumidityPct(5, humidityRatioAtSaturationKgKg(10))).toBe(100);
  });
});
