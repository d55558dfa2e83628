import { DomainError } from '../errors/domain-error';

/** One value at one instant. */
export interface Sample {
  /** Instant [ms since 1970-01-01T00:00Z]. */
  readonly at: number;
  /** Value in the stored unit of its quantity. */
  readonly value: number;
}

/** Samples of one quantity, strictly increasing in time. A missing value is a missing sample. */
export type Series = readonly Sample[];

/** A span of time [ms since epoch], half-open: `from` belongs to it, `to` does not. */
export interface TimeWindow {
  readonly from: number;
  readonly to: number;
}

/**
 * Refuses a window that does not run forward.
 *
 * @param window - The window to check.
 * @throws {@link DomainError} `INVALID_ARGUMENT` unless `from` precedes `to`.
 */
export function requireWindow({ from, to }: TimeWindow): void {
  const runsForward = from < to;
  if (!runsForward) {
    throw new DomainError('INVALID_ARGUMENT', 'from must precede to', { from, to });
  }
}

/**
 * Refuses samples that are not strictly increasing in time.
 *
 * @param series - The samples to check.
 * @throws {@link DomainError} `UNORDERED_SERIES` with the first instant that does not come after the one before it.
 */
export function requireIncreasing(series: Series): void {
  let previousAt = -Infinity;
  for (const { at } of series) {
    requireAfter(previousAt, at);
    previousAt = at;
  }
}

/**
 * Refuses an instant that does not come after another.
 *
 * @param previousAt - The earlier instant [ms since epoch].
 * @param at - The instant that must be later.
 * @throws {@link DomainError} `UNORDERED_SERIES` when it is not, or is NaN.
 */
export function requireAfter(previousAt: number, at: number): void {
  const isAfter = at > previousAt;
  if (!isAfter) {
    throw new DomainError('UNORDERED_SERIES', 'samples must be strictly increasing in time', {
      previousAt,
      at,
    });
  }
}
