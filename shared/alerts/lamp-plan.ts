import { DomainError } from '../errors/domain-error';

/** A stretch of one planned lamp state, half-open: `[since, until)`. */
export interface LampSpan {
  readonly on: boolean;
  /** Start [ms since 1970 UTC]; -Infinity when it has no known start. */
  readonly since: number;
  /** End [ms since 1970 UTC]; Infinity when none is planned. */
  readonly until: number;
}

/** A planned stretch of light. */
export interface LampInterval {
  /** [ms since 1970 UTC] */
  readonly onAt: number;
  /** [ms since 1970 UTC] */
  readonly offAt: number;
}

/** What a rule needs to know beside the readings: the planned lamp state at an instant. */
export interface AlertContext {
  readonly lampsAt: (at: number) => LampSpan;
}

/**
 * Makes the context of a shelf from its planned lamp intervals.
 *
 * @param intervals - Planned stretches of light in order; stretches that touch count as one. For the limits to be
 * right from the first reading on, begin with the interval before it. None: the lamps are never on.
 * @returns A context that finds the span of an instant by bisection.
 * @throws {@link DomainError} `UNORDERED_SERIES` when an interval ends before it starts, or starts before the one
 * before it ended.
 */
export function lampPlan(intervals: readonly LampInterval[]): AlertContext {
  const changes = changesOf(intervals);
  return {
    lampsAt: (at) => {
      const passed = countUpTo(changes, at);
      return {
        // The lamps start out off and every change toggles them.
        on: passed % 2 === 1,
        since: changes[passed - 1] ?? -Infinity,
        until: changes[passed] ?? Infinity,
      };
    },
  };
}

function changesOf(intervals: readonly LampInterval[]): number[] {
  const changes: number[] = [];
  for (const { onAt, offAt } of intervals) {
    const before = changes.at(-1) ?? -Infinity;
    if (onAt < before || offAt <= onAt) {
      throw new DomainError('UNORDERED_SERIES', 'Lamp intervals must be in order and not overlap', {
        onAt,
        offAt,
      });
    }
    if (onAt === before) changes.pop();
    else changes.push(onAt);
    changes.push(offAt);
  }
  return changes;
}

function countUpTo(ascending: readonly number[], at: number): number {
  let low = 0;
  let high = ascending.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if ((ascending[middle] ?? Infinity) <= at) low = middle + 1;
    else high = middle;
  }
  return low;
}
