import type { ShelfClimate } from '../room/room-model';
import { readingAt, sampledSensor } from './sensor-sampling';

const climate: ShelfClimate = {
  airC: 22.4,
  rootZoneC: 20.1,
  leafC: 23,
  humidityRatioKgKg: 0.01,
  relativeHumidityPct: 60,
  ppfdUmolM2S: 230,
  illuminanceLx: 15_640,
  isLampLit: true,
  isMatHeating: false,
};
const SECOND = 1000;
const NOON = Date.parse('2025-12-01T12:00:00Z');

function sampled(quantity: 'airTemperature' | 'relativeHumidity' | 'ppfd', seed = 1) {
  return sampledSensor(
    { key: `a1-${quantity}`, quantity, shelf: 'A1', expectedIntervalSeconds: 10 },
    'Rack A',
    seed,
  );
}

function readings(sensor: ReturnType<typeof sampled>, count: number, effect = {}): (number | null)[] {
  return Array.from({ length: count }, (_unused, index) =>
    readingAt(sensor, climate, NOON + index * SECOND, effect),
  );
}

function heard(values: readonly (number | null)[]): number[] {
  return values.filter((value) => value !== null);
}

describe('a simulated sensor', () => {
  it('with the same seed reads the same, with another seed not', () => {
    expect(readings(sampled('airTemperature'), 50)).toEqual(readings(sampled('airTemperature'), 50));
    expect(readings(sampled('airTemperature', 2), 50)).not.toEqual(readings(sampled('airTemperature'), 50));
  });

  it('reads the truth within its noise and wandering', () => {
    for (const value of heard(readings(sampled('airTemperature'), 2000))) {
      expect(Math.abs(value - climate.airC)).toBeLessThan(0.15 + 5 * 0.05);
    }
  });

  it('in the dark reads no light at all', () => {
    const dark = { ...climate, ppfdUmolM2S: 0, isLampLit: false };
    const value = readingAt(sampled('ppfd'), dark, NOON, {});
    expect(value).toBe(0);
  });

  it('never reads more than 100 % humidity', () => {
    const fog = { ...climate, relativeHumidityPct: 100 };
    for (let second = 0; second < 500; second += 1) {
      expect(
        readingAt(sampled('relativeHumidity'), fog, NOON + second * SECOND, {}) ?? 0,
      ).toBeLessThanOrEqual(100);
    }
  });

  it('loses about two readings in a thousand', () => {
    const lost = 10_000 - heard(readings(sampled('airTemperature'), 10_000)).length;
    // Binomial with n = 10 000, p = 0.002: mean 20, five standard deviations 22.
    expect(Math.abs(lost - 20)).toBeLessThanOrEqual(22);
    expect(lost).toBeGreaterThan(0);
  });

  it('when silent reads nothing', () => {
    expect(heard(readings(sampled('airTemperature'), 50, { isSilent: true }))).toEqual([]);
  });

  it('having drifted fully is off by what a scenario says', () => {
    const at = NOON + 7 * SECOND;
    const calm = readingAt(sampled('relativeHumidity'), climate, at, {}) ?? NaN;
    const drifted = readingAt(sampled('relativeHumidity'), climate, at, { drift: 1 }) ?? NaN;
    expect(drifted - calm).toBeCloseTo(14, 6);
  });
});
