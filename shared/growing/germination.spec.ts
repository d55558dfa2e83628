import fc from 'fast-check';

import { germinationOf, type GerminationCount } from './germination';

/** Daily looks from day 1 on, from the numbers newly up. */
function daily(...newlyUp: number[]): GerminationCount[] {
  let up = 0;
  return newlyUp.map((count, index) => {
    up += count;
    return { day: index + 1, up };
  });
}

// The worked example of the R package germinationmetrics, test suite: 50 seeds, daily counts of 14 days.
const published = daily(0, 0, 0, 0, 4, 17, 10, 7, 1, 0, 1, 0, 0, 0);

describe('germinationOf', () => {
  it.each([
    ['percent', 80],
    ['firstDay', 5],
    ['lastDay', 11],
    ['spreadDays', 6],
    ['modalDay', 6],
    ['t50Days', 5.94117647058824],
    ['meanTimeDays', 6.7],
    ['varianceDays2', 1.44615384615385],
    ['standardErrorDays', 0.190141647604743],
    ['ratePerDay', 0.149253731343284],
  ] as const)('gives %s of the published example as %d', (figure, expected) => {
    expect(germinationOf(50, published)[figure]).toBeCloseTo(expected, 12);
  });

  it('gives the T50 of Coolbear 1984 when asked, by the same example', () => {
    expect(germinationOf(50, published, 'coolbear').t50Days).toBeCloseTo(5.97058823529412, 12);
  });

  it('answers the day itself where a look found exactly half, which a strict test would miss', () => {
    expect(germinationOf(20, daily(0, 2, 0, 1, 2, 4, 1)).t50Days).toBe(5);
  });

  it('answers the last look where only that found as many as Coolbear’s half', () => {
    expect(germinationOf(4, daily(0, 0, 1), 'coolbear').t50Days).toBe(3);
  });

  it('leaves T50 open when the first look already found more than half', () => {
    const found = germinationOf(10, [
      { day: 6, up: 7 },
      { day: 9, up: 8 },
    ]);

    expect(found.t50Days).toBeNull();
    expect(found.firstDay).toBe(6);
    expect(found.meanTimeDays).toBeCloseTo((7 * 6 + 9) / 8, 12);
  });

  it('uses a look at day 0 that found none like any other', () => {
    const counts = [
      { day: 0, up: 0 },
      { day: 6, up: 8 },
    ];

    expect(germinationOf(10, counts).t50Days).toBe(3);
  });

  it('leaves everything but the percentage open when none came up', () => {
    expect(germinationOf(50, daily(0, 0, 0))).toEqual({
      sown: 50,
      up: 0,
      percent: 0,
      firstDay: null,
      lastDay: null,
      spreadDays: null,
      modalDay: null,
      t50Days: null,
      meanTimeDays: null,
      varianceDays2: null,
      standardErrorDays: null,
      ratePerDay: null,
    });
  });

  it('of one seedling has a mean time but no variance', () => {
    expect(germinationOf(4, daily(0, 0, 1))).toMatchObject({
      meanTimeDays: 3,
      t50Days: 2.5,
      varianceDays2: null,
      standardErrorDays: null,
    });
  });

  it('interpolates over uneven intervals in days, not in looks', () => {
    const counts = [
      { day: 4, up: 2 },
      { day: 10, up: 8 },
      { day: 11, up: 10 },
    ];

    // By hand: half of 10 is 5, half the way from 2 to 8, so half of the six days after day 4.
    expect(germinationOf(12, counts).t50Days).toBe(7);
  });

  it('does not undo what came up when seedlings are lost', () => {
    const counts = [
      { day: 5, up: 4 },
      { day: 6, up: 3 },
      { day: 7, up: 6 },
      { day: 8, up: 5 },
    ];

    expect(germinationOf(10, counts)).toMatchObject({ up: 6, percent: 60, lastDay: 7, meanTimeDays: 34 / 6 });
  });

  it('keeps T50 and mean time between first and last day', () => {
    fc.assert(
      fc.property(fc.array(fc.nat({ max: 9 }), { minLength: 1, maxLength: 20 }), (newlyUp) => {
        const { firstDay, lastDay, t50Days, meanTimeDays } = germinationOf(200, daily(0, ...newlyUp));
        if (firstDay === null || lastDay === null) return;
        expect(meanTimeDays).toBeGreaterThanOrEqual(firstDay - 1e-9);
        expect(meanTimeDays).toBeLessThanOrEqual(lastDay + 1e-9);
        // Interpolated, so it may lie in the interval that the first look closes.
        expect(t50Days).toBeGreaterThan(firstDay - 1);
        expect(t50Days).toBeLessThanOrEqual(lastDay);
      }),
    );
  });

  it.each([
    ['more than were sown', 5, [{ day: 1, up: 6 }]],
    ['half a seedling', 5, [{ day: 1, up: 0.5 }]],
    ['a negative count', 5, [{ day: 1, up: -1 }]],
    ['a day before sowing', 5, [{ day: -1, up: 1 }]],
    ['nothing sown', 0, []],
  ])('refuses %s', (_case, sown, counts) => {
    expect(() => germinationOf(sown, counts)).toThrow(expect.objectContaining({ code: 'INVALID_ARGUMENT' }));
  });

  it('refuses looks out of order', () => {
    const counts = [
      { day: 3, up: 1 },
      { day: 3, up: 2 },
    ];

    expect(() => germinationOf(5, counts)).toThrow(expect.objectContaining({ code: 'UNORDERED_SERIES' }));
  });
});
