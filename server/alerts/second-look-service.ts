import { advanceSeries } from '@shared/alerts/alert-machine';
import type { FixedLimitRule } from '@shared/alerts/alert-rule';
import { idleState, type AlertState, type ObservationColumns } from '@shared/alerts/alert-state';
import type { EpisodeChange } from '@shared/alerts/episode';
import { lampPlan, type AlertContext } from '@shared/alerts/lamp-plan';
import { restartFrom } from '@shared/alerts/restart-from';
import type { Tx } from '../database/transactions';
import type { SensorOnRoad } from '../readings/reading-store';
import type { AlertSources } from './alert-evaluation-service';
import type { AlertStore, Watch } from './alert-store';
import { outcomeOf, type FoldedWatch } from './episode-keeper';
import { secondLooksOf, settledTo, type ReadColumns, type SecondLook } from './second-look';
import type { ReadingSpan, SecondLookStore } from './second-look-store';

/** A stretch of time [ms], half-open. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** When something waited to germinate on shelves: stretches by shelf, in any order. */
export type GerminatingOn = (tx: Tx, shelfIds: readonly string[]) => Promise<ReadonlyMap<string, Stretch[]>>;

/** What is known of shelves beside their readings. */
export interface ShelfSources extends Pick<AlertSources, 'plannedLamps'> {
  readonly germinatingOn: GerminatingOn;
}

/** The same, of some shelves. */
interface ShelfPlans {
  readonly germinating: ReadonlyMap<string, Stretch[]>;
  readonly lamps: ReadonlyMap<string, AlertContext>;
}

interface Work {
  readonly look: SecondLook;
  readonly rule: FixedLimitRule;
  readonly watch: Watch;
  /** Values from here on are folded [ms]. */
  readonly from: number;
  /** Up to here, included [ms]. */
  readonly to: number;
  /** Whether what was found from there on is found anew. */
  readonly isAnew: boolean;
  state: AlertState;
  readonly changes: EpisodeChange[];
}

const MINUTE_MS = 60_000;
/** A long past is looked at in parts, so that memory stays the same and others get their turn however long it is. */
const PART_MS = 5 * 86_400_000;
/** Two days cover any stretch of light that reaches into the span. */
const LAMP_MARGIN_MS = 2 * 86_400_000;
/** These kinds have one limit at all hours. */
const noLamps = lampPlan([]);
const noReadings: ReadColumns = { times: [], values: [], qualities: [], flags: [] };

/**
 * Folds what is made from several readings or several sensors into alert episodes, from what is stored: a moment after
 * the readings came, when those that belong together are there.
 */
export class SecondLookService {
  constructor(
    private readonly alerts: AlertStore,
    private readonly looks: SecondLookStore,
    private readonly plans: ShelfSources,
  ) {}

  /**
   * Looks at shelves.
   *
   * @param tx - Holding the locks of every sensor on them.
   * @param sensors - The sensors on them, by id.
   * @returns What the watches came to.
   */
  async lookAt(tx: Tx, sensors: readonly SensorOnRoad[]): Promise<FoldedWatch[]> {
    const shelfIds = [...new Set(sensors.flatMap(({ shelfId }) => shelfId ?? []))];
    if (shelfIds.length === 0) return [];
    const shelves = await this.looks.shelves(tx, shelfIds);
    const looks = shelfIds.flatMap((id) =>
      secondLooksOf({
        sensors: sensors.filter(({ shelfId }) => shelfId === id),
        ...(shelves.get(id) ?? { leafOffsetC: 0, leftAt: 0 }),
      }),
    );
    const begun = await this.begin(tx, looks.filter(hasNews));
    const work = begun.filter((one) => !isSameMinute(one));
    const toFold = await this.worthReading(tx, work);
    if (toFold.length > 0) await this.foldAll(tx, toFold, await this.plansOf(tx, shelfIds, toFold));
    for (const { watch, from, isAnew, changes } of work) {
      if (!isAnew) continue;
      const found = outcomeOf(changes).episodes.map(({ beganAt }) => beganAt);
      await this.alerts.removeEpisodes(tx, watch.id, from, found);
    }
    return work.map(foldedOf);
  }

