import { comingDays, type DueTiming } from './coming-days';
import type { DayLimits } from './routine-days';

const allYear: DayLimits = { season: null, isClosed: () => false };
const startsOn = '2026-12-01';

describe('the next days of a routine', () => {
  it('by the calendar are those of its rule, from the first that counts', () => {
    const timing: DueTiming = { how: 'calendar', rule: 'FREQ=WEEKLY;BYDAY=MO,TH', startsOn: '2026-11-02' };
    expect(comingDays(timing, allYear, '2026-12-01', 3)).toEqual(['2026-12-03', '2026-12-07', '2026-12-10']);
  });

  it('by the calendar keep their rhythm where a closed day leaves one out', () => {
    const timing: DueTiming = { how: 'calendar', rule: 'FREQ=DAILY;INTERVAL=2', startsOn };
    const limits: DayLimits = { season: null, isClosed: (day) => day === '2026-12-03' };
    expect(comingDays(timing, limits, startsOn, 3)).toEqual(['2026-12-01', '2026-12-05', '2026-12-07']);
  });

  it('after doing go on from each, and wait for the day after a closed one', () => {
    const timing: DueTiming = { how: 'afterDoing', everyDays: 4, startsOn };
    const limits: DayLimits = { season: null, isClosed: (day) => day === '2026-12-05' };
    expect(comingDays(timing, limits, '2026-12-01', 3)).toEqual(['2026-12-01', '2026-12-06', '2026-12-10']);
  });

  it('start no sooner than the routine does', () => {
    const timing: DueTiming = { how: 'afterDoing', everyDays: 7, startsOn: '2027-01-04' };
    expect(comingDays(timing, allYear, startsOn, 2)).toEqual(['2027-01-04', '2027-01-11']);
  });

  it('by drying are those of the fallback', () => {
    const timing: DueTiming = { how: 'byDrying', fallbackDays: 3, startsOn };
    expect(comingDays(timing, allYear, startsOn, 3)).toEqual(['2026-12-01', '2026-12-04', '2026-12-07']);
  });

  it('wait for the season', () => {
    const limits: DayLimits = { ...allYear, season: { fromMonth: 3, toMonth: 10 } };
    expect(comingDays({ how: 'afterDoing', everyDays: 14, startsOn }, limits, startsOn, 2)).toEqual([
      '2027-03-01',
      '2027-03-15',
    ]);
    const lastOfSeason: DueTiming = { how: 'calendar', rule: 'FREQ=MONTHLY;BYMONTHDAY=31', startsOn };
    expect(comingDays(lastOfSeason, limits, startsOn, 3)).toEqual(['2027-03-31', '2027-05-31', '2027-07-31']);
  });

  it('of a leap day are those that three years have', () => {
    const timing: DueTiming = { how: 'calendar', rule: 'FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=29', startsOn };
    expect(comingDays(timing, allYear, startsOn, 5)).toEqual(['2028-02-29']);
  });

  it('are none for a day that no year has', () => {
    const timing: DueTiming = { how: 'calendar', rule: 'FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=30', startsOn };
    expect(comingDays(timing, allYear, startsOn, 5)).toEqual([]);
  });
});
