import { advanceSeries } from '@shared/alerts/alert-machine';
import { idleState, type AlertState } from '@shared/alerts/alert-state';
import { lightDays } from '@shared/alerts/derived-series';
import type { EpisodeChange } from '@shared/alerts/episode';
import { lampPlan, type LampInterval } from '@shared/alerts/lamp-plan';
import { restartFrom } from '@shared/alerts/restart-from';
import { maxGapMs } from '@shared/series/expected-interval';
import { dayBounds } from '@shared/series/room-days';
import type { Tx } from '../database/transactions';
import type { SensorOnRoad } from '../readings/reading-store';
import type { AlertSources } from './alert-evaluation-service';
import type { AlertStore, Watch } from './alert-store';
import { outcomeOf, type FoldedWatch } from './episode-keeper';
import { LIGHT_COVERAGE, ruleOfDay } from './light-day-rule';
import type { DayOfLight, SecondLookStore } from './second-look-store';

interface Due {
  readonly sensor: SensorOnRoad;
  readonly watch: Watch;
  /** Days that end from here on are judged [ms]. */
  readonly from: number;
  /** End of the last finished day [ms]. */
  readonly to: number;
  readonly isAnew: boolean;
}

/** Days have one limit each and no lamps to follow. */
const noLamps = lampPlan([]);

/** Judges the light of a room's day against what was planned, once the day is over. */
export class LightLookService {
  constructor(
    private readonly alerts: AlertStore,
    private readonly looks: SecondLookStore,
    private readonly plannedLamps: AlertSources['plannedLamps'],
  ) {}

  /**
   * Looks at light sensors.
   *
   * @param tx - Holding the sensors' locks.
   * @param sensors - Any sensors; those on shelves that see light are looked at.
   * @returns What the watches came to.
   */
  async lookAt(tx: Tx, sensors: readonly SensorOnRoad[]): Promise<FoldedWatch[]> {
    const seeing = sensors.filter(
      ({ shelfId, lightThreshold, latestAt, unjudgedFrom }) =>
        shelfId !== null && lightThreshold !== null && latestAt !== null && unjudgedFrom !== null,
    );
    if (seeing.length === 0) return [];
    const watches = await this.alerts.watches(
      tx,
      seeing.map((sensor) => ({ sensor, quantity: sensor.quantity, kind: 'lightShort' as const })),
    );
    const folded: FoldedWatch[] = [];
    for (const sensor of seeing) {
      const watch = watches.find(({ sensorId, kind }) => sensorId === sensor.id && kind === 'lightShort');
      const due = watch === undefined ? null : await this.due(tx, sensor, watch);
      if (due !== null) folded.push(await this.fold(tx, due));
    }
    return folded;
  }

  private async due(tx: Tx, sensor: SensorOnRoad, watch: Watch): Promise<Due | null> {
    const { unjudgedFrom, latestAt, timeZone, expectedIntervalS } = sensor;
    if (unjudgedFrom === null || latestAt === null) return null;
    // The day before changes too when what comes closes the gap over midnight.
    const newsFrom = unjudgedFrom - maxGapMs(expectedIntervalS);
    const to = dayBounds(latestAt, timeZone).start;
    const { lastAt } = watch.state;
    if (lastAt !== null && newsFrom > lastAt) {
      return to > lastAt ? { sensor, watch, from: lastAt + 1, to, isAnew: false } : null;
    }
    const around = await this.alerts.episodesAround(tx, watch.id, newsFrom);
    const { at } = restartFrom(ruleOfDay([], { startAt: 0, endAt: 0 }), around, newsFrom);
    return { sensor, watch, from: at, to, isAnew: true };
  }

  private async fold(tx: Tx, { sensor, watch, from, to, isAnew }: Due): Promise<FoldedWatch> {
    const days = (await this.looks.lightDays(tx, sensor.id, from, to)).filter(
      ({ startAt }) => startAt >= (sensor.placedAt ?? 0),
    );
    const planned = await this.planned(tx, sensor, days);
    let state: AlertState = isAnew ? idleState : watch.state;
    const changes: EpisodeChange[] = [];
    for (const day of days) {
      const { times, values, qualities } = lightDays([day], LIGHT_COVERAGE);
      const step = advanceSeries(ruleOfDay(planned, day), noLamps, state, times, values, qualities);
      state = step.state;
      changes.push(...step.changes);
    }
    const outcome = outcomeOf(changes);
    if (isAnew) {
      const found = outcome.episodes.map(({ beganAt }) => beganAt);
      await this.alerts.removeEpisodes(tx, watch.id, from, found);
    }
    return { watch, sensor, state: { ...state, lastAt: to }, newestAt: sensor.latestAt ?? to, ...outcome };
  }

  private async planned(
    tx: Tx,
    { shelfId }: SensorOnRoad,
    days: readonly DayOfLight[],
  ): Promise<LampInterval[]> {
    const [first, last] = [days[0], days.at(-1)];
    if (first === undefined || last === undefined || shelfId === null) return [];
    const plans = await this.plannedLamps(tx, [shelfId], new Date(first.startAt), new Date(last.endAt));
    return plans.get(shelfId) ?? [];
  }
}
