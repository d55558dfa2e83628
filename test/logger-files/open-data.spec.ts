import { LoggerFileError } from '@shared/logger-files/logger-file-error';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { readWhole, recogniseWhole } from './read-whole-file';

// Tables that were not made for this project, from the package vega-datasets 3.2.1 (BSD-3-Clause). Sources and licences
// are those that its datapackage.json states for each table.
const folder = join(__dirname, '../../node_modules/vega-datasets/data');
const TODAY = Date.UTC(2026, 5, 1);

function bringIn(name: string) {
  const bytes = readFileSync(join(folder, name));
  const { shape, series, questions } = recogniseWhole(bytes, 'America/Los_Angeles', TODAY);
  return { bytes, shape, series, questions, ...readWhole(bytes, shape, { referenceMs: TODAY }) };
}

function refusalOf(name: string): unknown {
  try {
    bringIn(name);
    return null;
  } catch (error) {
    return error instanceof LoggerFileError ? { code: error.code, line: error.line } : error;
  }
}

/** The cells of a quantity's first column, taken out of the file with nothing but string functions. */
function plainColumn(bytes: Uint8Array, column: number): number[] {
  const lines = Buffer.from(bytes).toString('utf8').trim().split(/\r?\n/).slice(1);
  return lines.map((line) => Number(line.split(',')[column]));
}

describe('open data that was not made for this project', () => {
  // NOAA National Centers for Environmental Information, U.S. government work: hourly normals of 2010.
  it('hourly normals, gives every temperature but that of the hour that never happened', () => {
    const { bytes, readings, rejected, questions } = bringIn('seattle-weather-hourly-normals.csv');
    const values = plainColumn(bytes, 2);
    expect(readings.length + rejected.length).toBe(values.length);
    expect(rejected.map(({ code, text }) => [code, text])).toEqual([
      ['NONEXISTENT_LOCAL_TIME', '2010-03-14T02:00:00'],
    ]);
    const total = readings.reduce((sum, { value }) => sum + value, 0);
    const skipped = values[Number(rejected[0]?.line) - 2] ?? Number.NaN;
    expect(total).toBeCloseTo(values.reduce((sum, value) => sum + value, 0) - skipped, 6);
    expect(questions).toEqual([]);
  });

  // NOAA National Climatic Data Center, U.S. government work: daily weather from 2012 to 2015.
  it('daily weather, gives both temperatures of each day', () => {
    const { bytes, readings, rejected, series } = bringIn('seattle-weather.csv');
    expect(series.map(({ name, quantity }) => [name, quantity])).toEqual([
      ['temp_max', 'airTemperature'],
      ['temp_min', 'airTemperature'],
    ]);
    const maxima = readings.filter(({ series: { column } }) => column === 2).map(({ value }) => value);
    expect(maxima).toEqual(plainColumn(bytes, 2));
    expect(rejected).toEqual([]);
  });

  // NOAA Climate Data Online, U.S. government work: the same for two places, named in a column.
  it('daily weather of two places, keeps them apart', () => {
    const { series, readings, shape } = bringIn('weather.csv');
    expect(new Set(series.map(({ sensorName }) => sensorName)).size).toBe(2);
    expect(series).toHaveLength(4);
    expect(shape.columns[0]?.role).toBe('sensorName');
    expect(readings).toHaveLength(2 * 2922);
  });

  // NASA Goddard Institute for Space Studies, U.S. government work: a year is not a time.
  it('yearly temperatures, are refused for want of a time', () => {
    expect(refusalOf('global-temp.csv')).toEqual({ code: 'NO_TIME', line: 2 });
  });

  // Scripps CO2 Program, CC BY 4.0; and prices, for which the package states no source.
  it.each(['co2-concentration.csv', 'sp500.csv', 'stocks.csv'])(
    '%s, is refused: nothing in it is kept here',
    (name) => {
      expect(refusalOf(name)).toEqual<{ code: LoggerFileError['code']; line: number }>({
        code: 'NO_VALUES',
        line: 2,
      });
    },
  );

  // Formats of the package that are not text tables.
  it.each([
    ['gimp.png', 'IMAGE_FILE'],
    ['cars.json', 'MARKUP_FILE'],
    ['flights-200k.arrow', 'BINARY_FILE'],
  ])('%s, is refused as %s', (name, code) => {
    expect(refusalOf(name)).toEqual({ code, line: 1 });
  });
});
