import { readFileSync } from 'node:fs';
import { join } from 'node:path';

import { degreeDaysFromMinMax, degreeDaysFromSeries } from '@shared/climate/degree-days';
import type { Sample } from '@shared/series/series';

import { maizeExamples, mcmasterWilhelmTable1, methodsCompared, zalomTable7 } from './degree-day-tables';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

/** Tolerance of a table printed to two decimals. */
const HALF_A_CENT = 0.005 + 1e-9;

describe('degreeDaysFromMinMax', () => {
  it.each(mcmasterWilhelmTable1)(
    'for %d and %d °C agrees with McMaster & Wilhelm 1997 Table 1',
    (maxC, minC, method1, method2) => {
      expect(degreeDaysFromMinMax({ minC, maxC, baseC: 0, method: 'average' })).toBe(method1);
      expect(degreeDaysFromMinMax({ minC, maxC, baseC: 0, method: 'averageOfFloored' })).toBe(method2);
    },
  );

  it.each(zalomTable7)(
    'for %d to %d and then %d °F agrees with Zalom et al. 1983 Table 7',
    (minF, maxF, nextMinF, single, double) => {
      const day = { minC: minF, maxC: maxF, nextMinC: nextMinF, baseC: 55, upperC: 90 };

      expect(Math.abs(degreeDaysFromMinMax({ ...day, method: 'singleSine' }) - single)).toBeLessThan(
        HALF_A_CENT,
      );
      expect(Math.abs(degreeDaysFromMinMax({ ...day, method: 'doubleSine' }) - double)).toBeLessThan(
        HALF_A_CENT,
      );
    },
  );

  it.each(maizeExamples)('for maize between %d and %d °F is the published %d', (maxF, minF, published) => {
    const day = { minC: minF, maxC: maxF, baseC: 50, upperC: 86, method: 'averageOfFloored' } as const;

    expect(degreeDaysFromMinMax(day)).toBe(published);
  });

  it.each(methodsCompared)(
    'from %d to %d °C tells the methods apart',
    (minC, maxC, average, floored, sine) => {
      const day = { minC, maxC, baseC: 10 };

      expect(degreeDaysFromMinMax({ ...day, method: 'average' })).toBe(average);
      expect(degreeDaysFromMinMax({ ...day, method: 'averageOfFloored' })).toBe(floored);
      expect(degreeDaysFromMinMax({ ...day, method: 'singleSine' })).toBeCloseTo(sine, 5);
    },
  );
});

describe('degreeDaysFromSeries', () => {
  // Hourly normals of Seattle, NOAA 1981–2010, as packed in vega-datasets 3.2.1.
  const hours = readHourlyNormals();
  const from = hours[0]!.at;
  const to = from + 364 * DAY_MS;

  it.each([5, 10, 15])(
    'over a year of hourly normals with base %d °C agrees with a plain hourly sum',
    (baseC) => {
      const measured = degreeDaysFromSeries(hours, { baseC, from, to, maxGapMs: HOUR_MS });
      const inYear = hours.filter(({ at }) => at >= from && at < to);
      const hourlySum = inYear.reduce((sum, { value }) => sum + Math.max(0, value - baseC) / 24, 0);

      expect(measured.coveredMs).toBe(to - from);
      // A step for each hour and a line between hours differ by less than a percent over a year.
      expect(Math.abs(measured.degreeDaysCD / hourlySum - 1)).toBeLessThan(0.01);
    },
  );

  it.each([5, 10, 15])(
    'over a year of normals with base %d °C is up to 10 %% below the daily single sine',
    (baseC) => {
      const measured = degreeDaysFromSeries(hours, { baseC, from, to, maxGapMs: HOUR_MS }).degreeDaysCD;
      let bySine = 0;
      for (let day = from; day < to; day += DAY_MS) {
        const values = hours.filter(({ at }) => at >= day && at <= day + DAY_MS).map(({ value }) => value);
        const extremes = { minC: Math.min(...values), maxC: Math.max(...values) };
        bySine += degreeDaysFromMinMax({ ...extremes, baseC, method: 'singleSine' });
      }

      // The real curve lingers near its minimum through the night, so the sine overstates: by 4, 5 and 10 percent.
      expect(measured).toBeLessThan(bySine);
      expect(measured / bySine).toBeGreaterThan(0.9);
    },
  );
});

function readHourlyNormals(): Sample[] {
  const file = join(process.cwd(), 'node_modules/vega-datasets/data/seattle-weather-hourly-normals.csv');
  const [header, ...rows] = readFileSync(file, 'utf8').trim().split('\n');
  if (header !== 'date,pressure,temperature,wind') {
    throw new Error(`unexpected columns: ${header}`);
  }
  return rows.map((row) => {
    const [date, , temperatureC] = row.split(',');
    return { at: Date.parse(`${date}Z`), value: Number(temperatureC) };
  });
}
