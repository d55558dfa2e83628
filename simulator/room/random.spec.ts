import fc from 'fast-check';
import { gaussianAt, smoothNoiseAt, uniformAt } from './random';

const SAMPLES = 20_000;

describe('chance by place', () => {
  it('is the same whenever it is asked for, and lies from 0 up to 1', () => {
    fc.assert(
      fc.property(fc.integer(), fc.integer(), (seed, place) => {
        const value = uniformAt(seed, place);
        expect(uniformAt(seed, place)).toBe(value);
        expect(value >= 0 && value < 1).toBe(true);
      }),
    );
  });

  it('fills ten equal classes evenly: chi-squared below its 99.9 % point for nine degrees of freedom', () => {
    const counts = new Array<number>(10).fill(0);
    for (let place = 0; place < SAMPLES; place += 1) {
      const bin = Math.floor(10 * uniformAt(42, place));
      counts[bin] = (counts[bin] ?? 0) + 1;
    }
    const expected = SAMPLES / 10;
    // 27.88: chi-squared distribution, 9 degrees of freedom, p = 0.001 (any table of it).
    expect(counts.reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0)).toBeLessThan(27.88);
  });

  it('as a bell curve has mean 0 and standard deviation 1 within four standard errors', () => {
    const values = Array.from({ length: SAMPLES }, (_unused, place) => gaussianAt(5, place));
    const mean = values.reduce((sum, value) => sum + value, 0) / SAMPLES;
    const deviation = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / SAMPLES);
    expect(Math.abs(mean)).toBeLessThan(4 / Math.sqrt(SAMPLES));
    expect(Math.abs(deviation - 1)).toBeLessThan(4 / Math.sqrt(2 * SAMPLES));
  });

  it('as smooth noise stays within ±1 and never jumps: its slope is at most 15/8 of the step in height', () => {
    fc.assert(
      fc.property(fc.integer(), fc.double({ min: -1e5, max: 1e5, noNaN: true }), (seed, position) => {
        const value = smoothNoiseAt(seed, position);
        expect(Math.abs(value)).toBeLessThanOrEqual(1);
        expect(Math.abs(smoothNoiseAt(seed, position + 1e-3) - value)).toBeLessThanOrEqual(
          2 * 1.875e-3 + 1e-9,
        );
      }),
    );
  });
});
