import { isSilenceRule, type AlertRule } from './alert-rule';
import { idleState, type AlertState } from './alert-state';
import type { Episode } from './episode';

/** From where, and from what state, stored readings have to be folded again. */
export interface Restart {
  /** Fold the readings taken at or after this instant [ms since 1970 UTC]. */
  readonly at: number;
  readonly state: AlertState;
}

/**
 * Tells where to fold again after a reading came late, so that the outcome is that of one pass over everything.
 *
 * @remarks
 * To use it: store the late readings, drop the rule's episodes that began at or after `at`, fold every stored reading
 * from `at` on beginning with `state`, and let the clock tick. Episodes are matched to those dropped by `beganAt`.
 *
 * The place is found from what a reading can have to do with: the episode that was open then, or a run that could
 * still have opened, which is shorter than the hold time and ends with the longest gap. So it never lies further back
 * than that, and the state there is always idle.
 *
 * @param rule - The rule.
 * @param episodes - Its episodes so far in order of `beganAt`, open one included; those that ended long before the
 * late reading may be left out.
 * @param lateAt - When the earliest of the late readings was taken [ms since 1970 UTC].
 * @returns The instant and the state.
 */
export function restartFrom(rule: AlertRule, episodes: readonly Episode[], lateAt: number): Restart {
  const before = episodes.findLast(({ beganAt }) => beganAt < lateAt);
  const reachMs = isSilenceRule(rule) ? rule.silentAfterMs : rule.holdMs + rule.maxGapMs;
  if (before === undefined) return { at: lateAt - reachMs, state: idleState };
  const knownOverAt = before.clearedAt ?? Infinity;
  // The reading that confirmed the clearing came up to one gap later, and an earlier one can still undo it.
  const doubtfulMs = isSilenceRule(rule) ? 0 : rule.maxGapMs;
  const at = lateAt <= knownOverAt + doubtfulMs ? before.beganAt : Math.max(knownOverAt, lateAt - reachMs);
  return { at, state: idleState };
}
