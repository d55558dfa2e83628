import fc from 'fast-check';
import { advance, advanceSeries, tick } from './alert-machine';
import type { AboveRangeRule, AlertRule } from './alert-rule';
import { idleState, type AlertState, type Observation, type Quality } from './alert-state';
import type { Episode, EpisodeChange } from './episode';
import { lampPlan } from './lamp-plan';
import { restartFrom } from './restart-from';

// Small whole numbers, so that random series meet holds, gaps, margins and lamp changes often, and exactly.
const context = lampPlan([
  { onAt: 20, offAt: 60 },
  { onAt: 75, offAt: 110 },
]);
const rangeRule = fc.record({
  kind: fc.constant('aboveRange' as const),
  lampsOn: fc.record({ high: fc.constantFrom(null, 4, 6) }),
  lampsOff: fc.record({ high: fc.constantFrom(null, 3, 5) }),
  holdMs: fc.nat(8),
  clearMargin: fc.nat(2),
  clearHoldMs: fc.nat(6),
  maxGapMs: fc.integer({ min: 1, max: 6 }),
  settleMs: fc.nat(5),
  rampMs: fc.nat(8),
  urgentBy: fc.constantFrom(null, 0, 3),
  urgentAfterMs: fc.constantFrom(null, 5, 12),
}) satisfies fc.Arbitrary<AboveRangeRule>;
const silenceRule = fc.record({
  kind: fc.constant('sensorSilent' as const),
  silentAfterMs: fc.integer({ min: 1, max: 5 }),
  urgentAfterMs: fc.constantFrom(null, 8),
});
const rule: fc.Arbitrary<AlertRule> = fc.oneof({ weight: 3, arbitrary: rangeRule }, silenceRule);

const quality = fc.constantFrom<Quality>('pass', 'pass', 'pass', 'suspect', 'fail');
const readings: fc.Arbitrary<Observation[]> = fc
  .array(
    fc.record({
      stepMs: fc.constantFrom(1, 1, 2, 3, 7),
      // Neighbours alike more often than not, so that runs last.
      value: fc.constantFrom(1, 2, 4, 5, 7, 7, 9),
      repeats: fc.integer({ min: 1, max: 5 }),
      quality,
    }),
    { maxLength: 25 },
  )
  .map((stretches) => {
    const rows: Observation[] = [];
    let at = 0;
    for (const { stepMs, value, repeats, ...flag } of stretches) {
      for (let i = 0; i < repeats; i += 1) rows.push({ at: (at += stepMs), value, ...flag });
    }
    return rows;
  });

function foldAll(rule: AlertRule, state: AlertState, rows: readonly Observation[]) {
  return advanceSeries(
    rule,
    context,
    state,
    rows.map(({ at }) => at),
    rows.map(({ value }) => value),
    rows.map(({ quality }) => quality),
  );
}

/** Applies changes as a table of episodes with a key on `beganAt` would. */
function applied(episodes: readonly Episode[], changes: readonly EpisodeChange[]): Episode[] {
  const table = new Map(episodes.map((episode) => [episode.beganAt, episode]));
  for (const { type, episode } of changes) {
    if (type === 'withdrawn') table.delete(episode.beganAt);
    else table.set(episode.beganAt, episode);
  }
  return [...table.values()].sort((a, b) => a.beganAt - b.beganAt);
}

function onePass(rule: AlertRule, rows: readonly Observation[]) {
  const { state, changes } = foldAll(rule, idleState, rows);
  return { state, episodes: applied([], changes) };
}

/** A store as the server keeps it: readings, episodes and the state of one rule. */
class TinyStore {
  private rows: Observation[] = [];
  private state = idleState;
  episodes: Episode[] = [];

  constructor(private readonly rule: AlertRule) {}

  take(batch: readonly Observation[]): void {
    const lastAt = this.rows.at(-1)?.at ?? -Infinity;
    const sorted = [...batch].sort((a, b) => a.at - b.at);
    const earliest = sorted[0];
    if (earliest === undefined) return;
    this.rows = [...this.rows, ...sorted].sort((a, b) => a.at - b.at);
    if (earliest.at > lastAt) this.fold(this.state, sorted);
    else this.refold(earliest.at);
  }

