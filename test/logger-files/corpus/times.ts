import type { CorpusFile, ExpectedReading } from './corpus-file';
import { lines, temperatures } from './corpus-file';

function timed(...rows: string[]): Uint8Array {
  return lines('Time;Temperature (°C)', ...rows.map((time, index) => `${time};2${index}.5`));
}

function read(...instants: string[]): ExpectedReading[] {
  return temperatures(...instants.map((at, index): readonly [string, number] => [at, 20.5 + index]));
}

const utc = { zone: 'UTC' } as const;
const eight = ['2026-01-20T08:00:00Z', '2026-01-20T08:10:00Z'];

/** Ways to write a time. */
export const timeFiles: readonly CorpusFile[] = [
  {
    says: 'ISO 8601 in UTC',
    bytes: timed('2026-01-20T08:00:00Z', '2026-01-20T08:10:00Z'),
    readings: read(...eight),
  },
  {
    says: 'ISO 8601 with offsets',
    bytes: timed('2026-01-20T09:00:00+01:00', '2026-01-20T13:40+0530'),
    readings: read(...eight),
  },
  {
    says: 'ISO 8601 without offset, in the zone of the room',
    bytes: timed('2026-01-20 09:00', '2026-01-20 09:10'),
    readings: read(...eight),
  },
  {
    says: 'ISO 8601 in basic format',
    ...utc,
    bytes: timed('20260120T080000', '20260120T081000'),
    readings: read(...eight),
  },
  {
    says: 'fractions of a second',
    ...utc,
    bytes: timed('2026-01-20 08:00:00.250', '2026-01-20 08:00:01,5'),
    readings: read('2026-01-20T08:00:00.250Z', '2026-01-20T08:00:01.500Z'),
  },
  {
    says: 'year first with slashes',
    ...utc,
    bytes: timed('2026/1/20 8:00', '2026/1/20 8:10'),
    readings: read(...eight),
  },
  {
    says: 'day first, told by a part above 12',
    ...utc,
    bytes: timed('20/01/2026 08:00', '20/01/2026 08:10'),
    readings: read(...eight),
  },
  {
    says: 'month first, told by a part above 12',
    ...utc,
    bytes: timed('1/20/2026 08:00', '1/20/2026 08:10'),
    readings: read(...eight),
  },
  {
    says: 'day first with full stops',
    ...utc,
    bytes: timed('02.01.2026 08:00', '03.01.2026 08:00'),
    readings: read('2026-01-02T08:00:00Z', '2026-01-03T08:00:00Z'),
  },
  {
    says: 'day first, told by the order of the rows',
    ...utc,
    bytes: timed(
      '09/02/2026 08:00',
      '10/02/2026 08:00',
      '11/02/2026 08:00',
      '12/02/2026 08:00',
      '01/03/2026 08:00',
    ),
    readings: read(
      '2026-02-09T08:00:00Z',
      '2026-02-10T08:00:00Z',
      '2026-02-11T08:00:00Z',
      '2026-02-12T08:00:00Z',
      '2026-03-01T08:00:00Z',
    ),
  },
  {
    says: 'month first, told by the spacing of the rows',
    ...utc,
    bytes: timed('02/03/2026 08:00', '02/04/2026 08:00', '02/05/2026 08:00'),
    readings: read('2026-02-03T08:00:00Z', '2026-02-04T08:00:00Z', '2026-02-05T08:00:00Z'),
  },
  {
    says: 'a day and month of last year that nothing decides',
    ...utc,
    bytes: timed('02/12/2025 08:00', '02/12/2025 08:10'),
    readings: read('2025-12-02T08:00:00Z', '2025-12-02T08:10:00Z'),
    questions: ['AMBIGUOUS_DAY_MONTH'],
  },
  {
    says: 'month first, because day first would lie in the future',
    ...utc,
    bytes: timed('02/11/2026 08:00', '02/11/2026 08:10'),
    readings: read('2026-02-11T08:00:00Z', '2026-02-11T08:10:00Z'),
  },
  {
    says: 'a day and month that nothing decides',
    ...utc,
    bytes: timed('03/04/2026 08:00', '03/04/2026 08:10'),
    readings: read('2026-04-03T08:00:00Z', '2026-04-03T08:10:00Z'),
    questions: ['AMBIGUOUS_DAY_MONTH'],
  },
  {
    says: 'a two-digit year',
    ...utc,
    bytes: timed('20.01.26 08:00', '20.01.26 08:10'),
    readings: read(...eight),
  },
  {
    says: 'a twelve-hour clock over noon and midnight',
    ...utc,
    bytes: timed(
      '1/20/2026 12:00:00 AM',
      '1/20/2026 11:59:00 am',
      '1/20/2026 12:30:00 p.m.',
      '1/20/2026 1:00:00 PM',
    ),
    readings: read(
      '2026-01-20T00:00:00Z',
      '2026-01-20T11:59:00Z',
      '2026-01-20T12:30:00Z',
      '2026-01-20T13:00:00Z',
    ),
  },
  {
    says: 'English month names',
    ...utc,
    bytes: timed('20-Jan-2026 08:00', '20-Jan-2026 08:10'),
    readings: read(...eight),
  },
  {
    says: 'an English month name first, with a weekday',
    ...utc,
    bytes: timed('"Tue, January 20, 2026 8:00 AM"', '"Tue, January 20, 2026 8:10 AM"'),
    readings: read(...eight),
  },
  {
    says: 'German month names',
    ...utc,
    bytes: timed('31. März 2026 08:00', '1. April 2026 08:00'),
    readings: read('2026-03-31T08:00:00Z', '2026-04-01T08:00:00Z'),
  },
  {
    says: 'French month names',
    ...utc,
    bytes: timed('28 févr. 2026 08:00', '1 mars 2026 08:00'),
    readings: read('2026-02-28T08:00:00Z', '2026-03-01T08:00:00Z'),
  },
  { says: 'Unix seconds', bytes: timed('1768896000', '1768896600'), readings: read(...eight) },
  { says: 'Unix milliseconds', bytes: timed('1768896000000', '1768896600000'), readings: read(...eight) },
  {
    says: 'serial days of a spreadsheet',
    ...utc,
    bytes: timed('46042.333333', '46042.340278'),
    readings: read(...eight),
  },
  {
    says: 'date and time in two columns',
    ...utc,
    bytes: lines('Date,Time,Temperature (°C)', '20/01/2026,08:00:00,20.5', '20/01/2026,08:10:00,21.5'),
    readings: read(...eight),
  },
  {
    says: 'dates alone',
    ...utc,
    bytes: timed('2026-01-20', '2026-01-21'),
    readings: read('2026-01-20T00:00:00Z', '2026-01-21T00:00:00Z'),
  },
  {
    says: 'a zone stated in the header',
    bytes: lines('Time (GMT-05:00),Temperature (°C)', '2026-01-20 03:00,20.5', '2026-01-20 03:10,21.5'),
    readings: read(...eight),
  },
  {
    says: 'elapsed seconds',
    startAt: '2026-01-20T08:00:00Z',
    bytes: lines('Elapsed (s),Temperature (°C)', '0,20.5', '600,21.5'),
    readings: read(...eight),
    questions: ['ELAPSED_NEEDS_START'],
  },
  {
    says: 'elapsed minutes',
    startAt: '2026-01-20T08:00:00Z',
    bytes: lines('Elapsed (min),Temperature (°C)', '0,20.5', '10,21.5'),
    readings: read(...eight),
    questions: ['ELAPSED_NEEDS_START'],
  },
  {
    says: 'elapsed hours, their unit on a line of its own',
    startAt: '2026-01-20T08:00:00Z',
    bytes: lines('Elapsed,Temperature', 'h,°C', '0,20.5', '0.25,21.5', '0.5,22.5'),
    readings: read('2026-01-20T08:00:00Z', '2026-01-20T08:15:00Z', '2026-01-20T08:30:00Z'),
    questions: ['ELAPSED_NEEDS_START'],
  },
  {
    says: 'elapsed days',
    startAt: '2026-01-20T08:00:00Z',
    bytes: lines('Elapsed time [days],Temperature (°C)', '0,20.5', '0.5,21.5'),
    readings: read('2026-01-20T08:00:00Z', '2026-01-20T20:00:00Z'),
    questions: ['ELAPSED_NEEDS_START'],
  },
  {
    says: 'elapsed minutes under a header that is only their unit',
    startAt: '2026-01-20T08:00:00Z',
    bytes: lines('Minutes,Temperature (°C)', '0,20.5', '10,21.5'),
    readings: read(...eight),
    questions: ['ELAPSED_NEEDS_START'],
  },
  {
    says: 'elapsed hours under a German header that is only their unit',
    startAt: '2026-01-20T08:00:00Z',
    bytes: lines('Temperatur (°C);Stunden', '20,5;0', '21,5;0,25', '22,5;0,5'),
    readings: read('2026-01-20T08:00:00Z', '2026-01-20T08:15:00Z', '2026-01-20T08:30:00Z'),
    questions: ['ELAPSED_NEEDS_START'],
  },
  {
    says: 'elapsed hours, minutes and seconds beyond a day',
    startAt: '2026-01-20T08:00:00Z',
    bytes: lines('Elapsed,Temperature (°C)', '0:00:00,20.5', '0:10:00,21.5', '26:00:30,22.5'),
    readings: read(...eight, '2026-01-21T10:00:30Z'),
    questions: ['ELAPSED_NEEDS_START'],
  },
  {
    says: 'times of day without a date, over midnight',
    startAt: '2026-01-20T00:00:00Z',
    bytes: lines('Time,Temperature (°C)', '23:50,20.5', '00:00,21.5', '00:10,22.5'),
    readings: read('2026-01-20T23:50:00Z', '2026-01-21T00:00:00Z', '2026-01-21T00:10:00Z'),
    questions: ['ELAPSED_NEEDS_START'],
  },
  {
    says: 'clocks that were not set: 1970 and 2099',
    bytes: timed('1970-01-01 00:00', '2099-01-01 00:00', '2026-01-20T08:20:00Z'),
    readings: temperatures(['2026-01-20T08:20:00Z', 22.5]),
    rejected: [
      ['TIME_IMPLAUSIBLE', 2, 1],
      ['TIME_IMPLAUSIBLE', 3, 1],
    ],
  },
  {
    says: 'days that no month has',
    ...utc,
    bytes: timed('2026-01-20 08:00', '2026-02-30 08:00', '2026-01-20 25:00'),
    readings: read('2026-01-20T08:00:00Z'),
    rejected: [
      ['TIME_UNREADABLE', 3, 1],
      ['TIME_UNREADABLE', 4, 1],
    ],
  },
];

