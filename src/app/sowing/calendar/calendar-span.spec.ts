import { calendarSpan, partOf } from './calendar-span';

describe('the sowing calendar', () => {
  const span = calendarSpan('2026-12-01');

  it('shows twelve months from this one on', () => {
    expect([span.from, span.to]).toEqual(['2026-12-01', '2027-12-01']);
    expect(span.months.map(({ label }) => label)).toEqual(
      'Dec Jan Feb Mar Apr May Jun Jul Aug Sept Oct Nov'.split(' '),
    );
    expect(span.months.reduce((sum, { breadth }) => sum + breadth, 0)).toBeCloseTo(1, 10);
    // February has 28 of 365 days, and 29 of 366 in a leap year.
    expect(span.months[2]?.breadth).toBeCloseTo(28 / 365, 10);
    expect(calendarSpan('2027-12-31').months[2]?.breadth).toBeCloseTo(29 / 366, 10);
  });

  it('draws the last day of a window too, and cuts what lies outside', () => {
    expect(partOf(span, '2026-12-01', '2026-12-01')).toEqual({ start: 0, breadth: 1 / 365 });
    expect(partOf(span, '2026-10-01', '2026-12-10')).toEqual({ start: 0, breadth: 10 / 365 });
    expect(partOf(span, '2027-11-30', '2028-02-01')?.breadth).toBeCloseTo(1 / 365, 10);
    expect(partOf(span, '2026-10-01', '2026-11-30')).toBeNull();
    expect(partOf(span, '2027-12-01', '2027-12-20')).toBeNull();
  });
});
