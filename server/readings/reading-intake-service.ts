import { isMeasured, type Quantity } from '@shared/climate/quantity';
import { qualityHistoryMs, qualityLimits } from '@shared/series/quality-tests';
import type { Sample } from '@shared/series/series';
import type { AlertEvaluationService, SeriesNews } from '../alerts/alert-evaluation-service';
import type { NewsOrigin } from '../alerts/episode-keeper';
import type { Transactions, Tx } from '../database/transactions';
import type { ComputedQuantities, Settling } from './computed-quantities';
import type { LateReadings, TouchedSpan } from './late-readings';
import type { FlaggedSample, ReadingStore, SensorOnRoad } from './reading-store';
import { SensorStream, positionFromStored, type StreamPosition } from './sensor-stream';
import { settledUpTo, temperaturesBeside, touchedAround } from './settling';
import type { StreamMemory } from './stream-memory';
import type { SummaryStore } from './summary-store';

/** What became of one sensor's readings. */
export interface SensorReceipt {
  readonly stored: number;
  readonly alreadyHeld: number;
  /** Instants for which another value is held [ms]. */
  readonly different: readonly number[];
}

/** What a transaction of readings came to. */
export interface IntakeOutcome {
  readonly receipts: ReadonlyMap<string, SensorReceipt>;
  readonly roomIds: ReadonlySet<string>;
  readonly shelfIds: ReadonlySet<string>;
  readonly alertIds: readonly string[];
}

/** What was done with one sensor's readings. */
export interface SensorWork {
  readonly sensor: SensorOnRoad;
  readonly fresh: FlaggedSample[];
  readonly stream: SensorStream | null;
  readonly late: TouchedSpan | null;
  readonly receipt: SensorReceipt;
}

/**
 * The road of a reading: check, store, sum, evaluate, in one transaction. Readings later than all before extend the
 * sums; others are stored and what they touch is computed anew. Either way the outcome is that of one pass in order.
 */
export class ReadingIntakeService {
  private readonly knownMonths = new Set<string>();

  constructor(
    private readonly transactions: Transactions,
    private readonly readings: ReadingStore,
    private readonly summaries: SummaryStore,
    private readonly lateReadings: LateReadings,
    private readonly computed: ComputedQuantities,
    private readonly alerts: Pick<AlertEvaluationService, 'observe'>,
    private readonly memory: StreamMemory,
  ) {}

  /**
   * Stores readings.
   *
   * @param bySensor - Readings of each sensor, strictly increasing in time.
   * @param origin - Live or not, and the present.
   * @param alongside - More work for the same transaction, such as noting when the device was last seen.
   * @returns What became of them, after the commit.
   */
  async store(
    bySensor: ReadonlyMap<string, readonly Sample[]>,
    origin: NewsOrigin,
    alongside: (tx: Tx) => Promise<void> = async () => undefined,
  ): Promise<IntakeOutcome> {
    await this.ensureMonths(bySensor);
    const positions: { sensor: SensorOnRoad; position: StreamPosition }[] = [];
    const outcome = await this.transactions.run(async (tx) => {
      // A file that fills the same sensors may take a minute; whoever waited for it with a connection would keep others out.
      if (origin.isLive) await tx.query(`SET LOCAL lock_timeout = '6s'`);
      const sensors = await this.lock(tx, [...bySensor.keys()]);
      const work = await this.takeAll(tx, sensors, bySensor);
      const stored = work.filter(({ fresh }) => fresh.length > 0);
      await this.readings.insert(
        tx,
        stored.map(({ sensor, fresh }) => ({ sensorId: sensor.id, samples: fresh })),
        null,
      );
      await this.sum(tx, stored);
      const computedNews = await this.compute(tx, sensors, stored);
      await this.saveStates(tx, sensors, stored, computedNews.computedTo);
      const alertIds = await this.alerts.observe(tx, [...stored.map(newsOf), ...computedNews.news], origin);
      await alongside(tx);
      for (const { sensor, stream, late } of stored) {
        if (stream !== null && late === null) positions.push({ sensor, position: stream.positionNow() });
      }
      return outcomeOf(work, alertIds);
    });
    for (const { sensor, position } of positions) this.memory.put(sensor.id, sensor.revision + 1, position);
    return outcome;
  }

  private async ensureMonths(bySensor: ReadonlyMap<string, readonly Sample[]>): Promise<void> {
    const edges = [...bySensor.values()].flatMap((samples) => [samples[0]?.at, samples.at(-1)?.at]);
    const known = edges.filter((at): at is number => at !== undefined);
    const months = new Set(known.map((at) => new Date(at).toISOString().slice(0, 7)));
    if ([...months].every((month) => this.knownMonths.has(month))) return;
    await this.readings.ensurePartitions(this.transactions.plain, Math.min(...known), Math.max(...known));
    for (const month of months) this.knownMonths.add(month);
  }

