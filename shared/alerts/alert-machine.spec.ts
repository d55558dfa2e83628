import { advance, advanceSeries, tick } from './alert-machine';
import type { AboveRangeRule, AlertRule, SilenceRule } from './alert-rule';
import { idleState, type Quality } from './alert-state';
import { lampPlan } from './lamp-plan';

const minute = 60_000;
const unlit = lampPlan([]);

const tooWarm: AboveRangeRule = {
  kind: 'aboveRange',
  lampsOn: { high: 26 },
  lampsOff: { high: 20 },
  holdMs: 10 * minute,
  clearMargin: 0.5,
  clearHoldMs: 5 * minute,
  maxGapMs: 20 * minute,
  settleMs: 30 * minute,
  rampMs: 60 * minute,
  urgentBy: 3,
  urgentAfterMs: 60 * minute,
};

const silent: SilenceRule = { kind: 'sensorSilent', silentAfterMs: 15 * minute, urgentAfterMs: 60 * minute };

/** Folds rows of minute, value and, unless it passed, quality; gives the changes with instants in minutes. */
function changesOf(rule: AlertRule, rows: readonly (readonly [number, number, Quality?])[]) {
  const { changes } = advanceSeries(
    rule,
    unlit,
    idleState,
    rows.map(([at]) => at * minute),
    rows.map(([, value]) => value),
    rows.map(([, , quality]) => quality ?? 'pass'),
  );
  return changes.map(({ type, at }) => [type, at / minute]);
}

describe('a limit rule', () => {
  it('opens hold time after the first reading past the limit, with its peak so far', () => {
    const { changes } = advanceSeries(
      tooWarm,
      unlit,
      idleState,
      [0, 4, 8, 12].map((at) => at * minute),
      [19, 20.5, 22, 21],
      ['pass', 'pass', 'pass', 'pass'],
    );
    expect(changes).toEqual([]);

    const opened = advanceSeries(
      tooWarm,
      unlit,
      idleState,
      [0, 4, 8, 12, 16].map((at) => at * minute),
      [19, 20.5, 22, 21, 21],
      ['pass', 'pass', 'pass', 'pass', 'pass'],
    );
    expect(opened.changes).toEqual([
      {
        type: 'opened',
        at: 14 * minute,
        episode: {
          beganAt: 4 * minute,
          openedAt: 14 * minute,
          peakAt: 8 * minute,
          peakValue: 22,
          peakExcess: 2,
          limit: 20,
          endedAt: null,
          clearedAt: null,
          urgency: 'lookToday',
        },
      },
    ]);
  });

  it('stays closed when the value only touches the limit, or returns within it before the hold time', () => {
    expect(
      changesOf(tooWarm, [
        [0, 20],
        [10, 20],
        [20, 20],
      ]),
    ).toEqual([]);
    expect(
      changesOf(tooWarm, [
        [0, 21],
        [9, 20],
        [10, 21],
        [19, 21],
      ]),
    ).toEqual([]);
  });

  it('begins a run anew after a gap longer than allowed, and only then', () => {
    expect(
      changesOf(tooWarm, [
        [0, 21],
        [20, 21],
      ]),
    ).toEqual([['opened', 10]]);
    expect(
      changesOf(tooWarm, [
        [0, 21],
        [21, 21],
      ]),
    ).toEqual([]);
    expect(
      changesOf(tooWarm, [
        [0, 21],
        [21, 21],
        [31, 21],
      ]),
    ).toEqual([['opened', 31]]);
  });

  it('clears once the value was inside by the margin for the clearing hold, and not by touching the limit', () => {
    const open = [
      [0, 21],
      [10, 21],
    ] as const;
    expect(changesOf(tooWarm, [...open, [15, 19.6], [20, 19.6]])).toEqual([['opened', 10]]);
    expect(changesOf(tooWarm, [...open, [15, 19.5], [20, 19.5]])).toEqual([
      ['opened', 10],
      ['cleared', 20],
    ]);
    expect(changesOf(tooWarm, [...open, [15, 19.5], [18, 19.6], [20, 19.5], [24, 19.5]])).toEqual([
      ['opened', 10],
    ]);
  });

  it('is urgent when far past the limit or long past it', () => {
    expect(
      changesOf(tooWarm, [
        [0, 21],
        [10, 21],
        [12, 23],
      ]),
    ).toEqual([
      ['opened', 10],
      ['urgencyRaised', 12],
      ['peaked', 12],
    ]);
    expect(
      changesOf(tooWarm, [
        [0, 21],
        [20, 21],
        [40, 21],
        [60, 21],
      ]),
    ).toEqual([
      ['opened', 10],
      ['urgencyRaised', 60],
    ]);
  });

  it('never opens on suspect or failed readings alone', () => {
    expect(
      changesOf(tooWarm, [
        [0, 21, 'suspect'],
        [10, 21, 'suspect'],
        [20, 21, 'suspect'],
      ]),
    ).toEqual([]);
    expect(
      changesOf(tooWarm, [
        [0, 21, 'fail'],
        [10, 21, 'fail'],
        [20, 21, 'fail'],
      ]),
    ).toEqual([]);
    expect(
      changesOf(tooWarm, [
        [0, 21],
        [5, 85, 'suspect'],
        [10, 21, 'suspect'],
      ]),
    ).toEqual([['opened', 10]]);
  });

  it('takes no peak and no urgency from a suspect reading', () => {
    const { state } = advanceSeries(
      tooWarm,
      unlit,
      idleState,
      [0, 10 * minute, 12 * minute],
      [21, 21, 85],
      ['pass', 'pass', 'suspect'],
    );
    expect(state.open).toMatchObject({ peakValue: 21, urgency: 'lookToday' });
  });

  it('does not answer to the clock', () => {
    const { state } = advance(tooWarm, unlit, idleState, { at: 0, value: 25, quality: 'pass' });
    expect(tick(tooWarm, state, 100 * minute)).toEqual({ state, changes: [] });
  });

  it('refuses a reading that is not later than the last', () => {
    const { state } = advance(tooWarm, unlit, idleState, { at: 0, value: 25, quality: 'pass' });
    expect(() => advance(tooWarm, unlit, state, { at: 0, value: 25, quality: 'pass' })).toThrow(
      expect.objectContaining({ code: 'UNORDERED_SERIES' }),
    );
  });
});

