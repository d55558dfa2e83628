import fc from 'fast-check';
import type { ObservationColumns, Quality } from './alert-state';
import {
  changePerHour,
  dewPointSurplus,
  disagreement,
  failedShare,
  lightDays,
  unaskedChange,
  unaskedWarmth,
} from './derived-series';
import { joinAsOf, mergedReadings } from './joined-series';
import { lampPlan } from './lamp-plan';
import { botrytisWindow, wetHours } from './wet-leaves';

const minute = 60_000;
const hour = 60 * minute;

const never = (): boolean => false;

type Row = readonly [atMin: number, value: number, quality?: Quality];

function series(...rows: Row[]): ObservationColumns {
  return {
    times: rows.map(([atMin]) => atMin * minute),
    values: rows.map(([, value]) => value),
    qualities: rows.map(([, , quality]) => quality ?? 'pass'),
  };
}

function rowsOf({ times, values, qualities }: ObservationColumns) {
  return Array.from(times, (at, i) => [at / minute, values[i], qualities[i]]);
}

describe('series joined as of their latest readings', () => {
  it('has a value at every reading of either, while the other is young enough', () => {
    const joined = joinAsOf(
      [series([0, 1], [10, 2], [40, 3]), series([5, 10], [10, 20])],
      20 * minute,
      ([a = NaN, b = NaN]) => a + b,
    );
    expect(rowsOf(joined)).toEqual([
      [5, 11, 'pass'],
      [10, 22, 'pass'],
    ]);
  });

  it('is suspect where either reading is, and knows no failed one', () => {
    const joined = joinAsOf(
      [series([0, 1], [10, 99, 'fail'], [20, 3]), series([0, 1, 'suspect'], [10, 2], [20, 3])],
      60 * minute,
      ([a = NaN, b = NaN]) => a - b,
    );
    expect(rowsOf(joined)).toEqual([
      [0, 0, 'suspect'],
      [10, -1, 'pass'],
      [20, 0, 'pass'],
    ]);
  });
});

describe('series of single kinds', () => {
  it('disagreement is the distance, whichever sensor is higher', () => {
    const apart = disagreement([series([0, 20], [10, 25]), series([0, 22], [10, 22])], minute);
    expect(apart.values).toEqual([2, 3]);
  });

  it('disagreement of three sensors is the widest, of those that still speak, and none of one alone', () => {
    const sensors = [series([0, 20], [60, 20]), series([0, 21], [60, 24]), series([0, 26])];
    expect(rowsOf(disagreement(sensors, 30 * minute))).toEqual([
      [0, 6, 'pass'],
      [60, 4, 'pass'],
    ]);
    expect(disagreement([series([0, 20], [10, 25]), series()], minute).values).toEqual([]);
  });

  it('readings of two thermometers merge in order, the first named counting where they coincide', () => {
    expect(
      rowsOf(mergedReadings([series([0, 1], [20, 3, 'suspect']), series([0, 9], [10, 2, 'fail'])])),
    ).toEqual([
      [0, 1, 'pass'],
      [10, 2, 'fail'],
      [20, 3, 'suspect'],
    ]);
  });

  it('unasked warmth is the root zone above the air, and nothing while seed waits for it', () => {
    const warmth = unaskedWarmth(
      series([0, 26], [10, 26]),
      series([0, 20], [10, 20]),
      minute,
      (at) => at === 0,
    );
    expect(warmth.values).toEqual([0, 6]);
  });

  // Dew points of 15.1 °C at 22 °C/65 % and 18.2 °C at 24 °C/70 %, to 0.1 °C, from FAO-56 eq. 11 inverted.
  it.each([
    [22, 65, 15.1],
    [24, 70, 18.2],
  ])(
    'dew point surplus in air of %d °C and %d %% is zero on a surface of %d °C',
    (temperature, humidity, dewPoint) => {
      const surplus = dewPointSurplus(
        { temperature: series([0, temperature]), humidity: series([0, humidity]) },
        { leafOffsetC: 0, rootZone: series([0, dewPoint]) },
        minute,
        never,
      );
      expect(Math.abs(surplus.values[0] ?? NaN)).toBeLessThan(0.05);
    },
  );

  it('dew point surplus takes the colder of leaves and root zone, and the leaves alone without a probe', () => {
    const air = { temperature: series([0, 22]), humidity: series([0, 65]) };
    const surplus = (leafOffsetC: number, rootZone: ObservationColumns): number =>
      dewPointSurplus(air, { leafOffsetC, rootZone }, minute, never).values[0] ?? NaN;
    // Dew point 15.1 °C; leaves at 14 °C, or at 22 °C beside a root zone of 13 °C.
    expect(surplus(-8, series([0, 20]))).toBeCloseTo(1.1, 1);
    expect(surplus(-8, series())).toBeCloseTo(1.1, 1);
    expect(surplus(0, series([0, 13]))).toBeCloseTo(2.1, 1);
    expect(surplus(0, series())).toBeCloseTo(-6.9, 1);
  });

  it('dew point surplus is well inside the limit while a covered tray is meant to sweat', () => {
    const air = { temperature: series([0, 22], [10, 22]), humidity: series([0, 65], [10, 65]) };
    const rootZone = series([0, 10], [10, 10]);
    const surplus = dewPointSurplus(air, { leafOffsetC: 0, rootZone }, minute, (at) => at === 0);
    expect(surplus.values[0]).toBeLessThanOrEqual(-0.5);
    expect(surplus.values[1]).toBeGreaterThan(5);
  });

  it('change per hour compares with the reading a window ago, across uneven intervals but not across gaps', () => {
    const rates = changePerHour(series([0, 20], [10, 20.5], [16, 22], [25, 23], [120, 30]), 15 * minute);
    // By hand: 2 °C in 16 min; 2.5 °C in 15 min; nothing within half an hour before minute 120.
    expect(rowsOf(rates)).toEqual([
      [16, 7.5, 'pass'],
      [25, 10, 'pass'],
    ]);
  });

  it('change that the lamps ask for is none, while they settle and in their direction only', () => {
    const plan = lampPlan([{ onAt: 10 * minute, offAt: 60 * minute }]);
    const rates = series([5, 20], [10, 20], [39, 20], [39.5, -20], [40, 20], [65, -20], [66, 20], [90, -20]);
    expect(rowsOf(unaskedChange(rates, plan.lampsAt, 30 * minute)).map(([, rate]) => rate)).toEqual([
      20, 0, 0, -20, 20, 0, 20, -20,
    ]);
  });

  it('failed share counts the window that ends with each reading, and takes few readings for good ones', () => {
    const readings = series([0, 5, 'fail'], [1, 5, 'suspect'], [2, 5, 'fail'], [3, 5, 'fail'], [6, 5]);
    // By hand: of at least four readings; the window of 5 min before minute 6 begins after minute 1.
    expect(rowsOf(failedShare(readings, { windowMs: 5 * minute, fewest: 4 }))).toEqual([
      [0, 0.25, 'pass'],
      [1, 0.25, 'pass'],
      [2, 0.5, 'pass'],
      [3, 0.75, 'pass'],
      [6, 0.5, 'pass'],
    ]);
  });

  it('a day that readings hardly cover is suspect', () => {
    const days = [
      { endAt: 24 * hour, value: 14, coverage: 0.9 },
      { endAt: 47 * hour, value: 3, coverage: 0.4 },
    ];
    expect(lightDays(days, 0.8)).toMatchObject({ values: [14, 3], qualities: ['pass', 'fail'] });
  });
});

