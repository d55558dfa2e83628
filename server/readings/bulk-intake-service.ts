import { isMeasured } from '@shared/climate/quantity';
import { maxGapMs } from '@shared/series/expected-interval';
import { qualityHistoryMs, qualityLimits } from '@shared/series/quality-tests';
import { AlertReplay, type ReplayedSeries, type ReplaySources } from '../alerts/alert-replay';
import type { AlertStore } from '../alerts/alert-store';
import type { Transactions, Tx } from '../database/transactions';
import { BulkComputed, type HygrometerStay } from './bulk-computed';
import { BulkIntake, type BulkIntakeParts } from './bulk-intake';
import type { BulkStore, StayRow } from './bulk-store';
import { BulkTrack } from './bulk-track';
import { BulkWriter, type BulkWriterParts } from './bulk-writer';
import { withinMs, type ComputedQuantities } from './computed-quantities';
import type { TouchedSpan } from './late-readings';
import type { FlaggedSample, ReadingStore, SensorOnRoad } from './reading-store';
import { temperaturesBeside } from './settling';

/** How a file is to be taken in. */
export interface BulkOrder {
  readonly fileId: string;
  /** Its sensors, in the order in which batches name them. */
  readonly sensorIds: readonly string[];
  readonly replacesDiffering: boolean;
  /** The present [ms]. */
  readonly now: number;
}

/** Where readings were removed or put back. */
export interface BulkRemoval {
  readonly spans: ReadonlyMap<string, TouchedSpan>;
  /** The present [ms]. */
  readonly now: number;
}

/** A file on its way in. */
export interface OpenBulkIntake {
  readonly intake: BulkIntake;
  /** Null when the file is only looked through. */
  readonly writer: BulkWriter | null;
  readonly tracks: readonly BulkTrack[];
}

/** How much is gathered before it is worked on; what comes of it is the same. */
export type BulkPace = Pick<BulkIntakeParts, 'columnRows'> & Pick<BulkWriterParts, 'stretchRows'>;

const usualPace: BulkPace = { columnRows: 500, stretchRows: 250_000 };

/** A room's day, twice. */
const TWO_DAYS_MS = 2 * 86_400_000;

/** Puts the bulk road of readings together: the same checks, sums and alerts as for live readings, a million at a time. */
export class BulkIntakeService {
  private readonly sources: ReplaySources;

  constructor(
    private readonly transactions: Transactions,
    private readonly store: BulkStore,
    private readonly readings: ReadingStore,
    private readonly computed: ComputedQuantities,
    private readonly alerts: AlertStore,
    plans: Pick<ReplaySources, 'wantedRangesOf' | 'plannedLamps'>,
    private readonly pace: BulkPace = usualPace,
  ) {
    this.sources = {
      wantedRangesOf: (...of) => plans.wantedRangesOf(...of),
      plannedLamps: (...of) => plans.plannedLamps(...of),
      storedBetween: (...of) => this.storedBetween(...of),
    };
  }

  /**
   * Locks a file's sensors, with those that hang together with them, against other changes of their readings.
   *
   * @param tx - Keeps the locks.
   * @param sensorIds - The file's sensors.
   * @returns The file's sensors in their order, then the others.
   */
  async lock(tx: Tx, sensorIds: readonly string[]): Promise<SensorOnRoad[]> {
    const locked = await this.readings.lockSensors(tx, await this.store.companions(tx, sensorIds));
    const own = sensorIds.flatMap((id) => locked.find((sensor) => sensor.id === id) ?? []);
    return [...own, ...locked.filter(({ id }) => !sensorIds.includes(id))];
  }

  /**
   * Begins to look through a file without storing anything.
   *
   * @param reader - Any connection.
   * @param sensors - The file's sensors, in the order in which batches name them.
   * @returns What to hand the readings to.
   */
  look(reader: Tx, sensors: readonly SensorOnRoad[]): OpenBulkIntake {
    const tracks = sensors.map((sensor, place) => new BulkTrack(sensor, place));
    const intake = new BulkIntake({
      reader,
      tracks,
      computed: [],
      replays: [],
      deficitReplays: [],
      writer: null,
      replacesDiffering: false,
      heldFrom: (firstAt) => firstAt - reachMs(sensors),
      columnRows: this.pace.columnRows,
    });
    return { intake, writer: null, tracks };
  }

  /**
   * Begins to store a file's readings.
   *
   * @param tx - The transaction, holding the locks of {@link BulkIntakeService.lock}.
   * @param reader - Another connection; sees what is held while `tx` is busy copying.
   * @param sensors - As `lock` returned them.
   * @param order - See {@link BulkOrder}.
   * @returns What to hand the readings to.
   */
  open(tx: Tx, reader: Tx, sensors: readonly SensorOnRoad[], order: BulkOrder): Promise<OpenBulkIntake> {
    return this.join(tx, reader, sensors, sensors, order);
  }

  /**
   * Computes anew what follows from readings that were removed or put back.
   *
   * @param tx - The transaction that did it, holding the locks of {@link BulkIntakeService.lock}.
   * @param before - As `lock` returned them before the change.
   * @param removal - Where readings changed, by sensor, and the present [ms].
   * @returns Ids of the alerts that changed.
   */
  async recompute(tx: Tx, before: readonly SensorOnRoad[], removal: BulkRemoval): Promise<string[]> {
    const sensors = await this.store.standing(tx, before);
    const { intake, writer, tracks } = await this.join(tx, tx, sensors, before, {
      fileId: null,
      sensorIds: [...removal.spans.keys()],
      replacesDiffering: false,
      now: removal.now,
    });
    for (const { sensor, spans } of tracks) {
      const span = removal.spans.get(sensor.id);
      if (span !== undefined) spans.addSpan(span);
    }
    const removedFrom = Math.min(...[...removal.spans.values()].map(({ from }) => from));
    await intake.recompute(removedFrom);
    await intake.finish();
    await this.store.saveStanding(tx, sensors, removedFrom);
    const empty = sensors.filter(({ latestAt }) => latestAt === null);
    await this.alerts.forget(
      tx,
      empty.map(({ id }) => id),
    );
    return writer?.alertIds ?? [];
  }

