import * as fc from 'fast-check';
import type { WantedRange } from '@shared/contracts/rooms';
import { rangeProblem, savedRange, typedRange, type TypedRange } from './wanted-range-form';

const range: WantedRange = {
  quantity: 'airTemperature',
  lampsOn: { low: 20, high: 26 },
  lampsOff: { low: 16, high: null },
  holdMinutes: 10,
  clearingMargin: 0.5,
  urgency: { by: 4, afterMinutes: 360 },
  source: 'shelf',
  since: '2026-11-01T00:00:00Z',
  reason: 'Where both plantings’ ranges meet',
};

describe('a wanted range in a form', () => {
  it('is in the reader’s unit, margin as a difference', () => {
    expect(typedRange('airTemperature', range, '°F')).toEqual({
      onLow: 68,
      onHigh: 78.8,
      offLow: 60.8,
      offHigh: null,
      holdMinutes: 10,
      clearingMargin: 0.9,
      urgentBy: 7.2,
      urgentAfterHours: 6,
      reason: range.reason,
    });
  });

  it('comes back as it was from either unit', () => {
    const tenth = fc.integer({ min: -100, max: 400 }).map((tenths) => tenths / 10);
    fc.assert(
      fc.property(tenth, fc.constantFrom('°C' as const, '°F' as const), (low, unit) => {
        const held = { ...range, lampsOn: { low, high: null } };
        const saved = savedRange('airTemperature', typedRange('airTemperature', held, unit), unit);
        // The form shows a tenth of a degree, of either unit.
        expect(Math.abs((saved.lampsOn.low ?? NaN) - low)).toBeLessThan(0.051);
        expect(saved.clearingMargin).toBeCloseTo(0.5, 2);
        expect(saved.urgency.by).toBeCloseTo(4, 2);
        expect(saved.urgency.afterMinutes).toBe(360);
      }),
    );
  });

  it('leaves humidity alone whatever the unit of temperatures', () => {
    const typed = typedRange('relativeHumidity', null, '°F');
    expect(savedRange('relativeHumidity', { ...typed, onLow: 50 }, '°F')).toMatchObject({
      lampsOn: { low: 50, high: null },
      clearingMargin: 2,
    });
  });

  const good = typedRange('airTemperature', range, '°C');
  it.each<[Partial<TypedRange>, RegExp]>([
    [{ onLow: null, onHigh: null, offLow: null }, /at least one limit/],
    [{ onLow: 26 }, /With lamps on/],
    [{ offHigh: 10 }, /With lamps off/],
    [{ holdMinutes: null }, /patience/],
    [{ holdMinutes: 1441 }, /patience/],
    [{ clearingMargin: -1 }, /margin/],
    [{ urgentBy: -0.1 }, /urgent/],
    [{ urgentAfterHours: 169 }, /urgent/],
  ])('with %j is refused', (changes, problem) => {
    expect(rangeProblem(good)).toBeNull();
    expect(rangeProblem({ ...good, ...changes })).toMatch(problem);
  });

  it('can be never urgent, or at once', () => {
    const saved = savedRange('airTemperature', { ...good, urgentBy: null, urgentAfterHours: 0 }, '°C');
    expect(saved.urgency).toEqual({ by: null, afterMinutes: 0 });
  });

  it('takes zero for a limit, not for an empty field', () => {
    const zero = { ...good, onLow: 0, onHigh: null, offLow: null };
    expect(rangeProblem(zero)).toBeNull();
    expect(savedRange('airTemperature', zero, '°C').lampsOn.low).toBe(0);
  });
});
