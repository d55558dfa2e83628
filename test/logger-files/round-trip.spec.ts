import fc from 'fast-check';
import { readWhole, recogniseWhole } from './read-whole-file';
import type { TableRow, TableStyle } from './table-writer';
import { writeTable } from './table-writer';

// A date after this would be in the future; the table's dates are all before it.
const TODAY = Date.UTC(2026, 11, 1);
// A day above 12 in the first row leaves no question about day and month.
const FIRST_MS = Date.UTC(2026, 4, 20, 10);

const zones = ['Europe/Berlin', 'America/New_York', 'Asia/Kolkata', 'UTC'] as const;

const times = [
  "yyyy-MM-dd'T'HH:mm:ssZZ",
  "yyyy-MM-dd'T'HH:mm:ss.SSSZZ",
  'yyyy-MM-dd HH:mm:ss',
  "yyyyMMdd'T'HHmmss",
  'yyyy/MM/dd HH:mm:ss',
  'dd.MM.yyyy HH:mm:ss',
  'd.M.yy HH:mm:ss',
  'dd/MM/yyyy HH:mm:ss',
  'M/d/yyyy h:mm:ss a',
  'dd-LLL-yyyy HH:mm:ss',
  'd LLLL yyyy HH:mm:ss',
  'seconds',
  'milliseconds',
] as const;

const row = fc.record({
  temperature: fc.option(fc.integer({ min: 500, max: 3500 }), { nil: null, freq: 8 }),
  humidity: fc.option(fc.integer({ min: 200, max: 990 }), { nil: null, freq: 8 }),
});

const table = fc
  .tuple(fc.array(row, { minLength: 3, maxLength: 60 }), fc.constantFrom(30, 90, 600, 3600))
  .map(([rows, intervalS]): TableRow[] =>
    rows.map(({ temperature, humidity }, index) => ({
      atMs: FIRST_MS + index * intervalS * 1000,
      // The first row is complete, so that every column shows what it is.
      temperatureC: temperature === null && index > 0 ? null : (temperature ?? 2000) / 100,
      relativeHumidityPct: humidity === null && index > 0 ? null : (humidity ?? 600) / 10,
    })),
  );

const style: fc.Arbitrary<TableStyle> = fc
  .record({
    encoding: fc.constantFrom('utf-8', 'utf-8-bom', 'utf-16le', 'utf-16be', 'windows-1252'),
    lineEnd: fc.constantFrom('\n', '\r\n', '\r'),
    delimiter: fc.constantFrom(',', ';', '\t', '|', 'spaces'),
    decimalMark: fc.constantFrom('.', ','),
    temperatureUnit: fc.constantFrom('°C', '°F', 'K'),
    humidityUnit: fc.constantFrom('%', 'fraction'),
    time: fc.constantFrom(...times),
    isLong: fc.boolean(),
    isQuoted: fc.boolean(),
    isUnitLine: fc.boolean(),
    hasRowNumber: fc.boolean(),
    missing: fc.constantFrom('', 'NaN', '--', 'ERR'),
    notes: fc.constantFrom([], ['Readings of a shelf'], ['Readings', '', 'Interval 90']),
  } as const)
  .filter(
    ({ delimiter, time, missing, isQuoted }) =>
      delimiter !== 'spaces' || (!time.includes(' ') && missing !== '' && !isQuoted),
  );

describe('a table of readings', () => {
  it('written in any supported shape, reads back the same', () => {
    fc.assert(
      fc.property(
        table,
        style,
        fc.constantFrom(...zones),
        fc.integer({ min: 1, max: 5000 }),
        (rows, how, zone, piece) => {
          const bytes = writeTable(rows, how, zone);
          const { shape, questions } = recogniseWhole(bytes, zone, TODAY);
          const { readings, rejected, totals } = readWhole(bytes, shape, { referenceMs: TODAY }, piece);
          const expected = rows.flatMap(({ atMs, temperatureC, relativeHumidityPct }) => [
            ...(temperatureC === null ? [] : [['airTemperature', atMs, temperatureC]]),
            ...(relativeHumidityPct === null ? [] : [['relativeHumidity', atMs, relativeHumidityPct]]),
          ]);
          expect(readings.map(({ series, atMs, value }) => [series.quantity, atMs, value])).toEqual(expected);
          expect({ rejected, questions }).toEqual({ rejected: [], questions: [] });
          expect(totals.readings + totals.missing).toBe(rows.length * 2);
        },
      ),
      { numRuns: 400 },
    );
  });

  it('with any byte replaced, is read or refused and never ends in another error', () => {
    fc.assert(
      fc.property(table, style, fc.nat(), fc.integer({ min: 0, max: 255 }), (rows, how, place, byte) => {
        const bytes = Uint8Array.from(writeTable(rows, how, 'UTC'));
        bytes[place % bytes.length] = byte;
        const outcome = (): string => {
          try {
            const { shape } = recogniseWhole(bytes, 'UTC', TODAY);
            const startAtMs = FIRST_MS;
            const { totals, readings } = readWhole(bytes, shape, { referenceMs: TODAY, startAtMs });
            return totals.readings === readings.length ? 'read' : 'miscounted';
          } catch (error) {
            return error instanceof Error ? error.name : 'thrown';
          }
        };
        expect(['read', 'LoggerFileError']).toContain(outcome());
      }),
      { numRuns: 300 },
    );
  });
});
