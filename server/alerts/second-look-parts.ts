import type { Clock } from '../clock';
import type { Transactions } from '../database/transactions';
import type { ReadingStore } from '../readings/reading-store';
import type { AlertService } from './alert-service';
import { AlertStore } from './alert-store';
import { EpisodeKeeper, type AlertTeller } from './episode-keeper';
import { LightLookService, type LightSources } from './light-look-service';
import { SecondLookJob } from './second-look-job';
import { SecondLookService, type ShelfSources } from './second-look-service';
import { SecondLookStore } from './second-look-store';
import { SilenceService } from './silence-service';
import { SilenceStore } from './silence-store';

/** What the second look needs of others. */
export interface SecondLookSources extends ShelfSources, LightSources {
  readonly transactions: Transactions;
  readonly readings: ReadingStore;
  readonly teller: AlertTeller;
  /** Tells dashboards. */
  readonly alerts: Pick<AlertService, 'publishChanged'>;
  readonly now: Clock;
}

/**
 * Puts the second look together.
 *
 * @param sources - See {@link SecondLookSources}.
 * @returns The job.
 */
export function secondLookJob(sources: SecondLookSources): SecondLookJob {
  const { transactions, readings, alerts, now } = sources;
  const [store, looks, silences] = [new AlertStore(), new SecondLookStore(), new SilenceStore()];
  return new SecondLookJob({
    transactions,
    readings,
    looks,
    silences,
    shelves: new SecondLookService(store, looks, sources),
    light: new LightLookService(store, looks, sources),
    devices: new SilenceService(store, silences),
    keeper: new EpisodeKeeper(store, sources.teller),
    alerts,
    now,
  });
}
