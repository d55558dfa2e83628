import type { AlertState } from '@shared/alerts/alert-state';
import type { Episode, EpisodeChange } from '@shared/alerts/episode';
import type { Tx } from '../database/transactions';
import type { SensorOnRoad } from '../readings/reading-store';
import type { AlertStore, EpisodeOfWatch, Watch } from './alert-store';

/** Where news come from, and what the clock says. */
export interface NewsOrigin {
  readonly isLive: boolean;
  /** The present [ms]. */
  readonly now: number;
}

/** Writes to people in the same transaction. */
export interface AlertTeller {
  tellOpened(tx: Tx, alertIds: readonly string[], now: number): Promise<void>;
  tellCleared(tx: Tx, alertIds: readonly string[], now: number): Promise<void>;
}

/** What a fold came to. */
export interface Outcome {
  readonly episodes: readonly Episode[];
  /** Episodes that had been opened and turned out not to be, by their beginning. */
  readonly withdrawn: readonly number[];
}

/** A watch that has been folded on. */
export interface FoldedWatch extends Outcome {
  readonly watch: Watch;
  readonly sensor: SensorOnRoad;
  /** Where it stands now; the watch's own state where that need not be written. */
  readonly state: AlertState;
  /** The newest reading that it rests on, or now where it rests on the clock [ms]. */
  readonly newestAt: number;
}

/** A reading older than this says nothing about now, so what it opens is history. */
const FRESH_MS = 15 * 60_000;

/** Keeps where watches stand and what episodes they found, and tells people of them. */
export class EpisodeKeeper {
  constructor(
    private readonly store: AlertStore,
    private readonly teller: AlertTeller,
  ) {}

  /**
   * Keeps what was found.
   *
   * @param tx - The transaction that folded, holding the sensors' locks.
   * @param folded - The watches.
   * @param origin - Live news may be told to people while they are fresh; others never are.
   * @returns Ids of the alerts that changed.
   */
  async keep(tx: Tx, folded: readonly FoldedWatch[], origin: NewsOrigin): Promise<string[]> {
    const episodes = folded.flatMap((one) =>
      one.episodes.map((episode): EpisodeOfWatch => {
        const isHistory =
          episode.clearedAt === null ? !isFresh(one, origin.now) : !wasOpen(one.watch, episode);
        const { watch, sensor } = one;
        return { watch, sensor, episode, foundLater: !origin.isLive || isHistory };
      }),
    );
    for (const { watch, withdrawn } of folded) await this.store.removeBegunAt(tx, watch.id, withdrawn);
    const changed = await this.store.saveEpisodes(tx, episodes);
    await this.store.saveStates(
      tx,
      folded
        .filter(({ watch, state }) => state !== watch.state)
        .map(({ watch, state }) => ({ watchId: watch.id, state })),
    );
    if (origin.isLive) await this.tell(tx, folded, changed, origin.now);
    return changed;
  }

  private async tell(
    tx: Tx,
    folded: readonly FoldedWatch[],
    changed: readonly string[],
    now: number,
  ): Promise<void> {
    const fresh = folded.filter((one) => one.state.open !== null && isFresh(one, now));
    const untold = await this.store.untold(
      tx,
      fresh.map(({ watch }) => watch.id),
    );
    if (untold.length > 0) {
      await this.teller.tellOpened(tx, untold, now);
      await this.store.markTold(tx, untold, now);
    }
    const hasCleared = folded.some(({ episodes }) => episodes.some(({ clearedAt }) => clearedAt !== null));
    if (hasCleared) await this.teller.tellCleared(tx, changed, now);
  }
}

/**
 * The last word on each episode that a run of changes spoke of.
 *
 * @param changes - In order.
 * @returns The episodes as they are now.
 */
export function outcomeOf(changes: readonly EpisodeChange[]): Outcome {
  const last = new Map(changes.map((change) => [change.episode.beganAt, change]));
  const isWithdrawn = ({ type }: EpisodeChange): boolean => type === 'withdrawn';
  return {
    episodes: [...last.values()].filter((change) => !isWithdrawn(change)).map(({ episode }) => episode),
    withdrawn: [...last.values()].filter(isWithdrawn).map(({ episode }) => episode.beganAt),
  };
}

function isFresh({ newestAt }: FoldedWatch, now: number): boolean {
  return now - newestAt <= FRESH_MS;
}

function wasOpen(watch: Watch, episode: Episode): boolean {
  return watch.state.open?.beganAt === episode.beganAt;
}