  private async join(
    tx: Tx,
    reader: Tx,
    sensors: readonly SensorOnRoad[],
    before: readonly SensorOnRoad[],
    order: Omit<BulkOrder, 'fileId'> & { readonly fileId: string | null },
  ): Promise<OpenBulkIntake> {
    const tracks = sensors.map((sensor, place) => new BulkTrack(sensor, place));
    const computed = await this.computedOf(tx, tracks);
    const { replays, deficitReplays } = await this.replaysOf(tx, tracks, before, computed, order);
    const shared = { tracks, computed, replays, deficitReplays };
    const writer = new BulkWriter({
      tx,
      reader,
      plain: this.transactions.plain,
      store: this.store,
      readings: this.readings,
      fileId: order.fileId,
      now: order.now,
      stretchRows: this.pace.stretchRows,
      ...shared,
    });
    const intake = new BulkIntake({
      reader,
      writer,
      replacesDiffering: order.replacesDiffering,
      heldFrom: (firstAt) => firstAt - reachMs(sensors),
      columnRows: this.pace.columnRows,
      ...shared,
    });
    return { intake, writer, tracks };
  }

  private async computedOf(tx: Tx, tracks: readonly BulkTrack[]): Promise<BulkComputed[]> {
    const hygrometers = tracks.filter(({ sensor }) => sensor.quantity === 'relativeHumidity');
    const stays = await this.store.stays(
      tx,
      hygrometers.map(({ sensor }) => sensor.id),
    );
    const sensors = tracks.map(({ sensor }) => sensor);
    return hygrometers.map((track) => {
      const own = stays.filter(({ hygrometerId }) => hygrometerId === track.sensor.id);
      const beside = temperaturesBeside(track.sensor, sensors).map(({ id }) => id);
      return new BulkComputed(
        track,
        staysOf(own, tracks),
        tracks.filter(({ sensor }) => beside.includes(sensor.id)),
      );
    });
  }

  private async replaysOf(
    tx: Tx,
    tracks: readonly BulkTrack[],
    before: readonly SensorOnRoad[],
    computed: readonly BulkComputed[],
    order: Pick<BulkOrder, 'sensorIds' | 'now'>,
  ): Promise<{ replays: (AlertReplay | null)[]; deficitReplays: (AlertReplay | null)[] }> {
    const seen = (sensor: SensorOnRoad): SensorOnRoad => before.find(({ id }) => id === sensor.id) ?? sensor;
    const own = tracks.map(({ sensor }): ReplayedSeries | null => {
      const isWatched = sensor.shelfId !== null && order.sensorIds.includes(sensor.id);
      return isWatched ? { sensor, quantity: sensor.quantity, seenTo: seen(sensor).latestAt } : null;
    });
    const deficits = computed.map(({ track: { sensor } }): ReplayedSeries | null =>
      sensor.shelfId === null
        ? null
        : { sensor, quantity: 'vapourPressureDeficit', seenTo: seen(sensor).computedTo },
    );
    const watched = [...own, ...deficits].filter((one) => one !== null);
    const begun = await AlertReplay.begin(tx, this.alerts, this.sources, watched, order.now);
    const replayOf = (one: ReplayedSeries | null): AlertReplay | null =>
      one === null ? null : (begun[watched.indexOf(one)] ?? null);
    return { replays: own.map(replayOf), deficitReplays: deficits.map(replayOf) };
  }

  private async storedBetween(
    tx: Tx,
    { sensor, quantity }: ReplayedSeries,
    from: number,
    to: number,
  ): Promise<FlaggedSample[]> {
    if (isMeasured(quantity)) return this.readings.between(tx, sensor.id, from, to, true);
    const end = Math.min(to, (sensor.computedTo ?? 0) + 1);
    const points = await this.computed.points(tx, sensor, quantity, from, end);
    return points.map((point) => ({ ...point, flags: 0 }));
  }
}

/** How far from a change what is held can matter: a whole day's sums, and what the quality tests look back on [ms]. */
function reachMs(sensors: readonly SensorOnRoad[]): number {
  const reaches = sensors.map(
    (sensor) =>
      2 * maxGapMs(sensor.expectedIntervalS) +
      2 * withinMs(sensor) +
      qualityHistoryMs(qualityLimits[sensor.quantity]),
  );
  return TWO_DAYS_MS + Math.max(0, ...reaches);
}

function staysOf(rows: readonly StayRow[], tracks: readonly BulkTrack[]): HygrometerStay[] {
  const froms = [...new Set(rows.map(({ from }) => from))];
  return froms.flatMap((from) => {
    const there = rows.filter((row) => row.from === from);
    const first = there[0];
    if (first === undefined) return [];
    const thermometers = there.flatMap(({ thermometerId, thermometerFrom, thermometerTo }) => {
      const track = tracks.find(({ sensor }) => sensor.id === thermometerId);
      return track === undefined ? [] : [{ track, from: thermometerFrom, to: thermometerTo }];
    });
    return [{ from, to: first.to, leafOffsetC: first.leafOffsetC, thermometers }];
  });
}
