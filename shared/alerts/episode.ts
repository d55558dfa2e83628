import type { Urgency } from './alert-rule';

/**
 * One stretch in which a rule was broken, told from the readings alone: when they were taken, never when they
 * arrived. Plain JSON; together with the rule and what it watches, `beganAt` identifies the episode.
 *
 * @remarks
 * `peakValue`, `peakExcess` and `limit` are in the unit of the watched series (stored units: °C, %, kPa, ...);
 * for silence they are milliseconds. Instants are milliseconds since 1970-01-01 UTC.
 */
export interface Episode {
  /** The first reading past the limit; for silence, the last reading before it. */
  readonly beganAt: number;
  /** `beganAt` plus the hold time. */
  readonly openedAt: number;
  /** The reading farthest past the limit that applied when it was taken. */
  readonly peakAt: number;
  readonly peakValue: number;
  /** How far past the limit the peak was, never negative. */
  readonly peakExcess: number;
  /** The limit that applied at the peak. */
  readonly limit: number;
  /** The first of the readings that showed it to be over; null while open. */
  readonly endedAt: number | null;
  /** `endedAt` plus the clearing hold; null while open. */
  readonly clearedAt: number | null;
  readonly urgency: Urgency;
}

/**
 * What happened to an episode, with the episode as it was just after.
 *
 * @remarks
 * `peaked` is said at most once an episode and call, for the last and highest of the new peaks, and not at all
 * when the same call clears it. `withdrawn` happens to silence only: the clock had opened it before readings that
 * were under way arrived and showed that there had been none.
 */
export interface EpisodeChange {
  readonly type: 'opened' | 'peaked' | 'urgencyRaised' | 'cleared' | 'withdrawn';
  /** The instant the change belongs to (openedAt, peakAt, clearedAt, ...) [ms]. */
  readonly at: number;
  readonly episode: Episode;
}