  private async lock(tx: Tx, sensorIds: readonly string[]): Promise<SensorOnRoad[]> {
    return this.readings.lockSensors(tx, await this.readings.withCompanions(tx, sensorIds));
  }

  private async takeAll(
    tx: Tx,
    sensors: readonly SensorOnRoad[],
    bySensor: ReadonlyMap<string, readonly Sample[]>,
  ): Promise<SensorWork[]> {
    const named = sensors.filter(({ id }) => bySensor.has(id));
    const positions = await this.positions(tx, named);
    const work: SensorWork[] = [];
    for (const sensor of named) {
      work.push(await this.take(tx, sensor, bySensor.get(sensor.id) ?? [], positions));
    }
    return work;
  }

  private async take(
    tx: Tx,
    sensor: SensorOnRoad,
    samples: readonly Sample[],
    positions: ReadonlyMap<string, StreamPosition>,
  ): Promise<SensorWork> {
    const latestAt = sensor.latestAt ?? -Infinity;
    const lateCount = samples.findIndex(({ at }) => at > latestAt);
    const late = lateCount === -1 ? samples : samples.slice(0, lateCount);
    const held =
      late.length === 0
        ? new Map<number, number>()
        : await this.readings.heldAt(
            tx,
            sensor.id,
            late.map(({ at }) => at),
          );
    const lateFresh = late.filter(({ at }) => !held.has(at));
    const different = late.filter(({ at, value }) => held.has(at) && held.get(at) !== value);
    const position = positions.get(sensor.id);
    const stream = position === undefined ? null : new SensorStream(sensor, position);
    const inOrder = samples.slice(late.length).map((sample) => {
      // A stream is made for every named sensor; without one there would be nothing in order either.
      return stream?.take(sample) ?? { ...sample, flags: 0 };
    });
    const first = lateFresh[0];
    const last = lateFresh.at(-1);
    return {
      sensor,
      // Late readings are judged with their neighbours once they are stored.
      fresh: [...lateFresh.map((sample) => ({ ...sample, flags: 0 })), ...inOrder],
      stream: inOrder.length > 0 ? stream : null,
      late: first === undefined || last === undefined ? null : { from: first.at, to: last.at },
      receipt: {
        stored: lateFresh.length + inOrder.length,
        alreadyHeld: late.length - lateFresh.length - different.length,
        different: different.map(({ at }) => at),
      },
    };
  }

  private async positions(tx: Tx, sensors: readonly SensorOnRoad[]): Promise<Map<string, StreamPosition>> {
    const positions = new Map<string, StreamPosition>();
    const unknown = sensors.filter((sensor) => {
      const position = this.memory.take(sensor.id, sensor.revision);
      if (position !== undefined) positions.set(sensor.id, position);
      return position === undefined;
    });
    if (unknown.length === 0) return positions;
    const ids = unknown.map(({ id }) => id);
    const hours = await this.summaries.newest(tx, 'hour', ids);
    const days = await this.summaries.newest(tx, 'day', ids);
    for (const sensor of unknown) {
      const historyMs = qualityHistoryMs(qualityLimits[sensor.quantity]);
      const history =
        sensor.latestAt === null
          ? []
          : await this.readings.between(tx, sensor.id, sensor.latestAt - historyMs, Infinity, true);
      const newestOf = (sums: typeof hours) => sums.find(({ sensorId }) => sensorId === sensor.id)?.sums;
      positions.set(sensor.id, positionFromStored(sensor, history, newestOf(hours), newestOf(days)));
    }
    return positions;
  }

  private async sum(tx: Tx, work: readonly SensorWork[]): Promise<void> {
    const entries = (pick: (stream: SensorStream) => ReturnType<SensorStream['touchedHours']>) =>
      work.flatMap(({ sensor, stream }) =>
        stream === null ? [] : pick(stream).map((sums) => ({ sensorId: sensor.id, sums })),
      );
    await this.summaries.save(
      tx,
      'hour',
      entries((stream) => stream.touchedHours()),
    );
    await this.summaries.save(
      tx,
      'day',
      entries((stream) => stream.touchedDays()),
    );
    for (const { sensor, late } of work) {
      if (late !== null) await this.lateReadings.recompute(tx, sensor, late);
    }
  }

