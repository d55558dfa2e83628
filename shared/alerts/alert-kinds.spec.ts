import { DateTime, FixedOffsetZone } from 'luxon';
import { roomDayBoundsAt } from '../series/room-days';
import { lightShortRule, lightSumShortRule, rangeRules, standingRules } from './alert-defaults';
import { advanceSeries } from './alert-machine';
import { alertKinds, type AlertRule } from './alert-rule';
import { idleState, type ObservationColumns, type Quality } from './alert-state';
import {
  changePerHour,
  dewPointSurplus,
  disagreement,
  failedShare,
  lightDays,
  unaskedWarmth,
} from './derived-series';
import { lampPlan } from './lamp-plan';
import { botrytisWindow, wetHours } from './wet-leaves';

const minute = 60_000;
const hour = 60 * minute;
const unlit = lampPlan([]);

/** A reading every five minutes, from a start [min] through values that each last some time [min]. */
function steps(...stretches: readonly (readonly [value: number, forMin: number, quality?: Quality])[]) {
  const times: number[] = [];
  const values: number[] = [];
  const qualities: Quality[] = [];
  for (const [value, forMin, quality] of stretches) {
    for (let passed = 0; passed < forMin; passed += 5) {
      times.push(times.length * 5 * minute);
      values.push(value);
      qualities.push(quality ?? 'pass');
    }
  }
  return { times, values, qualities } satisfies ObservationColumns;
}

/** Changes as type and minute; peaks are left to the machine's own tests. */
function told(rule: AlertRule, columns: ObservationColumns, context = unlit) {
  const { times, values, qualities } = columns;
  return advanceSeries(rule, context, idleState, times, values, qualities)
    .changes.filter(({ type }) => type !== 'peaked')
    .map(({ type, at, episode }) => [type, at / minute, episode.urgency]);
}

