import { requireAfter } from '../series/series';
import type { SilenceRule } from './alert-rule';
import type { AlertState, AlertStep } from './alert-state';
import type { Episode, EpisodeChange } from './episode';

/**
 * Folds the instants of readings into the episodes of a silence rule.
 *
 * @remarks
 * A gap longer than `silentAfterMs` is an episode from the reading before it to the reading after it, whether or not
 * a clock had noticed. Readings of any quality end a silence.
 *
 * @param rule - A silence rule.
 * @param state - The state after all readings and ticks before these.
 * @param times - When the readings were taken [ms since 1970 UTC], strictly ascending.
 * @returns The state after them and what happened, in order.
 * @throws {@link DomainError} `UNORDERED_SERIES` when a reading is not later than the one before it.
 */
export function foldInstants(rule: SilenceRule, state: AlertState, times: ArrayLike<number>): AlertStep {
  const changes: EpisodeChange[] = [];
  let lastAt = state.lastAt;
  let open = state.open;
  for (let i = 0; i < times.length; i += 1) {
    const at = times[i] ?? NaN;
    if (lastAt !== null) {
      requireAfter(lastAt, at);
      if (at - lastAt > rule.silentAfterMs) {
        const ended = endedSilence(rule, lastAt, at);
        if (open === null) changes.push(opened(silence(rule, lastAt, at)));
        changes.push({ type: 'cleared', at, episode: ended });
      } else if (open !== null) {
        changes.push({ type: 'withdrawn', at, episode: open });
      }
    }
    open = null;
    lastAt = at;
  }
  return { state: { ...state, lastAt, open }, changes };
}

/**
 * Lets the clock notice a silence, or that one has become urgent.
 *
 * @param rule - A silence rule.
 * @param state - The state after all readings so far.
 * @param now - The present [ms since 1970 UTC].
 * @returns The state to keep and what happened. Before the first reading nothing is silent.
 */
export function tickSilence(rule: SilenceRule, state: AlertState, now: number): AlertStep {
  if (state.lastAt === null || now - state.lastAt <= rule.silentAfterMs) return { state, changes: [] };
  const open = silence(rule, state.lastAt, now);
  if (state.open === null) return { state: { ...state, open }, changes: [opened(open)] };
  if (state.open.urgency === open.urgency) return { state, changes: [] };
  const at = state.lastAt + (rule.urgentAfterMs ?? 0);
  return { state: { ...state, open }, changes: [{ type: 'urgencyRaised', at, episode: open }] };
}

function opened(episode: Episode): EpisodeChange {
  return { type: 'opened', at: episode.openedAt, episode };
}

/** A silence that has lasted until `until` and goes on. */
function silence(rule: SilenceRule, lastAt: number, until: number): Episode {
  const { silentAfterMs, urgentAfterMs } = rule;
  const openedAt = lastAt + silentAfterMs;
  const isUrgent = urgentAfterMs !== null && until - lastAt > urgentAfterMs;
  return {
    beganAt: lastAt,
    openedAt,
    peakAt: openedAt,
    peakValue: silentAfterMs,
    peakExcess: 0,
    limit: silentAfterMs,
    endedAt: null,
    clearedAt: null,
    urgency: isUrgent ? 'goNow' : 'lookToday',
  };
}

function endedSilence(rule: SilenceRule, lastAt: number, at: number): Episode {
  const lastedMs = at - lastAt;
  return {
    ...silence(rule, lastAt, at),
    peakAt: at,
    peakValue: lastedMs,
    peakExcess: lastedMs - rule.silentAfterMs,
    endedAt: at,
    clearedAt: at,
  };
}
