import fc from 'fast-check';

import { dueDays, requireRule } from './recurrence';

const invalid = expect.objectContaining({ code: 'INVALID_ARGUMENT' }) as Error;
const days = (year: number, month: number, ...inMonth: number[]): string[] =>
  inMonth.map((day) => new Date(Date.UTC(year, month - 1, day)).toISOString().slice(0, 10));
const run = (year: number, month: number, first: number, last: number, step = 1): string[] =>
  days(
    year,
    month,
    ...Array.from({ length: Math.floor((last - first) / step) + 1 }, (_, n) => first + n * step),
  );

describe('dueDays', () => {
  // The examples of RFC 5545 §3.8.5.3 that fall on days. There they are times in New York; UNTIL is given as a date
  // here, which includes its day where the RFC's midnight did not.
  it.each([
    ['daily for 10 occurrences', 'FREQ=DAILY;COUNT=10', '1997-09-02', '1998-01-01', run(1997, 9, 2, 11)],
    [
      'daily until December 24, 1997',
      'FREQ=DAILY;UNTIL=19971223',
      '1997-09-02',
      '1998-01-01',
      [...run(1997, 9, 2, 30), ...run(1997, 10, 1, 31), ...run(1997, 11, 1, 30), ...run(1997, 12, 1, 23)],
    ],
    [
      'every other day',
      'FREQ=DAILY;INTERVAL=2',
      '1997-09-02',
      '1997-10-05',
      [...run(1997, 9, 2, 30, 2), ...days(1997, 10, 2, 4)],
    ],
    [
      'every 10 days, 5 occurrences',
      'FREQ=DAILY;INTERVAL=10;COUNT=5',
      '1997-09-02',
      '1998-01-01',
      [...days(1997, 9, 2, 12, 22), ...days(1997, 10, 2, 12)],
    ],
    [
      'every day in January, by year',
      'FREQ=YEARLY;UNTIL=20000131;BYMONTH=1;BYDAY=SU,MO,TU,WE,TH,FR,SA',
      '1998-01-01',
      '2001-01-01',
      [...run(1998, 1, 1, 31), ...run(1999, 1, 1, 31), ...run(2000, 1, 1, 31)],
    ],
    [
      'every day in January, by day',
      'FREQ=DAILY;UNTIL=20000131;BYMONTH=1',
      '1998-01-01',
      '2001-01-01',
      [...run(1998, 1, 1, 31), ...run(1999, 1, 1, 31), ...run(2000, 1, 1, 31)],
    ],
    [
      'weekly for 10 occurrences',
      'FREQ=WEEKLY;COUNT=10',
      '1997-09-02',
      '1998-01-01',
      [...days(1997, 9, 2, 9, 16, 23, 30), ...days(1997, 10, 7, 14, 21, 28), ...days(1997, 11, 4)],
    ],
    [
      'every other week',
      'FREQ=WEEKLY;INTERVAL=2;WKST=SU',
      '1997-09-02',
      '1998-02-20',
      [
        ...days(1997, 9, 2, 16, 30),
        ...days(1997, 10, 14, 28),
        ...days(1997, 11, 11, 25),
        ...days(1997, 12, 9, 23),
        ...days(1998, 1, 6, 20),
        ...days(1998, 2, 3, 17),
      ],
    ],
    [
      'weekly on Tuesday and Thursday for five weeks',
      'FREQ=WEEKLY;COUNT=10;WKST=SU;BYDAY=TU,TH',
      '1997-09-02',
      '1998-01-01',
      [...days(1997, 9, 2, 4, 9, 11, 16, 18, 23, 25, 30), ...days(1997, 10, 2)],
    ],
    [
      'every other week on Monday, Wednesday and Friday',
      'FREQ=WEEKLY;INTERVAL=2;UNTIL=19971223;WKST=SU;BYDAY=MO,WE,FR',
      '1997-09-01',
      '1998-01-01',
      [
        ...days(1997, 9, 1, 3, 5, 15, 17, 19, 29),
        ...days(1997, 10, 1, 3, 13, 15, 17, 27, 29, 31),
        ...days(1997, 11, 10, 12, 14, 24, 26, 28),
        ...days(1997, 12, 8, 10, 12, 22),
      ],
    ],
    [
      'monthly on the first Friday for 10 occurrences',
      'FREQ=MONTHLY;COUNT=10;BYDAY=1FR',
      '1997-09-05',
      '1999-01-01',
      [
        '1997-09-05',
        '1997-10-03',
        '1997-11-07',
        '1997-12-05',
        '1998-01-02',
        '1998-02-06',
        '1998-03-06',
        '1998-04-03',
        '1998-05-01',
        '1998-06-05',
      ],
    ],
    [
      'every other month on the first and last Sunday',
      'FREQ=MONTHLY;INTERVAL=2;COUNT=10;BYDAY=1SU,-1SU',
      '1997-09-07',
      '1999-01-01',
      [
        '1997-09-07',
        '1997-09-28',
        '1997-11-02',
        '1997-11-30',
        '1998-01-04',
        '1998-01-25',
        '1998-03-01',
        '1998-03-29',
        '1998-05-03',
        '1998-05-31',
      ],
    ],
    [
      'monthly on the second-to-last Monday for 6 months',
      'FREQ=MONTHLY;COUNT=6;BYDAY=-2MO',
      '1997-09-22',
      '1999-01-01',
      ['1997-09-22', '1997-10-20', '1997-11-17', '1997-12-22', '1998-01-19', '1998-02-16'],
    ],
    [
      'monthly on the third-to-the-last day',
      'FREQ=MONTHLY;BYMONTHDAY=-3',
      '1997-09-28',
      '1998-03-01',
      ['1997-09-28', '1997-10-29', '1997-11-28', '1997-12-29', '1998-01-29', '1998-02-26'],
    ],
    [
      'monthly on the 2nd and 15th for 10 occurrences',
      'FREQ=MONTHLY;COUNT=10;BYMONTHDAY=2,15',
      '1997-09-02',
      '1999-01-01',
      [
        '1997-09-02',
        '1997-09-15',
        '1997-10-02',
        '1997-10-15',
        '1997-11-02',
        '1997-11-15',
        '1997-12-02',
        '1997-12-15',
        '1998-01-02',
        '1998-01-15',
      ],
    ],
    [
      'yearly in June and July for 10 occurrences',
      'FREQ=YEARLY;COUNT=10;BYMONTH=6,7',
      '1997-06-10',
      '2002-01-01',
      [
        '1997-06-10',
        '1997-07-10',
        '1998-06-10',
        '1998-07-10',
        '1999-06-10',
        '1999-07-10',
        '2000-06-10',
        '2000-07-10',
        '2001-06-10',
        '2001-07-10',
      ],
    ],
    [
      'every third year on the 1st, 100th and 200th day',
      'FREQ=YEARLY;INTERVAL=3;COUNT=10;BYYEARDAY=1,100,200',
      '1997-01-01',
      '2007-01-01',
      [
        '1997-01-01',
        '1997-04-10',
        '1997-07-19',
        '2000-01-01',
        '2000-04-09',
        '2000-07-18',
        '2003-01-01',
        '2003-04-10',
        '2003-07-19',
        '2006-01-01',
      ],
    ],
    [
      'Monday of week number 20',
      'FREQ=YEARLY;BYWEEKNO=20;BYDAY=MO',
      '1997-05-12',
      '2000-01-01',
      ['1997-05-12', '1998-05-11', '1999-05-17'],
    ],
    [
      'every Friday the 13th',
      'FREQ=MONTHLY;BYDAY=FR;BYMONTHDAY=13',
      '1997-09-02',
      '2001-01-01',
      ['1998-02-13', '1998-03-13', '1998-11-13', '1999-08-13', '2000-10-13'],
    ],
    [
      'the third Tuesday, Wednesday or Thursday for 3 months',
      'FREQ=MONTHLY;COUNT=3;BYDAY=TU,WE,TH;BYSETPOS=3',
      '1997-09-04',
      '1998-06-01',
      ['1997-09-04', '1997-10-07', '1997-11-06'],
    ],
    [
      'an interval with the week starting on Monday',
      'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU;WKST=MO',
      '1997-08-05',
      '1998-01-01',
      ['1997-08-05', '1997-08-10', '1997-08-19', '1997-08-24'],
    ],
    [
      'an interval with the week starting on Sunday',
      'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU;WKST=SU',
      '1997-08-05',
      '1998-01-01',
      ['1997-08-05', '1997-08-17', '1997-08-19', '1997-08-31'],
    ],
    [
      'on a day that some months lack',
      'FREQ=MONTHLY;BYMONTHDAY=15,30;COUNT=5',
      '2007-01-15',
      '2008-01-01',
      ['2007-01-15', '2007-01-30', '2007-02-15', '2007-03-15', '2007-03-30'],
    ],
  ])('RFC 5545: %s', (_, rule, startsOn, to, expected) => {
    expect(dueDays(rule, startsOn, startsOn, to)).toEqual(expected);
  });

  it('includes the first day of the span and excludes the day after its last', () => {
    expect(dueDays('FREQ=DAILY', '2026-01-01', '2026-02-01', '2026-02-03')).toEqual([
      '2026-02-01',
      '2026-02-02',
    ]);
  });

  it('includes the day that UNTIL names', () => {
    expect(dueDays('FREQ=DAILY;UNTIL=20260102', '2026-01-01', '2026-01-01', '2026-02-01')).toEqual([
      '2026-01-01',
      '2026-01-02',
    ]);
  });

  it('is empty before the first day and for a rule that never falls due', () => {
    expect(dueDays('FREQ=DAILY', '2026-03-01', '2026-01-01', '2026-03-01')).toEqual([]);
    expect(dueDays('FREQ=YEARLY;BYMONTH=2;BYMONTHDAY=30', '2026-01-01', '2026-01-01', '2036-01-01')).toEqual(
      [],
    );
  });

  it.each([
    ['nothing', ''],
    ['no frequency', 'INTERVAL=2'],
    ['an unknown frequency', 'FREQ=FORTNIGHTLY'],
    ['hours', 'FREQ=HOURLY'],
    ['BYHOUR', 'FREQ=DAILY;BYHOUR=9'],
    ['a start of its own', 'FREQ=DAILY;DTSTART=19970902'],
    ['its own name before it', 'RRULE:FREQ=DAILY'],
    ['a second line', 'FREQ=DAILY\nFREQ=WEEKLY'],
    ['a part twice', 'FREQ=DAILY;FREQ=WEEKLY'],
    ['an interval of zero', 'FREQ=DAILY;INTERVAL=0'],
    ['a month of 13', 'FREQ=YEARLY;BYMONTH=13'],
    ['both COUNT and UNTIL', 'FREQ=DAILY;COUNT=2;UNTIL=20260101'],
    ['a time in UNTIL', 'FREQ=DAILY;UNTIL=20260101T000000Z'],
    ['an UNTIL that does not exist', 'FREQ=DAILY;UNTIL=20260230'],
    ['days of the month by week', 'FREQ=WEEKLY;BYMONTHDAY=1'],
    ['days of the year by month', 'FREQ=MONTHLY;BYYEARDAY=1'],
    ['week numbers by month', 'FREQ=MONTHLY;BYWEEKNO=1'],
    ['numbered weekdays by week', 'FREQ=WEEKLY;BYDAY=1MO'],
    ['positions of nothing', 'FREQ=MONTHLY;BYSETPOS=1'],
    ['an empty last part', 'FREQ=DAILY;'],
  ])('refuses a rule with %s', (_, rule) => {
    expect(() => requireRule(rule)).toThrow(invalid);
  });

  it.each(['2026-02-30', '2026-2-3', 'tomorrow'])('refuses the day %s', (day) => {
    expect(() => dueDays('FREQ=DAILY', day, '2026-01-01', '2026-02-01')).toThrow(invalid);
  });

  it('gives the same days for a span as for its two halves', () => {
    const rule = fc.constantFrom(
      'FREQ=DAILY;INTERVAL=4',
      'FREQ=WEEKLY;BYDAY=MO,TH;COUNT=30',
      'FREQ=MONTHLY;BYMONTHDAY=-1',
    );
    const day = (offset: number): string =>
      new Date(Date.UTC(2026, 0, 1 + offset)).toISOString().slice(0, 10);
    fc.assert(
      fc.property(rule, fc.nat(200), fc.nat(200), (chosen, first, second) => {
        const [middle, end] = [day(first), day(first + second)];

        const halves = [
          ...dueDays(chosen, '2026-01-01', '2026-01-01', middle),
          ...dueDays(chosen, '2026-01-01', middle, end),
        ];

        expect(halves).toEqual(dueDays(chosen, '2026-01-01', '2026-01-01', end));
      }),
      { numRuns: 50 },
    );
  });
});
