import fc from 'fast-check';

import {
  absoluteHumidityGM3,
  actualVapourPressureKPa,
  airFromReadings,
  dewPointC,
  relativeHumidityFromDewPointPct,
  saturationVapourPressureKPa,
  saturationVapourPressureSlopeKPaC,
  vapourPressureDeficitKPa,
  vpdUncertaintyKPa,
} from './psychrometrics';

const outOfRange = expect.objectContaining({ code: 'OUT_OF_RANGE' });
const temperatures = fc.double({ min: -20, max: 60, noNaN: true });
const air = fc.record({
  temperatureC: temperatures,
  relativeHumidityPct: fc.double({ min: 0.1, max: 100, noNaN: true }),
});

describe('saturationVapourPressureKPa', () => {
  it.each([-20, 0, 60])('accepts %d °C', (temperatureC) => {
    expect(saturationVapourPressureKPa(temperatureC)).toBeGreaterThan(0);
  });

  it.each([-20.001, 60.001, Number.NaN])('refuses %d °C', (temperatureC) => {
    expect(() => saturationVapourPressureKPa(temperatureC)).toThrow(outOfRange);
  });

  it('rises with temperature', () => {
    fc.assert(
      fc.property(temperatures, fc.double({ min: 0.001, max: 5, noNaN: true }), (temperatureC, stepC) => {
        fc.pre(temperatureC + stepC <= 60);
        expect(saturationVapourPressureKPa(temperatureC + stepC)).toBeGreaterThan(
          saturationVapourPressureKPa(temperatureC),
        );
      }),
    );
  });
});

describe('saturationVapourPressureSlopeKPaC', () => {
  // Central difference over 0.002 °C: its own error is far below the tolerance.
  it.each([-10, 0, 20, 45])('at %d °C is the derivative of the saturation pressure', (temperatureC) => {
    const difference =
      (saturationVapourPressureKPa(temperatureC + 0.001) -
        saturationVapourPressureKPa(temperatureC - 0.001)) /
      0.002;

    expect(saturationVapourPressureSlopeKPaC(temperatureC) / difference).toBeCloseTo(1, 6);
  });
});

describe('vapourPressureDeficitKPa', () => {
  it('of saturated air is 0', () => {
    expect(vapourPressureDeficitKPa({ temperatureC: 21, relativeHumidityPct: 100 })).toBe(0);
  });

  it('of dry air is the whole saturation pressure', () => {
    expect(vapourPressureDeficitKPa({ temperatureC: 21, relativeHumidityPct: 0 })).toBe(
      saturationVapourPressureKPa(21),
    );
  });

  it('of a leaf colder than the dew point is negative and not clamped', () => {
    expect(
      vapourPressureDeficitKPa({ temperatureC: 20, relativeHumidityPct: 95, leafOffsetC: -3 }),
    ).toBeLessThan(0);
  });

  it('is negative exactly where the leaf is below the dew point', () => {
    fc.assert(
      fc.property(air, fc.double({ min: -10, max: 10, noNaN: true }), (state, leafOffsetC) => {
        const aboveDewPointC = state.temperatureC + leafOffsetC - dewPointC(state)!;
        fc.pre(Math.abs(aboveDewPointC) > 1e-9);
        expect(vapourPressureDeficitKPa({ ...state, leafOffsetC }) > 0).toBe(aboveDewPointC > 0);
      }),
    );
  });

  it('and the vapour pressure add up to saturation', () => {
    fc.assert(
      fc.property(air, (state) => {
        expect(vapourPressureDeficitKPa(state) + actualVapourPressureKPa(state)).toBeCloseTo(
          saturationVapourPressureKPa(state.temperatureC),
          12,
        );
      }),
    );
  });

  it.each([
    { temperatureC: 61, relativeHumidityPct: 50 },
    { temperatureC: 20, relativeHumidityPct: -0.1 },
    { temperatureC: 20, relativeHumidityPct: 100.1 },
    { temperatureC: 20, relativeHumidityPct: Number.NaN },
    { temperatureC: 20, relativeHumidityPct: 50, leafOffsetC: -10.1 },
    { temperatureC: 20, relativeHumidityPct: 50, leafOffsetC: Number.NaN },
  ])('refuses $temperatureC °C, $relativeHumidityPct %, leaf $leafOffsetC', (state) => {
    expect(() => vapourPressureDeficitKPa(state)).toThrow(outOfRange);
  });
});

describe('dewPointC', () => {
  it('of air without water is undefined and null', () => {
    expect(dewPointC({ temperatureC: 20, relativeHumidityPct: 0 })).toBeNull();
  });

  it('of saturated air is its temperature, at 0 °C too', () => {
    expect(dewPointC({ temperatureC: 0, relativeHumidityPct: 100 })).toBe(0);
    expect(dewPointC({ temperatureC: 23.4, relativeHumidityPct: 100 })).toBeCloseTo(23.4, 12);
  });

  it('leads back to the relative humidity that it came from', () => {
    fc.assert(
      fc.property(air, (state) => {
        // Rounding may put the dew point of saturated air a hair above the air.
        const dewPoint = Math.min(dewPointC(state)!, state.temperatureC);
        const backPct = relativeHumidityFromDewPointPct({
          temperatureC: state.temperatureC,
          dewPointC: dewPoint,
        });
        expect(backPct / state.relativeHumidityPct).toBeCloseTo(1, 10);
      }),
    );
  });
});

describe('relativeHumidityFromDewPointPct', () => {
  it('refuses a dew point above the air temperature', () => {
    expect(() => relativeHumidityFromDewPointPct({ temperatureC: 20, dewPointC: 20.1 })).toThrow(outOfRange);
  });
});

describe('absoluteHumidityGM3', () => {
  it('is 0 without water and doubles with the relative humidity', () => {
    const atHalf = absoluteHumidityGM3({ temperatureC: 20, relativeHumidityPct: 50 });

    expect(absoluteHumidityGM3({ temperatureC: 20, relativeHumidityPct: 0 })).toBe(0);
    expect(absoluteHumidityGM3({ temperatureC: 20, relativeHumidityPct: 100 })).toBeCloseTo(2 * atHalf, 12);
  });
});

describe('vpdUncertaintyKPa', () => {
  it('of perfect sensors is 0', () => {
    const state = { temperatureC: 20, relativeHumidityPct: 50 };

    expect(vpdUncertaintyKPa(state, { temperatureC: 0, relativeHumidityPct: 0 })).toBe(0);
  });

  it('refuses a negative uncertainty', () => {
    const state = { temperatureC: 20, relativeHumidityPct: 50 };

    expect(() => vpdUncertaintyKPa(state, { temperatureC: -0.1, relativeHumidityPct: 1 })).toThrow(
      outOfRange,
    );
  });
});

describe('airFromReadings', () => {
  it('passes ordinary readings on, and zero as a measurement', () => {
    expect(airFromReadings(0, 0)).toEqual({ temperatureC: 0, relativeHumidityPct: 0 });
  });

  it('takes an overshoot up to 105 % as saturated', () => {
    expect(airFromReadings(20, 105)).toEqual({ temperatureC: 20, relativeHumidityPct: 100 });
  });

  it.each([
    [20, 105.1],
    [20, -0.1],
    [60.1, 50],
    [-20.1, 50],
    [Number.NaN, 50],
    [20, Number.NaN],
  ])('makes nothing of %d °C with %d %%', (temperatureC, relativeHumidityPct) => {
    expect(airFromReadings(temperatureC, relativeHumidityPct)).toBeNull();
  });
});
