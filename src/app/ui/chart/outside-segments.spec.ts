import fc from 'fast-check';
import type { ChartPoint, WantedSpan } from './chart-data';
import { outsideSegments } from './outside-segments';

const single = (at: number, value: number | null): ChartPoint => [at, value, value, value];
const always: WantedSpan = { from: 0, to: 1000, low: 20, high: 26 };

describe('what lies outside the wanted range', () => {
  it('starts and ends where the line crosses the limit', () => {
    const { above, below } = outsideSegments([single(0, 25), single(10, 27), single(20, 25)], [always]);
    expect(above).toEqual([
      [5, 26],
      [10, 27],
      [15, 26],
    ]);
    expect(below).toEqual([]);
  });

  it('changes sides within one stretch of line', () => {
    const { above, below } = outsideSegments([single(0, 18), single(10, 28)], [always]);
    expect(below).toEqual([
      [0, 18],
      [2, 20],
    ]);
    expect(above).toEqual([
      [8, 26],
      [10, 28],
    ]);
  });

  it('follows a range that steps when the lamps go off', () => {
    const wanted = [
      { from: 0, to: 5, low: 20, high: 26 },
      { from: 5, to: 10, low: 16, high: 20 },
    ];
    const { above } = outsideSegments([single(0, 24), single(10, 24)], wanted);
    expect(above).toEqual([
      [5, 24],
      [10, 24],
    ]);
  });

  it('does not bridge a gap', () => {
    const points = [single(0, 30), single(10, 30), single(20, null), single(30, 30), single(40, 30)];
    expect(outsideSegments(points, [always]).above).toEqual([
      [0, 30],
      [10, 30],
      [10, null],
      [30, 30],
      [40, 30],
    ]);
  });

  it('judges nothing where nothing is wanted', () => {
    const points = [single(0, 30), single(10, 30)];
    expect(outsideSegments(points, [])).toEqual({ above: [], below: [] });
    expect(outsideSegments(points, [{ ...always, low: null, high: null }]).above).toEqual([]);
  });

  it('never reaches inside the range, whatever the line', () => {
    const values = fc.array(fc.option(fc.double({ min: -10, max: 60, noNaN: true })), {
      minLength: 2,
      maxLength: 30,
    });
    fc.assert(
      fc.property(values, (line) => {
        const points = line.map((value, index) => single(index * 10, value));
        const { above, below } = outsideSegments(points, [always]);
        const drawn = (pen: typeof above): number[] =>
          pen.map(([, value]) => value).filter((value) => value !== null);
        drawn(above).forEach((value) => expect(value).toBeGreaterThanOrEqual(26 - 1e-6));
        drawn(below).forEach((value) => expect(value).toBeLessThanOrEqual(20 + 1e-6));
      }),
    );
  });
});
