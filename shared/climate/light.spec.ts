import {
  dailyLightIntegralMolM2,
  dliFromConstantPpfdMolM2D,
  lampKinds,
  lightSeconds,
  ppfdFromIlluminanceUmolM2S,
} from './light';

const HOUR_MS = 3_600_000;
const MINUTE_MS = 60_000;
const day = { from: 0, to: 24 * HOUR_MS, maxGapMs: 10 * MINUTE_MS };
const outOfRange = expect.objectContaining({ code: 'OUT_OF_RANGE' });

/** A reading every minute of a day and its last instant, from the hour of the day. */
function everyMinute(ppfdAt: (hour: number) => number): { at: number; value: number }[] {
  return Array.from({ length: 24 * 60 + 1 }, (_, minute) => ({
    at: minute * MINUTE_MS,
    value: ppfdAt(minute / 60),
  }));
}

const lampsFrom6To22 = everyMinute((hour) => (hour >= 6 && hour < 22 ? 200 : 0));

describe('dailyLightIntegralMolM2', () => {
  it('of lamps at 200 for 16 h is what constant light gives', () => {
    const light = dailyLightIntegralMolM2(lampsFrom6To22, day);

    expect(light.lightIntegralMolM2).toBeCloseTo(dliFromConstantPpfdMolM2D(200, 16), 9);
    expect(light.coverage).toBe(1);
  });

  it('of a half sine of light is 2/π of its peak, which no average of two readings gives', () => {
    // ∫ sin over half a wave: peak × hours × 2/π.
    const series = everyMinute((hour) => (hour <= 12 ? 600 * Math.sin((Math.PI * hour) / 12) : 0));
    const exact = (dliFromConstantPpfdMolM2D(600, 12) * 2) / Math.PI;

    expect(dailyLightIntegralMolM2(series, day).lightIntegralMolM2! / exact).toBeCloseTo(1, 5);
  });

  it('counts measured time only and says how much that was', () => {
    const firstHalf = everyMinute(() => 100).filter(({ at }) => at <= 12 * HOUR_MS);

    expect(dailyLightIntegralMolM2(firstHalf, day)).toEqual({
      lightIntegralMolM2: expect.closeTo(4.32, 9) as number,
      coverage: 0.5,
    });
  });

  it('of a dark day is 0, and of a day without readings null', () => {
    expect(
      dailyLightIntegralMolM2(
        everyMinute(() => 0),
        day,
      ).lightIntegralMolM2,
    ).toBe(0);
    expect(dailyLightIntegralMolM2([], day)).toEqual({ lightIntegralMolM2: null, coverage: 0 });
  });
});

describe('lightSeconds', () => {
  it('of lamps on for 16 h is 16 h, within the minute between readings', () => {
    const { lightSeconds: seconds } = lightSeconds(lampsFrom6To22, { ...day, threshold: 10 });

    expect(Math.abs(seconds! - 16 * 3600)).toBeLessThan(60);
  });

  it('counts a reading on the threshold as light', () => {
    expect(
      lightSeconds(
        everyMinute(() => 10),
        { ...day, threshold: 10 },
      ).lightSeconds,
    ).toBe(24 * 3600);
  });

  it('of a dark day is 0, and of a day without readings null', () => {
    expect(
      lightSeconds(
        everyMinute(() => 0),
        { ...day, threshold: 10 },
      ).lightSeconds,
    ).toBe(0);
    expect(lightSeconds([], { ...day, threshold: 10 }).lightSeconds).toBeNull();
  });
});

describe('dliFromConstantPpfdMolM2D', () => {
  it.each([
    [-1, 12],
    [5001, 12],
    [100, -1],
    [100, 24.1],
    [Number.NaN, 12],
  ])('refuses %d µmol m⁻² s⁻¹ for %d h', (ppfd, hours) => {
    expect(() => dliFromConstantPpfdMolM2D(ppfd, hours)).toThrow(outOfRange);
  });
});

describe('ppfdFromIlluminanceUmolM2S', () => {
  it('of darkness is 0', () => {
    expect(ppfdFromIlluminanceUmolM2S(0, lampKinds.whiteLed.luxPerUmol)).toBe(0);
  });

  it.each([
    [-1, 68],
    [1000, 0],
    [1000, Number.NaN],
  ])('refuses %d lx with a factor of %d', (illuminanceLx, luxPerUmol) => {
    expect(() => ppfdFromIlluminanceUmolM2S(illuminanceLx, luxPerUmol)).toThrow(outOfRange);
  });
});
