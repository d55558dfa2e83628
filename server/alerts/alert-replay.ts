import { advanceSeries } from '@shared/alerts/alert-machine';
import type { AlertRule } from '@shared/alerts/alert-rule';
import { idleState, type AlertState } from '@shared/alerts/alert-state';
import type { EpisodeChange } from '@shared/alerts/episode';
import { lampPlan, type AlertContext } from '@shared/alerts/lamp-plan';
import { restartFrom } from '@shared/alerts/restart-from';
import type { Quantity } from '@shared/climate/quantity';
import { qualityLevel } from '@shared/series/quality-tests';
import type { Tx } from '../database/transactions';
import type { FlaggedSample, SensorOnRoad } from '../readings/reading-store';
import type { AlertSources } from './alert-evaluation-service';
import { rulesFor } from './alert-rules';
import type { AlertStore, Watch } from './alert-store';

/** A series to be watched while a file's readings pass. */
export interface ReplayedSeries {
  /** As it was before. */
  readonly sensor: SensorOnRoad;
  readonly quantity: Quantity;
  /** The last value that the rules have seen [ms]; null before the first. */
  readonly seenTo: number | null;
}

/** Readings in order, in columns. */
export interface ReplayColumns {
  readonly ats: Float64Array;
  readonly values: Float64Array;
  readonly flags: Int16Array;
}

interface Running {
  readonly watch: Watch;
  readonly rule: AlertRule;
  /** Earlier values are not judged by the rule [ms]. */
  readonly judgesFrom: number;
  state: AlertState;
  /** From where episodes are found anew [ms]; null while the fold only goes on. */
  restartedAt: number | null;
  /** What is known of each episode, by its beginning. */
  readonly found: Map<number, EpisodeChange>;
}

/** What a replay needs of others. */
export interface ReplaySources extends Pick<AlertSources, 'wantedRangesOf' | 'plannedLamps'> {
  /** Stored values of a series in [from, to), in order, failed ones included. */
  storedBetween(tx: Tx, series: ReplayedSeries, from: number, to: number): Promise<FlaggedSample[]>;
}

/** Two days cover any stretch of light that reaches into the span. */
const LAMP_MARGIN_MS = 2 * 86_400_000;

/**
 * Folds a long stretch of readings, piece by piece, into the alert episodes of one series. Readings later than all before
 * go on from where the rules stand; as soon as the past has changed, the rules go back to where that can matter. What it
 * finds is history, which nobody is told of.
 */
export class AlertReplay {
  private hasRestarted = false;

  private constructor(
    private readonly series: ReplayedSeries,
    private readonly store: AlertStore,
    private readonly sources: ReplaySources,
    private readonly running: readonly Running[],
    private context: AlertContext,
    private readonly now: number,
  ) {}

  /**
   * Begins.
   *
   * @param tx - Of the change, holding the sensors' locks.
   * @param series - Of sensors that are on a shelf.
   * @param now - The present [ms].
   * @returns One replay a series, in their order.
   */
  static async begin(
    tx: Tx,
    store: AlertStore,
    sources: ReplaySources,
    series: readonly ReplayedSeries[],
    now: number,
  ): Promise<AlertReplay[]> {
    const shelfIds = [...new Set(series.map(({ sensor }) => sensor.shelfId ?? ''))];
    const wanted = await sources.wantedRangesOf(tx, shelfIds);
    const ruled = series.map((one) => {
      const ranges = wanted.get(one.sensor.shelfId ?? '');
      const range = ranges?.find(({ quantity }) => quantity === one.quantity);
      return rulesFor(one.sensor, one.quantity, range).map((ruled) => ({ one, ...ruled }));
    });
    const watches = await store.watches(
      tx,
      ruled.flat().map(({ one: { sensor, quantity }, rule: { kind } }) => ({ sensor, quantity, kind })),
    );
    const plans = await lampPlans(tx, sources, shelfIds, Math.min(now, ...series.map(firstOf)), now);
    return series.map((one, index) => {
      const running = (ruled[index] ?? []).flatMap(({ rule, judgesFrom }): Running[] => {
        const watch = watches.find(
          ({ sensorId, quantity, kind }) =>
            sensorId === one.sensor.id && quantity === one.quantity && kind === rule.kind,
        );
        if (watch === undefined) return [];
        return [{ watch, rule, judgesFrom, state: watch.state, restartedAt: null, found: new Map() }];
      });
      const context = plans.get(one.sensor.shelfId ?? '') ?? lampPlan([]);
      return new AlertReplay(one, store, sources, running, context, now);
    });
  }

