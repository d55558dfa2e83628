import { frostRiskAt } from './frost-date';

describe('frostRiskAt', () => {
  it.each([
    // NOAA's own wording: a spring 90 % level of 1 March means that in nine years of ten it freezes later.
    ['probability', 90, 'spring', 0.9],
    ['probability', 10, 'spring', 0.1],
    ['probability', 50, 'spring', 0.5],
    // NOAA, autumn: the chance of the temperature earlier than the date.
    ['probability', 10, 'autumn', 0.1],
    // MRCC: early is the 10th, late the 90th percentile of the dates.
    ['percentile', 10, 'spring', 0.9],
    ['percentile', 90, 'spring', 0.1],
    ['percentile', 50, 'spring', 0.5],
    ['percentile', 10, 'autumn', 0.1],
    ['percentile', 90, 'autumn', 0.9],
    ['probability', 0, 'spring', 0],
    ['percentile', 100, 'spring', 0],
  ] as const)('of a %s of %d in %s is %d', (kind, percent, season, risk) => {
    expect(frostRiskAt({ kind, percent }, season)).toBeCloseTo(risk, 12);
  });

  it('of an average is not known: it is a mean, not a median', () => {
    expect(frostRiskAt({ kind: 'average' }, 'spring')).toBeNull();
  });

  it.each([-1, 101, NaN])('refuses %d percent', (percent) => {
    expect(() => frostRiskAt({ kind: 'probability', percent }, 'spring')).toThrow(
      expect.objectContaining({ code: 'OUT_OF_RANGE' }),
    );
  });
});
