import { ordinal, saySeason, sayTiming } from './timing-words';

const startsOn = '2026-12-01'; // a Tuesday

describe('when care is due, in words', () => {
  it.each([
    ['FREQ=DAILY', 'every day'],
    ['FREQ=DAILY;INTERVAL=3', 'every 3 days'],
    ['FREQ=WEEKLY', 'every Tuesday'],
    ['FREQ=WEEKLY;BYDAY=TH,MO', 'every Monday and Thursday'],
    ['FREQ=WEEKLY;BYDAY=MO,WE,FR', 'every Monday, Wednesday and Friday'],
    ['FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR', 'every day from Monday to Friday'],
    ['FREQ=WEEKLY;INTERVAL=2;BYDAY=SU', 'every 2 weeks on Sunday'],
    ['FREQ=WEEKLY;INTERVAL=2;BYDAY=MO,TU,WE,TH', 'every 2 weeks, Monday to Thursday'],
    ['FREQ=MONTHLY;BYMONTHDAY=1', 'on the 1st of every month'],
    ['FREQ=MONTHLY;INTERVAL=3;BYMONTHDAY=-1', 'on the last day of every 3 months'],
    ['FREQ=MONTHLY;BYDAY=2SA', 'on the second Saturday of every month'],
    ['FREQ=MONTHLY;BYDAY=-1FR', 'on the last Friday of every month'],
    ['FREQ=YEARLY;BYMONTH=3;BYMONTHDAY=1', 'every year on 1 March'],
    ['FREQ=DAILY;COUNT=3', 'by its own rule, FREQ=DAILY;COUNT=3'],
  ])('%s', (rule, words) => {
    expect(sayTiming({ how: 'calendar', rule, startsOn }, null)).toBe(words);
  });

  it('by a week without a weekday, of care that has not begun', () => {
    expect(sayTiming({ how: 'calendar', rule: 'FREQ=WEEKLY' }, null)).toBe('every week');
  });

  it('after doing', () => {
    expect(sayTiming({ how: 'afterDoing', everyDays: 4, startsOn }, null)).toBe('4 days after the last time');
    expect(sayTiming({ how: 'afterDoing', everyDays: 1, startsOn }, null)).toBe('a day after the last time');
  });

  it('by drying', () => {
    expect(sayTiming({ how: 'byDrying', fallbackDays: 3, startsOn }, null)).toBe(
      'when the pot has dried, about every 3 days',
    );
  });

  it('in a season', () => {
    const rule = 'FREQ=DAILY;INTERVAL=3';
    expect(sayTiming({ how: 'calendar', rule, startsOn }, { fromMonth: 3, toMonth: 10 })).toBe(
      'every 3 days, March to October',
    );
    expect(saySeason({ fromMonth: 5, toMonth: 5 })).toBe('only in May');
  });

  it.each([
    [1, '1st'],
    [2, '2nd'],
    [3, '3rd'],
    [11, '11th'],
    [12, '12th'],
    [13, '13th'],
    [22, '22nd'],
    [31, '31st'],
  ])('%d as %s', (number, words) => {
    expect(ordinal(number)).toBe(words);
  });
});