  tick(now: number): void {
    const { state, changes } = tick(this.rule, this.state, now);
    this.state = state;
    this.episodes = applied(this.episodes, changes);
  }

  outcome() {
    return { state: this.state, episodes: this.episodes };
  }

  private refold(lateAt: number): void {
    const restart = restartFrom(this.rule, this.episodes, lateAt);
    this.episodes = this.episodes.filter(({ beganAt }) => beganAt < restart.at);
    this.fold(
      restart.state,
      this.rows.filter(({ at }) => at >= restart.at),
    );
  }

  private fold(from: AlertState, rows: readonly Observation[]): void {
    const { state, changes } = foldAll(this.rule, from, rows);
    this.state = state;
    this.episodes = applied(this.episodes, changes);
  }
}

describe('folding readings into episodes', () => {
  it('gives the same state and episodes one by one, through JSON, as in one pass', () => {
    fc.assert(
      fc.property(rule, readings, (rule, rows) => {
        let state = idleState;
        const changes: EpisodeChange[] = [];
        for (const row of rows) {
          const step = advance(rule, context, state, row);
          state = JSON.parse(JSON.stringify(step.state)) as AlertState;
          changes.push(...step.changes);
        }
        expect({ state, episodes: applied([], changes) }).toEqual(onePass(rule, rows));
      }),
      { numRuns: 500 },
    );
  });

  it('gives the same state and episodes for any batches in any order, folded again from where restartFrom says', () => {
    const shuffled = readings.chain((rows) =>
      fc.tuple(
        fc.constant(rows),
        fc.shuffledSubarray(rows, { minLength: rows.length }),
        fc.array(fc.integer({ min: 1, max: 9 }), { minLength: 1, maxLength: 9 }),
      ),
    );
    fc.assert(
      fc.property(rule, shuffled, (rule, [rows, arrival, sizes]) => {
        const store = new TinyStore(rule);
        for (let from = 0, turn = 0; from < arrival.length; turn += 1) {
          const size = sizes[turn % sizes.length] ?? 1;
          store.take(arrival.slice(from, from + size));
          from += size;
        }
        expect(store.outcome()).toEqual(onePass(rule, rows));
      }),
      { numRuns: 500 },
    );
  });

  it('gives the same for nearly ordered arrival, with the clock ticking between', () => {
    const delayed = readings.chain((rows) =>
      fc.tuple(
        fc.constant(rows),
        fc.array(fc.nat(12), { minLength: rows.length, maxLength: rows.length }),
        fc.array(fc.boolean(), { minLength: rows.length, maxLength: rows.length }),
      ),
    );
    fc.assert(
      fc.property(rule, delayed, (rule, [rows, delays, ticks]) => {
        const store = new TinyStore(rule);
        rows
          .map((row, i) => ({ row, arrivesAt: row.at + (delays[i] ?? 0), ticks: ticks[i] }))
          .sort((a, b) => a.arrivesAt - b.arrivesAt)
          .forEach(({ row, arrivesAt, ticks }) => {
            if (ticks === true) store.tick(arrivesAt);
            store.take([row]);
          });
        const now = (rows.at(-1)?.at ?? 0) + 15;
        store.tick(now);
        const { state, episodes } = onePass(rule, rows);
        const ticked = tick(rule, state, now);
        expect(store.outcome()).toEqual({ state: ticked.state, episodes: applied(episodes, ticked.changes) });
      }),
      { numRuns: 500 },
    );
  });

  it('never needs readings from before the hold, the longest gap, or the episode that was open', () => {
    fc.assert(
      fc.property(rangeRule, readings, fc.nat(150), (rule, rows, lateAt) => {
        const { episodes } = onePass(rule, rows);
        const { at, state } = restartFrom(rule, episodes, lateAt);
        const touched = episodes.find(
          (one) => one.beganAt < lateAt && lateAt <= (one.clearedAt ?? Infinity) + rule.maxGapMs,
        );
        expect(state).toEqual(idleState);
        expect(at).toBeGreaterThanOrEqual(
          Math.min(touched?.beganAt ?? Infinity, lateAt - rule.holdMs - rule.maxGapMs),
        );
      }),
    );
  });
});
