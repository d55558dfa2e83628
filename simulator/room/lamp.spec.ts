import { litPpfdUmolM2S, shareOfLightLeft } from './lamp';

describe('the light left in a lamp', () => {
  it('of a tube falls by a tenth in its first thousand hours', () => {
    // A lighting consultant's figure for tri-phosphor tubes (weak source), to within two points.
    expect(Math.abs(shareOfLightLeft('fluorescent', 1000) - 0.9)).toBeLessThan(0.02);
  });

  it('of an LED is 90 % after the hours that its L90 states', () => {
    expect(shareOfLightLeft('whiteLed', 36_000)).toBeCloseTo(0.9, 9);
  });

  it.each(['whiteLed', 'fluorescent'] as const)('of a new %s is all of it', (kind) => {
    expect(shareOfLightLeft(kind, 0)).toBe(1);
  });

  it('before its fitting day is that of a new one', () => {
    const lamp = {
      kind: 'fluorescent' as const,
      watts: 50,
      ppfdWhenNewUmolM2S: 150,
      luxPerUmol: 74,
      fittedAt: '2025-06-01T00:00:00Z',
    };
    expect(litPpfdUmolM2S(lamp, Date.parse('2025-05-01T00:00:00Z'))).toBe(150);
  });
});
