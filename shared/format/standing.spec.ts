import fc from 'fast-check';
import { standing } from './standing';

describe('a value against its wanted range', () => {
  const wanted = { low: 20, high: 26 };

  it.each([
    [19.5, 'below', 0.5],
    [20, 'inside', 0],
    [26, 'inside', 0],
    [28.25, 'above', 2.25],
  ])('of 20 to 26, %d is %s by %d', (value, side, by) => {
    expect(standing(value, wanted)).toEqual({ side, by });
  });

  it('with an open end is never off at that end', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true }), (value) => {
        expect(standing(value, { low: null, high: 26 }).side).not.toBe('below');
        expect(standing(value, { low: 0, high: null }).side).not.toBe('above');
      }),
    );
  });
});
