import { requireAfter } from '../series/series';
import { brokenSide, type LimitRule } from './alert-rule';
import type { AlertState, AlertStep, ObservationColumns, Run } from './alert-state';
import type { Episode, EpisodeChange } from './episode';
import type { AlertContext } from './lamp-plan';
import { limitLine } from './limit-line';

/**
 * Folds readings into the episodes of a limit rule.
 *
 * @remarks
 * A run begins with a reading past the limit and opens with the first reading past it that is at least `holdMs`
 * later. It clears once readings were inside by `clearMargin` for `clearHoldMs`. Only readings open, raise and clear:
 * an absence of readings proves nothing here, and a gap longer than `maxGapMs` ends a run and interrupts a clearing.
 *
 * Failed readings don't exist for the rule. A suspect one carries on a run or a clearing, or interrupts it, but
 * begins neither and makes no peak; so an alert rests on at least one reading that passed.
 *
 * @param rule - A limit rule.
 * @param context - The planned lamps.
 * @param state - The state after all readings before these.
 * @param columns - Readings, strictly later than those before.
 * @returns The state after them and what happened, in order.
 * @throws {@link DomainError} `UNORDERED_SERIES` when a reading is not later than the one before it.
 */
export function foldReadings(
  rule: LimitRule,
  context: AlertContext,
  state: AlertState,
  columns: ObservationColumns,
): AlertStep {
  const { times, values, qualities } = columns;
  const side = brokenSide(rule.kind);
  const limitAt = limitLine(rule, context);
  const fold = new EpisodeFold(rule, state);
  let lastAt = state.lastAt ?? -Infinity;
  for (let i = 0; i < times.length; i += 1) {
    const at = times[i] ?? NaN;
    requireAfter(lastAt, at);
    lastAt = at;
    const quality = qualities[i];
    if (quality === 'fail') continue;
    const value = values[i] ?? NaN;
    const limit = limitAt(at);
    const excess = side * (value - limit);
    // Nearly every reading is an ordinary one and needs no more than this.
    if (fold.isIdle && !(excess > 0)) continue;
    fold.take(at, value, limit, excess, quality === 'pass');
  }
  return fold.outcome(lastAt);
}

type Draft<T> = { -readonly [K in keyof T]: T[K] };

/** The fold in progress. Mutable, so that a million readings cost no allocation beyond their episodes. */
class EpisodeFold {
  private countedAt: number;
  private run: Draft<Run> | null;
  private open: Draft<Episode> | null;
  private clearingSince: number | null;
  private hasNewPeak = false;
  private readonly changes: EpisodeChange[] = [];

  constructor(
    private readonly rule: LimitRule,
    state: AlertState,
  ) {
    this.countedAt = state.carriedOnAt ?? -Infinity;
    this.run = state.run && { ...state.run };
    this.open = state.open && { ...state.open };
    this.clearingSince = state.clearingSince;
  }

  /** Whether nothing is under way that an ordinary reading could change. */
  get isIdle(): boolean {
    return this.run === null && this.open === null;
  }

  take(at: number, value: number, limit: number, excess: number, isPass: boolean): void {
    this.forgetBeforeGap(at);
    this.countedAt = at;
    if (this.open === null) this.watch(at, value, limit, excess, isPass);
    else this.follow(this.open, at, value, limit, excess, isPass);
  }

  /** @param lastAt - The last reading of any quality; -Infinity when there has been none. */
  outcome(lastAt: number): AlertStep {
    this.forgetBeforeGap(lastAt);
    if (this.hasNewPeak && this.open !== null) this.tell('peaked', this.open.peakAt, this.open);
    const isUnderWay = this.run !== null || this.clearingSince !== null;
    return {
      state: {
        lastAt: Number.isFinite(lastAt) ? lastAt : null,
        carriedOnAt: isUnderWay ? this.countedAt : null,
        run: this.run,
        open: this.open,
        clearingSince: this.clearingSince,
      },
      changes: this.changes,
    };
  }

  private forgetBeforeGap(at: number): void {
    if (at - this.countedAt <= this.rule.maxGapMs) return;
    this.run = null;
    this.clearingSince = null;
  }

  private watch(at: number, value: number, limit: number, excess: number, isPass: boolean): void {
    if (!(excess > 0)) {
      this.run = null;
      return;
    }
    if (this.run === null) {
      if (!isPass) return;
      this.run = { beganAt: at, peakAt: at, peakValue: value, peakExcess: excess, limit };
    } else if (isPass) {
      raisePeak(this.run, at, value, limit, excess);
    }
    if (at - this.run.beganAt >= this.rule.holdMs) this.begin(this.run, at);
  }

  private begin(run: Run, at: number): void {
    const openedAt = run.beganAt + this.rule.holdMs;
    this.open = { ...run, openedAt, endedAt: null, clearedAt: null, urgency: 'lookToday' };
    this.run = null;
    if (this.isUrgent(this.open, at)) this.open.urgency = 'goNow';
    this.tell('opened', openedAt, this.open);
  }

  private follow(
    open: Draft<Episode>,
    at: number,
    value: number,
    limit: number,
    excess: number,
    isPass: boolean,
  ): void {
    if (excess <= -this.rule.clearMargin) {
      if (isPass) this.clearingSince ??= at;
      if (this.clearingSince !== null && at - this.clearingSince >= this.rule.clearHoldMs) {
        this.close(open, this.clearingSince);
      }
      return;
    }
    this.clearingSince = null;
    if (!(excess > 0)) return;
    if (isPass && raisePeak(open, at, value, limit, excess)) this.hasNewPeak = true;
    if (open.urgency === 'lookToday' && this.isUrgent(open, at)) {
      open.urgency = 'goNow';
      this.tell('urgencyRaised', at, open);
    }
  }

  private close(open: Draft<Episode>, endedAt: number): void {
    open.endedAt = endedAt;
    open.clearedAt = endedAt + this.rule.clearHoldMs;
    this.tell('cleared', open.clearedAt, open);
    this.open = null;
    this.clearingSince = null;
    this.hasNewPeak = false;
  }

  /** Whether the episode is urgent at a reading past the limit. */
  private isUrgent(open: Episode, at: number): boolean {
    const { urgentBy, urgentAfterMs } = this.rule;
    return (
      (urgentBy !== null && open.peakExcess >= urgentBy) ||
      (urgentAfterMs !== null && at - open.beganAt >= urgentAfterMs)
    );
  }

  private tell(type: EpisodeChange['type'], at: number, episode: Episode): void {
    this.changes.push({ type, at, episode: { ...episode } });
  }
}

function raisePeak(peak: Draft<Run>, at: number, value: number, limit: number, excess: number): boolean {
  if (!(excess > peak.peakExcess)) return false;
  peak.peakAt = at;
  peak.peakValue = value;
  peak.peakExcess = excess;
  peak.limit = limit;
  return true;
}
