import { calendarDays, dayAfterDoing, dayOfDryness, type ClosedTurn } from './routine-days';
import { firstDayInSeason, isInSeason } from './season';

const open = { season: null, isClosed: () => false };
const sundays = {
  season: null,
  isClosed: (day: string) => new Date(`${day}T00:00:00Z`).getUTCDay() === 0,
};

describe('care by the calendar', () => {
  it.each([
    // Clocks change in Dublin on 29 March and 25 October 2026: days of a calendar are not moved by it.
    [
      'daily over the change to summer time',
      'FREQ=DAILY',
      '2026-03-27',
      '2026-03-31',
      ['27', '28', '29', '30'],
    ],
    [
      'every other day over the change back',
      'FREQ=DAILY;INTERVAL=2',
      '2026-10-23',
      '2026-10-28',
      ['23', '25', '27'],
    ],
    ['weekly over the change', 'FREQ=WEEKLY', '2026-10-18', '2026-10-27', ['18', '25']],
  ])('%s', (_, rule, startsOn, to, days) => {
    const found = calendarDays({ rule, startsOn }, open, startsOn, to);
    expect(found.map((day) => day.slice(8))).toEqual(days);
  });

  it.each([
    // RFC 5545 §3.3.10: dates that a month lacks are left out, as in its example of 15 and 30 February.
    ['on the 31st', 'FREQ=MONTHLY;BYMONTHDAY=31', '2026-01-31', ['2026-01-31', '2026-03-31', '2026-05-31']],
    [
      'on the last day',
      'FREQ=MONTHLY;BYMONTHDAY=-1',
      '2028-01-31',
      ['2028-01-31', '2028-02-29', '2028-03-31', '2028-04-30', '2028-05-31'],
    ],
    ['yearly on 29 February', 'FREQ=YEARLY', '2024-02-29', ['2024-02-29', '2028-02-29']],
  ])('%s', (_, rule, startsOn, days) => {
    const to = rule === 'FREQ=YEARLY' ? '2031-01-01' : `${startsOn.slice(0, 4)}-06-01`;
    expect(calendarDays({ rule, startsOn }, open, startsOn, to)).toEqual(days);
  });

  it('is left out on closed days and out of season', () => {
    expect(
      calendarDays({ rule: 'FREQ=DAILY', startsOn: '2026-02-26' }, sundays, '2026-02-26', '2026-03-03'),
    ).toEqual(['2026-02-26', '2026-02-27', '2026-02-28', '2026-03-02']);
    const summer = { season: { fromMonth: 3, toMonth: 9 }, isClosed: () => false };
    expect(
      calendarDays({ rule: 'FREQ=DAILY', startsOn: '2026-02-26' }, summer, '2026-02-26', '2026-03-03'),
    ).toEqual(['2026-03-01', '2026-03-02']);
  });
});

describe('care that counts from its last doing', () => {
  const turn = (
    plannedFor: string,
    closedOn: string,
    outcome: ClosedTurn['outcome'] = 'done',
  ): ClosedTurn => ({
    plannedFor,
    closedOn,
    outcome,
  });

  it.each([
    ['is first due on its first day', null, '2026-04-20', '2026-04-15', '2026-04-20'],
    ['that began in the past is first due today', null, '2026-04-01', '2026-04-15', '2026-04-15'],
    [
      'follows the day it was done',
      turn('2026-04-10', '2026-04-10'),
      '2026-04-01',
      '2026-04-15',
      '2026-04-14',
    ],
    ['is pushed by being late', turn('2026-04-10', '2026-04-13'), '2026-04-01', '2026-04-15', '2026-04-17'],
    [
      'comes sooner after being early',
      turn('2026-04-10', '2026-04-08'),
      '2026-04-01',
      '2026-04-15',
      '2026-04-12',
    ],
    [
      'counts not needed as looked after',
      turn('2026-04-10', '2026-04-10', 'notNeeded'),
      '2026-04-01',
      '2026-04-10',
      '2026-04-14',
    ],
    [
      'is due again tomorrow when it could not be done',
      turn('2026-04-10', '2026-04-10', 'couldNot'),
      '2026-04-01',
      '2026-04-10',
      '2026-04-11',
    ],
    [
      'is not planned twice for a day',
      turn('2026-04-20', '2026-04-15'),
      '2026-04-01',
      '2026-04-15',
      '2026-04-21',
    ],
    ['goes over 29 February', turn('2028-02-26', '2028-02-26'), '2028-01-01', '2028-02-26', '2028-03-01'],
    [
      'goes over the change of the clocks',
      turn('2026-03-27', '2026-03-27'),
      '2026-01-01',
      '2026-03-27',
      '2026-03-31',
    ],
  ])('%s', (_, last, startsOn, today, due) => {
    expect(dayAfterDoing({ everyDays: 4, startsOn }, last, open, today)).toBe(due);
  });

  it('waits for the next open day, and for its season', () => {
    // 19 April 2026 is a Sunday.
    expect(
      dayAfterDoing(
        { everyDays: 4, startsOn: '2026-04-01' },
        turn('2026-04-15', '2026-04-15'),
        sundays,
        '2026-04-15',
      ),
    ).toBe('2026-04-20');
    const winter = { season: { fromMonth: 10, toMonth: 3 }, isClosed: () => false };
    expect(
      dayAfterDoing(
        { everyDays: 4, startsOn: '2026-01-01' },
        turn('2026-03-29', '2026-03-29'),
        winter,
        '2026-03-29',
      ),
    ).toBe('2026-10-01');
  });
});

describe('care by drying', () => {
  it.each([
    ['today', null, open, '2026-04-15'],
    ['today, whenever it was watered last', { plannedFor: '2026-04-02' }, open, '2026-04-15'],
    ['tomorrow, when today’s turn is closed already', { plannedFor: '2026-04-15' }, open, '2026-04-16'],
    ['on the next open day', { plannedFor: '2026-04-18' }, sundays, '2026-04-20'],
  ])('is due %s', (_, last, limits, day) => {
    expect(dayOfDryness('2026-04-15', last, limits)).toBe(day);
  });
});

describe('a season', () => {
  it.each([
    ['2026-03-01', 3, 9, true],
    ['2026-09-30', 3, 9, true],
    ['2026-10-01', 3, 9, false],
    ['2026-12-31', 10, 3, true],
    ['2027-03-31', 10, 3, true],
    ['2026-04-01', 10, 3, false],
    ['2026-06-15', 6, 6, true],
  ])('on %s, from month %d to %d: %s', (day, fromMonth, toMonth, isIn) => {
    expect(isInSeason(day, { fromMonth, toMonth })).toBe(isIn);
  });

  it('is all year without limits, and never where every day is left out', () => {
    expect(isInSeason('2026-06-15', null)).toBe(true);
    expect(firstDayInSeason('2026-06-15', null, () => true)).toBeNull();
  });
});