  /** Extends or recomputes the computed quantities of every humidity sensor that the new readings concern. */
  private async compute(
    tx: Tx,
    sensors: readonly SensorOnRoad[],
    work: readonly SensorWork[],
  ): Promise<{ news: SeriesNews[]; computedTo: Map<string, number> }> {
    const newestOf = newestAfter(work);
    const computedTo = new Map<string, number>();
    const settling: Settling[] = [];
    const news: SeriesNews[] = [];
    for (const sensor of sensors.filter(({ quantity }) => quantity === 'relativeHumidity')) {
      const beside = temperaturesBeside(sensor, sensors);
      const touched = touchedAround(sensor, beside, work);
      if (touched === null) continue;
      const settledTo = settledUpTo(sensor, beside, newestOf);
      if (sensor.computedTo !== null && touched.changedFrom <= sensor.computedTo) {
        const span = { from: touched.changedFrom, to: Math.min(touched.to, sensor.computedTo) };
        await this.computed.recompute(tx, sensor, span, sensor.computedTo);
        const moved = { ...sensor, computedTo: Math.max(settledTo, sensor.computedTo) };
        news.push(changedNews(moved, 'vapourPressureDeficit', touched.changedFrom));
      }
      if (settledTo > (sensor.computedTo ?? -Infinity)) {
        computedTo.set(sensor.id, settledTo);
        settling.push({ sensor, computedTo: sensor.computedTo, settledTo });
      }
    }
    const points = await this.computed.extend(tx, settling);
    for (const { sensor, quantity, samples } of points) {
      const isRefolded = news.some((item) => item.sensor.id === sensor.id);
      if (quantity !== 'vapourPressureDeficit' || isRefolded) continue;
      const inOrder = samples.map((sample) => ({ ...sample, flags: 0 }));
      news.push({ sensor, quantity, inOrder, changedFrom: null });
    }
    return { news, computedTo };
  }

  private async saveStates(
    tx: Tx,
    sensors: readonly SensorOnRoad[],
    work: readonly SensorWork[],
    computedTo: ReadonlyMap<string, number>,
  ): Promise<void> {
    const changed = sensors.flatMap((sensor) => {
      const own = work.find((one) => one.sensor.id === sensor.id);
      const latest = latestAfter(sensor, own?.fresh ?? []);
      const isTouched = own !== undefined || computedTo.has(sensor.id);
      if (latest === null || !isTouched) return [];
      return [
        {
          sensorId: sensor.id,
          latest,
          computedTo: computedTo.get(sensor.id) ?? sensor.computedTo,
          changedFrom: own?.fresh[0]?.at ?? null,
        },
      ];
    });
    await this.readings.saveStates(tx, changed);
  }

  /**
   * Stored values of a series, for looking back.
   *
   * @param tx - Any.
   * @param sensor - Whose; a humidity sensor for computed quantities.
   * @param quantity - Its own or a computed one.
   * @param from - Start [ms].
   * @returns Values in order with their flags; computed points have none.
   */
  async stored(tx: Tx, sensor: SensorOnRoad, quantity: Quantity, from: number): Promise<FlaggedSample[]> {
    if (isMeasured(quantity)) return this.readings.between(tx, sensor.id, from, Infinity, true);
    const points = await this.computed.points(tx, sensor, quantity, from, (sensor.computedTo ?? 0) + 1);
    return points.map((point) => ({ ...point, flags: 0 }));
  }
}

function newsOf({ sensor, fresh, late }: SensorWork): SeriesNews {
  return late === null
    ? { sensor, quantity: sensor.quantity, inOrder: fresh, changedFrom: null }
    : changedNews(sensor, sensor.quantity, late.from);
}

function changedNews(sensor: SensorOnRoad, quantity: Quantity, from: number): SeriesNews {
  return { sensor, quantity, inOrder: [], changedFrom: from };
}

function latestAfter(sensor: SensorOnRoad, fresh: readonly FlaggedSample[]): FlaggedSample | null {
  const newest = fresh.at(-1);
  const isNewer = newest !== undefined && newest.at > (sensor.latestAt ?? -Infinity);
  if (isNewer) return newest;
  return sensor.latestAt === null || sensor.latestValue === null
    ? null
    : { at: sensor.latestAt, value: sensor.latestValue, flags: sensor.latestFlags };
}

function newestAfter(work: readonly SensorWork[]): (sensor: SensorOnRoad) => number {
  const newest = new Map(work.map(({ sensor, fresh }) => [sensor.id, fresh.at(-1)?.at ?? -Infinity]));
  return (sensor) => Math.max(sensor.latestAt ?? -Infinity, newest.get(sensor.id) ?? -Infinity);
}

function outcomeOf(work: readonly SensorWork[], alertIds: readonly string[]): IntakeOutcome {
  const stored = work.filter(({ fresh }) => fresh.length > 0);
  return {
    receipts: new Map(work.map(({ sensor, receipt }) => [sensor.id, receipt])),
    roomIds: new Set(stored.map(({ sensor }) => sensor.roomId)),
    shelfIds: new Set(stored.flatMap(({ sensor }) => (sensor.shelfId === null ? [] : [sensor.shelfId]))),
    alertIds,
  };
}
