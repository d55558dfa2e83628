import { DomainError, requireInRange } from './domain-error';

describe('requireInRange', () => {
  it.each([0, 0.5, 1])('accepts %d, inside or on a limit of 0 to 1', (value) => {
    expect(() => requireInRange('share', value, 0, 1)).not.toThrow();
  });

  it.each([-Number.EPSILON, 1 + Number.EPSILON, Number.NaN, Infinity, -Infinity])(
    'refuses %d, outside 0 to 1, with OUT_OF_RANGE and the facts',
    (value) => {
      expect(() => requireInRange('share', value, 0, 1)).toThrow(
        expect.objectContaining({
          name: 'DomainError',
          code: 'OUT_OF_RANGE',
          details: { name: 'share', value, low: 0, high: 1 },
        }),
      );
    },
  );
});

describe('DomainError', () => {
  it('keeps the error that led to it as its cause', () => {
    const cause = new Error('bad byte');

    expect(new DomainError('INVALID_ARGUMENT', 'unreadable', {}, { cause }).cause).toBe(cause);
  });
});
