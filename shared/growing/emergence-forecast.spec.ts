import fc from 'fast-check';

import { cropById } from './crops/crop-library';
import type { SeedFigures } from './crops/crop';
import { forecastEmergence, ownThermalTime, type WaitingSowing } from './emergence-forecast';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const SOWN = Date.UTC(2026, 2, 1);

function seedOf(id: string): SeedFigures {
  const seed = cropById(id)?.seed ?? null;
  if (seed === null) throw new Error(`no seed of ${id}`);
  return seed;
}

/** Readings every half hour from sowing on. */
function warmth(days: number, temperatureC: (day: number) => number): { at: number; value: number }[] {
  return Array.from({ length: days * 48 + 1 }, (_, half) => ({
    at: SOWN + (half * HOUR_MS) / 2,
    value: temperatureC(half / 48),
  }));
}

function sowing(
  id: string,
  days: number,
  temperatureC: number,
  more: Partial<WaitingSowing> = {},
): WaitingSowing {
  return {
    seed: seedOf(id),
    sownAt: SOWN,
    now: SOWN + days * DAY_MS,
    temperature: warmth(days, () => temperatureC),
    maxGapMs: HOUR_MS,
    ownSumsCD: [],
    ...more,
  };
}

const days = (at: number | null | undefined): number => ((at ?? NaN) - SOWN) / DAY_MS;

