import { rangeRules } from './alert-defaults';
import { advanceSeries } from './alert-machine';
import { idleState, type Quality } from './alert-state';
import { lampPlan } from './lamp-plan';
import { limitLine } from './limit-line';

const minute = 60_000;
const hour = 60 * minute;
const day = 24 * hour;

const wanted = { lampsOn: { low: 20, high: 26 }, lampsOff: { low: 16, high: 20 } };
const { above, below } = rangeRules('airTemperature', wanted, { settleMs: 30 * minute, rampMs: 60 * minute });
const plan = lampPlan([{ onAt: 6 * hour, offAt: 22 * hour }]);

describe('the lamp plan', () => {
  it.each([
    [0, { on: false, since: -Infinity, until: 10 }],
    [10, { on: true, since: 10, until: 30 }],
    [29, { on: true, since: 10, until: 30 }],
    [30, { on: false, since: 30, until: 40 }],
    [50, { on: false, since: 50, until: Infinity }],
  ])('at %d ms is in the half-open span that holds it, stretches that touch being one', (at, span) => {
    const { lampsAt } = lampPlan([
      { onAt: 10, offAt: 20 },
      { onAt: 20, offAt: 30 },
      { onAt: 40, offAt: 50 },
    ]);
    expect(lampsAt(at)).toEqual(span);
  });

  it.each([
    [[{ onAt: 10, offAt: 10 }]],
    [
      [
        { onAt: 10, offAt: 30 },
        { onAt: 20, offAt: 40 },
      ],
    ],
  ])('refuses intervals that are empty or overlap', (intervals) => {
    expect(() => lampPlan(intervals)).toThrow(expect.objectContaining({ code: 'UNORDERED_SERIES' }));
  });
});

describe('the limit around a change of the lamps', () => {
  // By hand: loosening is immediate; tightening waits 30 min, then takes 60 min.
  it.each([
    ['upper, before the lamps go on', above, 5.99, 20],
    ['upper, as the lamps go on', above, 6, 26],
    ['upper, as the lamps go off', above, 22, 26],
    ['upper, settled', above, 22.5, 26],
    ['upper, half way down', above, 23, 23],
    ['upper, arrived', above, 23.5, 20],
    ['lower, as the lamps go on', below, 6, 16],
    ['lower, half way up', below, 7, 18],
    ['lower, arrived', below, 7.5, 20],
    ['lower, as the lamps go off', below, 22, 16],
  ])('%s', (_, rule, atHour, limit) => {
    expect(limitLine(rule, plan)(atHour * hour)).toBeCloseTo(limit, 9);
  });

  it('counts a missing limit as infinitely far away, and a new one from the end of the ramp', () => {
    const limitAt = limitLine({ ...above, lampsOn: { high: null } }, plan);
    expect([21, 22.5, 23.49, 23.5].map((atHour) => limitAt(atHour * hour))).toEqual([
      Infinity,
      Infinity,
      Infinity,
      20,
    ]);
  });

  it('is the same whichever instant is asked for first', () => {
    const limitAt = limitLine(above, plan);
    const backwards = [23, 7, 22.5, 5].map((atHour) => limitAt(atHour * hour));
    expect(backwards).toEqual([23, 7, 22.5, 5].map((atHour) => limitLine(above, plan)(atHour * hour)));
  });
});

describe('ordinary days under lamps', () => {
  const days = 14;
  const manyDays = lampPlan(
    Array.from({ length: days }, (_, d) => ({ onAt: d * day + 6 * hour, offAt: d * day + 22 * hour })),
  );

  // Newton's law of cooling with a time constant of 40 min towards 24 °C with lamps, 17 °C without.
  function temperatureC(at: number): number {
    const { on, since } = manyDays.lampsAt(at);
    if (!Number.isFinite(since)) return 17;
    const [from, to] = on ? [17, 24] : [24, 17];
    return to + (from - to) * Math.exp(-(at - since) / (40 * minute));
  }

  it.each([1, 5])('open nothing with a reading every %d min while air follows the lamps', (everyMin) => {
    const times = Array.from({ length: (days * day) / (everyMin * minute) }, (_, i) => i * everyMin * minute);
    const values = times.map(temperatureC);
    const qualities = times.map((): Quality => 'pass');
    for (const rule of Object.values(rangeRules('airTemperature', wanted))) {
      expect(advanceSeries(rule, manyDays, idleState, times, values, qualities).changes).toEqual([]);
    }
  });

  it('open once a day when the lamp stays dark, since the lower limit rises without the air', () => {
    const times = Array.from({ length: (days * day) / (5 * minute) }, (_, i) => i * 5 * minute);
    const { changes } = advanceSeries(
      rangeRules('airTemperature', wanted).below,
      manyDays,
      idleState,
      times,
      times.map(() => 17),
      times.map((): Quality => 'pass'),
    );
    expect(changes.filter(({ type }) => type === 'opened')).toHaveLength(days);
    // 17 °C is reached 15 min into the ramp from 16 to 20 °C, so at 06:45; the first reading past it is at 06:50.
    expect(changes[0]?.episode.beganAt).toBe(6 * hour + 50 * minute);
  });
});
