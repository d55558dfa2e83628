import fc from 'fast-check';
import { createClockParser, splitTime } from './clock-text';
import { createDateParser, dateFormsOf } from './date-text';
import { monthOfName } from './month-names';

const DAY_MS = 86_400_000;

describe('createDateParser', () => {
  it('with any day from 1990 to 2089, gives the day that Date counts', () => {
    const parsers = {
      iso: createDateParser({ order: 'iso', isTwoDigitYear: false }),
      dayFirst: createDateParser({ order: 'dayFirst', isTwoDigitYear: true }),
      monthFirst: createDateParser({ order: 'monthFirst', isTwoDigitYear: false }),
    };
    fc.assert(
      fc.property(
        fc.integer({ min: Date.UTC(1990, 0, 1) / DAY_MS, max: Date.UTC(2089, 11, 31) / DAY_MS }),
        (day) => {
          const iso = new Date(day * DAY_MS).toISOString().slice(0, 10);
          const [year = '', month = '', date = ''] = iso.split('-');
          expect(parsers.iso(iso)).toBe(day);
          expect(parsers.dayFirst(`${date}.${month}.${year.slice(2)}`)).toBe(day);
          expect(parsers.monthFirst(`${Number(month)}/${Number(date)}/${year}`)).toBe(day);
        },
      ),
    );
  });

  it.each(['2026-02-29', '2026-13-01', '2026-00-10', '2026-01-32', '26-01-01', '2026-01', ''])(
    'with “%s”, gives NaN for ISO 8601',
    (text) => {
      expect(createDateParser({ order: 'iso', isTwoDigitYear: false })(text)).toBeNaN();
    },
  );
});

describe('dateFormsOf', () => {
  it.each([
    ['2026-01-20', ['iso']],
    ['20/01/2026', ['dayFirst']],
    ['01/20/2026', ['monthFirst']],
    ['03/04/2026', ['dayFirst', 'monthFirst']],
    ['03/04/26', ['dayFirst', 'monthFirst', 'yearFirst']],
    ['3 mai 2026', ['monthName']],
    ['Tuesday', []],
  ])('of “%s”, are %j', (text, orders) => {
    expect(dateFormsOf(text).map(({ order }) => order)).toEqual(orders);
  });
});

describe('monthOfName', () => {
  it.each([
    ['Jan', 1],
    ['März', 3],
    ['févr.', 2],
    ['août', 8],
    ['diciembre', 12],
    ['mrt', 3],
    ['Sept', 9],
    ['giugno', 6],
    ['shelf', null],
  ])('of “%s”, is %p', (name, month) => {
    expect(monthOfName(name)).toBe(month);
  });
});

describe('createClockParser', () => {
  const parse = createClockParser();

  it.each([
    ['8:05', 8 * 3600 + 5 * 60],
    ['08:05:30', 8 * 3600 + 5 * 60 + 30],
    ['24:00', 86_400],
    ['12:00 AM', 0],
    ['12:30 pm', 12.5 * 3600],
    ['1:00\u202fPM', 13 * 3600],
  ])('with “%s”, gives %d seconds', (text, seconds) => {
    expect(parse(text).clockMs).toBe(seconds * 1000);
  });

  it.each(['25:00', '24:01', '12:60', '13:00 PM', '0:30 AM', '8', 'aa:bb', '08:05 later', '8:5'])(
    'with “%s”, gives NaN',
    (text) => {
      expect(parse(text).clockMs).toBeNaN();
    },
  );

  it.each([
    ['08:00Z', 0],
    ['08:00+02:00', 120],
    ['08:00-0530', -330],
    ['08:00 UTC+1', 60],
  ])('with “%s”, gives an offset of %d minutes', (text, minutes) => {
    expect(parse(text).offsetMs).toBe(minutes * 60_000);
  });
});

describe('splitTime', () => {
  it.each([
    ['2026-01-20T08:00', '2026-01-20', '08:00'],
    ['20.01.2026, 8:00', '20.01.2026', '8:00'],
    ['20260120T0800', '20260120', '08:00:00'],
    ['2026-01-20', '2026-01-20', ''],
    ['8:00', '', '8:00'],
  ])('of “%s”, is date and clock', (text, date, clock) => {
    expect(splitTime(text)).toEqual({ date, clock });
  });
});