  /**
   * Takes the next values of the series.
   *
   * @param reader - Sees what was held before; only asked once, when the past has changed.
   * @param columns - Values in order.
   * @param changedFrom - Where the series first changed [ms]; null while it has not.
   */
  async take(reader: Tx, columns: ReplayColumns, changedFrom: number | null): Promise<void> {
    const first = columns.ats[0];
    if (first === undefined) return;
    const isPast = changedFrom !== null && changedFrom <= (this.series.seenTo ?? -Infinity);
    if (isPast && !this.hasRestarted) await this.restart(reader, changedFrom, first);
    this.fold(columns);
  }

  /**
   * Writes what was found.
   *
   * @param tx - Of the change.
   * @param reader - As for {@link AlertReplay.take}.
   * @param changedFrom - As for {@link AlertReplay.take}.
   * @returns Ids of the alerts.
   */
  async finish(tx: Tx, reader: Tx, changedFrom: number | null): Promise<string[]> {
    const isPast = changedFrom !== null && changedFrom <= (this.series.seenTo ?? -Infinity);
    if (isPast && !this.hasRestarted) await this.restart(reader, changedFrom, Infinity);
    if (changedFrom === null) return [];
    const changed = await this.store.saveEpisodes(
      tx,
      this.running.flatMap(({ watch, found }) =>
        [...found.values()].map(({ episode }) => ({
          watch,
          sensor: this.series.sensor,
          episode,
          foundLater: true,
        })),
      ),
    );
    for (const { watch, found, restartedAt } of this.running) {
      if (restartedAt !== null) await this.store.removeEpisodes(tx, watch.id, restartedAt, [...found.keys()]);
    }
    await this.store.saveStates(
      tx,
      this.running.map(({ watch, state }) => ({ watchId: watch.id, state })),
    );
    return changed;
  }

  private async restart(reader: Tx, changedFrom: number, passedTo: number): Promise<void> {
    this.hasRestarted = true;
    const { sensor } = this.series;
    for (const one of this.running) {
      const around = await this.store.episodesAround(reader, one.watch.id, changedFrom);
      const { at } = restartFrom(one.rule, around, changedFrom);
      one.restartedAt = Math.max(at, one.judgesFrom);
      one.state = idleState;
      one.found.clear();
    }
    const from = Math.min(...this.running.map(({ restartedAt }) => restartedAt ?? Infinity));
    const shelfId = sensor.shelfId ?? '';
    // What passes from now on lies in the past, too, even where nothing held has to be judged again.
    const plans = await lampPlans(reader, this.sources, [shelfId], Math.min(from, passedTo), this.now);
    this.context = plans.get(shelfId) ?? this.context;
    if (from >= passedTo) return;
    const stored = await this.sources.storedBetween(reader, this.series, from, passedTo);
    this.fold(columnsOf(stored));
  }

  private fold({ ats, values, flags }: ReplayColumns): void {
    const qualities = Array.from(flags, qualityLevel);
    for (const one of this.running) {
      const from = Math.max(one.restartedAt ?? firstOf(this.series), one.judgesFrom);
      const skip = ats[0] === undefined || ats[0] >= from ? 0 : ats.findIndex((at) => at >= from);
      if (skip === -1) continue;
      const [times, numbers, levels] =
        skip === 0
          ? [ats, values, qualities]
          : [ats.subarray(skip), values.subarray(skip), qualities.slice(skip)];
      keepStep(one, advanceSeries(one.rule, this.context, one.state, times, numbers, levels));
    }
  }
}

function keepStep(one: Running, step: { state: AlertState; changes: readonly EpisodeChange[] }): void {
  one.state = step.state;
  for (const change of step.changes) one.found.set(change.episode.beganAt, change);
}

function columnsOf(samples: readonly FlaggedSample[]): ReplayColumns {
  return {
    ats: Float64Array.from(samples, ({ at }) => at),
    values: Float64Array.from(samples, ({ value }) => value),
    flags: Int16Array.from(samples, ({ flags }) => flags),
  };
}

/** The first value that a series can have for rules that only go on [ms]. */
function firstOf({ sensor, seenTo }: ReplayedSeries): number {
  return Math.max(sensor.placedAt ?? 0, seenTo === null ? 0 : seenTo + 1);
}

async function lampPlans(
  tx: Tx,
  sources: ReplaySources,
  shelfIds: readonly string[],
  from: number,
  to: number,
): Promise<Map<string, AlertContext>> {
  const lamps = await sources.plannedLamps(
    tx,
    shelfIds,
    new Date(from - LAMP_MARGIN_MS),
    new Date(to + LAMP_MARGIN_MS),
  );
  return new Map(shelfIds.map((id) => [id, lampPlan(lamps.get(id) ?? [])]));
}
