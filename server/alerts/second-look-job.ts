import { silentAfterMs } from '@shared/series/expected-interval';
import type { Clock } from '../clock';
import type { Transactions } from '../database/transactions';
import type { ReadingStore } from '../readings/reading-store';
import type { AlertService } from './alert-service';
import type { EpisodeKeeper } from './episode-keeper';
import type { LightLookService } from './light-look-service';
import { looksApart } from './looks-apart';
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

/** Sensors of one transaction at most; devices wait for it no longer than that takes. */
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
      let judged = 0;
      for (const together of looksApart(unjudged)) judged += await this.look(together, []);
      if (judged === 0 || unjudged.length < MOST_AT_ONCE) return;
    }
  }

  /**
   * Looks at the shelves and devices of some sensors, save those of which somebody holds a sensor: waiting for it with the
   * others locked would keep live readings out. Those stay for the next run.
   *
   * @returns How many of the unjudged sensors have been looked at.
   */
  private async look(unjudged: readonly UnjudgedSensor[], quietDevices: readonly string[]): Promise<number> {
    const { transactions, readings, looks, shelves, light, devices, keeper } = this.parts;
    const now = this.parts.now().getTime();
    const { changed, judged } = await transactions.run(async (tx) => {
      const all = {
        shelfIds: distinct(unjudged.map(({ shelfId }) => shelfId)),
        deviceIds: devicesOf(unjudged, quietDevices),
      };
      const wanted = [
        ...(await looks.sensorsOf(tx, all.shelfIds, all.deviceIds)),
        ...unjudged.map(({ id }) => id),
      ];
      const held = await looks.lockFree(tx, distinct(wanted));
      const free = unjudged.filter(
        ({ shelfId, deviceId }) => !held.shelfIds.has(shelfId) && !held.deviceIds.has(deviceId),
      );
      const freeIds = free.map(({ id }) => id);
      const shelfIds = distinct(free.map(({ shelfId }) => shelfId));
      const deviceIds = devicesOf(free, quietDevices).filter((id) => !held.deviceIds.has(id));
      const beside = (await looks.sensorsOf(tx, shelfIds, deviceIds)).filter((id) => wanted.includes(id));
      const sensors = await readings.lockSensors(tx, distinct([...beside, ...freeIds]));
      const onShelves = sensors.filter(({ shelfId }) => shelfId !== null && shelfIds.includes(shelfId));
      const folded = [
        ...(await shelves.lookAt(tx, onShelves)),
        ...(await light.lookAt(tx, onShelves)),
        ...(await devices.lookAt(tx, sensors, deviceIds, now)),
      ];
      await looks.noteJudged(tx, freeIds);
      return { changed: await keeper.keep(tx, folded, { isLive: true, now }), judged: free.length };
    });
    await this.parts.alerts.publishChanged(changed);
    return judged;
  }
}

function distinct(ids: readonly (string | null)[]): string[] {
  return [...new Set(ids.filter((id) => id !== null))];
}

function devicesOf(sensors: readonly UnjudgedSensor[], others: readonly string[]): string[] {
  return distinct([...sensors.map(({ deviceId }) => deviceId), ...others]);
}
