import { silentAfterMs } from '@shared/series/expected-interval';
import type { Clock } from '../clock';
import type { Transactions } from '../database/transactions';
import type { ReadingStore } from '../readings/reading-store';
import type { AlertService } from './alert-service';
import type { EpisodeKeeper } from './episode-keeper';
import type { LightLookService } from './light-look-service';
import type { SecondLookService } from './second-look-service';
import type { SecondLookStore, UnjudgedSensor } from './second-look-store';
import type { SilenceService } from './silence-service';
import type { SilenceStore } from './silence-store';

/** What the job works with. */
export interface SecondLookParts {
  readonly transactions: Transactions;
  readonly readings: ReadingStore;
  readonly looks: SecondLookStore;
  readonly silences: SilenceStore;
  readonly shelves: SecondLookService;
  readonly light: LightLookService;
  readonly devices: SilenceService;
  readonly keeper: EpisodeKeeper;
  /** Tells dashboards, after the commit. */
  readonly alerts: Pick<AlertService, 'publishChanged'>;
  readonly now: Clock;
}

/** Sensors of one transaction; devices wait for it no longer than that takes. */
const MOST_AT_ONCE = 250;

/**
 * The second look at readings: what needs more than the reading itself. It follows within moments of the first look, which
 * the transaction that stores readings takes, and finds what that transaction left for it; so nothing is missed when the
 * server stops between the two.
 */
export class SecondLookJob {
  constructor(private readonly parts: SecondLookParts) {}

  /** Looks at everything new, and at devices that have gone quiet. */
  async run(): Promise<void> {
    const { transactions, looks, silences, now } = this.parts;
    const quietSince = new Date(now().getTime() - silentAfterMs(1));
    const quiet = await silences.quietDevices(transactions.plain, quietSince);
    // Each room's silences open together, so that a power cut is one mail.
    if (quiet.length > 0) await this.look([], quiet);
    for (;;) {
      const unjudged = await looks.unjudged(transactions.plain, MOST_AT_ONCE);
      if (unjudged.length > 0) await this.look(unjudged, []);
      if (unjudged.length < MOST_AT_ONCE) return;
    }
  }

  private async look(unjudged: readonly UnjudgedSensor[], quietDevices: readonly string[]): Promise<void> {
    const { transactions, readings, looks, shelves, light, devices, keeper } = this.parts;
    const now = this.parts.now().getTime();
    const shelfIds = distinct(unjudged.map(({ shelfId }) => shelfId));
    const deviceIds = distinct([...unjudged.map(({ deviceId }) => deviceId), ...quietDevices]);
    const changed = await transactions.run(async (tx) => {
      const ids = await looks.sensorsOf(tx, shelfIds, deviceIds);
      const sensors = await readings.lockSensors(tx, [...new Set([...ids, ...unjudged.map(({ id }) => id)])]);
      const onShelves = sensors.filter(({ shelfId }) => shelfId !== null && shelfIds.includes(shelfId));
      const folded = [
        ...(await shelves.lookAt(tx, onShelves)),
        ...(await light.lookAt(tx, onShelves)),
        ...(await devices.lookAt(tx, sensors, deviceIds, now)),
      ];
      await looks.noteJudged(
        tx,
        unjudged.map(({ id }) => id),
      );
      return keeper.keep(tx, folded, { isLive: true, now });
    });
    await this.parts.alerts.publishChanged(changed);
  }
}

function distinct(ids: readonly (string | null)[]): string[] {
  return [...new Set(ids.filter((id) => id !== null))];
}
