import {
  lampDueOn,
  lampEnergyKWh,
  lampOutput,
  ledDecay,
  ledHoursTo,
  ledOutput,
  longestProjectionHours,
  type WearingLamp,
} from './lamp-wear';

const led: WearingLamp = {
  kind: 'whiteLed',
  fittedOn: '2025-01-10',
  hoursRun: 0,
  l70Hours: 50_000,
  l90Hours: null,
};
const tube: WearingLamp = { ...led, kind: 'fluorescent', l70Hours: null };
const invalid = expect.objectContaining({ code: 'INVALID_ARGUMENT' });

describe('ledHoursTo', () => {
  it('of 70 % at α = 5.095e-6 is 70 005 h', () => {
    // By arithmetic: ln(1/0.7)/5.095e-6.
    expect(ledHoursTo({ b: 1, alphaPerHour: 5.095e-6 }, 70)).toBeCloseTo(70_005, 0);
  });
});

describe('ledDecay', () => {
  it.each([
    [{ l70Hours: 50_000, l90Hours: null }, 50_000, 0.7],
    [{ l70Hours: null, l90Hours: 20_000 }, 20_000, 0.9],
    [{ l70Hours: 60_000, l90Hours: 20_000 }, 20_000, 0.9],
    [{ l70Hours: 60_000, l90Hours: 20_000 }, 60_000, 0.7],
  ])('of %j passes through what was stated', (life, hours, share) => {
    const decay = ledDecay(life);

    expect(decay).not.toBeNull();
    expect(ledOutput(decay!, hours)).toBeCloseTo(share, 12);
    expect(ledHoursTo(decay!, 100 * share)).toBeCloseTo(hours, 6);
  });

  it('never gives more than its first light', () => {
    expect(ledOutput(ledDecay({ l70Hours: 60_000, l90Hours: 40_000 })!, 0)).toBe(1);
  });

  it('is null when nothing was stated', () => {
    expect(ledDecay({ l70Hours: null, l90Hours: null })).toBeNull();
  });

  it.each([
    [20_000, 30_000],
    [20_000, 20_000],
    [0, null],
    [NaN, null],
  ])('refuses L70 %d with L90 %p', (l70Hours, l90Hours) => {
    expect(() => ledDecay({ l70Hours, l90Hours })).toThrow(invalid);
  });
});

describe('longestProjectionHours', () => {
  it('of a test of 6000 h is 36 000 h (IES TM-21)', () => {
    expect(longestProjectionHours(6000)).toBe(36_000);
  });
});

describe('lampOutput', () => {
  it.each([
    [0, 1],
    [500, 0.95],
    [1000, 0.9],
    [8000, 0.9],
  ])('of a tube after %d h is %d', (hoursRun, share) => {
    expect(lampOutput({ ...tube, hoursRun })?.value).toBeCloseTo(share, 12);
  });

  it('of an LED follows its stated life', () => {
    expect(lampOutput({ ...led, hoursRun: 25_000 })?.value).toBeCloseTo(Math.sqrt(0.7), 12);
  });

  it('is not known without a stated life or for other kinds', () => {
    expect(lampOutput({ ...led, l70Hours: null })).toBeNull();
    expect(lampOutput({ ...led, kind: 'metalHalide' })).toBeNull();
  });
});

describe('lampDueOn', () => {
  it('of a tube is a year after fitting, however long it burns', () => {
    expect(lampDueOn(tube, 0, '2025-06-01')).toEqual({
      value: '2026-01-10',
      source: 'common practice, no source',
    });
  });

  it('of an LED is when its stated hours are over', () => {
    // 160 h left at 16 h a day.
    expect(lampDueOn({ ...led, hoursRun: 49_840 }, 16, '2025-06-01')?.value).toBe('2025-06-11');
    expect(lampDueOn({ ...led, hoursRun: 49_840, l90Hours: 20_000 }, 16, '2025-06-01')?.value).toBe(
      '2025-06-11',
    );
    expect(lampDueOn({ ...led, hoursRun: 51_000 }, 16, '2025-06-01')?.value).toBe('2025-06-01');
  });

  it('is open for an LED that stays dark or has no stated hours', () => {
    expect(lampDueOn(led, 0, '2025-06-01')).toBeNull();
    expect(lampDueOn({ ...led, l70Hours: null }, 16, '2025-06-01')).toBeNull();
  });
});

describe('lampEnergyKWh', () => {
  it('of 42 W over 500 h is 21 kWh', () => {
    expect(lampEnergyKWh(42, 500)).toBe(21);
  });
});
