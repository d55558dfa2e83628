import { lightSumShortRule } from '@shared/alerts/alert-defaults';
import { advanceSeries } from '@shared/alerts/alert-machine';
import type { FixedLimitRule } from '@shared/alerts/alert-rule';
import { idleState, type AlertState } from '@shared/alerts/alert-state';
import { lightDays } from '@shared/alerts/derived-series';
import type { EpisodeChange } from '@shared/alerts/episode';
import { lampPlan, type LampInterval } from '@shared/alerts/lamp-plan';
import { restartFrom } from '@shared/alerts/restart-from';
import type { WantedLight } from '@shared/contracts/rooms';
import { LEAST_COVERAGE } from '@shared/growing/light-need';
import { maxGapMs } from '@shared/series/expected-interval';
import { dayBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';
import type { SensorOnRoad } from '../readings/reading-store';
import { dliMolM2 } from '../series/light-sums';
import type { AlertSources } from './alert-evaluation-service';
import type { AlertStore, Watch } from './alert-store';
import { outcomeOf, type FoldedWatch } from './episode-keeper';
import { ruleOfDay } from './light-day-rule';
import type { DayOfLight, SecondLookStore } from './second-look-store';

/** What days of light are judged by. */
export interface LightSources extends Pick<AlertSources, 'plannedLamps'> {
  /** By shelf; those that want none have no entry. */
  wantedLightOf(tx: Tx, shelfIds: readonly string[]): Promise<Map<string, WantedLight>>;
}

type LightKind = 'lightShort' | 'lightSumShort';

/** A light sensor on a shelf, with readings that wait for their second look. */
interface Seeing {
  readonly sensor: SensorOnRoad;
  readonly shelfId: string;
  readonly latestAt: number;
  readonly newsFrom: number;
}

/** A sensor's days, as one kind judges them. */
interface Look {
  readonly kind: LightKind;
  readonly seeing: Seeing;
  /** Days that began before are not judged [ms]. */
  readonly judgesFrom: number;
  readonly ruleOf: (days: readonly DayOfLight[]) => Promise<(day: DayOfLight) => FixedLimitRule>;
  /** Null where the sensor cannot tell. */
  readonly valueOf: (day: DayOfLight) => number | null;
}

interface Due {
  /** Days that end from here on are judged [ms]. */
  readonly from: number;
  /** End of the last finished day [ms]. */
  readonly to: number;
  readonly isAnew: boolean;
}

/** Days have one limit each and no lamps to follow. */
const noLamps = lampPlan([]);
/** How patient a kind is does not hang on what the day should be. */
const patience = {
  lightShort: ruleOfDay([], { startAt: 0, endAt: 0 }),
  lightSumShort: lightSumShortRule(0),
} as const satisfies Record<LightKind, FixedLimitRule>;

/** Judges the light of a room's day, once the day is over: its hours against the plan, its sum against what is wanted. */
export class LightLookService {
  constructor(
    private readonly alerts: AlertStore,
    private readonly looks: SecondLookStore,
    private readonly sources: LightSources,
  ) {}

  /**
   * Looks at light sensors.
   *
   * @param tx - Holding the sensors' locks.
   * @param sensors - Any sensors; those on shelves that see light are looked at.
   * @returns What the watches came to.
   */
  async lookAt(tx: Tx, sensors: readonly SensorOnRoad[]): Promise<FoldedWatch[]> {
    const seeing = sensors.flatMap(seeingOf);
    if (seeing.length === 0) return [];
    const wanted = await this.sources.wantedLightOf(tx, [...new Set(seeing.map(({ shelfId }) => shelfId))]);
    const looks = seeing.flatMap((one) => [
      this.hoursLook(tx, one),
      ...sumLook(one, wanted.get(one.shelfId)),
    ]);
    const watches = await this.alerts.watches(
      tx,
      looks.map(({ kind, seeing: { sensor } }) => ({ sensor, quantity: sensor.quantity, kind })),
    );
    const folded: FoldedWatch[] = [];
    for (const look of looks) {
      const { sensor } = look.seeing;
      const watch = watches.find(({ sensorId, kind }) => sensorId === sensor.id && kind === look.kind);
      const due = watch === undefined ? null : await this.due(tx, look, watch);
      if (watch !== undefined && due !== null) folded.push(await this.fold(tx, look, watch, due));
    }
    return folded;
  }

  private hoursLook(tx: Tx, seeing: Seeing): Look {
    return {
      kind: 'lightShort',
      seeing,
      judgesFrom: seeing.sensor.placedAt ?? 0,
      ruleOf: async (days) => {
        const planned = await this.planned(tx, seeing.shelfId, days);
        return (day) => ruleOfDay(planned, day);
      },
      valueOf: ({ lightHours }) => lightHours,
    };
  }

  private async due(tx: Tx, { kind, seeing, judgesFrom }: Look, watch: Watch): Promise<Due | null> {
    const { sensor, latestAt, newsFrom } = seeing;
    const to = dayBounds(latestAt, sensor.timeZone).start;
    const { lastAt } = watch.state;
    if (lastAt !== null && (newsFrom > lastAt || newsFrom < judgesFrom)) {
      return to > lastAt ? { from: lastAt + 1, to, isAnew: false } : null;
    }
    const around = await this.alerts.episodesAround(tx, watch.id, newsFrom);
    const { at } = restartFrom(patience[kind], around, newsFrom);
    return { from: Math.max(at, judgesFrom), to, isAnew: true };
  }

  private async fold(tx: Tx, look: Look, watch: Watch, { from, to, isAnew }: Due): Promise<FoldedWatch> {
    const { sensor, latestAt: newestAt } = look.seeing;
    const days = (await this.looks.lightDays(tx, sensor.id, from, to)).filter(
      ({ startAt }) => startAt >= look.judgesFrom,
    );
    const ruleOf = await look.ruleOf(days);
    let state: AlertState = isAnew ? idleState : watch.state;
    const changes: EpisodeChange[] = [];
    for (const day of days) {
      const value = look.valueOf(day);
      if (value === null) continue;
      const { times, values, qualities } = lightDays([{ ...day, value }], LEAST_COVERAGE);
      const step = advanceSeries(ruleOf(day), noLamps, state, times, values, qualities);
      state = step.state;
      changes.push(...step.changes);
    }
    const outcome = outcomeOf(changes);
    if (isAnew) {
      const found = outcome.episodes.map(({ beganAt }) => beganAt);
      await this.alerts.removeEpisodes(tx, watch.id, from, found);
    }
    return { watch, sensor, state: { ...state, lastAt: to }, newestAt, ...outcome };
  }

  private async planned(tx: Tx, shelfId: string, days: readonly DayOfLight[]): Promise<LampInterval[]> {
    const [first, last] = [days[0], days.at(-1)];
    if (first === undefined || last === undefined) return [];
    const plans = await this.sources.plannedLamps(
      tx,
      [shelfId],
      new Date(first.startAt),
      new Date(last.endAt),
    );
    return plans.get(shelfId) ?? [];
  }
}

function sumLook(seeing: Seeing, wanted: WantedLight | undefined): Look[] {
  if (wanted === undefined) return [];
  const { placedAt, quantity, luxPerUmol } = seeing.sensor;
  const rule = lightSumShortRule(wanted.leastMolM2D);
  return [
    {
      kind: 'lightSumShort',
      seeing,
      judgesFrom: Math.max(placedAt ?? 0, Date.parse(wanted.since)),
      ruleOf: async () => () => rule,
      valueOf: ({ integralMs }) => dliMolM2(integralMs, quantity, luxPerUmol),
    },
  ];
}

function seeingOf(sensor: SensorOnRoad): Seeing[] {
  const { shelfId, lightThreshold, latestAt, unjudgedFrom, expectedIntervalS } = sensor;
  if (shelfId === null || lightThreshold === null || latestAt === null || unjudgedFrom === null) return [];
  // The day before changes too when what comes closes the gap over midnight.
  return [{ sensor, shelfId, latestAt, newsFrom: unjudgedFrom - maxGapMs(expectedIntervalS) }];
}
