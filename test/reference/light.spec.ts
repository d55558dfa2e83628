import { dliFromConstantPpfdMolM2D, lampKinds, ppfdFromIlluminanceUmolM2S } from '@shared/climate/light';

import { constantLight, publishedFactors } from './light-tables';

const LUX_PER_FOOT_CANDLE = 10.7639;

describe('dliFromConstantPpfdMolM2D', () => {
  it.each(constantLight)('of %d µmol m⁻² s⁻¹ for %d h is %d mol m⁻² d⁻¹', (ppfd, hours, expected) => {
    expect(dliFromConstantPpfdMolM2D(ppfd, hours)).toBeCloseTo(expected, 12);
  });
});

describe('lampKinds', () => {
  it.each(publishedFactors)(
    '%s agrees with both published forms of its factor',
    (kind, umolPerLux, footCandles) => {
      const { luxPerUmol } = lampKinds[kind];

      // Printed to four decimals, with one (0.0170 for 1/59) rounded to three.
      expect(Math.abs(1 / luxPerUmol - umolPerLux)).toBeLessThan(6e-5);
      if (footCandles !== null) {
        // The two copies were rounded apart: they agree within a hundredth of a foot-candle.
        expect(Math.abs(luxPerUmol / LUX_PER_FOOT_CANDLE - footCandles)).toBeLessThan(0.01);
      }
    },
  );
});

describe('ppfdFromIlluminanceUmolM2S', () => {
  // The sensor maker's sunlight table; its line for 200 prints 40,800 lx for 10,800.
  it.each([
    [10_800, 200],
    [16_200, 300],
  ])('of %d lx of sunlight is %d µmol m⁻² s⁻¹', (illuminanceLx, ppfd) => {
    expect(ppfdFromIlluminanceUmolM2S(illuminanceLx, lampKinds.sunlight.luxPerUmol)).toBe(ppfd);
  });
});
