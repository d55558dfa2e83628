import type { TimeWindow } from '../series/series';
import { advanceSeries, tick } from './alert-machine';
import type { AlertRule } from './alert-rule';
import { idleState, type ObservationColumns } from './alert-state';
import type { Episode } from './episode';
import type { AlertContext } from './lamp-plan';

/** What a rule would have done. */
export interface PastOpenings {
  /** Episodes that would have opened within the window. */
  readonly count: number;
  /** Time in which the value was past the limit, within the window [ms]; an open episode counts to its end. */
  readonly totalMs: number;
  /** Those episodes in order, as charts mark them. */
  readonly episodes: readonly Episode[];
}

/**
 * Tries a rule on past readings, as if it had been set then.
 *
 * @param rule - The rule to try.
 * @param context - The planned lamps of that time.
 * @param readings - The series it would have watched, in order; some hold time more than the window, so that what
 * was under way at its start is known.
 * @param window - The time that is asked about.
 * @returns How often and how long in all it would have opened.
 */
export function wouldHaveOpened(
  rule: AlertRule,
  context: AlertContext,
  { times, values, qualities }: ObservationColumns,
  window: TimeWindow,
): PastOpenings {
  const past = advanceSeries(rule, context, idleState, times, values, qualities);
  const present = tick(rule, past.state, window.to);
  const byBeginning = new Map<number, Episode>();
  for (const { episode } of [...past.changes, ...present.changes]) byBeginning.set(episode.beganAt, episode);
  const episodes = [...byBeginning.values()].filter(
    ({ openedAt }) => openedAt >= window.from && openedAt < window.to,
  );
  return {
    count: episodes.length,
    totalMs: episodes.reduce((sum, episode) => sum + lengthWithin(episode, window), 0),
    episodes,
  };
}

function lengthWithin({ beganAt, endedAt }: Episode, { from, to }: TimeWindow): number {
  return Math.min(endedAt ?? to, to) - Math.max(beganAt, from);
}

/**
 * Says in a sentence what a rule would have done.
 *
 * @param openings - From {@link wouldHaveOpened}.
 * @param days - Length of the window in days.
 * @param formatDuration - Writes a length of time [ms], such as "31 h".
 * @returns "This rule would have opened 9 times in the last 14 days, 31 h in all."
 */
export function describeOpenings(
  { count, totalMs }: Pick<PastOpenings, 'count' | 'totalMs'>,
  days: number,
  formatDuration: (ms: number) => string,
): string {
  const span = days === 1 ? 'the last day' : `the last ${days} days`;
  if (count === 0) return `This rule would not have opened in ${span}.`;
  const often = count === 1 ? 'once' : count === 2 ? 'twice' : `${count} times`;
  return `This rule would have opened ${often} in ${span}, ${formatDuration(totalMs)} in all.`;
}
