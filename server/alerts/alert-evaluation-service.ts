import { advanceSeries, tick } from '@shared/alerts/alert-machine';
import { isSilenceRule, type AlertRule } from '@shared/alerts/alert-rule';
import { idleState, type AlertState } from '@shared/alerts/alert-state';
import type { Episode, EpisodeChange } from '@shared/alerts/episode';
import { lampPlan, type AlertContext, type LampInterval } from '@shared/alerts/lamp-plan';
import { restartFrom } from '@shared/alerts/restart-from';
import type { Quantity } from '@shared/climate/quantity';
import type { WantedRange } from '@shared/contracts/rooms';
import { qualityLevel } from '@shared/series/quality-tests';
import type { Tx } from '../database/transactions';
import type { FlaggedSample, SensorOnRoad } from '../readings/reading-store';
import { rulesFor } from './alert-rules';
import type { AlertStore, EpisodeOfWatch, Watch } from './alert-store';

/** What happened to one series of a sensor in a transaction. */
export interface SeriesNews {
  readonly sensor: SensorOnRoad;
  readonly quantity: Quantity;
  /** New readings later than all before, in order. */
  readonly inOrder: readonly FlaggedSample[];
  /** From where stored readings have changed otherwise [ms]; null when they have not. */
  readonly changedFrom: number | null;
}

/** Where news come from, and what the clock says. */
export interface NewsOrigin {
  readonly isLive: boolean;
  readonly now: number;
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

/** Writes to people in the same transaction. */
export interface AlertTeller {
  tellOpened(tx: Tx, alertIds: readonly string[], now: number): Promise<void>;
  tellCleared(tx: Tx, alertIds: readonly string[], now: number): Promise<void>;
}

/** A reading older than this says nothing about now, so what it opens is history. */
const FRESH_MS = 15 * 60_000;
const LAMP_MARGIN_MS = 2 * 86_400_000;

interface Watched {
  readonly watch: Watch;
  readonly rule: AlertRule;
  /** Earlier readings are not judged by the rule [ms]. */
  readonly judgesFrom: number;
  readonly news: SeriesNews;
}

/** What a fold came to. */
interface Outcome {
  readonly episodes: readonly Episode[];
  /** Silences that the clock had seen and readings on their way have disproved, by their beginning. */
  readonly withdrawn: readonly number[];
}

interface Folded extends Watched, Outcome {
  readonly state: AlertState;
}

/** Folds new readings into alert episodes, in the transaction that stores the readings. */
export class AlertEvaluationService {
  constructor(
    private readonly store: AlertStore,
    private readonly sources: AlertSources,
    private readonly teller: AlertTeller,
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
    const folded: Folded[] = [];
    for (const [index, one] of watched.entries()) {
      const context = contexts(one.news.sensor);
      folded.push(
        one.news.changedFrom === null
          ? advanceInOrder(one, context)
          : await this.refold(tx, one, context, starts[index] ?? one.news.changedFrom, origin.now),
      );
    }
    return this.keep(tx, folded, origin);
  }

