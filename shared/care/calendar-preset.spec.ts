import { presetOf, ruleOf, type CalendarPreset } from './calendar-preset';
import { dueDays, requireRule } from './recurrence';

const cases: readonly (readonly [string, CalendarPreset])[] = [
  ['FREQ=DAILY', { every: 'days', interval: 1 }],
  ['FREQ=DAILY;INTERVAL=10', { every: 'days', interval: 10 }],
  ['FREQ=WEEKLY', { every: 'weeks', interval: 1, weekdays: [] }],
  ['FREQ=WEEKLY;INTERVAL=2;BYDAY=TU,TH', { every: 'weeks', interval: 2, weekdays: [2, 4] }],
  ['FREQ=MONTHLY;BYMONTHDAY=31', { every: 'monthDay', interval: 1, day: 31 }],
  ['FREQ=MONTHLY;INTERVAL=3;BYMONTHDAY=-1', { every: 'monthDay', interval: 3, day: -1 }],
  ['FREQ=MONTHLY;BYDAY=1FR', { every: 'monthWeekday', interval: 1, nth: 1, weekday: 5 }],
  ['FREQ=MONTHLY;BYDAY=-1MO', { every: 'monthWeekday', interval: 1, nth: -1, weekday: 1 }],
  ['FREQ=YEARLY;BYMONTH=3;BYMONTHDAY=1', { every: 'year', month: 3, day: 1 }],
];

describe('a rhythm from the list', () => {
  it.each(cases)('%s is written and read back', (rule, preset) => {
    expect(ruleOf(preset)).toBe(rule);
    expect(presetOf(rule)).toEqual(preset);
    expect(() => requireRule(rule)).not.toThrow();
  });

  it('is read whatever the order of its parts', () => {
    expect(presetOf('INTERVAL=2;BYDAY=TH,TU;FREQ=WEEKLY')).toEqual({
      every: 'weeks',
      interval: 2,
      weekdays: [4, 2],
    });
  });

  it.each([
    'FREQ=DAILY;COUNT=10',
    'FREQ=DAILY;UNTIL=20261224',
    'FREQ=DAILY;BYMONTH=1',
    'FREQ=WEEKLY;WKST=SU',
    'FREQ=MONTHLY;BYDAY=MO',
    'FREQ=MONTHLY;BYDAY=5MO',
    'FREQ=MONTHLY;BYMONTHDAY=-2',
    'FREQ=MONTHLY;BYMONTHDAY=1,15',
    'FREQ=MONTHLY;BYDAY=1MO;BYMONTHDAY=1',
    'FREQ=YEARLY;BYDAY=20MO',
    'FREQ=YEARLY;INTERVAL=2;BYMONTH=3;BYMONTHDAY=1',
    'every day',
    '',
  ])('is none of the list’s for %s', (rule) => {
    expect(presetOf(rule)).toBeNull();
  });

  it('falls on the days that RFC 5545 §3.8.5.3 lists for “every other week on Tuesday and Thursday”', () => {
    const rule = ruleOf({ every: 'weeks', interval: 2, weekdays: [2, 4] });
    expect(dueDays(rule, '1997-09-02', '1997-09-02', '1997-10-17')).toEqual([
      '1997-09-02',
      '1997-09-04',
      '1997-09-16',
      '1997-09-18',
      '1997-09-30',
      '1997-10-02',
      '1997-10-14',
      '1997-10-16',
    ]);
  });

  it('falls on the days that RFC 5545 §3.8.5.3 lists for “monthly on the first Friday”', () => {
    const rule = ruleOf({ every: 'monthWeekday', interval: 1, nth: 1, weekday: 5 });
    expect(dueDays(rule, '1997-09-05', '1997-09-05', '1997-12-24')).toEqual([
      '1997-09-05',
      '1997-10-03',
      '1997-11-07',
      '1997-12-05',
    ]);
  });
});
