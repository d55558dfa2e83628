import { advanceSeries } from '@shared/alerts/alert-machine';
import type { AlertRule } from '@shared/alerts/alert-rule';
import { idleState, type AlertState, type AlertStep } from '@shared/alerts/alert-state';
import { lampPlan, type AlertContext, type LampInterval } from '@shared/alerts/lamp-plan';
import { restartFrom } from '@shared/alerts/restart-from';
import type { Quantity } from '@shared/climate/quantity';
import type { WantedRange } from '@shared/contracts/rooms';
import { qualityLevel } from '@shared/series/quality-tests';
import type { Tx } from '../database/transactions';
import type { FlaggedSample, SensorOnRoad } from '../readings/reading-store';
import { rulesFor } from './alert-rules';
import type { AlertStore, Watch } from './alert-store';
import { outcomeOf, type EpisodeKeeper, type FoldedWatch, type NewsOrigin } from './episode-keeper';

/** What happened to one series of a sensor in a transaction. */
export interface SeriesNews {
  readonly sensor: SensorOnRoad;
  readonly quantity: Quantity;
  /** New readings later than all before, in order. */
  readonly inOrder: readonly FlaggedSample[];
  /** From where stored readings have changed otherwise [ms]; null when they have not. */
  readonly changedFrom: number | null;
}

/** What the evaluation needs of others. */
export interface AlertSources {
  wantedRangesOf(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedRange[]>>;
  plannedLamps(
    tx: Tx,
    shelfIds: readonly string[],
    from: Date,
    to: Date,
  ): Promise<Map<string, LampInterval[]>>;
  /** Stored readings or computed points of a series from an instant on, in order, failed ones included. */
  stored(tx: Tx, sensor: SensorOnRoad, quantity: Quantity, from: number): Promise<FlaggedSample[]>;
}

const LAMP_MARGIN_MS = 2 * 86_400_000;

interface Watched {
  readonly watch: Watch;
  readonly rule: AlertRule;
  /** Earlier readings are not judged by the rule [ms]. */
  readonly judgesFrom: number;
  readonly news: SeriesNews;
}

/** Folds new readings into alert episodes, in the transaction that stores the readings. */
export class AlertEvaluationService {
  constructor(
    private readonly store: AlertStore,
    private readonly sources: AlertSources,
    private readonly keeper: EpisodeKeeper,
  ) {}

  /**
   * Takes what is new in some series.
   *
   * @param tx - The transaction that stored it, holding the sensors' locks.
   * @param news - A series each; sensors that are on no shelf are passed over.
   * @param origin - Live news may be told to people while they are fresh; others never are.
   * @returns Ids of the alerts that changed.
   */
  async observe(tx: Tx, news: readonly SeriesNews[], origin: NewsOrigin): Promise<string[]> {
    const watched = await this.watch(
      tx,
      news.filter(({ sensor }) => sensor.shelfId !== null),
    );
    if (watched.length === 0) return [];
    const starts = await this.starts(tx, watched);
    const contexts = await this.contexts(tx, watched, Math.min(origin.now, ...starts), origin.now);
    const folded: FoldedWatch[] = [];
    for (const [index, one] of watched.entries()) {
      const context = contexts(one.news.sensor);
      folded.push(
        one.news.changedFrom === null
          ? advanceInOrder(one, context)
          : await this.refold(tx, one, context, starts[index] ?? one.news.changedFrom),
      );
    }
    return this.keeper.keep(tx, folded, origin);
  }