  private async plansOf(tx: Tx, shelfIds: readonly string[], work: readonly Work[]): Promise<ShelfPlans> {
    const { plannedLamps, germinatingOn } = this.plans;
    const from = new Date(Math.min(...work.map((one) => one.from)) - LAMP_MARGIN_MS);
    const to = new Date(Math.max(...work.map((one) => one.to)) + LAMP_MARGIN_MS);
    const lamps = await plannedLamps(tx, shelfIds, from, to);
    return {
      germinating: await germinatingOn(tx, shelfIds),
      lamps: new Map([...lamps].map(([shelfId, intervals]) => [shelfId, lampPlan(intervals)])),
    };
  }

  private async begin(tx: Tx, looks: readonly SecondLook[]): Promise<Work[]> {
    const ruled = looks.flatMap((look) => look.rules.map((rule) => ({ look, rule })));
    if (ruled.length === 0) return [];
    const watches = await this.alerts.watches(
      tx,
      ruled.map(({ look, rule }) => ({ sensor: look.holder, quantity: look.quantity, kind: rule.kind })),
    );
    const byKey = new Map(watches.map((watch) => [keyOf(watch.sensorId, watch.kind), watch]));
    const work: Work[] = [];
    for (const { look, rule } of ruled) {
      const watch = byKey.get(keyOf(look.holder.id, rule.kind));
      const to = settledTo(look);
      if (watch !== undefined && to !== null) work.push(await this.start(tx, look, rule, watch, to));
    }
    return work;
  }

  /** From where a watch folds: on from where it stands, or from where readings that came late can matter. */
  private async start(
    tx: Tx,
    look: SecondLook,
    rule: FixedLimitRule,
    watch: Watch,
    to: number,
  ): Promise<Work> {
    const newsFrom = newsFromOf(look) ?? to;
    const { judgesFrom } = look;
    const { lastAt } = watch.state;
    const common = { look, rule, watch, to, changes: [] };
    if (lastAt !== null && newsFrom > lastAt) {
      return { ...common, from: Math.max(lastAt + 1, judgesFrom), isAnew: false, state: watch.state };
    }
    // The first reading of a minute counts; one that comes late may be another.
    const changedFrom = wholeMinute(newsFrom);
    const around = await this.alerts.episodesAround(tx, watch.id, changedFrom);
    const { at } = restartFrom(rule, around, changedFrom);
    return { ...common, from: Math.max(at, judgesFrom), isAnew: true, state: idleState };
  }

  /** Leaves out what can see nothing: leaves that were dry throughout. */
  private async worthReading(tx: Tx, work: readonly Work[]): Promise<Work[]> {
    const doubtful = work.filter(({ look, state }) => look.nothingBelow !== null && isIdle(state));
    const [limit] = doubtful.map(({ look }) => look.nothingBelow);
    if (typeof limit !== 'number') return [...work];
    const reached = await this.looks.reached(tx, doubtful.map(spanOfHolder), limit);
    return work.filter((one) => !doubtful.includes(one) || reached.has(one.look.holder.id));
  }

  private async foldAll(tx: Tx, work: readonly Work[], plans: ShelfPlans): Promise<void> {
    const end = Math.max(...work.map(({ to }) => to));
    for (let part = Math.min(...work.map(({ from }) => from)); part <= end; part += PART_MS) {
      const window = { from: part, to: Math.min(part + PART_MS, end + 1) };
      const due = work.filter(({ from, to }) => from < window.to && to >= window.from);
      if (due.length > 0) await this.foldPart(tx, due, window, plans);
    }
  }