describe('each kind, with its default patience', () => {
  const air = rangeRules('airTemperature', {
    lampsOn: { low: 20, high: 26 },
    lampsOff: { low: 16, high: 20 },
  });

  it('aboveRange opens after a quarter of an hour and clears ten minutes after it is back by the margin', () => {
    expect(told(air.above, steps([19, 30], [21, 60], [19.8, 30], [19.5, 30]))).toEqual([
      ['opened', 45, 'lookToday'],
      ['cleared', 130, 'lookToday'],
    ]);
  });

  it('belowRange is urgent when 4 °C too cold', () => {
    expect(told(air.below, steps([17, 30], [15, 20], [12, 20]))).toEqual([
      ['opened', 45, 'lookToday'],
      ['urgencyRaised', 50, 'goNow'],
    ]);
  });

  it('fastFall opens at once on 3 °C in 15 minutes and clears when it slows; fastRise is silent then', () => {
    // An open window: 22 °C down to 16 °C within 20 minutes.
    const window = steps([22, 30], [20, 5], [18, 5], [16, 60]);
    const rate = changePerHour(window, 15 * minute);
    // By hand: minute 35 is the first at which 15 minutes lost more than 3 °C (22 to 18); at 50 it is 2 °C (18 to 16).
    expect(told(standingRules.fastFall, rate)).toEqual([
      ['opened', 35, 'lookToday'],
      ['cleared', 60, 'lookToday'],
    ]);
    expect(told(standingRules.fastRise, rate)).toEqual([]);
  });

  it('fastRise mirrors fastFall', () => {
    const rate = changePerHour(steps([16, 30], [18, 5], [20, 5], [22, 60]), 15 * minute);
    expect(told(standingRules.fastRise, rate)[0]).toEqual(['opened', 35, 'lookToday']);
    expect(told(standingRules.fastFall, rate)).toEqual([]);
  });

  it('lampDark opens in planned light only, five minutes and the hold after it should have come on', () => {
    const plan = lampPlan([{ onAt: hour, offAt: 3 * hour }]);
    // The loosening at lamps-off ends it: from then on darkness is what is wanted.
    expect(told(standingRules.lampDark, steps([0, 240]), plan)).toEqual([
      ['opened', 80, 'lookToday'],
      ['cleared', 190, 'lookToday'],
    ]);
    expect(told(standingRules.lampDark, steps([0, 60], [200, 120], [0, 60]), plan)).toEqual([]);
  });

  it('lampLit opens in planned darkness only', () => {
    const plan = lampPlan([{ onAt: hour, offAt: 2 * hour }]);
    expect(told(standingRules.lampLit, steps([0, 60], [200, 120], [0, 30]), plan)).toEqual([
      ['opened', 140, 'lookToday'],
      ['cleared', 190, 'lookToday'],
    ]);
  });

  it('lightShort opens at the end of a short day, clears with a full one, and lets a doubtful day pass', () => {
    const day = (d: number, value: number, coverage = 1) => ({ endAt: d * 24 * hour, value, coverage });
    const days = lightDays([day(1, 14), day(2, 9), day(3, 14), day(4, 2, 0.3)], 0.8);
    expect(told(lightShortRule(12), days)).toEqual([
      ['opened', 2 * 24 * 60, 'lookToday'],
      ['cleared', 3 * 24 * 60, 'lookToday'],
    ]);
  });

  it.each([
    ['three short days in a row', [9, 9, 9.9], [['opened', 3 * 24 - 1]]],
    [
      'and the day that reaches it',
      [9, 9, 9, 9, 10],
      [
        ['opened', 3 * 24 - 1],
        ['cleared', 5 * 24],
      ],
    ],
    ['short days with a full one between', [9, 9, 10, 9, 9], []],
    ['a short day, one of which nothing is known, and two short ones', [9, null, 9, 9], []],
    ['zero three times', [0, 0, 0], [['opened', 3 * 24 - 1]]],
    ['days that just reach it', [10, 10, 10], []],
  ] as const)('lightSumShort, wanting 10 mol/m² a day: %s', (_, sums, expected) => {
    const days = sums.map((value, index) => ({
      endAt: (index + 1) * 24 * hour,
      value: value ?? 2,
      coverage: value === null ? 0.5 : 1,
    }));
    const changes = told(lightSumShortRule(10), lightDays(days, 0.8));
    expect(changes.map(([type, at]) => [type, Number(at) / 60])).toEqual(expected);
  });

  it('matStuckOn opens two hours after the last seed came up with the mat still on, and clears without it', () => {
    const rootZone = steps([26, 300], [20, 60]);
    const isWarmthWanted = (at: number) => at < 60 * minute;
    const warmth = unaskedWarmth(rootZone, steps([20, 360]), 10 * minute, isWarmthWanted);
    expect(told(standingRules.matStuckOn, warmth)).toEqual([
      ['opened', 180, 'lookToday'],
      ['cleared', 310, 'lookToday'],
    ]);
  });

  it('condensation opens half an hour after a surface falls below the dew point', () => {
    // 20 °C and 60 %: dew point 12.0 °C (FAO-56 eq. 11 inverted).
    const room = { temperature: steps([20, 180]), humidity: steps([60, 180]) };
    const rootZone = steps([13, 60], [11, 60], [13, 60]);
    const surplus = dewPointSurplus(room, { leafOffsetC: 0, rootZone }, 10 * minute, () => false);
    expect(told(standingRules.condensation, surplus)).toEqual([
      ['opened', 90, 'lookToday'],
      ['cleared', 130, 'lookToday'],
    ]);
  });

  it('wetHours opens once leaves were wet for more than 8 hours, is urgent at 12, and clears when they dry', () => {
    const humidity = steps([95, 13 * 60], [60, 180]);
    const wet = wetHours(humidity, steps([18, 16 * 60]), botrytisWindow);
    expect(told(standingRules.wetHours, wet)).toEqual([
      ['opened', 8 * 60 + 5, 'lookToday'],
      ['urgencyRaised', 12 * 60, 'goNow'],
      // The reading at 12:55 is the last wet one and speaks until 13:00; two dry hours and the clearing hold follow.
      ['cleared', 15 * 60 + 10, 'goNow'],
    ]);
  });

  it('sensorsDisagree opens after an hour apart', () => {
    const apart = disagreement([steps([20, 180]), steps([20, 30], [23, 90], [20, 60])], 10 * minute);
    expect(told(standingRules.sensorsDisagree, apart)).toEqual([
      ['opened', 90, 'lookToday'],
      ['cleared', 130, 'lookToday'],
    ]);
  });

  it('sensorFailed opens once most readings of half an hour failed, one after another or not', () => {
    const half = { windowMs: 30 * minute, fewest: 6 };
    const dead = steps([20, 30], [-40, 5, 'fail'], [20, 30], [-40, 30, 'fail'], [20, 60]);
    // By hand: minute 80 is the fourth of six; from minute 105 on at most three of six, for ten minutes.
    expect(told(standingRules.sensorFailed, failedShare(dead, half))).toEqual([
      ['opened', 80, 'lookToday'],
      ['cleared', 115, 'lookToday'],
    ]);
    const loose = Array.from({ length: 8 }).flatMap(() => [
      [-40, 10, 'fail'] as const,
      [20, 5, 'pass'] as const,
    ]);
    expect(told(standingRules.sensorFailed, failedShare(steps(...loose), half))).toEqual([
      ['opened', 20, 'lookToday'],
    ]);
  });

  it.each([
    ['dangerLow', 1],
    ['dangerHigh', 40],
  ] as const)('%s is urgent from the start, five minutes after it began', (kind, value) => {
    expect(told(standingRules[kind], steps([20, 30], [value, 15], [20, 30]))).toEqual([
      ['opened', 35, 'goNow'],
      ['cleared', 55, 'goNow'],
    ]);
  });

  it.each(['sensorSilent', 'deviceSilent'] as const)(
    '%s finds a gap that is longer than its limit',
    (kind) => {
      const rule = standingRules[kind];
      const columns = (gapMs: number): ObservationColumns => ({
        times: [0, gapMs],
        values: [20, 20],
        qualities: ['pass', 'pass'],
      });
      expect(told(rule, columns(rule.silentAfterMs))).toEqual([]);
      expect(told(rule, columns(rule.silentAfterMs + minute)).map(([type]) => type)).toEqual([
        'opened',
        'cleared',
      ]);
    },
  );

  it('no kind is without a rule', () => {
    const fromRange = [air.above.kind, air.below.kind, lightShortRule(12).kind, lightSumShortRule(12).kind];
    expect([...Object.keys(standingRules), ...fromRange].sort()).toEqual([...alertKinds].sort());
  });
});

