import { usualUrgency } from '@shared/alerts/alert-defaults';
import { lampPlan, type LampInterval } from '@shared/alerts/lamp-plan';
import { wouldHaveOpened, type PastOpenings } from '@shared/alerts/would-have-opened';
import type { ObservationColumns } from '@shared/alerts/alert-state';
import type { Quantity } from '@shared/climate/quantity';
import type { RangeTrial, RangeUrgency, WantedRange } from '@shared/contracts/rooms';
import { maxGapMs } from '@shared/series/expected-interval';
import { qualityLevel } from '@shared/series/quality-tests';
import type { TimeWindow } from '@shared/series/series';
import type { Clock } from '../clock';
import type { Transactions, Tx } from '../database/transactions';
import type { FlaggedSample } from '../readings/reading-store';
import { rulesOfRange } from './range-rules';

/** A range to try. */
export type TriedRange = Pick<
  WantedRange,
  'quantity' | 'lampsOn' | 'lampsOff' | 'holdMinutes' | 'clearingMargin'
> & {
  readonly urgency?: RangeUrgency | undefined;
};

/** A sensor's time on the shelf. */
export interface TrialSensor {
  readonly sensorId: string;
  readonly expectedIntervalS: number;
  readonly from: number;
  readonly to: number;
  /** Readings in that time. */
  readonly count: number;
}

/** What a trial needs of other areas. */
export interface TrialSources {
  requireShelf(roomId: string, shelfId: string): Promise<void>;
  sensorsOn(tx: Tx, shelfId: string, quantity: Quantity, from: number, to: number): Promise<TrialSensor[]>;
  /** Readings or computed points in order, failed ones included. */
  samples(tx: Tx, sensor: TrialSensor, quantity: Quantity): Promise<FlaggedSample[]>;
  plannedLamps(
    tx: Tx,
    shelfIds: readonly string[],
    from: Date,
    to: Date,
  ): Promise<Map<string, LampInterval[]>>;
}

const DAY_MS = 86_400_000;
const DAYS = 14;
/** More readings would make a person wait who only moves a limit. */
const MOST_READINGS = 60_000;
/** Before the window, so that what was under way at its start is known. */
const LEAD_MS = 2 * DAY_MS;
const MOST_EPISODES = 100;

/** Tries a wanted range on the readings of the last days, before anybody sets it. */
export class RangeTrialService {
  constructor(
    private readonly transactions: Transactions,
    private readonly sources: TrialSources,
    private readonly now: Clock,
  ) {}

  /**
   * What a range would have done.
   *
   * @param roomId - Whose.
   * @param shelfId - Of which shelf.
   * @param range - The range.
   * @returns How often and how long alerts would have been open, over all sensors of the shelf.
   * @throws RequestProblem 404 when the room has no such shelf.
   */
  async try(roomId: string, shelfId: string, range: TriedRange): Promise<RangeTrial> {
    await this.sources.requireShelf(roomId, shelfId);
    const tx = this.transactions.plain;
    const now = this.now().getTime();
    const days = await this.days(tx, shelfId, range.quantity, now);
    const window = { from: now - days * DAY_MS, to: now };
    const from = window.from - LEAD_MS;
    const lamps = await this.sources.plannedLamps(
      tx,
      [shelfId],
      new Date(from - LEAD_MS),
      new Date(now + DAY_MS),
    );
    const context = lampPlan(lamps.get(shelfId) ?? []);
    const sides: [PastOpenings[], PastOpenings[]] = [[], []];
    let coveredMs = 0;
    for (const sensor of await this.sources.sensorsOn(tx, shelfId, range.quantity, from, now)) {
      const readings = columnsOf(await this.sources.samples(tx, sensor, range.quantity));
      const rules = rulesOfRange(
        { ...range, urgency: range.urgency ?? usualUrgency(range.quantity) },
        sensor.expectedIntervalS,
      );
      rules.forEach((rule, side) => sides[side]?.push(wouldHaveOpened(rule, context, readings, window)));
      coveredMs = Math.max(coveredMs, coveredWithin(readings, maxGapMs(sensor.expectedIntervalS), window));
    }
    const [above, below] = sides;
    return {
      days,
      above: summed(above),
      below: summed(below),
      episodes: spansOf([...above, ...below]),
      coverage: coveredMs / (window.to - window.from),
    };
  }

  private async days(tx: Tx, shelfId: string, quantity: Quantity, now: number): Promise<number> {
    const sensors = await this.sources.sensorsOn(tx, shelfId, quantity, now - DAYS * DAY_MS, now);
    const count = sensors.reduce((sum, sensor) => sum + sensor.count, 0);
    return Math.max(1, Math.min(DAYS, Math.floor((DAYS * MOST_READINGS) / Math.max(1, count))));
  }
}

function columnsOf(samples: readonly FlaggedSample[]): ObservationColumns {
  return {
    times: samples.map(({ at }) => at),
    values: samples.map(({ value }) => value),
    qualities: samples.map(({ flags }) => qualityLevel(flags)),
  };
}

/** Time of the window that lies between readings near enough to each other [ms]. */
function coveredWithin({ times }: ObservationColumns, gapMs: number, { from, to }: TimeWindow): number {
  let covered = 0;
  for (let index = 1; index < times.length; index += 1) {
    const [before = 0, at = 0] = [times[index - 1], times[index]];
    if (at - before <= gapMs) covered += Math.max(0, Math.min(at, to) - Math.max(before, from));
  }
  return covered;
}

function summed(openings: readonly PastOpenings[]): RangeTrial['above'] {
  const episodes = openings.flatMap((of) => of.episodes);
  return {
    count: episodes.length,
    totalMs: openings.reduce((sum, { totalMs }) => sum + totalMs, 0),
    urgentCount: episodes.filter(({ urgency }) => urgency === 'goNow').length,
  };
}

function spansOf(openings: readonly PastOpenings[]): RangeTrial['episodes'] {
  return openings
    .flatMap(({ episodes }) => episodes)
    .sort((a, b) => a.beganAt - b.beganAt)
    .slice(-MOST_EPISODES)
    .map(({ beganAt, endedAt }) => ({
      beganAt: new Date(beganAt).toISOString(),
      endedAt: endedAt === null ? null : new Date(endedAt).toISOString(),
    }));
}