  private async foldPart(tx: Tx, due: readonly Work[], window: Stretch, plans: ShelfPlans): Promise<void> {
    const readings = await this.looks.readings(tx, spansOf(due, window));
    const derived = new Map<SecondLook, ObservationColumns>();
    for (const one of due) {
      const { look, rule } = one;
      const shelfId = look.holder.shelfId ?? '';
      const stretches = plans.germinating.get(shelfId) ?? [];
      const series =
        derived.get(look) ??
        look.derive({
          readingsOf: ({ id }) => readings.get(id) ?? noReadings,
          isGerminating: (at) => stretches.some(({ from, to }) => at >= from && at < to),
          lampsAt: (plans.lamps.get(shelfId) ?? noLamps).lampsAt,
        });
      derived.set(look, series);
      const { times, values, qualities } = within(series, {
        from: Math.max(one.from, window.from),
        to: Math.min(one.to + 1, window.to),
      });
      const step = advanceSeries(rule, noLamps, one.state, times, values, qualities);
      one.state = step.state;
      one.changes.push(...step.changes);
    }
  }
}

function keyOf(sensorId: string, kind: string): string {
  return `${sensorId} ${kind}`;
}

function isIdle({ run, open }: AlertState): boolean {
  return run === null && open === null;
}

function hasNews(look: SecondLook): boolean {
  return newsFromOf(look) !== null;
}

/** Where a look's readings first changed [ms]; null where they did not. */
function newsFromOf({ groups }: SecondLook): number | null {
  const first = Math.min(...groups.flat().map(({ unjudgedFrom }) => unjudgedFrom ?? Infinity));
  return Number.isFinite(first) ? first : null;
}

/** Whether a sensor with many readings a minute has had none yet that counts, since it was looked at last. */
function isSameMinute({ look, watch, to, isAnew }: Work): boolean {
  const isAlone = look.groups.flat().length === 1;
  return isAlone && !isAnew && watch.state.lastAt !== null && wholeMinute(to) <= watch.state.lastAt;
}

function wholeMinute(at: number): number {
  return Math.floor(at / MINUTE_MS) * MINUTE_MS;
}

function spanOfHolder({ look, from, to }: Work): ReadingSpan {
  return { sensorId: look.holder.id, from: from - look.lookBackMs, to: to + 1, isDense: false };
}

/** What has to be read for a part: of each sensor one span, as wide as any look at it needs. */
function spansOf(due: readonly Work[], window: Stretch): ReadingSpan[] {
  const spans = new Map<string, ReadingSpan>();
  for (const { look, from, to } of due) {
    const neededFrom = Math.max(from, window.from) - look.lookBackMs;
    for (const { id, placedAt, expectedIntervalS } of look.groups.flat()) {
      const held = spans.get(id);
      spans.set(id, {
        sensorId: id,
        from: Math.min(held?.from ?? Infinity, wholeMinute(Math.max(neededFrom, placedAt ?? 0))),
        to: Math.max(held?.to ?? -Infinity, Math.min(to + 1, window.to)),
        isDense: expectedIntervalS * 1_000 < MINUTE_MS,
      });
    }
  }
  return [...spans.values()];
}

function within({ times, values, qualities }: ObservationColumns, { from, to }: Stretch): ObservationColumns {
  const [first, end] = [indexFrom(times, from), indexFrom(times, to)];
  const cut = <T>(column: ArrayLike<T>): T[] => Array.prototype.slice.call(column, first, end);
  return { times: cut(times), values: cut(values), qualities: cut(qualities) };
}

/** How many of some instants in order come before another one. */
function indexFrom(times: ArrayLike<number>, at: number): number {
  let [low, high] = [0, times.length];
  while (low < high) {
    const middle = (low + high) >>> 1;
    if ((times[middle] ?? Infinity) < at) low = middle + 1;
    else high = middle;
  }
  return low;
}

function foldedOf({ look, watch, to, isAnew, state, changes }: Work): FoldedWatch {
  // What is idle and was is not worth writing at every look: a minute looked at twice stays idle.
  const isStill = !isAnew && changes.length === 0 && isIdle(state) && isIdle(watch.state);
  const isRecent = to - (watch.state.lastAt ?? -Infinity) < MINUTE_MS;
  return {
    watch,
    sensor: look.holder,
    // Up to here it is judged, also where no value came of the readings.
    state: isStill && isRecent ? watch.state : { ...state, lastAt: to },
    newestAt: Math.max(...look.groups.flat().map(({ latestAt }) => latestAt ?? -Infinity)),
    ...outcomeOf(changes),
  };
}