  /**
   * Lets the clock find sensors that have fallen silent.
   *
   * @param tx - Holding the sensors' locks.
   * @param sensors - Sensors on shelves whose last reading is old.
   * @param now - The present [ms].
   * @returns Ids of the alerts that changed.
   */
  async tick(tx: Tx, sensors: readonly SensorOnRoad[], now: number): Promise<string[]> {
    const news = sensors.map((sensor) => ({
      sensor,
      quantity: sensor.quantity,
      inOrder: [],
      changedFrom: null,
    }));
    const watched = (await this.watch(tx, news)).filter(({ rule }) => isSilenceRule(rule));
    const folded = watched.map((one): Folded => {
      const step = tick(one.rule, stateBefore(one), now);
      return { ...one, state: step.state, ...outcomeOf(step.changes) };
    });
    return this.keep(
      tx,
      folded.filter(({ episodes }) => episodes.length > 0),
      { isLive: true, now },
    );
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

  private async contexts(
    tx: Tx,
    watched: readonly Watched[],
    from: number,
    now: number,
  ): Promise<(sensor: SensorOnRoad) => AlertContext> {
    const shelfIds = [...new Set(watched.map(({ news }) => news.sensor.shelfId ?? ''))];
    const lamps = await this.sources.plannedLamps(
      tx,
      shelfIds,
      new Date(from - LAMP_MARGIN_MS),
      new Date(now + LAMP_MARGIN_MS),
    );
    const plans = new Map(shelfIds.map((shelfId) => [shelfId, lampPlan(lamps.get(shelfId) ?? [])]));
    return (sensor) => plans.get(sensor.shelfId ?? '') ?? lampPlan([]);
  }

  /** Folds again from an instant at which the rule was idle; episodes that began alike keep what people did with them. */
  private async refold(
    tx: Tx,
    one: Watched,
    context: AlertContext,
    from: number,
    now: number,
  ): Promise<Folded> {
    const { sensor, quantity } = one.news;
    const samples = await this.sources.stored(tx, sensor, quantity, from);
    const step = fold(one.rule, context, idleState, samples);
    const ticked = tick(one.rule, step.state, now);
    const outcome = outcomeOf([...step.changes, ...ticked.changes]);
    await this.store.removeEpisodes(
      tx,
      one.watch.id,
      from,
      outcome.episodes.map(({ beganAt }) => beganAt),
    );
    return { ...one, state: ticked.state, ...outcome };
  }

  private async keep(tx: Tx, folded: readonly Folded[], origin: NewsOrigin): Promise<string[]> {
    const episodes = folded.flatMap(({ watch, news, episodes: found }) =>
      found.map((episode): EpisodeOfWatch => {
        const isOver = episode.clearedAt !== null;
        return {
          watch,
          sensor: news.sensor,
          episode,
          foundLater: !origin.isLive || (isOver && !wasOpen(watch, episode)),
        };
      }),
    );
    for (const { watch, withdrawn } of folded) await this.store.removeBegunAt(tx, watch.id, withdrawn);
    const changed = await this.store.saveEpisodes(tx, episodes);
    await this.store.saveStates(
      tx,
      folded.map(({ watch, state }) => ({ watchId: watch.id, state })),
    );
    if (origin.isLive) await this.tell(tx, folded, changed, origin.now);
    return changed;
  }

  private async tell(
    tx: Tx,
    folded: readonly Folded[],
    changed: readonly string[],
    now: number,
  ): Promise<void> {
    const fresh = folded.filter(({ state, rule, news }) => {
      if (state.open === null) return false;
      const newest = isSilenceRule(rule) ? now : (news.inOrder.at(-1)?.at ?? state.lastAt ?? 0);
      return now - newest <= FRESH_MS;
    });
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

function wasOpen(watch: Watch, episode: Episode): boolean {
  return watch.state.open?.beganAt === episode.beganAt;
}

function advanceInOrder(one: Watched, context: AlertContext): Folded {
  const samples = one.news.inOrder.filter(({ at }) => at >= one.judgesFrom);
  const step = fold(one.rule, context, stateBefore(one), samples);
  return { ...one, state: step.state, ...outcomeOf(step.changes) };
}

/** A silence hangs on the newest reading alone, which the sensor's own state keeps. */
function stateBefore({ watch, rule, news }: Watched): AlertState {
  return isSilenceRule(rule) ? { ...watch.state, lastAt: news.sensor.latestAt } : watch.state;
}

function fold(
  rule: AlertRule,
  context: AlertContext,
  state: AlertState,
  samples: readonly FlaggedSample[],
): { state: AlertState; changes: readonly EpisodeChange[] } {
  return advanceSeries(
    rule,
    context,
    state,
    samples.map(({ at }) => at),
    samples.map(({ value }) => value),
    samples.map(({ flags }) => qualityLevel(flags)),
  );
}

/** The last word on each episode that a run of changes spoke of. */
function outcomeOf(changes: readonly EpisodeChange[]): Outcome {
  const last = new Map(changes.map((change) => [change.episode.beganAt, change]));
  const isWithdrawn = ({ type }: EpisodeChange): boolean => type === 'withdrawn';
  return {
    episodes: [...last.values()].filter((change) => !isWithdrawn(change)).map(({ episode }) => episode),
    withdrawn: [...last.values()].filter(isWithdrawn).map(({ episode }) => episode.beganAt),
  };
}