describe('hours of wet leaves', () => {
  const every30 = (values: readonly number[]) => series(...values.map((value, i): Row => [i * 30, value]));
  const wetAt20 = (humidity: readonly number[]) =>
    wetHours(every30(humidity), every30(humidity.map(() => 20)), botrytisWindow).values;

  it('add up through a short dry break and start again after two dry hours', () => {
    expect(wetAt20([95, 95, 95, 80, 80, 95, 95])).toEqual([0, 0.5, 1, 1.5, 1.5, 1.5, 2]);
    expect(wetAt20([95, 95, 80, 80, 80, 80, 80, 95, 95])).toEqual([0, 0.5, 1, 1, 1, 1, 0, 0, 0.5]);
  });

  it('never exceed the window', () => {
    expect(Math.max(...Array.from(wetAt20(Array.from({ length: 120 }, () => 95))))).toBe(24);
  });

  it('count only at temperatures at which Botrytis infects, 12.8 to 23.9 °C', () => {
    const humidity = every30([95, 95, 95]);
    expect(wetHours(humidity, every30([12, 14, 14]), botrytisWindow).values).toEqual([0, 0, 0.5]);
    expect(wetHours(humidity, every30([24, 12, 14]), { ...botrytisWindow, betweenC: null }).values).toEqual([
      0, 0.5, 1,
    ]);
  });

  it('do not count on a tray whose seed is still under its cover', () => {
    const humidity = every30([95, 95, 95]);
    const values = wetHours(humidity, every30([20, 20, 20]), botrytisWindow, (at) => at < 30 * minute).values;
    expect(values).toEqual([0, 0, 0.5]);
  });

  it('do not grow across a gap', () => {
    expect(wetHours(series([0, 95], [31, 95]), series([0, 20], [31, 20]), botrytisWindow).values).toEqual([
      0, 0,
    ]);
  });
});

describe('look-back', () => {
  const small = { wetFromPct: 90, betweenC: null, dryAfterMs: 4, windowMs: 12, maxGapMs: 3 } as const;
  const columns = fc
    .array(
      fc.record({
        step: fc.integer({ min: 1, max: 4 }),
        value: fc.constantFrom(80, 90, 95),
        quality: fc.constantFrom<Quality>('pass', 'pass', 'suspect', 'fail'),
      }),
      { maxLength: 60 },
    )
    .map((steps): ObservationColumns => {
      let at = 0;
      return {
        times: steps.map(({ step }) => (at += step)),
        values: steps.map(({ value }) => value),
        qualities: steps.map(({ quality }) => quality),
      };
    });
  const from = (start: number, { times, values, qualities }: ObservationColumns): ObservationColumns => {
    const kept = Array.from(times, (at, i) => ({ at, i })).filter(({ at }) => at >= start);
    return {
      times: kept.map(({ at }) => at),
      values: kept.map(({ i }) => values[i] ?? NaN),
      qualities: kept.map(({ i }) => qualities[i] ?? 'fail'),
    };
  };

  it.each([
    [
      'joinAsOf',
      3,
      (a: ObservationColumns) => joinAsOf([a, a], 3, ([one = NaN, other = NaN]) => one + other),
    ],
    ['failedShare', 6, (a: ObservationColumns) => failedShare(a, { windowMs: 6, fewest: 2 })],
    ['changePerHour', 10, (a: ObservationColumns) => changePerHour(a, 5)],
    ['wetHours', 15, (a: ObservationColumns) => wetHours(a, a, small)],
  ])('of %s suffices: from there on the series is that of all readings', (_, lookBackMs, derive) => {
    fc.assert(
      fc.property(columns, fc.nat(150), (readings, start) => {
        expect(from(start, derive(from(start - lookBackMs, readings)))).toEqual(
          from(start, derive(readings)),
        );
      }),
    );
  });
});