describe('forecastEmergence', () => {
  it.each([
    // Harrington & Minges (1954), days at a steady temperature.
    ['onion-long-day', 10, 13],
    ['onion-long-day', 15, 7],
    ['onion-long-day', 20, 5],
    ['leek', 15, 7],
    ['tomato', 20, 8],
    ['tomato', 25, 6],
    ['sweet-pepper', 20, 13],
    ['sweet-pepper', 25, 8],
    ['lettuce-head', 15, 4],
    ['celery', 15, 12],
    ['cucumber', 25, 4],
  ])('of %s at %d °C holds the trial’s %d days in its range', (id, temperatureC, trialDays) => {
    const forecast = forecastEmergence(sowing(id, 2, temperatureC));
    const byTrial = forecast.published.find(({ source }) => source.includes('Harrington & Minges'));

    expect(days(byTrial?.at)).toBeCloseTo(trialDays, 6);
    expect(days(forecast.earliest?.at)).toBeLessThanOrEqual(trialDays + 1e-6);
    expect(days(forecast.latest?.at)).toBeGreaterThanOrEqual(trialDays - 1e-6);
  });

  it('takes rates between the trial’s temperatures from a straight line', () => {
    const forecast = forecastEmergence(sowing('onion-long-day', 2, 12.5));
    const byTrial = forecast.published.find(({ source }) => source.includes('Harrington & Minges'));

    // Halfway between one in 13 days at 10 °C and one in 7 at 15 °C.
    expect(days(byTrial?.at)).toBeCloseTo(2 / (1 / 13 + 1 / 7), 6);
  });

  it('of onion at 15 °C reaches from Brewster’s paper to Bierhuizen & Wagenvoort’s soil, and names both', () => {
    const { earliest, latest } = forecastEmergence(sowing('onion-long-day', 2, 15));

    // 80/(15 − 2.5) and 219/(15 − 1.4) days.
    expect(days(earliest?.at)).toBeCloseTo(6.4, 6);
    expect(earliest?.source).toContain('Brewster');
    expect(days(latest?.at)).toBeCloseTo(219 / 13.6, 6);
    expect(latest?.source).toContain('Bierhuizen');
  });

  it('overlaps the 10 to 20 days that growers count for onion and leek in a room of 15 °C', () => {
    // Common practice, no source.
    const { earliest, latest } = forecastEmergence(sowing('leek', 2, 15));

    expect(days(earliest?.at)).toBeLessThan(20);
    expect(days(latest?.at)).toBeGreaterThan(10);
  });

  it('adds the warmth there was to the mean of the last 72 hours', () => {
    // Of Brewster's 80 °C·d above 2.5 °C two days at 12.5 °C make 20 and three at 22.5 °C the other 60.
    const temperature = warmth(5, (day) => (day < 2 ? 12.5 : 22.5));
    const forecast = forecastEmergence(sowing('onion-long-day', 5, 0, { temperature }));

    expect(forecast.outlookC).toBeCloseTo(22.5, 1);
    expect(days(forecast.earliest?.at)).toBeCloseTo(5, 1);
  });

  it('says when a passed expectation was due', () => {
    const { earliest, isLate } = forecastEmergence(sowing('onion-long-day', 10, 15));

    expect(days(earliest?.at)).toBeCloseTo(6.4, 2);
    expect(isLate).toBe(false);
  });

  it('is late once every source has been', () => {
    expect(forecastEmergence(sowing('onion-long-day', 17, 15)).isLate).toBe(true);
    expect(forecastEmergence(sowing('onion-long-day', 16, 15)).isLate).toBe(false);
  });

  it('expects nothing where nothing germinates, and is not late for it', () => {
    // Harrington & Minges: no pepper at 10 °C; the remembered base is 6 °C, so one source still hopes.
    const pepper = forecastEmergence(sowing('sweet-pepper', 5, 10));
    const cold = forecastEmergence(sowing('sweet-pepper', 5, 5));

    expect(pepper.published.map(({ at }) => at !== null)).toEqual([true, false]);
    expect(cold).toMatchObject({ earliest: null, latest: null, isLate: false });
  });

  it('without recent readings expects nothing and says how little was measured', () => {
    const forecast = forecastEmergence(sowing('tomato', 8, 20, { temperature: warmth(2, () => 20) }));

    expect(forecast).toMatchObject({ earliest: null, outlookC: null });
    expect(forecast.coverage).toBeCloseTo(0.25, 9);
  });

  it('counts gaps at the temperature gone on with, and says so by its coverage', () => {
    const temperature = warmth(4, () => 20).filter(
      ({ at }) => at <= SOWN + 12 * HOUR_MS || at >= SOWN + 36 * HOUR_MS,
    );
    const forecast = forecastEmergence(sowing('tomato', 4, 20, { temperature }));

    expect(forecast.coverage).toBeCloseTo(0.75, 9);
    expect(days(forecast.latest?.at)).toBeCloseTo(8, 6);
  });

  it('keeps to the published range for two emergences of its own and to its own from three on', () => {
    const two = forecastEmergence(sowing('onion-long-day', 2, 15, { ownSumsCD: [120, 140] }));
    const three = forecastEmergence(sowing('onion-long-day', 2, 15, { ownSumsCD: [120, 140, 130] }));

    expect(two.basis).toBe('published');
    expect(three.basis).toBe('room');
    // 120 and 140 °C·d above 2.5 °C.
    expect(days(three.earliest?.at)).toBeCloseTo(120 / 12.5, 6);
    expect(days(three.latest?.at)).toBeCloseTo(140 / 12.5, 6);
    expect(three.earliest?.source).toContain('3 past emergences');
    expect(three.published).toHaveLength(3);
  });

  it('has no figures for a crop without published emergence, and says nothing', () => {
    expect(forecastEmergence(sowing('mint', 5, 20))).toMatchObject({ earliest: null, published: [] });
  });

  it('refuses a sowing in the future', () => {
    expect(() => forecastEmergence(sowing('tomato', 2, 20, { now: SOWN }))).toThrow(
      expect.objectContaining({ code: 'INVALID_ARGUMENT' }),
    );
  });

  it('never comes later for being warmer within the linear range', () => {
    const temperature = fc.double({ min: 6, max: 24, noNaN: true });
    fc.assert(
      fc.property(temperature, fc.double({ min: 0.1, max: 1, noNaN: true }), (cooler, warmer) => {
        const at = (temperatureC: number) =>
          forecastEmergence(sowing('onion-long-day', 1, temperatureC)).latest?.at ?? Infinity;

        expect(at(cooler + warmer)).toBeLessThanOrEqual(at(cooler));
      }),
      { numRuns: 50 },
    );
  });
});

describe('ownThermalTime', () => {
  it('of a past sowing forecasts the same days again', () => {
    const past = {
      sownAt: SOWN,
      upAt: SOWN + 11 * DAY_MS,
      temperature: warmth(11, () => 16),
      maxGapMs: HOUR_MS,
    };
    const sumCD = ownThermalTime(seedOf('onion-long-day'), past) ?? NaN;
    const forecast = forecastEmergence(sowing('onion-long-day', 3, 16, { ownSumsCD: [sumCD, sumCD, sumCD] }));

    expect(sumCD).toBeCloseTo(11 * 13.5, 6);
    expect(days(forecast.earliest?.at)).toBeCloseTo(11, 6);
    expect(days(forecast.latest?.at)).toBeCloseTo(11, 6);
  });

  it('is null when too little was measured', () => {
    const past = {
      sownAt: SOWN,
      upAt: SOWN + 11 * DAY_MS,
      temperature: warmth(8, () => 16),
      maxGapMs: HOUR_MS,
    };

    expect(ownThermalTime(seedOf('onion-long-day'), past)).toBeNull();
  });
});