// In 2026 clocks in Dublin go forward on 29 March at 01:00 UTC and back on 25 October at 01:00 UTC.
describe.each([
  ['23-hour day', '2026-03-27', 29, 23],
  ['25-hour day', '2026-10-23', 25, 25],
])('over a %s in Europe/Dublin', (_, firstDay, changeDay, hoursThen) => {
  const zone = 'Europe/Dublin';
  const first = DateTime.fromISO(firstDay, { zone });
  const localDays = Array.from({ length: 5 }, (_, d) => first.plus({ days: d }));
  // A timer by the room's clock, on at 20:00 and off at 08:00, so that the change falls into its light.
  const plan = lampPlan(
    localDays.map((day) => ({
      onAt: day.set({ hour: 20 }).toMillis(),
      offAt: day.plus({ days: 1 }).set({ hour: 8 }).toMillis(),
    })),
  );
  const start = first.plus({ hours: 12 }).toMillis();
  const times = Array.from({ length: (4 * 24 * hour) / (5 * minute) }, (_, i) => start + i * 5 * minute);
  const qualities = times.map((): Quality => 'pass');

  it('a lamp that follows the room’s clock is neither dark nor lit out of turn', () => {
    const values = times.map((at) => {
      const clock = DateTime.fromMillis(at, { zone }).hour;
      return clock >= 20 || clock < 8 ? 200 : 0;
    });
    expect(told(standingRules.lampDark, { times, values, qualities }, plan)).toEqual([]);
    expect(told(standingRules.lampLit, { times, values, qualities }, plan)).toEqual([]);
  });

  it('a timer that keeps to the old clock is found on the day of the change and not before', () => {
    const fixedHour = (at: number) =>
      DateTime.fromMillis(at).setZone(FixedOffsetZone.instance(first.offset)).hour;
    const values = times.map((at) => (fixedHour(at) >= 20 || fixedHour(at) < 8 ? 200 : 0));
    const { changes } = advanceSeries(standingRules.lampDark, plan, idleState, times, values, qualities);
    const { changes: litChanges } = advanceSeries(
      standingRules.lampLit,
      plan,
      idleState,
      times,
      values,
      qualities,
    );
    const opened = [...changes, ...litChanges].filter(({ type }) => type === 'opened');
    const days = opened.map(({ at }) => DateTime.fromMillis(at, { zone }).day);
    expect(Math.min(...days)).toBe(changeDay);
  });

  it('light hours are judged at the end of the room’s own day', () => {
    const noon = first.set({ day: changeDay, hour: 12 }).toMillis();
    const bounds = roomDayBoundsAt(zone)(noon);
    expect((bounds.end - bounds.start) / hour).toBe(hoursThen);
    const days = lightDays([{ endAt: bounds.end, value: 11, coverage: 1 }], 0.8);
    expect(told(lightShortRule(12), days)).toEqual([['opened', bounds.end / minute, 'lookToday']]);
  });

  it.each([3, 2])(
    '%d short days with the change among them open a short sum only when they are three',
    (count) => {
      const days = [2, 1, 0].map((before) => {
        const noon = first.set({ day: changeDay, hour: 12 }).minus({ days: before }).toMillis();
        return { endAt: roomDayBoundsAt(zone)(noon).end, value: 9, coverage: 1 };
      });
      const changes = told(lightSumShortRule(10), lightDays(days.slice(-count), 0.8));
      expect(changes.map(([type]) => type)).toEqual(count === 3 ? ['opened'] : []);
    },
  );
});