/** Clocks that are put forward and back; Berlin changes at 01:00 UTC on 29 March 2026 and 26 October 2025. */
export const clockChangeFiles: readonly CorpusFile[] = [
  {
    says: 'the hour that happens twice, oldest first',
    bytes: timed(
      '2025-10-26 01:30',
      '2025-10-26 02:00',
      '2025-10-26 02:30',
      '2025-10-26 02:00',
      '2025-10-26 02:30',
      '2025-10-26 03:00',
    ),
    readings: read(
      '2025-10-25T23:30:00Z',
      '2025-10-26T00:00:00Z',
      '2025-10-26T00:30:00Z',
      '2025-10-26T01:00:00Z',
      '2025-10-26T01:30:00Z',
      '2025-10-26T02:00:00Z',
    ),
  },
  {
    says: 'the hour that happens twice, hourly',
    bytes: timed('2025-10-26 01:00', '2025-10-26 02:00', '2025-10-26 02:00', '2025-10-26 03:00'),
    readings: read(
      '2025-10-25T23:00:00Z',
      '2025-10-26T00:00:00Z',
      '2025-10-26T01:00:00Z',
      '2025-10-26T02:00:00Z',
    ),
  },
  {
    says: 'the hour that happens twice, newest first',
    bytes: timed(
      '2025-10-26 03:00',
      '2025-10-26 02:30',
      '2025-10-26 02:00',
      '2025-10-26 02:30',
      '2025-10-26 02:00',
      '2025-10-26 01:30',
    ),
    readings: read(
      '2025-10-26T02:00:00Z',
      '2025-10-26T01:30:00Z',
      '2025-10-26T01:00:00Z',
      '2025-10-26T00:30:00Z',
      '2025-10-26T00:00:00Z',
      '2025-10-25T23:30:00Z',
    ),
  },
  {
    says: 'the hour that happens twice in a long file, where sensors take turns',
    bytes: lines(
      'Time,Sensor,Quantity,Value,Unit',
      ...['02:00', '02:30', '02:00'].flatMap((time, row) =>
        ['North', 'South'].map((sensor) => `2025-10-26 ${time},${sensor},temperature,2${row}.5,°C`),
      ),
    ),
    readings: ['2025-10-26T00:00:00.000Z', '2025-10-26T00:30:00.000Z', '2025-10-26T01:00:00.000Z'].flatMap(
      (at, row) =>
        ['North', 'South'].map((sensor): ExpectedReading => ['airTemperature', at, 20.5 + row, sensor]),
    ),
  },
  {
    says: 'the hour that never happens',
    bytes: timed('2026-03-29 01:59', '2026-03-29 02:00', '2026-03-29 02:59', '2026-03-29 03:00'),
    readings: temperatures(['2026-03-29T00:59:00Z', 20.5], ['2026-03-29T01:00:00Z', 23.5]),
    rejected: [
      ['NONEXISTENT_LOCAL_TIME', 3, 1],
      ['NONEXISTENT_LOCAL_TIME', 4, 1],
    ],
  },
  {
    says: 'a zone whose clocks move by half an hour',
    zone: 'Australia/Lord_Howe',
    bytes: timed('2026-04-05 01:15', '2026-04-05 01:45', '2026-04-05 01:45', '2026-04-05 02:15'),
    readings: read(
      '2026-04-04T14:15:00Z',
      '2026-04-04T14:45:00Z',
      '2026-04-04T15:15:00Z',
      '2026-04-04T15:45:00Z',
    ),
  },
];
