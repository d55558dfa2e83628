import { rangeRules, standingRules } from './alert-defaults';
import { lampPlan } from './lamp-plan';
import type { ObservationColumns } from './alert-state';
import { describeOpenings, wouldHaveOpened } from './would-have-opened';

const minute = 60_000;
const hour = 60 * minute;
const unlit = lampPlan([]);
const { above } = rangeRules(
  'airTemperature',
  { lampsOn: { low: null, high: 26 }, lampsOff: { low: null, high: 20 } },
  { holdMs: 10 * minute },
);

function everyTenMinutes(values: readonly number[]): ObservationColumns {
  return {
    times: values.map((_, i) => i * 10 * minute),
    values,
    qualities: values.map(() => 'pass'),
  };
}

describe('trying a rule on past readings', () => {
  it('counts the episodes that opened in the window and their time past the limit in it', () => {
    // Past the limit at 0:10 to 0:30 and from 1:10 on; the window ends at 2:00.
    const readings = everyTenMinutes([19, 21, 21, 19, 19, 19, 19, 21, 21, 21, 21, 21]);
    const past = wouldHaveOpened(above, unlit, readings, { from: 0, to: 2 * hour });
    expect(past).toMatchObject({ count: 2, totalMs: 20 * minute + 50 * minute });
    expect(past.episodes.map(({ beganAt }) => beganAt / minute)).toEqual([10, 70]);
  });

  it('leaves out what opened before the window, and cuts what began before it', () => {
    const readings = everyTenMinutes([21, 21, 21, 19, 19, 19, 21, 21, 21, 21]);
    expect(wouldHaveOpened(above, unlit, readings, { from: 65 * minute, to: 2 * hour })).toMatchObject({
      count: 1,
      totalMs: 55 * minute,
    });
  });

  it('finds a silence that lasts to the end of the window', () => {
    const past = wouldHaveOpened(standingRules.sensorSilent, unlit, everyTenMinutes([20]), {
      from: 0,
      to: hour,
    });
    expect(past).toMatchObject({ count: 1, totalMs: hour });
  });

  it('finds nothing in no readings', () => {
    expect(wouldHaveOpened(above, unlit, everyTenMinutes([]), { from: 0, to: hour })).toEqual({
      count: 0,
      totalMs: 0,
      episodes: [],
    });
  });
});

describe('saying what a rule would have done', () => {
  const inHours = (ms: number) => `${ms / hour} h`;

  it.each([
    [9, 31, 14, 'This rule would have opened 9 times in the last 14 days, 31 h in all.'],
    [2, 3, 7, 'This rule would have opened twice in the last 7 days, 3 h in all.'],
    [1, 3, 1, 'This rule would have opened once in the last day, 3 h in all.'],
    [0, 0, 14, 'This rule would not have opened in the last 14 days.'],
  ])('%d openings, %d h, %d days', (count, hours, days, sentence) => {
    expect(describeOpenings({ count, totalMs: hours * hour }, days, inHours)).toBe(sentence);
  });
});
