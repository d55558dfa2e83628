import type { Episode, EpisodeChange } from './episode';

/** Outcome of the quality tests of a reading (QARTOD's pass, suspect and fail). */
export type Quality = 'pass' | 'suspect' | 'fail';

/** One reading of the watched series. */
export interface Observation {
  /** When it was taken [ms since 1970 UTC]. */
  readonly at: number;
  /** In the stored unit of the series. */
  readonly value: number;
  readonly quality: Quality;
}

/** Readings as columns of equal length, in strictly ascending order of time. */
export interface ObservationColumns {
  readonly times: ArrayLike<number>;
  readonly values: ArrayLike<number>;
  readonly qualities: ArrayLike<Quality>;
}

/** A stretch past the limit that has not lasted long enough to open an alert. */
export type Run = Pick<Episode, 'beganAt' | 'peakAt' | 'peakValue' | 'peakExcess' | 'limit'>;

/** All that a rule remembers between readings; plain JSON, kept in the database beside them. */
export interface AlertState {
  /** The last reading of any quality [ms since 1970 UTC]; null before the first. */
  readonly lastAt: number | null;
  /** The last reading that carried on the run or the clearing [ms since 1970 UTC]; null when there is neither. */
  readonly carriedOnAt: number | null;
  readonly run: Run | null;
  readonly open: Episode | null;
  /** The first of the readings that say the open episode is over [ms since 1970 UTC]. */
  readonly clearingSince: number | null;
}

/** The state before the first reading. */
export const idleState: AlertState = Object.freeze({
  lastAt: null,
  carriedOnAt: null,
  run: null,
  open: null,
  clearingSince: null,
});

/** The outcome of a step: the state to keep and what happened, in order. */
export interface AlertStep {
  readonly state: AlertState;
  readonly changes: readonly EpisodeChange[];
}
