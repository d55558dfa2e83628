import { dayBounds } from '@shared/series/room-days';
import { ruleOfDay } from './light-day-rule';

const hour = 3_600_000;

function day(date: string): { startAt: number; endAt: number } {
  const { start, end } = dayBounds(date, 'Europe/Dublin');
  return { startAt: start, endAt: end };
}

describe('the rule of a day’s light', () => {
  const ordinary = day('2026-01-20');

  it.each([
    ['sixteen hours', [{ onAt: ordinary.startAt + 6 * hour, offAt: ordinary.startAt + 22 * hour }], 14.4],
    [
      'light past midnight, on either side',
      [
        { onAt: ordinary.startAt - 4 * hour, offAt: ordinary.startAt + 2 * hour },
        { onAt: ordinary.startAt + 20 * hour, offAt: ordinary.startAt + 26 * hour },
      ],
      5.4,
    ],
    ['none', [], 0],
  ])('asks for nine tenths of what was planned within it: %s', (_, planned, limit) => {
    expect(ruleOfDay(planned, ordinary).limit).toBeCloseTo(limit, 9);
  });

  // In 2026 clocks in Dublin go forward on 29 March and back on 25 October.
  it.each([
    ['2026-03-29', 23],
    ['2026-10-25', 25],
  ])('knows that %s has %d hours', (date, hours) => {
    const changing = day(date);
    const allDay = [{ onAt: changing.startAt - hour, offAt: changing.endAt + hour }];
    expect(ruleOfDay(allDay, changing).limit).toBeCloseTo(0.9 * hours, 9);
  });
});