  private async watch(tx: Tx, news: readonly SeriesNews[]): Promise<Watched[]> {
    const shelfIds = [...new Set(news.map(({ sensor }) => sensor.shelfId ?? ''))];
    const wanted = await this.sources.wantedRangesOf(tx, shelfIds);
    const ruled = news.flatMap((item) =>
      rulesFor(
        item.sensor,
        item.quantity,
        wanted.get(item.sensor.shelfId ?? '')?.find(({ quantity }) => quantity === item.quantity),
      ).map((watching) => ({ ...watching, news: item })),
    );
    const watches = await this.store.watches(
      tx,
      ruled.map(({ rule, news: { sensor, quantity } }) => ({ sensor, quantity, kind: rule.kind })),
    );
    const byKey = new Map(
      watches.map((watch) => [`${watch.sensorId} ${watch.quantity} ${watch.kind}`, watch]),
    );
    return ruled.flatMap(({ rule, judgesFrom, news: item }) => {
      const watch = byKey.get(`${item.sensor.id} ${item.quantity} ${rule.kind}`);
      return watch === undefined ? [] : [{ watch, rule, judgesFrom, news: item }];
    });
  }

  /** From where each watch folds: a change in the past may reach back to the episode that was open then [ms]. */
  private async starts(tx: Tx, watched: readonly Watched[]): Promise<number[]> {
    const starts: number[] = [];
    for (const { watch, rule, judgesFrom, news } of watched) {
      if (news.changedFrom === null) {
        starts.push(news.inOrder[0]?.at ?? Infinity);
        continue;
      }
      const around = await this.store.episodesAround(tx, watch.id, news.changedFrom);
      starts.push(Math.max(restartFrom(rule, around, news.changedFrom).at, judgesFrom));
    }
    return starts;
  }

  /** Lamps are asked for only where a rule follows them. */
  private async contexts(
    tx: Tx,
    watched: readonly Watched[],
    from: number,
    now: number,
  ): Promise<(sensor: SensorOnRoad) => AlertContext> {
    const following = watched.filter(({ rule }) => 'settleMs' in rule);
    const shelfIds = [...new Set(following.map(({ news }) => news.sensor.shelfId ?? ''))];
    const lamps =
      shelfIds.length === 0
        ? new Map<string, LampInterval[]>()
        : await this.sources.plannedLamps(
            tx,
            shelfIds,
            new Date(from - LAMP_MARGIN_MS),
            new Date(now + LAMP_MARGIN_MS),
          );
    const plans = new Map(shelfIds.map((shelfId) => [shelfId, lampPlan(lamps.get(shelfId) ?? [])]));
    return (sensor) => plans.get(sensor.shelfId ?? '') ?? lampPlan([]);
  }

  /** Folds again from an instant at which the rule was idle; episodes that began alike keep what people did with them. */
  private async refold(tx: Tx, one: Watched, context: AlertContext, from: number): Promise<FoldedWatch> {
    const { sensor, quantity } = one.news;
    const samples = await this.sources.stored(tx, sensor, quantity, from);
    const step = fold(one.rule, context, idleState, samples);
    const folded = foldedOf(one, step, samples);
    const found = folded.episodes.map(({ beganAt }) => beganAt);
    await this.store.removeEpisodes(tx, one.watch.id, from, found);
    return folded;
  }
}

function advanceInOrder(one: Watched, context: AlertContext): FoldedWatch {
  const samples = one.news.inOrder.filter(({ at }) => at >= one.judgesFrom);
  return foldedOf(one, fold(one.rule, context, one.watch.state, samples), samples);
}

function foldedOf(
  { watch, news: { sensor } }: Watched,
  { state, changes }: AlertStep,
  samples: readonly FlaggedSample[],
): FoldedWatch {
  const newestAt = samples.at(-1)?.at ?? state.lastAt ?? -Infinity;
  // Nearly every step ends as idle as it began, and is not worth writing.
  const isStill = isIdle(watch.state) && isIdle(state);
  return { watch, sensor, state: isStill ? watch.state : state, newestAt, ...outcomeOf(changes) };
}

function isIdle({ run, open }: AlertState): boolean {
  return run === null && open === null;
}

function fold(
  rule: AlertRule,
  context: AlertContext,
  state: AlertState,
  samples: readonly FlaggedSample[],
): AlertStep {
  return advanceSeries(
    rule,
    context,
    state,
    samples.map(({ at }) => at),
    samples.map(({ value }) => value),
    samples.map(({ flags }) => qualityLevel(flags)),
  );
}