describe('a silence rule', () => {
  const { state } = advance(silent, unlit, idleState, { at: 0, value: 20, quality: 'fail' });

  it('opens by the clock once the time between readings is exceeded, at the same instant whenever it looks', () => {
    expect(tick(silent, state, 15 * minute).changes).toEqual([]);
    for (const now of [15 * minute + 1, 40 * minute]) {
      expect(tick(silent, state, now).changes).toMatchObject([
        { type: 'opened', at: 15 * minute, episode: { beganAt: 0, urgency: 'lookToday' } },
      ]);
    }
  });

  it('becomes urgent once by the clock and is cleared by the next reading', () => {
    const open = tick(silent, state, 20 * minute).state;
    const urgent = tick(silent, open, 61 * minute);
    expect(urgent.changes).toMatchObject([{ type: 'urgencyRaised', at: 60 * minute }]);
    expect(tick(silent, urgent.state, 62 * minute).changes).toEqual([]);

    const back = advance(silent, unlit, urgent.state, { at: 70 * minute, value: 20, quality: 'pass' });
    expect(back.changes).toMatchObject([
      { type: 'cleared', at: 70 * minute, episode: { peakExcess: 55 * minute, urgency: 'goNow' } },
    ]);
  });

  it('finds the same episode in readings alone', () => {
    const ticked = tick(silent, tick(silent, state, 20 * minute).state, 61 * minute).state;
    const withClock = advance(silent, unlit, ticked, { at: 70 * minute, value: 20, quality: 'pass' });
    const without = advance(silent, unlit, state, { at: 70 * minute, value: 20, quality: 'pass' });

    expect(without.state).toEqual(withClock.state);
    expect(without.changes.map(({ type }) => type)).toEqual(['opened', 'cleared']);
    expect(without.changes.at(-1)).toEqual(withClock.changes.at(-1));
  });

  it('is withdrawn when readings that were under way show that there was none', () => {
    const open = tick(silent, state, 20 * minute).state;
    const late = advance(silent, unlit, open, { at: 14 * minute, value: 20, quality: 'pass' });
    expect(late.changes.map(({ type }) => type)).toEqual(['withdrawn']);
    expect(late.state.open).toBeNull();
  });

  it('is never silent before its first reading', () => {
    expect(tick(silent, idleState, 1e12).changes).toEqual([]);
  });
});
