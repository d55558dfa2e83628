import { cited, span } from './crops/figure';
import { dayInYear, planSowing, sowingDue, sowingsInWindow, type SowingPlan } from './sowing-plan';
import type { SowingTimes } from './sowing-window';

// Onion transplants: 10–12 weeks from sowing (Purdue); out 2–6 weeks before the last frost.
const onion: SowingTimes = {
  weeksToTransplant: [cited(span(10, 12), 'Purdue')],
  plantingOutWeeks: cited(span(-6, -2), 'gardening articles'),
  sowBeforeFrostWeeks: [],
};

function plan(today: string, everyDays: number | null = null, times = onion, frost = '05-15'): SowingPlan {
  const found = planSowing(times, frost, today, everyDays);
  if (found === null) throw new Error('no plan');
  return found;
}

describe('a day of every year', () => {
  it.each([
    ['05-15', 2026, '2026-05-15'],
    ['02-29', 2024, '2024-02-29'],
    ['02-29', 2025, '2025-02-28'],
    ['02-29', 2100, '2100-02-28'],
    ['02-29', 2000, '2000-02-29'],
  ])('%s is in %d %s', (monthDay, year, day) => {
    expect(dayInYear(monthDay, year)).toBe(day);
  });
});

describe('the plan of a sowing', () => {
  // 15 May less 18 weeks is 9 January; less 12 weeks 20 February (date arithmetic by hand).
  it.each([
    ['2025-12-01', '2026-01-09', '2026-02-20', 'notYet'],
    ['2026-01-09', '2026-01-09', '2026-02-20', 'open'],
    ['2026-02-20', '2026-01-09', '2026-02-20', 'open'],
    ['2026-02-21', '2027-01-09', '2027-02-20', 'notYet'],
  ] as const)('on %s is from %s to %s: %s', (today, opens, closes, standing) => {
    expect(plan(today)).toMatchObject({ opens, closes, standing, sowings: [opens] });
  });

  it('is counted from a frost of the other half of the year in the south', () => {
    expect(plan('2026-05-01', null, onion, '09-20')).toMatchObject({
      opens: '2026-05-17',
      lastFrost: '2026-09-20',
    });
  });

  it('may begin in the year before its frost', () => {
    expect(plan('2026-11-20', null, onion, '02-15')).toMatchObject({
      opens: '2026-10-12',
      standing: 'open',
      lastFrost: '2027-02-15',
    });
  });

  it('has sowings that follow each other while the window is open', () => {
    expect(plan('2026-01-01', 14).sowings).toEqual(['2026-01-09', '2026-01-23', '2026-02-06', '2026-02-20']);
  });

  it('is none for a crop without figures', () => {
    const nothing = { weeksToTransplant: [], plantingOutWeeks: null, sowBeforeFrostWeeks: [] };
    expect(planSowing(nothing, '05-15', '2026-01-01', null)).toBeNull();
  });

  it('counts what was sown in its window, or a week before', () => {
    const sown = ['2026-01-01', '2026-01-02', '2026-02-20', '2026-02-21'];
    expect(sowingsInWindow(plan('2026-01-09'), sown)).toEqual(['2026-01-02', '2026-02-20']);
  });
});

describe('what is due this week', () => {
  it.each([
    ['2026-01-02', [], null],
    ['2026-01-03', [], '2026-01-09'],
    ['2026-01-20', [], '2026-01-20'],
    ['2026-02-20', [], '2026-02-20'],
    ['2026-01-20', ['2026-01-12'], null],
    ['2026-01-20', ['2026-01-03'], null],
    ['2026-01-20', ['2025-12-24'], '2026-01-20'],
  ] as const)('on %s with sowings of %j is %s', (today, sownOn, due) => {
    expect(sowingDue(plan(today), sownOn, today)).toBe(due);
  });

  it.each([
    ['2026-01-20', ['2026-01-09'], '2026-01-23'],
    ['2026-01-20', ['2026-01-09', '2026-01-18'], null],
    ['2026-01-25', ['2026-01-09'], '2026-01-25'],
  ] as const)('of staggered sowings on %s after %j is %s', (today, sownOn, due) => {
    expect(sowingDue(plan(today, 14), sownOn, today)).toBe(due);
  });
});
